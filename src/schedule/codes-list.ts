import { InputError } from '../findings/input-error.ts';
import type { Family } from '../tables/open-family.ts';
import type { Table } from '../tables/table.ts';
import type { SizeLabel } from './result.ts';

/** `format: "drainwright-codes"`: the codes, or one with what it holds, or one table with every cell. */
export interface CodesList {
  readonly format: 'drainwright-codes';
  readonly version: 1;
  readonly codes?: readonly CodeHead[];
  readonly code?: CodeContents;
  readonly table?: TableContents;
}

export interface CodeHead {
  readonly id: string;
  readonly title: string;
  readonly edition: string;
  readonly unit: string;
}

export interface CodeContents extends CodeHead {
  readonly sizes: readonly SizeLabel[];
  readonly localTables: readonly string[];
  readonly tables: readonly TableHead[];
  readonly settings: readonly {
    readonly id: string;
    readonly what: string;
    readonly clause: string;
    readonly values: readonly (string | number | boolean)[];
    readonly standard: unknown;
  }[];
  /** What to look at first with the printed code, most doubtful first. */
  readonly verify: readonly { readonly where: string; readonly why: string }[];
}

export interface TableHead {
  /** As `codes ID TABLE` takes it. */
  readonly id: string;
  readonly title: string;
  readonly clause: string;
  readonly rows: number;
  /** Cells by how far to trust them: `{published: 12, memory: 3}`. */
  readonly trust: Readonly<Record<string, number>>;
}

export interface TableContents extends TableHead {
  readonly code: string;
  readonly source: string;
  readonly columns: readonly { readonly id: string; readonly title: string; readonly unit: string }[];
  readonly cells: readonly TableCell[];
  readonly notes: readonly string[];
}

/** One figure as it is printed, row by row; `null` is one that nobody could read yet. */
export interface TableCell {
  readonly row: string;
  readonly column: string;
  readonly value: unknown;
  readonly trust: string;
  readonly source: string;
  readonly note?: string;
}

export const headOf = ({ code, title, edition, unit }: Family): CodeHead => ({ id: code, title, edition, unit });

export function contentsOf(family: Family): CodeContents {
  return {
    ...headOf(family),
    sizes: family.series.sizes.map(({ label, dn }) => ({ label, dn })),
    localTables: family.localTables,
    tables: tableIds(family).map((id) => head(tableOf(family, id))),
    settings: family.settings.map(({ id, what, clause, values, standard }) => ({ id, what, clause, values, standard })),
    verify: family.verify.map(({ table, rows, columns, rules, numbers, why }) => {
      const all = [...rows, ...columns, ...rules, ...numbers];
      const more = all.length > mostPlaces ? [`and ${all.length - mostPlaces} more`] : [];
      const places = [...(table === null ? [] : [table]), ...all.slice(0, mostPlaces), ...more];
      return { where: places.join(', '), why };
    }),
  };
}

const mostPlaces = 4;

/** The tables of the book, then the numbers that stand alone and the rules, which are listed the same way. */
const tableIds = ({ tables }: Family): string[] => [...tables.map(({ id }) => id), 'limits', 'rules'];

const head = ({ id, title, clause, rows, trust }: TableContents): TableHead => ({ id, title, clause, rows, trust });

/** One table of a code, every cell with its source and how far to trust it. An unknown one is wrong usage (exit 2). */
export function tableOf(family: Family, id: string): TableContents {
  if (id === 'limits') return limitsOf(family);
  if (id === 'rules') return rulesOf(family);
  const table = family.tables.find((one) => one.id === id || one.id === `${id} (local)`);
  if (table === undefined)
    throw new InputError(`table ${id}`, `is not in ${family.code}; expected one of ${tableIds(family).join(', ')}`, {
      exit: 2,
    });
  return printed(family, table);
}

function printed(family: Family, { id, title, clause, origin, columns, rows, notes, key }: Table): TableContents {
  const source = [
    `${origin.document} ${origin.edition}, ${origin.at}`,
    ...(origin.seen === undefined ? [] : [origin.seen]),
  ];
  const cells = rows.flatMap((row) =>
    columns
      .filter(({ id: column, dimension }) => dimension !== 'key' && dimension !== 'text' && !key.includes(column))
      .map((column): TableCell => {
        const cell = row.cell(column.id);
        const note = row.noteOf(column.id);
        return {
          row: row.name,
          column: column.id,
          value: row.printed(column.id),
          trust: cell.trust,
          source: `${family.title} ${family.edition}, ${cell.place.clause}`,
          ...(note === null ? {} : { note }),
        };
      }),
  );
  return {
    code: family.code,
    id,
    title,
    clause,
    rows: rows.length,
    trust: trustCounts(cells),
    source: source.join('; '),
    columns: columns.map((column) => ({ id: column.id, title: column.title, unit: column.unit })),
    cells,
    notes,
  };
}

function limitsOf(family: Family): TableContents {
  const { origin, all } = family.numbers;
  const cells = all.map(
    ({ id, what, unit, printed: value, cell, note, rule }): TableCell => ({
      row: id,
      column: 'value',
      value,
      trust: cell.trust,
      source: `${family.title} ${family.edition}, ${cell.place.clause}`,
      note: [`${what}, in ${unit} (${rule})`, ...(note === null ? [] : [note])].join('; '),
    }),
  );
  return {
    code: family.code,
    id: 'limits',
    title: 'Numbers that stand alone in the clauses',
    clause: origin.at,
    rows: cells.length,
    trust: trustCounts(cells),
    source: `${origin.document} ${origin.edition}, ${origin.at}`,
    columns: [{ id: 'value', title: 'value', unit: 'as each says' }],
    cells,
    notes: [],
  };
}

function rulesOf(family: Family): TableContents {
  const cells = [...family.rules.values()].map(
    ({ id, title, clause, trust, note }): TableCell => ({
      row: id,
      column: 'rule',
      value: title,
      trust,
      source: `${family.title} ${family.edition}, ${clause}`,
      ...(note === null ? {} : { note }),
    }),
  );
  return {
    code: family.code,
    id: 'rules',
    title: 'Rules, as the trails name them',
    clause: family.numbers.origin.at,
    rows: cells.length,
    trust: trustCounts(cells),
    source: `${family.title} ${family.edition}`,
    columns: [{ id: 'rule', title: 'rule', unit: 'text' }],
    cells,
    notes: [],
  };
}

function trustCounts(cells: readonly TableCell[]): Readonly<Record<string, number>> {
  const counts: Record<string, number> = {};
  for (const { trust } of cells) counts[trust] = (counts[trust] ?? 0) + 1;
  return Object.fromEntries(Object.entries(counts).sort(([a], [b]) => (a < b ? -1 : 1)));
}
