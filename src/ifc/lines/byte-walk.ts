import { readNumbers } from './number.ts';
import { plainText } from './plain-text.ts';

/** Offset of the quote that closes a string opened at `open`; a doubled quote is part of the string. */
export function endOfQuoted(b: Uint8Array, open: number): number {
  const n = b.length;
  for (let i = open + 1; i < n; i++) {
    if (b[i] === 39) {
      if (b[i + 1] !== 39) return i;
      i++;
    }
  }
  return n;
}

/** Past a comment that begins here; past the one byte where none does. */
export function pastComment(b: Uint8Array, at: number): number {
  if (b[at + 1] !== 42) return at + 1;
  for (let i = b.indexOf(47, at + 3); i > 0; i = b.indexOf(47, i + 1)) if (b[i - 1] === 42) return i + 1;
  return b.length;
}

export const isLetter = (c: number | undefined): boolean =>
  c !== undefined && ((c >= 65 && c <= 90) || (c >= 97 && c <= 122));

/** Past so many arguments and the commas behind them; in front of the closing bracket where there are fewer. */
export function pastArguments(b: Uint8Array, from: number, count: number): number {
  const n = b.length;
  let i = from;
  let left = count;
  let depth = 0;
  for (; left > 0 && i < n; i++) {
    const c = b[i]!;
    if (c === 39) i = endOfQuoted(b, i);
    else if (c === 44) {
      if (depth === 0) left--;
    } else if (c === 40) depth++;
    else if (c === 41) {
      if (depth === 0) break;
      depth--;
    } else if (c === 47) i = pastComment(b, i) - 1;
    else if (c === 59) break;
  }
  return i;
}

export interface TypedList {
  readonly type: string;
  readonly numbers: number[];
}

/** Typed lists of numbers between two offsets. */
export function typedListsBetween(b: Uint8Array, from: number, end: number): TypedList[] {
  const found: TypedList[] = [];
  let i = from;
  while (i < end) {
    if (!isLetter(b[i])) {
      i++;
      continue;
    }
    const start = i;
    while (i < end && b[i] !== 40) i++;
    const numbers: number[] = [];
    found.push({ type: (plainText(b, start, i) ?? '').trim().toUpperCase(), numbers });
    i = readNumbers(b, i + 1, numbers);
    // The list within the brackets has its own: its end is the bracket that closes it.
    while (i < end && b[i] !== 41) i++;
  }
  return found;
}
