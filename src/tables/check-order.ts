import { InputError } from '../findings/input-error.ts';
import type { NominalSize, SizeSeries } from '../units/nominal-size.ts';
import { at } from './read-json.ts';
import type { CellValue, Column, Row } from './table.ts';

/** The directions a file states for itself: columns that never fall or never rise down the page, rows across it. */
export interface StatedOrder {
  readonly rising: readonly string[];
  readonly falling: readonly string[];
  readonly across: 'rising' | null;
  /** Columns whose change starts the order afresh: each stack size has its own run of loads. */
  readonly within: readonly string[];
}

/** Unread cells have no place in an order and are passed over; a misprint or a slip of the typist breaks one. */
export function checkOrder(
  rows: readonly Row[],
  columns: readonly Column[],
  where: string,
  series: SizeSeries,
  order: StatedOrder,
): void {
  const group = (row: Row): string => order.within.map((column) => String(row.printed(column))).join();
  for (const [stated, sign] of [
    [order.rising, 1],
    [order.falling, -1],
  ] as const)
    for (const column of stated) {
      let last: number | null = null;
      let before = '';
      for (const [index, row] of rows.entries()) {
        // The columns that make the groups run on through the whole page.
        if (!order.within.includes(column) && group(row) !== before) last = null;
        before = group(row);
        const height = heightOf(row.cell(column).value, series);
        if (height === null) continue;
        if (last !== null && (height - last) * sign < 0)
          throw new InputError(
            at(`${where}: rows[${index}]`, column),
            `breaks the ${sign > 0 ? 'rising' : 'falling'} order that the table states`,
          );
        last = height;
      }
    }
  if (order.across === null) return;
  const heads = columns.filter(({ size, slope }) => size !== null || slope !== null);
  for (const [index, row] of rows.entries()) {
    let last = Number.NEGATIVE_INFINITY;
    for (const { id } of heads) {
      const height = heightOf(row.cell(id).value, series);
      if (height === null) continue;
      if (height < last)
        throw new InputError(at(`${where}: rows[${index}]`, id), 'is below the cell to its left; the row should rise');
      last = height;
    }
  }
}

const endless = Number.MAX_VALUE;

function heightOf(value: CellValue, series: SizeSeries): number | null {
  if (value === null) return null;
  if (value === 'NP') return -1;
  if (value === 'NL' || value === 'NA') return endless;
  return typeof value === 'number' ? value : series.rank(value as NominalSize);
}
