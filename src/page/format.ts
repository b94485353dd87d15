import type { LoadRange, PipeState, SizeRange } from '../schedule/result.ts';
import { frenchPlace } from './words/french-place.ts';
import type { Words } from './words/words.ts';

/** Numbers as the page's language writes them: a point in English, a comma in French; at most `places` decimals. */
export function decimal(words: Words, value: number, places: number): string {
  const text = value.toFixed(places);
  const short = text.includes('.') ? text.replace(/\.?0+$/, '') : text;
  const plain = short === '-0' ? '0' : short;
  return words.language === 'fr' ? plain.replace('.', ',') : plain;
}

/** Millimetres below one metre. */
export const lengthText = (words: Words, metres: number): string =>
  Math.abs(metres) < 1 ? `${decimal(words, metres * 1000, 0)} mm` : `${decimal(words, metres, 2)} m`;

export const slopeText = (words: Words, slope: number): string =>
  slope === 0 ? words.level : `${decimal(words, slope * 100, 2)} % (1:${decimal(words, 1 / Math.abs(slope), 0)})`;

export function loadText(words: Words, { least, most }: LoadRange, unit: string): string {
  const range =
    least === most ? decimal(words, most, 2) : `${decimal(words, least, 2)} ${words.to} ${decimal(words, most, 2)}`;
  return `${range} ${words.unit(unit)}`;
}

export function shortLoad(words: Words, { least, most }: LoadRange, unit: string): string {
  const range = least === most ? decimal(words, most, 2) : `${decimal(words, least, 2)}–${decimal(words, most, 2)}`;
  return `${range} ${words.shortUnit(unit)}`;
}

/** A figure of a table as printed: a number, or that a size is not permitted (NP) or without limit (NL). */
export const limitText = (words: Words, limit: number | string): string =>
  typeof limit === 'number' ? decimal(words, limit, 2) : (words.limits[limit] ?? limit);

/** Nominal sizes as the trade writes them: `4 in`, in French `4 po`. */
export const sizeLabel = (words: Words, label: string): string =>
  words.language === 'fr' ? label.replace(/ in$/, ' po') : label;

/** The same for a size that may be missing. */
export const oneSize = (words: Words, size: { readonly label: string } | null | undefined, missing = '?'): string =>
  size == null ? missing : sizeLabel(words, size.label);

/** What is drawn, and beside it what is needed where that differs or nothing is drawn: `3 in`, `▲ 3 in → 4 in`, `? → 4 in`. */
export function sizesText(words: Words, { modelled, required, verdict }: PipeState): string {
  const drawn = oneSize(words, modelled);
  if (verdict === 'undersized') return `▲ ${drawn} → ${sizeText(words, required)}`;
  return modelled === null && required?.most != null ? `? → ${sizeText(words, required)}` : drawn;
}

/** `4 in`, `2 in to 3 in`; where no size of the table holds it the words say so. */
export function sizeText(words: Words, range: SizeRange | null): string {
  const label = (size: { readonly label: string } | null | undefined): string | undefined =>
    size == null ? undefined : sizeLabel(words, size.label);
  const least = label(range?.least);
  const most = label(range?.most);
  if (most === undefined) return least === undefined ? words.pipe.noSize : `${least} …`;
  return least === undefined || least === most ? most : `${least} ${words.to} ${most}`;
}

/** Where something is printed, in the page's language: `Table 2.4.9.3., row 3 in`. */
export const placeIn = (words: Words, place: string): string => (words.language === 'fr' ? frenchPlace(place) : place);
