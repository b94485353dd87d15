export const inchMm = 25.4;

const fractions: Readonly<Record<string, number>> = { '¼': 0.25, '½': 0.5, '¾': 0.75, '⅜': 0.375, '⅝': 0.625 };

/** Inches as texts write them: `1`, `1 1/2`, `1½`, `3/4`, `¾`; the parts that a text lacks are undefined. */
export function inchesOf(
  whole: string | undefined,
  top: string | undefined,
  bottom: string | undefined,
  sign: string | undefined,
): number {
  const part =
    top === undefined || bottom === undefined || bottom === '0'
      ? (fractions[sign ?? ''] ?? 0)
      : Number(top) / Number(bottom);
  return (whole === undefined ? 0 : Number(whole.replace(',', '.'))) + part;
}
