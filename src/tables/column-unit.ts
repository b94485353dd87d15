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
/** What one of the printed unit is inside; 1 where it is not a plain multiple. */
export function factorOf(unit: ColumnUnit): number {
  const { factor = 1 }: { readonly dimension: Dimension; readonly factor?: number } = units[unit];
  return factor;
}
