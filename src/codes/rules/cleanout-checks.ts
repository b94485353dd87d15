import { type Finding, finding } from '../../findings/finding.ts';
import type { RuleEntry } from '../../tables/rule-list.ts';
import type { NominalSize, SizeSeries } from '../../units/nominal-size.ts';
import { coordinateMetres, turnDegrees } from '../../units/uncertainty.ts';
import type { Check, CheckFacts } from '../check.ts';

/** What a code asks of cleanouts; a rule that it does not have is absent. */
export interface CleanoutDemands {
  /** Every drain within the reach of one, metres; null: any distance. */
  readonly spacing: { readonly rule: RuleEntry; readonly reach: (pipe: NominalSize) => number | null };
  readonly size: { readonly rule: RuleEntry; readonly least: (pipe: NominalSize) => NominalSize };
  readonly buildingDrain?: RuleEntry;
  /** At the foot of a stack or so far above it, metres. */
  readonly stackFoot?: { readonly rule: RuleEntry; readonly within: number };
  /** On the drain of a kitchen sink that turns more than this, degrees. */
  readonly sink?: { readonly rule: RuleEntry; readonly turn: number };
  readonly interceptor?: RuleEntry;
  /** At or before a trap on the building drain. */
  readonly buildingTrap?: RuleEntry;
}

/**
 * Where cleanouts are missing or too small. A model that draws none has left them to another drawing: one finding says
 * so and counts where the code wants them.
 */
export function cleanoutChecks(demands: CleanoutDemands, { larger, rank }: SizeSeries): Check {
  const { spacing, size, buildingDrain, stackFoot, sink, interceptor, buildingTrap } = demands;
  return {
    id: spacing.rule.id,
    run: (facts) => {
      const { stacks, drains, access } = facts;
      if (access.cleanouts.length === 0) return noneDrawn(facts, demands);
      const found: Finding[] = [];
      const missing = (about: readonly number[], what: string, { clause }: RuleEntry, more = {}): void => {
        found.push(finding('cleanout-missing', about, { what, ...more }, clause));
      };
      for (const { elements, hasCleanout } of drains)
        if (buildingDrain !== undefined && !hasCleanout) missing(elements, 'building drain', buildingDrain);
      for (const { elements, cleanout } of stacks) {
        if (stackFoot === undefined || (cleanout !== null && cleanout <= stackFoot.within + coordinateMetres)) continue;
        missing(elements, 'stack foot', stackFoot.rule, {
          withinM: stackFoot.within,
          ...(cleanout === null ? {} : { distanceM: cleanout }),
        });
      }
      for (const { element, turn, hasCleanout } of access.sinks) {
        if (sink !== undefined && !hasCleanout && turn > sink.turn + turnDegrees)
          missing([element], 'sink', sink.rule, { turnDeg: turn, limitDeg: sink.turn });
      }
      for (const { element, hasCleanout } of access.interceptors)
        if (interceptor !== undefined && !hasCleanout) missing([element], 'interceptor', interceptor);
      for (const { element, hasCleanout } of access.buildingTraps)
        if (buildingTrap !== undefined && !hasCleanout) missing([element], 'running trap', buildingTrap);
      found.push(...outOfReach(facts, spacing));
      for (const { element, size: own, opens } of access.cleanouts) {
        if (own === null || opens === null) continue;
        const least = size.least(opens);
        if (rank(larger(own, least)) > rank(own))
          found.push(finding('cleanout-too-small', [element], { modelled: own, least, pipe: opens }, size.rule.clause));
      }
      return found;
    },
  };
}

/** Drains that no cleanout reaches: one finding for each limit, the farthest drain first. */
function outOfReach({ access }: CheckFacts, { rule, reach }: CleanoutDemands['spacing']): Finding[] {
  const byLimit = new Map<number, { element: number; distance: number }[]>();
  for (const { element, size, distance } of access.drains) {
    const limit = reach(size);
    if (limit === null || distance === null || distance <= limit + coordinateMetres) continue;
    byLimit.set(limit, [...(byLimit.get(limit) ?? []), { element, distance }]);
  }
  return [...byLimit]
    .sort(([a], [b]) => a - b)
    .map(([limit, drains]) => {
      const far = [...drains].sort((a, b) => b.distance - a.distance || a.element - b.element);
      const about = [...new Set(far.map(({ element }) => element))];
      const facts = { what: 'spacing', pipes: about.length, distanceM: far[0]!.distance, limitM: limit };
      return finding('cleanout-missing', about, facts, rule.clause);
    });
}

function noneDrawn(
  { stacks, drains, access }: CheckFacts,
  { spacing, buildingDrain, stackFoot, sink, interceptor }: CleanoutDemands,
): Finding[] {
  const wants = {
    buildingDrains: buildingDrain === undefined ? 0 : drains.length,
    stacks: stackFoot === undefined ? 0 : stacks.length,
    sinks: sink === undefined ? 0 : access.sinks.filter(({ turn }) => turn > sink.turn + turnDegrees).length,
    interceptors: interceptor === undefined ? 0 : access.interceptors.length,
  };
  const about = [...drains, ...stacks].flatMap(({ elements }) => elements.slice(-1));
  return access.drains.length === 0 && about.length === 0
    ? []
    : [finding('cleanout-missing', about, { what: 'none drawn', ...wants }, spacing.rule.clause)];
}
