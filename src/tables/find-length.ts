import type { NominalSize } from '../units/nominal-size.ts';
import { type Candidate, firstThatHolds, noneOmitted, reaches, type SizeFound } from './find-size.ts';
import type { Amount, Cell, Row, Table } from './table.ts';

/**
 * Smallest vent whose longest length, in the row of this load, reaches `length` (metres). Rows are read upward, never
 * between: the first whose load holds. An unread cell takes the same column of the next heavier row that has one.
 * `group` narrows the rows first, as by the stack's size. null: the load is past the last row of the group, or the
 * table has no such group.
 */
export function sizeForLength(
  table: Table,
  loadColumn: string,
  load: number,
  length: number,
  options: { readonly group?: RowGroup; readonly omit?: ReadonlySet<NominalSize> } = {},
): (SizeFound & { readonly row: Row }) | null {
  const rows = rowsOf(table, options.group);
  const start = rows.findIndex((row) => reaches(row.amount(loadColumn).value, load));
  const row = rows[start];
  if (row === undefined) return null;
  const heavier = rows.slice(start + 1);
  const candidates = table.columns.flatMap(({ id, size }): Candidate[] =>
    size === null || (options.omit ?? noneOmitted).has(size)
      ? []
      : [{ size, cell: row.amount(id), instead: firstRead(heavier, id) }],
  );
  return { ...firstThatHolds(candidates, length), row };
}

export interface RowGroup {
  readonly column: string;
  readonly size: NominalSize;
}

/** Rows of one stack size; all rows where no group is asked for. */
export const rowsOf = (table: Table, group?: RowGroup): readonly Row[] =>
  group === undefined ? table.rows : table.rows.filter((row) => row.size(group.column).value === group.size);

/** Heaviest load that the table, or one group of it, knows: what an overloaded stack is compared with. */
export function heaviest(table: Table, loadColumn: string, group?: RowGroup): Cell<Amount> | null {
  return rowsOf(table, group).at(-1)?.amount(loadColumn) ?? null;
}

const firstRead = (rows: readonly Row[], column: string): Cell<Amount> | null =>
  rows.map((row) => row.amount(column)).find(({ value }) => value !== null) ?? null;
