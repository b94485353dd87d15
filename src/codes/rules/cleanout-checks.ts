import { type Facts, type Finding, finding } from '../../findings/finding.ts';
import type { ElementId } from '../../model/model.ts';
import type { PipeId } from '../../network/network.ts';
import type { RuleEntry } from '../../tables/rule-list.ts';
import type { NominalSize, SizeSeries } from '../../units/nominal-size.ts';
import { coordinateMetres, turnDegrees } from '../../units/uncertainty.ts';
import type { Check, CheckFacts } from '../check.ts';

/** What a code asks of cleanouts; a rule that it does not have is absent. */
export interface CleanoutDemands {
  /** Every drain within the reach of one, metres; null: any distance. */
  readonly spacing: {
    readonly rule: RuleEntry;
    readonly reach: (pipe: NominalSize, isBetween: boolean) => number | null;
  };
  readonly size: {
    readonly rule: RuleEntry;
    readonly least: (pipe: NominalSize) => NominalSize;
    /** As it is printed, where that is no size of the series. */
    readonly printed?: (pipe: NominalSize) => string;
  };
  readonly buildingDrain?: RuleEntry;
  /** A cleanout near the foot of a stack, so far from where the building drain leaves, stands for the one there, metres. */
  readonly footServes?: number;
  /** At the foot of a stack or so far above it, metres. */
  readonly stackFoot?: { readonly rule: RuleEntry; readonly within: number };
  /** On the drain of a kitchen sink that turns more than this, degrees. */
  readonly sink?: { readonly rule: RuleEntry; readonly turn: number };
  readonly interceptor?: RuleEntry;
  /** At or before a trap on the building drain. */
  readonly buildingTrap?: RuleEntry;
  /** A level drain that turns more than `turn` degrees in one fitting, within so many metres. */
  readonly bend?: { readonly rule: RuleEntry; readonly turn: number; readonly within: number };
  /** At the upper end of a level drain on the way to the building drain, unless it is shorter than this, metres. */
  readonly upperEnd?: { readonly rule: RuleEntry; readonly free: number };
  /** A further one wherever such a drain has turned so far since the last, degrees. */
  readonly turns?: { readonly rule: RuleEntry; readonly turn: number };
  readonly urinal?: RuleEntry;
  /** On the drain of every kitchen sink, however it runs. */
  readonly kitchenSink?: RuleEntry;
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
      for (const { elements, pipes, hasCleanout } of drains)
        if (buildingDrain !== undefined && !hasCleanout && !footServes(facts, pipes, demands))
          missing(elements, 'building drain', buildingDrain);
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
      found.push(...onLevelDrains(facts, demands), ...outOfReach(facts, spacing));
      for (const { element, size: own, opens } of access.cleanouts) {
        if (own === null || opens === null) continue;
        const least = size.least(opens);
        if (rank(larger(own, least)) > rank(own))
          found.push(
            finding(
              'cleanout-too-small',
              [element],
              { modelled: own, least: size.printed?.(opens) ?? least, pipe: opens },
              size.rule.clause,
            ),
          );
      }
      return found;
    },
  };
}

/** A large sewer has a manhole soon after the building, and further ones along its run, metres. */
export const manholes = (
  { id, clause }: RuleEntry,
  { rank }: SizeSeries,
  { from, first, next }: { readonly from: NominalSize; readonly first: number; readonly next: number },
): Check => ({
  id,
  run: ({ access }) =>
    access.sewers.flatMap(({ element, size, since, pastManhole }): Finding[] => {
      const most = pastManhole ? next : first;
      if (rank(size) < rank(from) || since <= most + coordinateMetres) return [];
      return [finding('cleanout-missing', [element], { what: 'manhole', distanceM: since, limitM: most }, clause)];
    }),
});

/** A stack's cleanout at its foot serves a short building drain as well. */
function footServes({ stacks, pipes }: CheckFacts, drain: readonly PipeId[], { footServes: within }: CleanoutDemands) {
  const length = drain.reduce<number>((sum, pipe) => sum + pipes[pipe]!.length, 0);
  return within !== undefined && length <= within && stacks.some(({ cleanout }) => cleanout !== null);
}

/** Bends, upper ends and turns of level drains, and urinals: one finding for each demand, all the drains that miss it. */
function onLevelDrains(
  { access }: CheckFacts,
  { bend, upperEnd, turns, urinal, kitchenSink }: CleanoutDemands,
): Finding[] {
  const found: Finding[] = [];
  const report = (about: readonly number[], what: string, { clause }: RuleEntry, facts: Facts): void => {
    if (about.length > 0)
      found.push(finding('cleanout-missing', about, { what, pipes: about.length, ...facts }, clause));
  };
  const far = (distance: number | null, limit: number): boolean =>
    distance === null || distance > limit + coordinateMetres;
  const lowest = access.runs.filter(({ endsAt }) => endsAt === 'building-drain');
  if (bend !== undefined) {
    const bent = access.bends.filter(
      ({ turn, distance }) => turn > bend.turn + turnDegrees && far(distance, bend.within),
    );
    const facts = { turnDeg: Math.max(0, ...bent.map(({ turn }) => turn)), limitDeg: bend.turn, withinM: bend.within };
    report(elementsOf(bent), 'bend', bend.rule, facts);
  }
  if (upperEnd !== undefined) {
    const open = lowest.filter(
      ({ length, head }) => length > upperEnd.free + coordinateMetres && far(head, upperEnd.free),
    );
    report(elementsOf(open), 'upper end', upperEnd.rule, {
      lengthM: Math.max(0, ...open.map(({ length }) => length)),
      limitM: upperEnd.free,
    });
  }
  if (turns !== undefined) {
    const turned = lowest.filter(({ turn }) => turn > turns.turn + turnDegrees);
    report(elementsOf(turned), 'turns', turns.rule, {
      turnDeg: Math.max(0, ...turned.map(({ turn }) => turn)),
      limitDeg: turns.turn,
    });
  }
  if (urinal !== undefined)
    report(elementsOf(access.urinals.filter(({ hasCleanout }) => !hasCleanout)), 'urinal', urinal, {});
  if (kitchenSink !== undefined)
    report(elementsOf(access.sinks.filter(({ hasCleanout }) => !hasCleanout)), 'kitchen sink', kitchenSink, {});
  return found;
}

const elementsOf = (list: readonly { readonly element: ElementId }[]): ElementId[] => [
  ...new Set(list.map(({ element }) => element)),
];

/** Drains that no cleanout reaches: one finding for each limit, the farthest drain first. */
function outOfReach({ access }: CheckFacts, { rule, reach }: CleanoutDemands['spacing']): Finding[] {
  const byLimit = new Map<number, { element: number; distance: number }[]>();
  for (const { element, size, distance, isBetween } of access.drains) {
    const limit = reach(size, isBetween);
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
  { spacing, buildingDrain, stackFoot, sink, interceptor, upperEnd, urinal }: CleanoutDemands,
): Finding[] {
  const wants = {
    buildingDrains: buildingDrain === undefined ? 0 : drains.length,
    stacks: stackFoot === undefined ? 0 : stacks.length,
    sinks: sink === undefined ? 0 : access.sinks.filter(({ turn }) => turn > sink.turn + turnDegrees).length,
    interceptors: interceptor === undefined ? 0 : access.interceptors.length,
    ...(upperEnd === undefined
      ? {}
      : {
          upperEnds: access.runs.filter(({ endsAt, length }) => endsAt === 'building-drain' && length > upperEnd.free)
            .length,
        }),
    ...(urinal === undefined ? {} : { urinals: access.urinals.length }),
  };
  const about = [...drains, ...stacks].flatMap(({ elements }) => elements.slice(-1));
  return access.drains.length === 0 && about.length === 0
    ? []
    : [finding('cleanout-missing', about, { what: 'none drawn', ...wants }, spacing.rule.clause)];
}
