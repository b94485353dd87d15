/** Arrays of character codes by length, filled anew each time: making them costs more than filling them. */
const codesOfLength: number[][] = Array.from({ length: 65 }, (_, length) => Array<number>(length).fill(0));

/** Plain short texts as they stand; null where something must be decoded or the text is long. */
export function plainText(b: Uint8Array, from: number, to: number): string | null {
  const codes = codesOfLength[to - from];
  if (codes === undefined) return null;
  for (let k = 0; k < codes.length; k++) {
    const c = b[from + k]!;
    if (c === 92 || c === 39 || c >= 128) return null;
    codes[k] = c;
  }
  return String.fromCharCode.apply(null, codes);
}
