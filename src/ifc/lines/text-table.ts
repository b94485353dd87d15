import { NameTable } from './name-table.ts';
import { plainText } from './plain-text.ts';

/** Texts longer than this are seldom said twice. */
export const longestRemembered = 64;

/** Short texts of a file by their bytes. A text with escapes is odd: it is decoded each time, so that it is counted. */
export const textTable = (b: Uint8Array): NameTable<null> =>
  new NameTable(b, (from, to) => {
    const plain = plainText(b, from, to);
    return { name: plain ?? '', meaning: null, isOdd: plain === null };
  });
