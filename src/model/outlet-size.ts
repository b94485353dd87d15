import { inchesOf, inchMm } from '../units/inches.ts';
import type { Element, PropertyFact } from './model.ts';
import type { NamesTable } from './names-table.ts';

/** A trap or outlet outside these is a slip or another quantity. */
const least = 15;
const most = 400;
/** Below this a bare number counts inches, from `least` on millimetres. */
const largestInches = 12;

/** Millimetres of the trap, else the outlet, that a property states, occurrence before type; null where none does. */
export function outletSize(element: Element, names: NamesTable): number | null {
  let outlet: number | null = null;
  for (const fact of element.properties) {
    const use = names.propertyUse(fact.name);
    if (use !== 'trap' && use !== 'outlet') continue;
    const mm = millimetres(fact);
    if (mm === null) continue;
    if (use === 'trap') return mm;
    outlet ??= mm;
  }
  return outlet;
}

function millimetres({ name, value, measure }: PropertyFact): number | null {
  if (typeof value === 'string') return within(lengthIn(value));
  if (typeof value !== 'number') return null;
  if (measure === 'length') return within(value * 1000);
  if (/\bmm\b/i.test(name.replaceAll(/[()_[\]]/g, ' '))) return within(value);
  return within(value <= largestInches ? value * inchMm : value);
}

const within = (mm: number | null): number | null =>
  mm !== null && mm >= least && mm <= most ? Math.round(mm * 100) / 100 : null;

/** `1 1/2"`, `1½ in`, `DN 50`, `Ø50`, `50 mm`, or a bare number. null: no length, or a range of two. */
function lengthIn(text: string): number | null {
  const short = text.slice(0, 60).trim();
  const inches =
    /^(?:(\d{1,2}(?:[.,]\d{1,3})?)?[ -]?(?:(\d)\/(\d)|([¼½¾]))?)\s?(?:"|”|″|''|in(?:ch(?:es)?)?|po)\.?$/iu.exec(short);
  if (inches !== null) {
    const [, whole, top, bottom, sign] = inches;
    const value = inchesOf(whole, top, bottom, sign);
    return value > 0 ? value * inchMm : null;
  }
  const metric = /^(?:DN|NW|Ø|⌀|OD|d)?\s?(\d{2,3}(?:[.,]\d{1,2})?)\s?(?:mm)?(?:\s?[øØ])?$/iu.exec(short);
  return metric === null ? null : Number(metric[1]?.replace(',', '.'));
}
