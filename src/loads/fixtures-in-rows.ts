import type { Vec3 } from '../geometry/vector.ts';
import type { FixtureId } from '../paths/paths.ts';
import type { Load } from '../units/quantity.ts';
import type { FixtureFacts } from './fixture-facts.ts';
import type { Bundle } from './loads.ts';

/** Outlets this near to one another, metres, stand side by side: common practice, no source. */
const sideBySide = 1.5;

/**
 * Rows of fixtures that the code rates higher together: of one kind, side by side, as many as it names or more. Each
 * counts its larger load on every drain that two or more of a row share; its own drain keeps its own.
 */
export function fixturesInRows(facts: FixtureFacts): Bundle[] {
  const rule = facts.code.row;
  if (rule === null) return [];
  const { paths, identities, network } = facts;
  const places = paths.fixtures.flatMap(({ id, element, outlet }): { id: FixtureId; at: Vec3 }[] => {
    const { at } = network.joints[outlet]!;
    return at === null || identities[element]!.kind !== rule.kind ? [] : [{ id, at }];
  });
  const rows: FixtureId[][] = [];
  const placed = new Set<FixtureId>();
  for (const first of places) {
    if (placed.has(first.id)) continue;
    placed.add(first.id);
    const row = [first];
    for (let next = 0; next < row.length; next++) {
      const { at } = row[next]!;
      for (const other of places) {
        if (placed.has(other.id) || distance(at, other.at) > sideBySide) continue;
        placed.add(other.id);
        row.push(other);
      }
    }
    if (row.length >= rule.least) rows.push(row.map(({ id }) => id).sort((a, b) => a - b));
  }
  return rows.map((members) => ({
    members,
    together: (sum, count) => (count < 2 ? sum : (Math.max(sum, count * rule.each) as Load)),
  }));
}

const distance = (a: Vec3, b: Vec3): number => Math.hypot(a[0] - b[0], a[1] - b[1], a[2] - b[2]);
