import { rowsHolding } from '../../tables/find-row.ts';
import type { Amount, Cell, Row, Table } from '../../tables/table.ts';
import type { NominalSize } from '../../units/nominal-size.ts';
import type { Step } from '../sizing-rule.ts';
import type { Tools } from '../tools.ts';
import type { FlowSystem } from './system.ts';

/** A row of Table 4 or 7, as one system reads it. */
export interface BranchRow {
  readonly row: Row;
  readonly size: NominalSize;
  readonly cell: Cell;
  readonly smaller: Step['smaller'];
}

export interface BranchTable {
  /** First row that carries the flow (l/s); null past the last. Rows without a size in the system are passed by. */
  forFlow(flow: number): BranchRow | null;
  /** First size that may carry so many water closets on ways that turn so far, degrees; null: no closet, no demand. */
  forClosets(closets: number, turn: number): (BranchRow & { readonly limits: Cell<Amount> }) | null;
  /** Both at once: the row whose vent the branch has. */
  forBoth(flow: number, closets: number, turn: number): BranchRow | null;
}

/** Table 4 without a vent, Table 7 with one (R10, R13, R16). */
export function branchTable(table: Table, system: FlowSystem, { family, omit }: Tools): BranchTable {
  const sized = table.rows.flatMap((row): Omit<BranchRow, 'smaller'>[] => {
    const cell = row.size(system);
    const { value } = cell;
    return value !== null && family.series.has(value) && !omit.has(value as NominalSize)
      ? [{ row, size: value as NominalSize, cell }]
      : [];
  });
  const withSmaller = (one: Omit<BranchRow, 'smaller'>, limit: (row: Row) => Amount): BranchRow => {
    const before = sized[sized.indexOf(one) - 1];
    return { ...one, smaller: before === undefined ? null : { size: before.size, limit: limit(before.row) } };
  };
  const carries = ({ row }: { readonly row: Row }, flow: number): boolean =>
    rowsHolding(table, 'flow', flow).includes(row);
  const takes = ({ row }: { readonly row: Row }, closets: number, turn: number): boolean =>
    within(row.amount(`closets${system}`).value, closets) &&
    (closets === 0 || system !== 'I' || within(row.amount('turnI').value, turn - angle));
  const flowLimit = (row: Row): Amount => row.amount('flow').value;
  const closetLimit = (row: Row): Amount => row.amount(`closets${system}`).value;
  return {
    forFlow: (flow) => {
      const found = sized.find((one) => carries(one, flow));
      return found === undefined ? null : withSmaller(found, flowLimit);
    },
    forClosets: (closets, turn) => {
      const found = closets === 0 ? undefined : sized.find((one) => takes(one, closets, turn));
      if (found === undefined) return null;
      return { ...withSmaller(found, closetLimit), limits: found.row.amount(`closets${system}`) };
    },
    forBoth: (flow, closets, turn) => {
      const found = sized.find((one) => carries(one, flow) && takes(one, closets, turn));
      return found === undefined ? null : withSmaller(found, flowLimit);
    },
  };
}

const within = (limit: Amount, amount: number): boolean =>
  limit === 'NL' || (typeof limit === 'number' && amount <= limit);

/** Turns carry a hundredth of a degree at each bend. */
const angle = 0.05;
