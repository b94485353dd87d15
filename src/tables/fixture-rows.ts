import type { NominalSize, SizeSeries } from '../units/nominal-size.ts';
import type { FactTest, FixtureKinds, KindEntry } from './fixture-kinds.ts';
import type { Cell, LoadAtTrap, Row, Table, Word } from './table.ts';

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
      const rows = entry.rows.flatMap((key) => table.rows.find(({ name }) => name === key) ?? []);
      const row = joined(entry, rows, columns);
      return row === null ? [] : [row];
    });
}

/**
 * Load of the row for a trap: print's own figure for it, between two the larger, past the largest the largest. null:
 * the row has none for it and `loadFrom` names the table that does.
 */
export function loadAtTrap(row: FixtureRow, trap: NominalSize | null, series: SizeSeries): Cell<number> | null {
  const first = row.loads[0];
  if (first === undefined) return null;
  if (first.trap === null || trap === null) return first.load;
  const reached = row.loads.find((one) => one.trap !== null && series.rank(one.trap) >= series.rank(trap));
  if (reached === undefined && row.loadFrom !== null) return null;
  return (reached ?? row.loads.at(-1) ?? first).load;
}

/** Largest trap that the row prints a load for; null where the load does not depend on the trap. */
export const largestTrap = (row: FixtureRow): NominalSize | null => row.loads.at(-1)?.trap ?? null;

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

function joined(entry: KindEntry, rows: readonly Row[], columns: FixtureColumns): FixtureRow | null {
  const first = rows[0];
  if (first === undefined) return null;
  const loads = rows.flatMap((row): FixtureRow['loads'] => {
    const byTrap = row.byTrap(columns.load);
    if (byTrap.length > 0) return byTrap;
    const load = row.amount(columns.load);
    if (typeof load.value !== 'number') return [];
    const own = load as Cell<number>;
    const trap = row.size(columns.outlet).value;
    return [rows.length > 1 && isSize(trap) ? { trap, load: own } : { trap: null, load: own }];
  });
  return {
    key: rows.map(({ name }) => name).join(' / '),
    title: first.text('title') ?? first.name,
    outlet: first.size(columns.outlet),
    loads,
    loadFrom: entry.loadFrom,
    note: first.note,
  };
}

const isSize = (value: NominalSize | Word | null): value is NominalSize =>
  value !== null && value !== 'NP' && value !== 'NL' && value !== 'NA';
