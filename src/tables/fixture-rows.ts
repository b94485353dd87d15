import type { NominalSize, SizeSeries } from '../units/nominal-size.ts';
import { rowAtSize } from './find-row.ts';
import { sizeColumn } from './find-size.ts';
import type { FactTest, FixtureKinds, KindEntry } from './fixture-kinds.ts';
import type { Cell, LoadAtTrap, Table, Trust, Word } from './table.ts';

type Fact = string | number | boolean | null;

/** What is known of a fixture, and of its use where the code asks for that. null or absent: nobody says. */
export type FixtureFacts = { readonly kind: string } & Readonly<Record<string, Fact>>;

export interface FixtureRow {
  /** Names of the printed rows, joined by a slash where there are several. */
  readonly key: string;
  readonly title: string;
  /** Least outlet, or least trap where the code prints that; `NA`: the table asks none. */
  readonly outlet: Cell<NominalSize | Word | null>;
  /** One load for every trap, or one for each printed trap, smallest first. Empty: see `loadFrom`. */
  readonly loads: readonly (LoadAtTrap | { readonly trap: null; readonly load: Cell<number> })[];
  /** Table that gives the load by trap where the row does not. */
  readonly loadFrom: string | null;
  /** Trap of the fixture as it is made, where print says no more than "as the fixture's outlet". */
  readonly usualTrap: NominalSize | null;
  readonly note: string | null;
}

/** Columns of the fixture table that hold in this use or system. */
export interface FixtureColumns {
  readonly load: string;
  readonly outlet: string;
}

/**
 * Rows that the fixture may be by what is known, in the order of the kinds: one when all that matters is known, several
 * when a detail that decides is not. None: the code does not list it.
 */
export function fixtureRowsFor(
  kinds: FixtureKinds,
  table: Table,
  facts: FixtureFacts,
  columns: FixtureColumns = { load: 'load', outlet: 'outlet' },
): readonly FixtureRow[] {
  return kinds.entries
    .filter((entry) => fits(entry, facts))
    .flatMap((entry) => {
      const row = joined(entry, table, columns, facts);
      return row === null ? [] : [row];
    });
}

/**
 * All rows that any fixture may be: what an unidentified one is measured by. Groups of fixtures are none of them, nor
 * rows that what is known of the whole building, such as its use, rules out.
 */
export function allFixtureRows(
  kinds: FixtureKinds,
  table: Table,
  columns: FixtureColumns = { load: 'load', outlet: 'outlet' },
  facts: Readonly<Record<string, string>> = {},
): readonly (FixtureRow & { readonly kind: string })[] {
  const ruledOut = ({ where }: KindEntry): boolean =>
    [...where].some(([fact, test]) => facts[fact] !== undefined && !meets(facts[fact], test));
  return kinds.entries.flatMap((entry) => {
    const row = ruledOut(entry) ? null : joined(entry, table, columns);
    return row === null ? [] : [{ ...row, kind: entry.kind }];
  });
}

/** Stands for a fixture that the code does not list: its load by its trap. null where the code has no such table. */
export function unlistedFixture(family: TrapTables): FixtureRow | null {
  const { unlisted } = family.kinds;
  const first = unlisted === null ? undefined : family.table(unlisted).rows[0];
  if (unlisted === null || first === undefined) return null;
  const outlet = first.size(sizeColumn(family.table(unlisted)));
  const title = family.table(unlisted).title;
  return { key: 'unlisted', title, outlet, loads: [], loadFrom: unlisted, usualTrap: null, note: null };
}

/** What of a family the trap look-ups need. */
export interface TrapTables {
  readonly series: SizeSeries;
  readonly kinds: FixtureKinds;
  table(id: string): Table;
}

/**
 * Load of the row for a trap: print's own figure for it, between two the larger; past the largest the table that the
 * row refers to, else the largest. null: that table ends before the trap, or the row has no load at all.
 */
export function loadAtTrap(row: FixtureRow, trap: NominalSize | null, family: TrapTables): Cell<number> | null {
  const first = row.loads[0];
  if (first !== undefined) {
    if (first.trap === null || trap === null) return first.load;
    const { series } = family;
    const reached = row.loads.find((one) => one.trap !== null && series.rank(one.trap) >= series.rank(trap));
    if (reached !== undefined || row.loadFrom === null) return (reached ?? row.loads.at(-1) ?? first).load;
  }
  if (row.loadFrom === null) return null;
  const table = family.table(row.loadFrom);
  const column = sizeColumn(table);
  const found = trap === null ? table.rows[0] : rowAtSize(table, column, trap, 'larger', family.series);
  const load = found?.amount(loadColumn(table));
  return load === undefined || typeof load.value !== 'number' ? null : (load as Cell<number>);
}

/**
 * Smallest and largest trap that print gives the row: its outlet, the traps of its loads, the table it refers to. The
 * usual trap of the fixture as made where print says no more than that.
 */
export function trapRange(
  row: FixtureRow,
  family: TrapTables,
): { readonly least: NominalSize; readonly largest: NominalSize } {
  const { series } = family;
  const referred = row.loadFrom === null ? [] : family.table(row.loadFrom).sizes;
  const printed = row.loads.flatMap(({ trap }) => trap ?? []);
  const outlet = row.outlet.value;
  const least = isSize(outlet) ? outlet : (printed[0] ?? row.usualTrap ?? referred[0] ?? series.sizes[0]?.label);
  if (least === undefined) throw new Error('a code without sizes');
  return { least, largest: [...printed, ...referred].reduce(series.larger, least) };
}

function loadColumn(table: Table): string {
  const column = table.columns.find(({ dimension }) => dimension === 'load');
  if (column === undefined) throw new Error(`table ${table.id} has no column of loads`);
  return column.id;
}

function fits(entry: KindEntry, facts: FixtureFacts): boolean {
  if (entry.kind !== facts.kind) return false;
  for (const [fact, test] of entry.where) {
    const value = facts[fact] ?? null;
    if (value === null ? entry.onlyIfSaid : !meets(value, test)) return false;
  }
  return [...entry.unless].every(([fact, test]) => {
    const value = facts[fact] ?? null;
    return value === null || !meets(value, test);
  });
}

function meets(value: string | number | boolean, test: FactTest): boolean {
  if (typeof test === 'string' || typeof test === 'boolean') return value === test;
  if ('least' in test) return typeof value === 'number' && value >= test.least && value <= test.most;
  return test.some((word) => word === value);
}

/** null: the row prints no load in this column and names no other table. */
function joined(entry: KindEntry, table: Table, columns: FixtureColumns, facts?: FixtureFacts): FixtureRow | null {
  const rows = entry.rows.flatMap((key) => table.rows.find(({ name }) => name === key) ?? []);
  const first = rows[0];
  if (first === undefined) return null;
  const loads = rows.flatMap((row): FixtureRow['loads'] => {
    const byTrap = row.byTrap(columns.load);
    if (byTrap.length > 0) return byTrap;
    const load = row.amount(columns.load);
    if (typeof load.value !== 'number') return [];
    const own = withMore(load as Cell<number>, entry, table, columns, facts);
    const trap = row.size(columns.outlet).value;
    return [rows.length > 1 && isSize(trap) ? { trap, load: own } : { trap: null, load: own }];
  });
  if (loads.length === 0 && entry.loadFrom === null) return null;
  return {
    key: rows.map(({ name }) => name).join(' / '),
    title: first.text('title') ?? first.name,
    outlet: first.size(columns.outlet),
    loads,
    loadFrom: entry.loadFrom,
    usualTrap: entry.usualTrap,
    note: first.note,
  };
}

/** The load with what is added for each further head; it is trusted no more than the row that it adds. */
function withMore(
  load: Cell<number>,
  { more }: KindEntry,
  table: Table,
  columns: FixtureColumns,
  facts?: FixtureFacts,
): Cell<number> {
  const count = more === null ? null : (facts?.[more.fact] ?? null);
  const each = table.rows.find(({ name }) => name === more?.row)?.amount(columns.load);
  if (more === null || typeof count !== 'number' || count <= more.beyond || typeof each?.value !== 'number')
    return load;
  const trust = trustOrder.indexOf(each.trust) > trustOrder.indexOf(load.trust) ? each.trust : load.trust;
  return { ...load, value: load.value + (count - more.beyond) * each.value, trust };
}

const trustOrder: readonly Trust[] = ['published', 'cross-checked', 'memory'];

const isSize = (value: NominalSize | Word | null): value is NominalSize =>
  value !== null && value !== 'NP' && value !== 'NL' && value !== 'NA';
