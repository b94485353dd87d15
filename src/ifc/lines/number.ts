const tenTo: readonly number[] = Array.from({ length: 23 }, (_, k) => 10 ** k);

/**
 * The number that begins at `at`, exactly as JavaScript would read its text. Up to fifteen digits and a power of ten
 * up to 22 are exact in doubles, so one multiplication or division rounds right; the rest goes the long way.
 */
export function readNumber(b: Uint8Array, at: number): number {
  let i = at;
  let c = b[i] as number;
  const isNegative = c === 45;
  if (isNegative || c === 43) c = b[++i] as number;
  let digits = 0;
  let mantissa = 0;
  let scale = 0;
  while (c >= 48 && c <= 57) {
    if (digits > 0 || c !== 48) digits++;
    mantissa = mantissa * 10 + c - 48;
    c = b[++i] as number;
  }
  if (c === 46) {
    c = b[++i] as number;
    while (c >= 48 && c <= 57) {
      if (digits > 0 || c !== 48) digits++;
      mantissa = mantissa * 10 + c - 48;
      scale--;
      c = b[++i] as number;
    }
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
  if (digits > 15 || scale > 22 || scale < -22) return slowNumber(b, at, i);
  const value = scale < 0 ? mantissa / (tenTo[-scale] as number) : mantissa * (tenTo[scale] as number);
  return isNegative ? -value : value;
}

function slowNumber(b: Uint8Array, from: number, to: number): number {
  let text = '';
  for (let i = from; i < to; i++) text += String.fromCharCode(b[i] as number);
  return Number(text);
}
