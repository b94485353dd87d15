import { inchesOf, inchMm } from '../units/inches.ts';

/**
 * The length in millimetres that a text such as `3"`, `1 1/2 in`, `DN 80`, `Ø 82,5` or `110 mm` says. `nominal` is true
 * where the text itself says that it is a nominal size. null: the text says none, or more than one.
 */
export function lengthOfText(text: string): { readonly mm: number; readonly nominal: boolean } | null {
  const found = [...inches(text), ...nominalDiameters(text)];
  const lengths = found.length > 0 ? found : diameters(text);
  const first = lengths[0];
  if (first === undefined || lengths.some(({ mm }) => Math.abs(mm - first.mm) > 0.01)) return null;
  return first;
}

interface Said {
  readonly mm: number;
  readonly nominal: boolean;
}

/** `3"`, `1 1/2"`, `1-1/2 in`, `1½ inch`, `0.75 in`. */
function inches(text: string): Said[] {
  const pattern =
    /(?<![\d.,/])(?:(\d{1,2}(?:[.,]\d{1,3})?)(?:[ -]?(?:(\d)\/(\d)|([¼½¾⅜⅝])))?|(\d)\/(\d)|([¼½¾⅜⅝]))\s{0,2}(?:"|”|″|''|inch(?:es)?\b|in\b|po\b)/giu;
  return [...text.matchAll(pattern)].map(([, whole, top, bottom, sign, soloTop, soloBottom, soloSign]) => {
    return { mm: inchesOf(whole, top ?? soloTop, bottom ?? soloBottom, sign ?? soloSign) * inchMm, nominal: true };
  });
}

const nominalDiameters = (text: string): Said[] =>
  [...text.matchAll(/(?<![\p{L}\d])(?:DN|NW)[ _-]?(\d{2,4})(?![\d.,/])/giu)].map(([, mm]) => ({
    mm: Number(mm),
    nominal: true,
  }));

/** `Ø80`, `d 110`, `110 mm`, or the bare number alone. */
function diameters(text: string): Said[] {
  const marked = [...text.matchAll(/[ØøΦφ⌀]\s?(\d{2,4}(?:[.,]\d{1,2})?)(?![\d/])/gu)];
  const measured = [...text.matchAll(/(?<![\d.,xX/])(\d{2,4}(?:[.,]\d{1,2})?)\s?mm\b/gu)];
  const bare = /^\s*(\d{2,4}(?:[.,]\d{1,2})?)\s*$/u.exec(text);
  const hits = marked.length > 0 ? marked : measured.length > 0 ? measured : bare === null ? [] : [bare];
  return hits.map((hit) => ({ mm: decimal(hit[1] ?? ''), nominal: false }));
}

const decimal = (text: string): number => Number(text.replace(',', '.'));
