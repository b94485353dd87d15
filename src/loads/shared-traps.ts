import type { JointId } from '../network/network.ts';
import type { FixtureId } from '../paths/paths.ts';
import { noLoad } from '../units/quantity.ts';
import type { FixtureFacts } from './fixture-facts.ts';
import type { FixtureLoad } from './loads.ts';

/**
 * Fixtures on one drawn trap: what the code counts together puts its load in once, and what it lets drain through a
 * sink for nothing puts in none. By fixture id, as given but for those loads.
 */
export function countSharedTraps(facts: FixtureFacts, loads: readonly FixtureLoad[]): FixtureLoad[] {
  const counted = [...loads];
  const rule = facts.code.sharedTrap;
  if (rule === null) return counted;
  for (const ids of trapMates(facts)) {
    const fixtures = ids.map((id) => {
      const { kind, detail } = facts.identities[facts.paths.fixtures[id]!.element]!;
      const { row, load } = loads[id]!;
      return { kind, domestic: detail.domestic, row, load };
    });
    rule(fixtures).forEach((counts, at) => {
      const id = ids[at]!;
      if (!counts) counted[id] = { ...loads[id]!, row: domesticRow(facts, loads, id), load: noLoad, settled: true };
    });
  }
  return counted;
}

/** What counts for nothing beside a sink is domestic, or not known to be otherwise: so is the outlet it asks for. */
function domesticRow({ code, identities, paths }: FixtureFacts, loads: readonly FixtureLoad[], id: FixtureId) {
  const { row, settled } = loads[id]!;
  const { kind, detail } = identities[paths.fixtures[id]!.element]!;
  return settled ? row : (code.fixtures.rowsFor(kind, { ...detail, domestic: true })[0] ?? row);
}

/** Fixtures that share a drawn trap, two or more, by fixture id. */
function trapMates({ paths }: FixtureFacts): FixtureId[][] {
  const byTrap = new Map<JointId, FixtureId[]>();
  for (const { fixture, at, how } of paths.traps) {
    if (how !== 'drawn') continue;
    const mates = byTrap.get(at);
    if (mates === undefined) byTrap.set(at, [fixture]);
    else mates.push(fixture);
  }
  return [...byTrap.values()].filter(({ length }) => length > 1);
}
