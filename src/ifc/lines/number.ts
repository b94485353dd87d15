import { plainText } from './plain-text.ts';

const tenTo: readonly number[] = Array.from({ length: 23 }, (_, k) => 10 ** k);

/** Where the last `readNumber` stopped: behind the number. */
let numberEnd = 0;

/**
 * The number that begins at `at`, exactly as JavaScript would read its text. Up to fifteen digits and a power of ten
 * up to 22 are exact in doubles, so one multiplication or division rounds right; the rest goes the long way.
 */
export function readNumber(b: Uint8Array, at: number): number {
  let i = at;
  let c = b[i] as number;
  const isNegative = c === 45;
  if (isNegative || c === 43) c = b[++i] as number;
  const first = i;
  let mantissa = 0;
  let scale = 0;
  while (c >= 48 && c <= 57) {
    mantissa = mantissa * 10 + c - 48;
    c = b[++i] as number;
  }
  let digits = i - first;
  if (c === 46) {
    const point = i;
    c = b[++i] as number;
    while (c >= 48 && c <= 57) {
      mantissa = mantissa * 10 + c - 48;
      c = b[++i] as number;
    }
    scale = point + 1 - i;
    digits -= scale;
  }
  if (c === 69 || c === 101) {
    c = b[++i] as number;
    const isSmall = c === 45;
    if (isSmall || c === 43) c = b[++i] as number;
    let exponent = 0;
    while (c >= 48 && c <= 57) {
      if (exponent < 100_000) exponent = exponent * 10 + c - 48;
      c = b[++i] as number;
    }
    scale += isSmall ? -exponent : exponent;
  }
  numberEnd = i;
  if (digits > 15 || scale > 22 || scale < -22) return slowNumber(b, at, i);
  const value = scale < 0 ? mantissa / (tenTo[-scale] as number) : mantissa * (tenTo[scale] as number);
  return isNegative ? -value : value;
}

/**
 * Adds the numbers of the argument that begins at `from` to `into`, of nested lists in order; what stands between them
 * is passed over. Returns the offset of the `,` or `)` behind the argument.
 */
export function readNumbers(b: Uint8Array, from: number, into: number[]): number {
  const n = b.length;
  let depth = 0;
  let i = from;
  while (i < n) {
    const c = b[i]!;
    if ((c >= 48 && c <= 57) || c === 45 || c === 43) {
      into.push(readNumber(b, i));
      i = numberEnd > i ? numberEnd : i + 1;
    } else if (c === 44) {
      if (depth === 0) break;
      i++;
    } else if (c === 40) {
      depth++;
      i++;
    } else if (c === 41) {
      if (depth === 0) break;
      depth--;
      i++;
    } else if (c === 35 || c >= 65) {
      // A reference or a word: its digits are no number.
      for (i++; i < n; i++) {
        const d = b[i]!;
        if (d === 44 || d === 40 || d === 41 || d === 59) break;
      }
    } else if (c === 39) i = pastString(b, i);
    else if (c === 59) break;
    else i++;
  }
  return i;
}

function pastString(b: Uint8Array, open: number): number {
  const close = b.indexOf(39, open + 1);
  return close < 0 ? b.length : close + 1;
}

function slowNumber(b: Uint8Array, from: number, to: number): number {
  return Number(plainText(b, from, to) ?? '');
}

const triple = new Float64Array(3);

/** The first three numbers of the argument that begins at `from`, missing ones 0, in one and the same array each time. */
export function readTriple(b: Uint8Array, from: number): Float64Array {
  const n = b.length;
  triple[0] = 0;
  triple[1] = 0;
  triple[2] = 0;
  let depth = 0;
  let i = from;
  for (let k = 0; k < 3 && i < n; ) {
    const c = b[i]!;
    if ((c >= 48 && c <= 57) || c === 45 || c === 43) {
      triple[k++] = readNumber(b, i);
      i = numberEnd > i ? numberEnd : i + 1;
    } else if (c === 40) {
      depth++;
      i++;
    } else if (c === 41) {
      if (--depth <= 0) break;
      i++;
    } else if (c === 59 || c === 35 || c === 39) break;
    else i++;
  }
  return triple;
}
