import { codeList, codeTable, codeTables, standardCode } from '../schedule/code-book.ts';
import { codeText, verifyText } from '../schedule/code-text.ts';
import type { TextLine } from '../schedule/text-line.ts';
import { verifyBook } from '../schedule/verify-book.ts';
import { codesOf, openCode } from '../tables/open-family.ts';
import { localTables, ownTables } from './tables-on-disk.ts';

export interface CodeBookOptions {
  readonly tables?: string;
  readonly verify?: boolean;
}

/** What `codes` prints, as data and as lines. */
export function codeBook(
  id: string | undefined,
  table: string | undefined,
  { tables, verify }: CodeBookOptions,
): { readonly data: Readonly<Record<string, unknown>>; readonly lines: () => TextLine[] } {
  const source = ownTables();
  const local = tables === undefined ? undefined : localTables(tables);
  if (verify === true) {
    const book = verifyBook(openCode(source, id ?? standardCode, local), table ?? null);
    return { data: { ...book }, lines: () => verifyText(book) };
  }
  const opened = (code: string) => openCode(source, code, local);
  const book =
    id === undefined
      ? codeList(codesOf(source).map((code) => openCode(source, code)))
      : table === undefined
        ? codeTables(opened(id))
        : codeTable(opened(id), table);
  return { data: { ...book }, lines: () => codeText(book) };
}
