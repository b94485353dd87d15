/** Why no end was found; see `endOfStatement`. */
export const cutInInstance = -1;
export const cutInString = -2;
export const cutInComment = -3;

/** What a scan notes on its way. In `lineGuided` scans a string ends before a line that begins an instance. */
export interface StringWatch {
  readonly lineGuided: boolean;
  readonly openStrings: number[];
  readonly oddStrings: number[];
}

const semicolon = 59;
const quote = 39;
const slash = 47;
const equals = 61;
const hash = 35;
const newLine = 10;
const carriageReturn = 13;
const high = 0x80808080 | 0;
const ones = 0x01010101;
const isPlain = Uint8Array.from({ length: 256 }, (_, c) => ([semicolon, quote, slash, equals].includes(c) ? 0 : 1));

/**
 * Offset of the `;` that ends the statement, or of a `#` that begins another instance before any `;` came, or one of
 * the negative reasons when the bytes end first. `view` shows the same memory as `b`: most of a model is numbers, and
 * four bytes without any of `; ' / =` are passed in one step.
 */
export function endOfStatement(b: Uint8Array, view: DataView, from: number, watch: StringWatch): number {
  const n = b.length;
  const lastWord = n - 4;
  let i = from;
  while (i < n) {
    while (i <= lastWord) {
      const x = view.getInt32(i, true);
      const p = x ^ 0x3b3b3b3b;
      // A quote and a slash differ in one bit only.
      const q = (x | 0x08080808) ^ 0x2f2f2f2f;
      const s = x ^ 0x3d3d3d3d;
      // A byte of `y` is zero exactly when (y - 0x01) & ~y has its high bit set.
      if ((((p - ones) & ~p) | ((q - ones) & ~q) | ((s - ones) & ~s)) & high) break;
      i += 4;
    }
    while (i < n && isPlain[b[i] as number] === 1) i++;
    if (i >= n) break;
    const c = b[i] as number;
    if (c === semicolon) return i;
    if (c === quote) {
      const end = endOfString(b, i, watch);
      if (end < 0) return cutInString;
      if (b[end] === hash) return end;
      i = end;
    } else if (c === slash) {
      if (b[i + 1] === 42) {
        i = endOfComment(b, i);
        if (i < 0) return cutInComment;
      }
    } else if (c === equals) {
      const start = instanceBefore(b, i, from);
      if (start >= 0) return start;
    }
    i++;
  }
  return cutInInstance;
}

/** Offset of the closing quote; of the `#` of an instance that a line-guided scan met first; -1 at the end of bytes. */
export function endOfString(b: Uint8Array, from: number, watch: StringWatch): number {
  const n = b.length;
  for (let i = from + 1; i < n; i++) {
    const c = b[i];
    if (c === quote) return i;
    if ((c === newLine || c === carriageReturn) && beginsInstance(b, i + 1)) {
      if (watch.lineGuided) {
        watch.openStrings.push(from);
        return i + 1;
      }
      watch.oddStrings.push(from);
    }
  }
  return -1;
}

/** Offset of the `/` that closes a comment opened at `from`; -1 at the end of bytes. */
export function endOfComment(b: Uint8Array, from: number): number {
  for (let i = b.indexOf(slash, from + 3); i > 0; i = b.indexOf(slash, i + 1)) if (b[i - 1] === 42) return i;
  return -1;
}

function beginsInstance(b: Uint8Array, at: number): boolean {
  if (b[at] !== hash) return false;
  let i = at + 1;
  while (isDigit(b[i])) i++;
  if (i === at + 1) return false;
  while (b[i] === 32) i++;
  return b[i] === equals;
}

/** Offset of the `#` of `#12 =` when its `=` stands at `at`, not before `from`; -1 when there is no such thing. */
function instanceBefore(b: Uint8Array, at: number, from: number): number {
  let i = at - 1;
  while (i > from && (b[i] as number) <= 32) i--;
  const digits = i;
  while (i > from && isDigit(b[i])) i--;
  return i < digits && b[i] === hash ? i : -1;
}

export const isDigit = (c: number | undefined): boolean => c !== undefined && c >= 48 && c <= 57;
