/** Names longer than this are cut before they are searched: a size stands near the front. */
const longest = 200;

const inches =
  /(?<![\d.,/])(?:\d{1,2}(?:[.,]\d{1,3})?(?:[ -]?(?:\d\/\d|[¼½¾⅜⅝]))?|\d\/\d|[¼½¾⅜⅝])\s{0,2}(?:"|”|″|''|inch(?:es)?\b|in\b)/iu;
const nominal = /(?<![\p{L}\d])(?:DN|NW)[ _-]?\d{2,4}(?![\d.,])/iu;
const marked = /[ØøΦφ⌀]\s?\d{2,4}(?:[.,]\d{1,2})?(?!\d)/u;
const millimetres = /(?<![\d.,/]|[xX×]\s{0,2})\d{2,4}(?:[.,]\d{1,2})?\s?mm\b(?!\s?[xX×/])/u;
/** `Circ_0.4x0.06`: a round section in metres, bore or outside by wall. */
const roundSection = /(?<!\p{L})Circ\w{0,10}?_(0?\.\d{1,4})\s?x\s?0?\.\d{1,4}/iu;
/** Sizes of plastic drains that are written bare in type names: `82.5`, `110`. */
const bare = /^\s*(?:32|40|50|56|58|63|75|82[.,]5|90|110|125|160|200|250|315|400)\s*$/u;

/**
 * The piece of a name that claims a size, such as `DN100`, `3"`, `Ø80`, `110 mm`; null where nothing does. Of a bare
 * number only a whole type name (`isType`) is believed: occurrences are often numbered.
 */
export function sizeInName(name: string, isType: boolean): string | null {
  const text = name.length > longest ? name.slice(0, longest) : name;
  if (!/[\d¼½¾⅜⅝]/u.test(text)) return null;
  const section = roundSection.exec(text);
  if (section !== null) return `Ø${Number((Number(section[1]) * 1000).toFixed(1))}`;
  const found = nominal.exec(text) ?? inches.exec(text) ?? marked.exec(text) ?? millimetres.exec(text);
  if (found !== null) return found[0].trim();
  return isType && bare.test(text) ? text.trim() : null;
}
