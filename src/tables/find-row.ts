import type { NominalSize, SizeSeries } from '../units/nominal-size.ts';
import { reaches } from './find-size.ts';
import type { Row, Table } from './table.ts';

/** Row whose key is the text; undefined when the table does not list it. */
export const rowNamed = (table: Table, column: string, text: string): Row | undefined =>
  table.rows.find((row) => row.text(column) === text);

/**
 * Rows from the first whose limit in the column holds the amount, in printed order; none past the last. For tables whose
 * rows are steps of load or flow and whose cells say what each takes.
 */
export function rowsHolding(table: Table, column: string, amount: number): readonly Row[] {
  const first = table.rows.findIndex((row) => reaches(row.amount(column).value, amount));
  return first < 0 ? [] : table.rows.slice(first);
}

/**
 * Row for a size, such as a trap. Between printed rows `smaller` takes the next smaller one (lengths), `larger` the next
 * larger (vents, loads). null: outside the table on the side that was asked for.
 */
export function rowAtSize(
  table: Table,
  column: string,
  size: NominalSize,
  between: 'smaller' | 'larger',
  series: SizeSeries,
): Row | null {
  const rank = series.rank(size);
  const ranked = table.rows.flatMap((row) => {
    const { value } = row.size(column);
    return value !== null && series.has(value) ? [{ row, rank: series.rank(value as NominalSize) }] : [];
  });
  const inOrder = ranked.sort((a, b) => a.rank - b.rank);
  return between === 'smaller'
    ? (inOrder.findLast((one) => one.rank <= rank)?.row ?? null)
    : (inOrder.find((one) => one.rank >= rank)?.row ?? null);
}

/** One step down the sizes of the table, past those the user omits; null below its smallest. */
export function oneSizeBelow(
  table: Table,
  size: NominalSize,
  series: SizeSeries,
  omit: ReadonlySet<NominalSize> = new Set(),
): NominalSize | null {
  return table.sizes.findLast((one) => !omit.has(one) && series.rank(one) < series.rank(size)) ?? null;
}

/** One step up the sizes of the table, past those the user omits; null above its largest. */
export function oneSizeAbove(
  table: Table,
  size: NominalSize,
  series: SizeSeries,
  omit: ReadonlySet<NominalSize> = new Set(),
): NominalSize | null {
  return table.sizes.find((one) => !omit.has(one) && series.rank(one) > series.rank(size)) ?? null;
}
