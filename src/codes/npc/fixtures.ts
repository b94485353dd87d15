import {
  allFixtureRows,
  fixtureRowsFor,
  loadAtTrap,
  type FixtureRow as PrintedRow,
  trapRange,
  unlistedFixture,
} from '../../tables/fixture-rows.ts';
import type { Cell } from '../../tables/table.ts';
import type { Load } from '../../units/quantity.ts';
import { coordinateMetres } from '../../units/uncertainty.ts';
import type { FixtureRow, FixtureRows, FreeTrapFacts, GroupRule } from '../plumbing-code.ts';
import type { Tools } from '../tools.ts';

/** Loads of fixtures: Table 2.4.9.3., and Table 2.4.10.2. by trap where that says nothing (R08, R09, R11). */
export function fixtureRows({ family }: Tools): FixtureRows {
  const fixtures = family.table('fixtures');
  const bind = (row: PrintedRow, kind: string | null): FixtureRow => {
    const { least, largest } = trapRange(row, family);
    return {
      id: row.key,
      title: row.title,
      closet: kind === 'water-closet',
      siphonic: kind === 'water-closet' || row.key === 'urinal-pedestal',
      emergency: row.key === 'emergency-floor-drain',
      leastTrap: least,
      largestTrap: largest,
      loadAt: (trap) => {
        const cell = loadAtTrap(row, trap, family) ?? loadAtTrap(row, largest, family);
        if (cell === null) throw new Error(`${family.code} has no load for ${row.key}`);
        return { load: cell.value as Load, cell };
      },
    };
  };
  const unlisted = unlistedFixture(family);
  const cache = new Map<string, readonly FixtureRow[]>();
  return {
    rowsFor: (kind, detail) => {
      const key = [kind, ...Object.values(detail)].join('|');
      const known = cache.get(key);
      if (known !== undefined) return known;
      const rows =
        kind === null
          ? allFixtureRows(family.kinds, fixtures).map((row) => bind(row, row.kind))
          : fixtureRowsFor(family.kinds, fixtures, { kind, ...detail }).map((row) => bind(row, kind));
      if (rows.length === 0 && unlisted !== null) rows.push(bind(unlisted, kind));
      const sorted = rows.sort((a, b) => a.loadAt(a.leastTrap).load - b.loadAt(b.leastTrap).load);
      cache.set(key, sorted);
      return sorted;
    },
  };
}

/** One closet, one domestic lavatory and one bathtub or single shower in one room (R07). */
export function bathroomGroup({ family }: Tools): GroupRule {
  const fixtures = family.table('fixtures');
  const figureRow = (id: string): Cell<number> =>
    fixtures.rows.find((row) => row.text('fixture') === id)!.amount('load') as Cell<number>;
  return {
    clause: family.rule('NPC-R07').clause,
    memberOf: ({ id, closet }) =>
      closet
        ? 'closet'
        : id === 'lavatory-domestic'
          ? 'lavatory'
          : id === 'bathtub' || id === 'shower-1'
            ? 'bath'
            : null,
    figure: ({ id }) => {
      const cell = figureRow(id === 'wc-valve' ? 'bathroom-group-valve' : 'bathroom-group-tank');
      return { load: cell.value as Load, cell };
    },
  };
}

/** A floor drain that needs no vent: large trap, long drain, little fall (R37). */
export function freeOfVent({ family }: Tools): (trap: FreeTrapFacts) => { rule: string; clause: string } | null {
  const { series } = family;
  const least = family.size('floor-drain-free-trap');
  const longest = family.number('floor-drain-free-length', 'length');
  const { id, clause } = family.rule('NPC-R37');
  return ({ kind, trap, length, fall }) => {
    if (kind !== 'floor-drain' || length === null || fall === null) return null;
    const width = series.sizes[series.rank(trap)]!.lengthsMm[0]! / 1000;
    const holds =
      series.rank(trap) >= series.rank(least.value) &&
      length >= longest.value - coordinateMetres &&
      fall <= width + coordinateMetres;
    return holds ? { rule: id, clause } : null;
  };
}
