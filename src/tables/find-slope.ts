import type { NominalSize } from '../units/nominal-size.ts';
import { type Candidate, firstThatHolds, noneOmitted, type SizeFound, sizedRows } from './find-size.ts';
import type { Amount, Cell, Column, Row, Table } from './table.ts';

/** A decimal slope is the printed 1:n when they agree this closely: models write 0.0075 for 1:133. */
export const slopeAgreement = 0.005;

export interface SizeAtSlope extends SizeFound {
  /** Column that was read for the size found, m/m. */
  readonly slope: number | null;
  /** The drawn slope is flatter than any at which the table lets the size be laid. */
  readonly tooFlat: boolean;
  /** Least slope at which the table has a figure for the size found. */
  readonly leastSlope: number | null;
  /** A smaller size that would hold the load, laid to this slope; null: none. */
  readonly steeper: { readonly size: NominalSize; readonly slope: number } | null;
}

/** How a code reads its table of slopes. */
export interface SlopeReading {
  /** A slope this share of a printed one counts as it: codes that print inches a foot take the round percent for it. */
  readonly share: number;
  /** A size that may not be laid so flat gives way to the next that may, by the next flatter of the least slopes. */
  readonly asLaid: boolean;
}
const ownLeast: SlopeReading = { share: 1, asLaid: false };

/**
 * Smallest drain whose figure holds the load, each size read at the steeper of the drawn slope and its own least slope:
 * a pipe laid too flat is a fault of its slope, not of its size. Where the code reads sizes as they are laid, the next size
 * that may be laid so flat stands instead, as long as it is of the next flatter sort: nobody lays 8 in for the slope of a
 * 2 in branch. Between columns the flatter counts; null: not drawn.
 */
export function sizeAtSlope(
  table: Table,
  load: number,
  drawn: number | null,
  omit: ReadonlySet<NominalSize> = noneOmitted,
  { share, asLaid }: SlopeReading = ownLeast,
): SizeAtSlope {
  // A drawn slope is held against the printed ones as if it were printed in inches a foot itself.
  const slope = drawn === null ? null : drawn / share;
  const read = sizedRows(table, omit).map(({ size, row }) => ({ size, row, ...columnFor(table, row, slope) }));
  const candidates: Candidate[] = read.map(({ size, row, column }) => ({
    size,
    cell: column === null ? notPermitted(row, table) : row.amount(column.id),
    instead: null,
  }));
  const isTooFlat = ({ least }: (typeof read)[number]): boolean =>
    slope !== null && least !== null && !reachesSlope(slope, least);
  const byLeast = firstThatHolds(candidates, load);
  const laysAny = slope !== null && sloped(table).some((column) => reachesSlope(slope, column.slope ?? 0));
  const laid =
    asLaid && laysAny
      ? firstThatHolds(
          candidates.map((one, at) =>
            isTooFlat(read[at]!) ? { ...one, cell: read[at]!.row.amount(columnAt(table, slope)) } : one,
          ),
          load,
        )
      : byLeast;
  const sorts = [...new Set(read.flatMap(({ least }) => least ?? []))].sort((a, b) => b - a);
  const sortOf = (one: SizeFound): number => sorts.indexOf(read.find(({ size }) => size === one.size)?.least ?? 0);
  const found = laid.size === null || sortOf(laid) - sortOf(byLeast) > 1 ? byLeast : laid;
  const chosen = read.find(({ size }) => size === found.size);
  const steeper = found.size === byLeast.size ? undefined : read.find(({ size }) => size === byLeast.size);
  return {
    ...found,
    slope: times(chosen?.column?.slope, share),
    leastSlope: times(chosen?.least, share),
    tooFlat: chosen !== undefined && isTooFlat(chosen),
    steeper: steeper === undefined ? null : { size: steeper.size, slope: times(steeper.least, share)! },
  };
}

const times = (slope: number | null | undefined, share: number): number | null =>
  slope === null || slope === undefined ? null : slope * share;

/** The steepest column that a slope reaches, whether the size stands there or not. */
const columnAt = (table: Table, slope: number): string =>
  sloped(table).findLast((one) => reachesSlope(slope, one.slope ?? 0))!.id;

/** Flattest slope at which the table has a figure for the size; null where it has none. */
export function leastSlopeOf(
  table: Table,
  size: NominalSize,
): { readonly slope: number; readonly cell: Cell<Amount> } | null {
  const row = sizedRows(table).find((one) => one.size === size)?.row;
  const column = row === undefined ? undefined : flattest(table, row);
  return row === undefined || column?.slope === undefined || column.slope === null
    ? null
    : { slope: column.slope, cell: row.amount(column.id) };
}

/** True where `slope` is the printed one or steeper, within the agreement of a decimal with its 1:n. */
export const reachesSlope = (slope: number, printed: number): boolean => slope >= printed * (1 - slopeAgreement);

function columnFor(
  table: Table,
  row: Row,
  drawn: number | null,
): { readonly column: Column | null; readonly least: number | null } {
  const least = flattest(table, row);
  if (least === undefined) return { column: null, least: null };
  const reached = drawn === null ? [] : sloped(table).filter(({ slope }) => reachesSlope(drawn, slope ?? 0));
  const steepest = reached.at(-1);
  const column = steepest === undefined || (steepest.slope ?? 0) < (least.slope ?? 0) ? least : steepest;
  return { column, least: least.slope };
}

const sloped = (table: Table): readonly Column[] => table.columns.filter(({ slope }) => slope !== null);

const flattest = (table: Table, row: Row): Column | undefined =>
  sloped(table).find(({ id }) => typeof row.amount(id).value === 'number');

function notPermitted(row: Row, table: Table): Cell<Amount> {
  const first = sloped(table)[0];
  if (first === undefined) throw new Error(`table ${table.id} has no columns of slope`);
  return row.amount(first.id);
}
