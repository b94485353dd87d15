import type { Family } from '../tables/open-family.ts';
import type { Table, Trust } from '../tables/table.ts';
import { tableNamed } from './code-book.ts';

/** `codes --verify`: what a person with the printed code should look at, most doubtful first. */
export interface VerifyBook {
  readonly format: 'drainwright-verify';
  readonly version: 1;
  readonly code: string;
  readonly table: string | null;
  readonly entries: readonly VerifyLine[];
}

export interface VerifyLine {
  /** Place in the code's own list of doubts; null: in no list, but unread or known from memory only. */
  readonly order: number | null;
  /** A table with row and column, or `rules` and `limits` with the id as row. */
  readonly table: string;
  readonly row: string;
  readonly column: string;
  readonly clause: string;
  readonly value: unknown;
  readonly trust: Trust;
  readonly why: string;
  /** The entry of the list is the whole table. */
  readonly whole: boolean;
}

/**
 * First the code's own list, then every other cell that is unread, then every other one from memory; each cell once.
 * One table where `name` is given: its id or printed number.
 */
export function verifyBook(family: Family, name: string | null = null): VerifyBook {
  const only = name === null ? null : tableNamed(family, name).id;
  const lines = [...listed(family), ...unlisted(family, 'unread'), ...unlisted(family, 'memory')];
  const seen = new Set<string>();
  const entries = lines.filter(({ table, row, column }) => {
    const cell = `${table}|${row}|${column}`;
    if (seen.has(cell) || (only !== null && table !== only)) return false;
    seen.add(cell);
    return true;
  });
  return { format: 'drainwright-verify', version: 1, code: family.code, table: only, entries };
}

/** A cell, a lone number or a rule, before anybody says why to look at it. */
type Spot = Omit<VerifyLine, 'order' | 'why' | 'whole'>;

function listed(family: Family): readonly VerifyLine[] {
  return family.verify.flatMap(({ order, table, rows, columns, rules, numbers, why }) => {
    const own = table === null ? undefined : family.table(table);
    const cells =
      own === undefined
        ? []
        : cellsOf(own).filter(
            (cell) =>
              (rows.length === 0 || rows.includes(cell.row)) && (columns.length === 0 || columns.includes(cell.column)),
          );
    const fromRules = rules.map((id): Spot => {
      const { clause, title, trust } = family.rule(id);
      return { table: 'rules', row: id, column: 'title', clause, value: title, trust };
    });
    return [...cells, ...fromRules, ...limitLines(family, (id) => numbers.includes(id))].map((cell) => ({
      order,
      ...cell,
      why,
      whole: table !== null && rows.length + columns.length === 0,
    }));
  });
}

function unlisted(family: Family, kind: 'unread' | 'memory'): readonly VerifyLine[] {
  const why = kind === 'unread' ? 'nobody could read it yet' : 'from memory only';
  return [...family.tables.flatMap(cellsOf), ...limitLines(family, () => true)]
    .filter(({ value, trust }) => (kind === 'unread' ? value === null : value !== null && trust === 'memory'))
    .map((cell) => ({ order: null, ...cell, why, whole: false }));
}

const limitLines = (family: Family, wanted: (id: string) => boolean): readonly Spot[] =>
  family.numbers.all
    .filter(({ id }) => wanted(id))
    .map(({ id, printed, cell }) => {
      const { clause } = cell.place;
      return { table: 'limits', row: id, column: 'value', clause, value: printed, trust: cell.trust };
    });

/** Every figure of a table; what only names the row is none. */
function cellsOf(table: Table): readonly Spot[] {
  const figures = table.columns.filter(({ id, dimension }) => dimension !== 'text' && !table.key.includes(id));
  return table.rows.flatMap((row) =>
    figures.map(({ id }) => {
      const { trust, place } = row.cell(id);
      return { table: table.id, row: row.name, column: id, clause: place.clause, value: row.printed(id), trust };
    }),
  );
}
