import type { FixtureDetail, FixtureKind } from '../../model/identity.ts';
import {
  allFixtureRows,
  type FixtureColumns,
  fixtureRowsFor,
  loadAtTrap,
  type FixtureRow as PrintedRow,
  trapRange,
} from '../../tables/fixture-rows.ts';
import type { Cell } from '../../tables/table.ts';
import type { Load } from '../../units/quantity.ts';
import type { FixtureRow, FixtureRows } from '../fixture-row.ts';
import type { SharedTrapRule } from '../plumbing-code.ts';
import { openDetails } from '../rules/open-details.ts';
import type { Tools } from '../tools.ts';
import { isGerman, systemOf } from './system.ts';

const systems = ['I', 'II', 'III', 'IV'] as const;

/**
 * Discharge units by Table 2 in the system's column (R02). An appliance the system does not permit counts as the
 * lightest of its kind that it does; one without a figure counts what another system prints for it, the largest. What
 * the table does not list may be any of its rows.
 */
export function fixtureRows(tools: Tools): FixtureRows {
  const { family } = tools;
  const table = family.table('discharge-units');
  const own = systemOf(tools);
  const columnsOf = (system: string): FixtureColumns => ({ load: system, outlet: 'outlet' });
  const bind = (row: PrintedRow, kind: string | null): FixtureRow => {
    const { least, largest } = trapRange(row, family);
    return {
      id: row.key,
      title: row.title,
      closet: kind === 'water-closet' || kind === 'clinical-sink',
      siphonic: false,
      emergency: false,
      leastTrap: least,
      largestTrap: largest,
      loadAt: (trap) => {
        const cell = loadAtTrap(row, trap, family) ?? loadAtTrap(row, largest, family);
        if (cell === null) throw new Error(`${family.code} has no load for ${row.key}`);
        return { load: cell.value as Load, cell };
      },
    };
  };
  const all = allFixtureRows(family.kinds, table, columnsOf(own)).map((row) => bind(row, row.kind));
  const units = (row: FixtureRow): number => row.loadAt(row.leastTrap).load;
  const german = isGerman(tools) ? germanRows(tools) : () => null;

  const refused = (row: FixtureRow, kind: FixtureKind): FixtureRow => {
    const allowed = fixtureRowsFor(family.kinds, table, { kind }, columnsOf(own)).map((one) => bind(one, kind));
    const lightest = allowed.sort((a, b) => units(a) - units(b))[0];
    return { ...row, ...(lightest === undefined ? {} : { loadAt: lightest.loadAt }), refused: true };
  };
  const elsewhere = (kind: FixtureKind, detail: FixtureDetail): FixtureRow[] => {
    const found = systems.flatMap((system) =>
      fixtureRowsFor(family.kinds, table, { kind, ...detail }, columnsOf(system)).map((row) => bind(row, kind)),
    );
    const heaviest = found.sort((a, b) => units(b) - units(a))[0];
    if (heaviest === undefined) return [];
    const word = table.rows.find(({ name }) => name === heaviest.id)?.amount(own).value;
    return [word === 'NP' ? refused(heaviest, kind) : heaviest];
  };
  const rowsOf = (kind: FixtureKind | null, detail: FixtureDetail): readonly FixtureRow[] => {
    if (kind === null) return all;
    const national = german(kind, detail);
    if (national !== null) return [national];
    const rows = fixtureRowsFor(family.kinds, table, { kind, ...detail }, columnsOf(own)).map((row) => bind(row, kind));
    if (rows.length > 0) return rows;
    const found = elsewhere(kind, detail);
    return found.length > 0 ? found : all;
  };
  const cache = new Map<string, readonly FixtureRow[]>();
  const rowsFor: FixtureRows['rowsFor'] = (kind, detail) => {
    const key = JSON.stringify([kind, detail]);
    const known = cache.get(key);
    if (known !== undefined) return known;
    const rows = [...rowsOf(kind, detail)].sort((a, b) => units(a) - units(b));
    cache.set(key, rows);
    return rows;
  };
  return { rowsFor, openDetails: openDetails(family.kinds, rowsFor) };
}

/** Discharge units that Germany adds, read only where nothing but their row fits. */
function germanRows({ family }: Tools): (kind: FixtureKind, detail: FixtureDetail) => FixtureRow | null {
  const table = family.table('din-units');
  const trapOf = (kind: FixtureKind) => family.kinds.entries.find((entry) => entry.kind === kind)?.usualTrap ?? null;
  const row = (id: string, kind: FixtureKind): FixtureRow => {
    const printed = table.rows.find(({ name }) => name === id)!;
    const cell = printed.amount('I') as Cell<number>;
    const trap = trapOf(kind)!;
    return {
      id,
      title: printed.text('title') ?? id,
      closet: kind === 'water-closet',
      siphonic: false,
      emergency: false,
      leastTrap: trap,
      largestTrap: trap,
      loadAt: () => ({ load: cell.value as Load, cell }),
    };
  };
  return (kind, { flushLitres, style }) => {
    if (kind === 'water-closet' && flushLitres !== undefined && flushLitres < 5) return row('wc-4.5', kind);
    if (kind === 'urinal' && style === 'waterless') return row('urinal-dry', kind);
    return null;
  };
}

/** Germany counts a dishwasher on the trap of a kitchen sink with the sink. */
export const countOnOneTrap: SharedTrapRule = (fixtures) => {
  const hasSink = fixtures.some(({ row }) => row.id === 'kitchen-sink');
  return fixtures.map(({ row }) => !(hasSink && row.id === 'dishwasher'));
};
