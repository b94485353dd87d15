import type { Cell } from '../../tables/table.ts';
import type { Load } from '../../units/quantity.ts';
import { coordinateMetres } from '../../units/uncertainty.ts';
import type { FixtureRows } from '../fixture-row.ts';
import type { FreeTrapFacts, GroupRule } from '../plumbing-code.ts';
import { fixtureRows } from '../rules/fixture-rows.ts';
import type { Tools } from '../tools.ts';
import type { PipeUse } from '../use.ts';

/** Loads of fixtures: Table 2.4.9.3., and Table 2.4.10.2. by trap where that says nothing (R08, R09, R11). */
export const fixtures = (tools: Tools): FixtureRows =>
  fixtureRows(tools, {
    columns: [{ load: 'load', outlet: 'outlet', facts: {} }],
    isSiphonic: (key, kind) => kind === 'water-closet' || key === 'urinal-pedestal',
    isEmergency: (key) => key === 'emergency-floor-drain',
  });

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

/** Name under which macerating toilets are counted. */
export const macerators = 'macerating-toilets';

/** The discharge of a macerating toilet by itself: pumped, neither sloped nor sized by the tables of drains (R24). */
export const isPumped = ({ drain, fixtures: carried, counts }: PipeUse): boolean =>
  drain === 'fixture-drain' && carried > 0 && counts[macerators] === carried;

/** A floor drain that needs no vent: large trap, long drain, little fall (R37). */
export function freeOfVent({
  family,
  settings,
}: Tools): (trap: FreeTrapFacts) => { rule: string; clause: string } | null {
  const { series } = family;
  const least = family.size('floor-drain-free-trap');
  const longest = family.number('floor-drain-free-length', 'length');
  const { id, clause } = family.rule('NPC-R37');
  const { rank } = series;
  return ({ kind, trap, length, fall, stackAbove }) => {
    // Ontario's text of 2012: it joins a drain that ends upstream in a stack as large.
    if (settings.floorDrainAtStack === true && (stackAbove === null || rank(stackAbove) < rank(least.value)))
      return null;
    if (kind !== 'floor-drain' || length === null || fall === null) return null;
    const width = series.sizes[series.rank(trap)]!.lengthsMm[0]! / 1000;
    const holds =
      series.rank(trap) >= series.rank(least.value) &&
      length >= longest.value - coordinateMetres &&
      fall <= width + coordinateMetres;
    return holds ? { rule: id, clause } : null;
  };
}
