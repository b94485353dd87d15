/** Outside diameters of pipe by material and standard, millimetres; sizes by DN as every code's series lists them. */
export type PipeDimensions = readonly DimensionSeries[];

export interface DimensionSeries {
  readonly id: string;
  readonly title: string;
  readonly standard: string;
  readonly rows: readonly DimensionRow[];
}

export interface DimensionRow {
  readonly dn: number;
  readonly outerMm: number;
  readonly innerMm: number | null;
  /** Largest outside diameter of a fitting's hub; null where no source gives it. */
  readonly fittingMm: number | null;
}
