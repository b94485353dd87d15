import type { Trust } from './table.ts';

/** Outside diameters of pipe by material and standard, millimetres; sizes by DN as every code's series lists them. */
export type PipeDimensions = readonly DimensionSeries[];

export interface DimensionSeries {
  readonly id: string;
  readonly title: string;
  readonly standard: string;
  readonly region: 'north-america' | 'europe';
  /** How the diameters are known, in plain words, and how far the fittings are to be trusted. */
  readonly seen: string;
  readonly fittingTrust: Trust;
  readonly rows: readonly DimensionRow[];
}

export interface DimensionRow {
  /** As it is sold: `3 in`, `110 mm`, `DN 100`. */
  readonly size: string;
  /** DN it counts as; of European pipe the largest DN of EN 12056-2, Table 1, whose least bore it reaches. */
  readonly dn: number;
  readonly outerMm: number;
  readonly innerMm: number | null;
  /** Largest outside diameter of a fitting's hub; null where no source gives it. */
  readonly fittingMm: number | null;
  readonly trust: Trust;
}
