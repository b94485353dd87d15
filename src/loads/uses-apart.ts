import type { StatedUses } from '../codes/way.ts';
import { type Load, noLoad, plusLoad } from '../units/quantity.ts';
import type { FixtureFacts } from './fixture-facts.ts';
import type { FixtureLoad } from './loads.ts';

const none: StatedUses = [];

/** Loads by the frequency factor stated for them; those without one are left out. */
export function statedUses(parts: readonly { readonly frequency: number | null; readonly load: Load }[]): StatedUses {
  const sums = new Map<number, Load>();
  for (const { frequency, load } of parts)
    if (frequency !== null) sums.set(frequency, plusLoad(sums.get(frequency) ?? noLoad, load));
  if (sums.size === 0) return none;
  return [...sums].map(([frequency, load]) => ({ frequency, load })).sort((a, b) => a.frequency - b.frequency);
}

/** Of what drains through every pipe, the loads whose use the user states apart from the building's. By pipe id. */
export function usesApart({ paths, identities }: FixtureFacts, loads: readonly FixtureLoad[]): StatedUses[] {
  const uses: StatedUses[] = paths.wet.map(() => none);
  const stated = paths.fixtures.map(({ element }) => identities[element]!.detail.frequency ?? null);
  if (stated.every((frequency) => frequency === null)) return uses;
  for (const pipe of paths.inFlowOrder) {
    const own = paths.entering[pipe]!.map((one) => ({ frequency: stated[one]!, load: loads[one]!.load }));
    uses[pipe] = statedUses([...uses[pipe]!, ...own]);
    const next = paths.next[pipe];
    if (next !== null && next !== undefined) uses[next] = statedUses([...uses[next]!, ...uses[pipe]!]);
  }
  return uses;
}
