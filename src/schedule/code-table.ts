import type { Family } from '../tables/open-family.ts';
import type { Table, TableOrigin, Trust } from '../tables/table.ts';

/** One table as a person would read it beside the book: values in printed units. */
export interface ShownTable {
  readonly id: string;
  readonly title: string;
  readonly clause: string;
  readonly source: TableOrigin;
  readonly trust: Trust;
  /** In printed order. `head`: the head is a size or a slope; `names`: the column only names its row. */
  readonly columns: readonly ShownColumn[];
  /** In printed order. */
  readonly rows: readonly ShownRow[];
  readonly notes: readonly string[];
}

export interface ShownColumn {
  readonly id: string;
  readonly title: string;
  readonly unit: string;
  readonly is?: 'head' | 'names';
}

export interface ShownRow {
  readonly name: string;
  readonly note: string | null;
  /** By column id. */
  readonly cells: Readonly<Record<string, ShownCell>>;
}

export interface ShownCell {
  /** As printed: a number, a size, `NP` `NL` `NA`, loads by trap, words; null: nobody could read it yet. */
  readonly value: unknown;
  readonly trust: Trust;
  readonly source: string;
  readonly note?: string;
}

export function shownTable(table: Table): ShownTable {
  const { id, title, clause, origin, trust, columns, rows, notes } = table;
  const source = `${origin.document} ${origin.edition}, ${origin.at}`;
  const shown = rows.map((row) => {
    const cells = columns.map(({ id: column, dimension }): [string, ShownCell] => {
      const words = dimension === 'key' || dimension === 'text';
      const note = row.noteOf(column);
      const cell = { value: row.printed(column), trust: words ? trust : row.cell(column).trust, source };
      return [column, note === null ? cell : { ...cell, note }];
    });
    const figures = cells.filter(([column]) => columns.some((one) => one.id === column && one.dimension !== 'key'));
    return { name: row.name, note: row.note, cells: Object.fromEntries(figures) };
  });
  return {
    id,
    title,
    clause,
    source: origin,
    trust,
    columns: columns
      .filter(({ dimension }) => dimension !== 'key')
      .map(({ id: one, title: head, unit, size, slope }) => {
        const column = { id: one, title: head, unit };
        if (table.key.includes(one)) return { ...column, is: 'names' as const };
        return size === null && slope === null ? column : { ...column, is: 'head' as const };
      }),
    rows: shown,
    notes,
  };
}

/** The numbers that stand alone in clauses, as a table: each row its own clause. */
export function limitsAsTable({ numbers }: Family): ShownTable {
  const rows = numbers.all.map(({ id, what, unit, printed, cell, rule, note }): ShownRow => {
    const known = { trust: cell.trust, source: cell.place.clause };
    return {
      name: id,
      note,
      cells: {
        what: { value: what, ...known },
        value: { value: printed, ...known },
        unit: { value: unit, ...known },
        rule: { value: rule, ...known },
      },
    };
  });
  return {
    id: 'limits',
    title: 'Numbers that stand alone in the clauses',
    clause: numbers.origin.at,
    source: numbers.origin,
    trust: 'memory',
    columns: columnsOf(['what', 'value', 'unit', 'rule']),
    rows,
    notes: [],
  };
}

/** The rules with their clause, and how the sense of each is known. */
export function rulesAsTable(family: Family): ShownTable {
  const origin = { document: family.title, edition: family.edition, at: 'rules' };
  const rows = [...family.rules.values()].map(({ id, title, clause, trust, note }): ShownRow => {
    const known = { trust, source: clause };
    return { name: id, note, cells: { title: { value: title, ...known }, clause: { value: clause, ...known } } };
  });
  return {
    id: 'rules',
    title: 'Rules of the code as they are applied',
    clause: 'rules',
    source: origin,
    trust: 'memory',
    columns: columnsOf(['title', 'clause']),
    rows,
    notes: [],
  };
}

/** Columns of words only, but for the figure or the clause that the row is there for. */
const columnsOf = (ids: readonly string[]): ShownTable['columns'] =>
  ids.map((id) => ({ id, title: id, unit: id === 'value' || id === 'clause' ? id : 'text' }));

/** The cells that state something, in reading order: words beside them left out. */
export const figuresOf = ({ columns, rows }: ShownTable): readonly ShownCell[] =>
  rows.flatMap((row) => columns.flatMap(({ id, unit }) => (unit === 'text' ? [] : (row.cells[id] ?? []))));
