import { type Finding, finding } from '../../findings/finding.ts';
import type { RuleEntry } from '../../tables/rule-list.ts';
import { coordinateMetres } from '../../units/uncertainty.ts';
import type { Check, CheckedVent, FloodFacts } from '../check.ts';
import { islandDescent } from './island.ts';

/** How high fixtures fill over their floor where the drawing does not say less, metres. */
export interface RimLimits {
  readonly usual: number;
  readonly closet: number;
}

/**
 * Height at which a fixture overflows, metres: the top of its body, at most the usual rim over its floor (a tap or a tank
 * stands higher), never below its outlet. A fixture without a body: its outlet, which is surely below the rim.
 */
export function floodHeight(
  { closet, outlet, top, floor }: FloodFacts,
  { usual, closet: bowl }: RimLimits,
): number | null {
  const rim = top === null ? null : Math.min(top, floor + (closet ? bowl : usual));
  return rim === null ? outlet : Math.max(rim, outlet ?? rim);
}

/** The fixture of those that a vent serves that overflows highest. */
export function highestFlood(
  { serves }: CheckedVent,
  rims: RimLimits,
): { readonly fixture: FloodFacts; readonly height: number } | null {
  let highest: { fixture: FloodFacts; height: number } | null = null;
  for (const fixture of serves) {
    const height = floodHeight(fixture, rims);
    if (height !== null && (highest === null || height > highest.height)) highest = { fixture, height };
  }
  return highest;
}

/** A dry vent meets another so far above the flood level of every fixture it serves, metres. */
export const ventsMeetHigh = ({ id, clause }: RuleEntry, rims: RimLimits, above: number): Check => ({
  id,
  run: ({ vents }) =>
    vents.flatMap((vent): Finding[] => {
      const flood = highestFlood(vent, rims);
      if (flood === null || vent.meets === null || vent.meets >= flood.height + above - coordinateMetres) return [];
      const { element, floor } = flood.fixture;
      const facts = { meetsM: vent.meets - floor, floodsM: flood.height - floor, aboveM: above };
      return [finding('vent-joins-too-low', [vent.elements[0]!, element, ...vent.elements.slice(1)], facts, clause)];
    }),
});

/** A dry vent of traps rises so far above the flood level of every fixture it serves before it runs level, metres. */
export const ventsRiseFirst = ({ id, clause }: RuleEntry, rims: RimLimits, above: number): Check => ({
  id,
  run: ({ vents }) =>
    vents.flatMap((vent): Finding[] => {
      const { elements, traps, runsLevelAt, descent } = vent;
      const flood = traps.length === 0 || descent >= islandDescent ? null : highestFlood(vent, rims);
      if (flood === null || runsLevelAt === null || runsLevelAt >= flood.height + above - coordinateMetres) return [];
      const { element, floor } = flood.fixture;
      const facts = { levelM: runsLevelAt - floor, floodsM: flood.height - floor, aboveM: above };
      return [finding('dry-vent-too-flat', [elements[0]!, element, ...elements.slice(1)], facts, clause)];
    }),
});

/** A dry vent leaves a level drain through its upper half: one that leaves flatter than this, degrees, leaves at its side. */
export const ventLeavesUpward = ({ id, clause }: RuleEntry, flattest: number): Check => ({
  id,
  run: ({ vents }) =>
    vents.flatMap(({ elements, leavesAt }): Finding[] =>
      leavesAt === null || leavesAt >= flattest
        ? []
        : [finding('dry-vent-too-flat', elements, { angleDeg: Math.max(0, leavesAt), leastDeg: flattest }, clause)],
    ),
});

/** A vent ends so far above the roof over its place, metres. */
export const endsOverRoof = ({ id, clause }: RuleEntry, least: number): Check => ({
  id,
  run: ({ drains }) =>
    drains.flatMap(({ mouths }) =>
      mouths.flatMap(({ elements, how, overRoof }): Finding[] =>
        how === 'valve' || how === 'answer' || overRoof === null || overRoof >= least - coordinateMetres
          ? []
          : [finding('terminal-too-low', elements, { overRoofM: overRoof, leastM: least }, clause)],
      ),
    ),
});
