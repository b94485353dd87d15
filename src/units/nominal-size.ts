/** A nominal size as the trade writes it: `1½ in`, `DN 50`. A label, not a length: only a size series orders two. */
export type NominalSize = string & { readonly __nominal: true };
export const nominalSize = (label: string): NominalSize => label as NominalSize;

export interface SeriesSize {
  readonly label: NominalSize;
  /** DN as CONTRACT lists it beside the label. */
  readonly dn: number;
  /** Every length in millimetres that means this size when a model gives a length: nominal inches, DN, soft metric. */
  readonly lengthsMm: readonly number[];
}

/** The sizes a plumbing code knows, smallest first. */
export interface SizeSeries {
  readonly sizes: readonly SeriesSize[];
  /** Position in the series; throws for a label that is not in it (a table and its series disagree: our own fault). */
  rank(size: NominalSize): number;
  has(label: string): boolean;
  larger(a: NominalSize, b: NominalSize): NominalSize;
}

export function sizeSeries(sizes: readonly SeriesSize[]): SizeSeries {
  const ranks = new Map<string, number>(sizes.map(({ label }, rank) => [label, rank]));
  const rank = (size: NominalSize): number => {
    const found = ranks.get(size);
    if (found === undefined) throw new Error(`size ${size} is not in the series`);
    return found;
  };
  return { sizes, rank, has: (label) => ranks.has(label), larger: (a, b) => (rank(a) >= rank(b) ? a : b) };
}
