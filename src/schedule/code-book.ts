import { InputError } from '../findings/input-error.ts';
import type { Family } from '../tables/open-family.ts';
import type { SettingEntry } from '../tables/settings-file.ts';
import type { Trust } from '../tables/table.ts';
import { figuresOf, limitsAsTable, rulesAsTable, type ShownTable, shownTable } from './code-table.ts';

/** `format: "drainwright-codes"`: the plumbing codes, one code with its tables, or one table cell by cell. */
export interface CodeBook {
  readonly format: 'drainwright-codes';
  readonly version: 1;
  /** By family, then edition. */
  readonly codes?: readonly CodeEntry[];
  readonly code?: CodeEntry;
  /** Of the one code that was asked for, in the order of the book; then limits and rules. */
  readonly tables?: readonly TableEntry[];
  readonly settings?: readonly SettingEntry[];
  /** What its rules ask that no model tells; absent where there is nothing. */
  readonly unchecked?: readonly UncheckedRule[];
  readonly table?: ShownTable;
}

export interface CodeEntry {
  readonly id: string;
  readonly title: string;
  readonly edition: string;
  readonly unit: string;
  /** Used when no code is named. */
  readonly standard: boolean;
  readonly tables: number;
  readonly cells: TrustCount;
  readonly localTables: readonly string[];
}

export interface UncheckedRule {
  readonly rule: string;
  readonly clause: string;
  readonly what: string;
}

export interface TableEntry {
  readonly id: string;
  readonly title: string;
  readonly clause: string;
  readonly rows: number;
  readonly cells: TrustCount;
}

/** How many figures of the printed tables are known how. `unread` ones are in none of the others. */
export type TrustCount = Readonly<Record<Trust | 'unread', number>>;

export const standardCode = 'npc-2020';

/** Every code, in the order given. */
export const codeList = (families: readonly Family[]): CodeBook => ({
  format: 'drainwright-codes',
  version: 1,
  codes: families.map(codeEntry),
});

/** One code: its tables with how far each is to be trusted, and what the answers file may set with it. */
export function codeTables(family: Family): CodeBook {
  const unchecked = [...family.rules.values()].flatMap(({ id, clause, unchecked: what }) =>
    what === null ? [] : [{ rule: id, clause, what }],
  );
  return {
    format: 'drainwright-codes',
    version: 1,
    code: codeEntry(family),
    tables: allTables(family).map((table) => {
      const { id, title, clause, rows } = table;
      return { id, title, clause, rows: rows.length, cells: trustCount(figuresOf(table)) };
    }),
    settings: family.settings,
    ...(unchecked.length === 0 ? {} : { unchecked }),
  };
}

/** One table, every cell with value, trust and source. `name` is its id or the number it is printed under. */
export const codeTable = (family: Family, name: string): CodeBook => ({
  format: 'drainwright-codes',
  version: 1,
  code: codeEntry(family),
  table: tableNamed(family, name),
});

/** The table of this id or printed number (`branch`, `Table 2.4.10.6.-B`, `2.4.10.6.b`); else wrong usage. */
export function tableNamed(family: Family, name: string): ShownTable {
  const tables = allTables(family);
  const found = tables.filter((table) => table.id === name || printedKeys(table).includes(bare(name)));
  const [first] = found;
  if (first !== undefined && found.length === 1) return first;
  const known = tables.map((table) => `${table.id} (${table.clause})`).join(', ');
  throw new InputError(
    `table ${name}`,
    `${family.code} has ${found.length === 0 ? 'none' : 'several'} of that name: ${known}`,
    {
      exit: 2,
    },
  );
}

const allTables = (family: Family): readonly ShownTable[] => [
  ...family.tables.map((table) => shownTable(table)),
  limitsAsTable(family),
  rulesAsTable(family),
];

function codeEntry(family: Family): CodeEntry {
  const { code, title, edition, unit, localTables } = family;
  const cells = family.tables.flatMap((table) => figuresOf(shownTable(table)));
  const standard = code === standardCode;
  return {
    id: code,
    title,
    edition,
    unit,
    standard,
    tables: family.tables.length,
    cells: trustCount(cells),
    localTables,
  };
}

function trustCount(cells: readonly { readonly value: unknown; readonly trust: Trust }[]): TrustCount {
  const count = { published: 0, 'cross-checked': 0, memory: 0, unread: 0 };
  for (const { value, trust } of cells) count[value === null ? 'unread' : trust] += 1;
  return count;
}

/** `Table 2.4.10.6.-B` is asked for as `2.4.10.6.-B`, `2.4.10.6-b`, `24106b`. */
const bare = (name: string): string =>
  name
    .toLowerCase()
    .replace(/^table/, '')
    .replace(/[^a-z0-9]/g, '');

const printedKeys = ({ id, clause }: ShownTable): readonly string[] => [
  bare(id.replace(' (local)', '')),
  ...clause.split(/[,;]/).map(bare),
];
