import type { NominalSize, SizeSeries } from '../units/nominal-size.ts';
import { loadOf } from '../units/quantity.ts';
import type { CellValue } from './table.ts';

export type Dimension =
  | 'key'
  | 'text'
  | 'size'
  | 'load'
  | 'load-by-trap'
  | 'length'
  | 'slope'
  | 'flow'
  | 'speed'
  | 'angle'
  | 'count'
  | 'factor'
  | 'area'
  | 'share';

const foot = 0.3048;
const inch = 0.0254;
/** US gallon a minute in litres a second. */
const gallonPerMinute = 3.785411784 / 60;

/** Printed units, and what one of them is inside: sixtieths, metres, m/m, l/s, degrees, square metres. */
const units = {
  key: { dimension: 'key' },
  text: { dimension: 'text' },
  size: { dimension: 'size' },
  fu: { dimension: 'load' },
  dfu: { dimension: 'load' },
  du: { dimension: 'load' },
  'fu by trap': { dimension: 'load-by-trap' },
  'dfu by trap': { dimension: 'load-by-trap' },
  m: { dimension: 'length', factor: 1 },
  mm: { dimension: 'length', factor: 0.001 },
  ft: { dimension: 'length', factor: foot },
  in: { dimension: 'length', factor: inch },
  '1:n': { dimension: 'slope' },
  'in/ft': { dimension: 'slope', factor: 1 / 12 },
  '%': { dimension: 'slope', factor: 0.01 },
  'l/s': { dimension: 'flow', factor: 1 },
  gpm: { dimension: 'flow', factor: gallonPerMinute },
  'm/s': { dimension: 'speed', factor: 1 },
  'm2/s': { dimension: 'factor', factor: 1 },
  deg: { dimension: 'angle', factor: 1 },
  count: { dimension: 'count', factor: 1 },
  'pipe sizes': { dimension: 'factor', factor: 1 },
  factor: { dimension: 'factor', factor: 1 },
  'fu per l/s': { dimension: 'factor', factor: 1 },
  'dfu per gpm': { dimension: 'factor', factor: 1 / gallonPerMinute },
  litres: { dimension: 'factor', factor: 1 },
  'litres per fu': { dimension: 'factor', factor: 1 },
  'litres per l/s': { dimension: 'factor', factor: 1 },
  in2: { dimension: 'area', factor: inch * inch },
  mm2: { dimension: 'area', factor: 1e-6 },
  share: { dimension: 'share', factor: 1 },
} as const satisfies Record<string, { readonly dimension: Dimension; readonly factor?: number }>;

export type ColumnUnit = keyof typeof units;
export const isColumnUnit = (word: string): word is ColumnUnit => Object.hasOwn(units, word);
export const columnUnits = (): readonly string[] => Object.keys(units);
export const dimensionOf = (unit: ColumnUnit): Dimension => units[unit].dimension;

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
  const known: { readonly dimension: Dimension; readonly factor?: number } = units[unit];
  return { value: Number((printed * (known.factor ?? 1)).toPrecision(exactDigits)) };
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
