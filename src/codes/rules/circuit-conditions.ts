import { reachesSlope } from '../../tables/find-slope.ts';
import type { Family } from '../../tables/open-family.ts';
import type { BatteryFacts, Broken } from '../battery.ts';

/** Rules of a family's section on circuit vents, by what they say. */
export interface CircuitRules {
  /** Which rows may be circuit vented, and how they join. */
  readonly allowed: string;
  /** Each group of the branch has its own vent. */
  readonly groups: string;
  /** Where the vent joins, and that nothing drains into it. */
  readonly vent: string;
  readonly slope: string;
  readonly relief: string;
  /** Other fixtures on the branch. */
  readonly others: string;
}

/** Fewest fixtures that a vent can be said to be shared by. */
const fewest = 2;

/**
 * Conditions of a circuit vent as the American codes print them: two to eight fixtures of one storey on a level branch,
 * each joining level; the vent between the two most upstream drains, dry; a relief vent where closets and drainage from
 * above ask for one. A drop before the vent empties the trap, so it is no level joint wherever it ends.
 */
export function circuitConditions(family: Family, rules: CircuitRules): (facts: BatteryFacts) => Broken[] {
  const most = family.number('circuit-most-fixtures', 'count');
  const steepest = family.number('circuit-slope-most', 'slope');
  const closets = family.number('relief-closets', 'count');
  return ({ circuit, guests }) => {
    const broken: Broken[] = [];
    const breaks = (
      rule: string,
      facts: Broken['facts'],
      finding: Broken['finding'] = 'circuit-vent-not-allowed',
    ): void => {
      broken.push({ rule, clause: family.rule(rule).clause, facts, finding });
    };
    const { traps, onVent } = circuit;
    if (circuit.vertical > 0) breaks(rules.allowed, { verticalPipes: circuit.vertical });
    const storeys = new Set(traps.map(({ storey }) => storey));
    if (storeys.size > 1) breaks(rules.allowed, { storeys: storeys.size });
    // A water closet may drop from its ring, as long as its drain then joins level.
    const dropping = traps.filter(({ row, drops, joinsLevel }) => !joinsLevel || (!row.siphonic && drops.pipes > 0));
    if (dropping.length > 0) breaks(rules.allowed, { drops: dropping.length });
    if (circuit.stackUpstream) breaks(rules.allowed, { stackUpstream: true });
    if (traps.length < fewest) breaks(rules.allowed, { circuitTraps: traps.length, circuitLeast: fewest });
    if (traps.length > most.value) breaks(rules.groups, { circuitTraps: traps.length, circuitMost: most.value });
    if (circuit.additional.length > 0) breaks(rules.groups, { furtherVents: circuit.additional.length });
    if (circuit.trapsAtStart !== 1) breaks(rules.vent, { trapsAtStart: circuit.trapsAtStart });
    if (onVent.length > 0) breaks(rules.vent, { fixturesOnVent: onVent.length, ventDry: true });
    if (
      circuit.steepest !== null &&
      circuit.steepest > steepest.value &&
      !reachesSlope(steepest.value, circuit.steepest)
    )
      breaks(rules.slope, { slope: circuit.steepest, slopeMost: steepest.value });
    if (circuit.closets >= closets.value && circuit.soilAbove && circuit.relief === null)
      breaks(rules.relief, { closets: circuit.closets, closetsFrom: closets.value }, 'relief-vent-missing');
    const elsewhere = guests.filter(({ storey }) => !storeys.has(storey));
    if (elsewhere.length > 0) breaks(rules.others, { othersElsewhere: elsewhere.length });
    return broken;
  };
}
