import type { NominalSize } from '../units/nominal-size.ts';
import type { Amount, Cell, Row, Table } from './table.ts';

/** What a table answers when asked for a size. */
export interface SizeFound {
  /** null: no size of the table holds it, or the cells that might have held it are unread (`provisional`). */
  readonly size: NominalSize | null;
  /** The limit that holds; where none does, the last limit that was met. */
  readonly cell: Cell<Amount>;
  /** An unread cell was passed on the way: a smaller size may be enough. */
  readonly provisional: boolean;
  /** Unread cells that were passed, in the order met. */
  readonly unread: readonly Cell<Amount>[];
  /** The next smaller size that the table offers and the limit it fails by, or null when `size` is its smallest. */
  readonly smaller: { readonly size: NominalSize; readonly cell: Cell<Amount> } | null;
}

export const noneOmitted: ReadonlySet<NominalSize> = new Set();

export interface Candidate {
  readonly size: NominalSize;
  /** The printed cell. */
  readonly cell: Cell<Amount>;
  /** What stands in for an unread cell: the same column in the next heavier row that has a figure. */
  readonly instead: Cell<Amount> | null;
}

/**
 * The first candidate whose limit reaches `amount`; the limit itself holds. Candidates run from the smallest size up. A
 * limit that is read and too small settles every unread cell below it, since a smaller pipe never carries more.
 */
export function firstThatHolds(candidates: readonly Candidate[], amount: number): SizeFound {
  let unread: Cell<Amount>[] = [];
  let smaller: SizeFound['smaller'] = null;
  let last: Cell<Amount> | undefined;
  for (const { size, cell, instead } of candidates) {
    if (cell.value === 'NA') break;
    last = cell;
    if (cell.value === null) {
      unread.push(cell);
      if (instead !== null && reaches(instead.value, amount))
        return { size, cell: instead, provisional: true, unread, smaller };
      smaller = { size, cell: instead ?? cell };
    } else if (reaches(cell.value, amount)) {
      return { size, cell, provisional: unread.length > 0, unread, smaller };
    } else {
      unread = [];
      smaller = { size, cell };
    }
  }
  if (last === undefined) last = candidates[0]?.cell;
  if (last === undefined) throw new Error('asked a table for a size and offered it none');
  return { size: null, cell: last, provisional: unread.length > 0, unread, smaller };
}

/** A limit itself is allowed; `NL` holds everything, `NP`, `NA` and an unread cell nothing. */
export const reaches = (limit: Amount, amount: number): boolean =>
  limit === 'NL' || (typeof limit === 'number' && amount <= limit);

/** Smallest row whose limit in the column holds the load; the row's size stands in the table's first size column. */
export function sizeForLoad(
  table: Table,
  column: string,
  load: number,
  omit: ReadonlySet<NominalSize> = noneOmitted,
): SizeFound {
  return firstThatHolds(candidatesOf(table, column, omit), load);
}

/** A table is asked thousands of times with the same sizes left out: its candidates are laid out once. */
const laidOut = new WeakMap<Table, WeakMap<ReadonlySet<NominalSize>, Map<string, readonly Candidate[]>>>();

function candidatesOf(table: Table, column: string, omit: ReadonlySet<NominalSize>): readonly Candidate[] {
  const byOmit = laidOut.get(table) ?? new WeakMap<ReadonlySet<NominalSize>, Map<string, readonly Candidate[]>>();
  laidOut.set(table, byOmit);
  const byColumn = byOmit.get(omit) ?? new Map<string, readonly Candidate[]>();
  byOmit.set(omit, byColumn);
  let candidates = byColumn.get(column);
  if (candidates === undefined) {
    candidates = sizedRows(table, omit).map(({ size, row }) => ({ size, cell: row.amount(column), instead: null }));
    byColumn.set(column, candidates);
  }
  return candidates;
}

/** Rows with their size, smallest first, the user's omitted sizes left out. */
export function sizedRows(
  table: Table,
  omit: ReadonlySet<NominalSize> = noneOmitted,
): readonly { readonly size: NominalSize; readonly row: Row }[] {
  const column = sizeColumn(table);
  return table.sizes
    .filter((size) => !omit.has(size))
    .flatMap((size) => table.rows.filter((row) => row.size(column).value === size).map((row) => ({ size, row })));
}

export function sizeColumn(table: Table): string {
  const column = table.columns.find(({ dimension }) => dimension === 'size');
  if (column === undefined) throw new Error(`table ${table.id} has no column of sizes`);
  return column.id;
}
