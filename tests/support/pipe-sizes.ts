/** One nominal size as the notation names it: `3 in` or `DN 80`. */
export interface PipeSize {
  /** As the trade writes it: `1½ in`, `DN 50`. */
  readonly label: string;
  /** The length that a nominal diameter property states, metres: 0.0762 for 3 in, 0.08 for DN 80. */
  readonly nominal: number;
  /** Outer and inner diameter of the pipe, metres. */
  readonly outer: number;
  readonly inner: number;
}

/**
 * PVC-DWV schedule 40: outside diameter and least wall in inches, ASTM D2665 (CSA B181.2: the same outside diameters).
 * 2½ and 5 in are not made in that standard: iron pipe sizes of ASME B36.10M, schedule 40. 15 in: ASTM D3034, SDR 35.
 */
const rows: readonly (readonly [inches: number, label: string, dn: number, outerIn: number, wallIn: number])[] = [
  [0.75, '¾', 20, 1.05, 0.113],
  [1.25, '1¼', 32, 1.66, 0.14],
  [1.5, '1½', 40, 1.9, 0.145],
  [2, '2', 50, 2.375, 0.154],
  [2.5, '2½', 65, 2.875, 0.203],
  [3, '3', 80, 3.5, 0.216],
  [4, '4', 100, 4.5, 0.237],
  [5, '5', 125, 5.563, 0.258],
  [6, '6', 150, 6.625, 0.28],
  [8, '8', 200, 8.625, 0.322],
  [10, '10', 250, 10.75, 0.365],
  [12, '12', 300, 12.75, 0.406],
  [15, '15', 375, 15.3, 0.437],
];

const inch = 0.0254;

export function sizeOfInches(inches: number): PipeSize | undefined {
  const row = rows.find(([size]) => size === inches);
  return row && made(row, `${row[1]} in`, Math.round(row[0] * inch * 1e6) / 1e6);
}

/** Sizes that only Europe has: polyethylene pipe by EN 1519, DN by the least bores of EN 12056-2, Table 1. */
const europeanRows: readonly (readonly [dn: number, outerMm: number, innerMm: number])[] = [
  [30, 32, 26],
  [56, 56, 50],
  [60, 63, 57],
  [70, 75, 69],
  [90, 90, 83],
];

export function sizeOfDn(dn: number): PipeSize | undefined {
  const label = `DN ${dn}`;
  const european = europeanRows.find((each) => each[0] === dn);
  if (european !== undefined)
    return { label, nominal: dn / 1000, outer: european[1] / 1000, inner: european[2] / 1000 };
  const row = rows.find((each) => each[2] === dn);
  return row && made(row, label, dn / 1000);
}

const made = (row: (typeof rows)[number], label: string, nominal: number): PipeSize => ({
  label,
  nominal,
  outer: row[3] * inch,
  inner: (row[3] - 2 * row[4]) * inch,
});
