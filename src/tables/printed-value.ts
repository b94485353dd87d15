import type { NominalSize, SizeSeries } from '../units/nominal-size.ts';
import { loadOf } from '../units/quantity.ts';
import { type ColumnUnit, dimensionOf, factorOf } from './column-unit.ts';
import type { CellValue } from './table.ts';

/** A printed value in the units of the core, or a sentence that says why it is none. */
export type Converted = { readonly value: CellValue } | { readonly wrong: string };

export function convert(printed: unknown, unit: ColumnUnit, series: SizeSeries): Converted {
  if (printed === null || printed === 'NP' || printed === 'NL' || printed === 'NA') return { value: printed };
  const dimension = dimensionOf(unit);
  if (dimension === 'size') {
    const size = typeof printed === 'string' ? sizeIn(series, printed) : undefined;
    return size === undefined
      ? { wrong: `is ${show(printed)}, expected a size of the code's series` }
      : { value: size };
  }
  if (unit === '1:n') {
    const run = typeof printed === 'string' ? slopeRun(printed) : undefined;
    return run === undefined ? { wrong: `is ${show(printed)}, expected a slope such as "1:50"` } : { value: 1 / run };
  }
  if (typeof printed !== 'number' || !Number.isFinite(printed) || printed < 0)
    return { wrong: `is ${show(printed)}, expected a number in ${unit}, "NP", "NL", "NA" or null` };
  if (dimension === 'count' && !Number.isInteger(printed)) return { wrong: `is ${printed}, expected a whole number` };
  if (dimension === 'load') return { value: loadOf(printed) };
  return { value: Number((printed * factorOf(unit)).toPrecision(exactDigits)) };
}

/** Printed figures have few digits: what multiplying by an inch or a foot adds behind these is noise, and `<=` would see it. */
const exactDigits = 12;

/** The 50 of `1:50`; undefined for anything else. */
export function slopeRun(text: string): number | undefined {
  const run = /^1:(\d+(?:\.\d+)?)$/.exec(text)?.[1];
  return run === undefined || Number(run) === 0 ? undefined : Number(run);
}

/** A label of the series, also typed without the fraction signs: `1 1/2 in`. */
export function sizeIn(series: SizeSeries, text: string): NominalSize | undefined {
  if (series.has(text)) return text as NominalSize;
  return text.includes('/') ? series.sizes.find(({ label }) => plainLabel(label) === text)?.label : undefined;
}

const fractions: Readonly<Record<string, string>> = { '¼': '1/4', '½': '1/2', '¾': '3/4', '⅛': '1/8' };

/** `1½ in` as it is typed on a plain keyboard: `1 1/2 in`. */
export const plainLabel = (label: string): string =>
  label.replace(
    /(\d?)([¼½¾⅛])/g,
    (_, whole: string, sign: string) => `${whole === '' ? '' : `${whole} `}${fractions[sign]}`,
  );

export const show = (value: unknown): string => (value === undefined ? 'missing' : JSON.stringify(value));
