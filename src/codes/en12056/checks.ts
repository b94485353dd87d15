import { type Finding, finding } from '../../findings/finding.ts';
import type { ElementId } from '../../model/model.ts';
import type { PipeId } from '../../network/network.ts';
import { unitsOf } from '../../units/quantity.ts';
import type { Check, CheckedPipe, CheckedTrap, CheckFacts } from '../check.ts';
import type { Tools } from '../tools.ts';
import type { Breach } from './breach.ts';
import { leastDrainSlope } from './drain-rules.ts';
import { isSteepEnough, leastGradient, reachOf } from './reach.ts';
import { isGerman, isLine, systemOf } from './system.ts';
import { applianceTables } from './system-three.ts';

/** Demands that are no size: R02, R11 to R14, R22, R44, slopes, and the two stacks of system IV. */
export function checks(tools: Tools): Check[] {
  return [permitted(tools), branches(tools), slopes(tools), stackTops(tools), twoStacks(tools), ventOfDrain(tools)];
}

/** An appliance that the system does not permit (R02). */
function permitted({ family }: Tools): Check {
  const { clause } = family.rule('EN-R02');
  return {
    id: 'EN-R02',
    run: ({ traps }) =>
      traps
        .filter(({ refused }) => refused)
        .map(({ element, kind }) => finding('appliance-not-allowed', [element], { kind, what: 'appliance' }, clause)),
  };
}

/** One finding for each branch and measure: the trap that is farthest out of reach (R11 to R14). */
function branches(tools: Tools): Check {
  const { family } = tools;
  const three = systemOf(tools) === 'III';
  const reach = reachOf(tools);
  const appliances = three ? applianceTables(tools) : null;
  const clauseOf = (ventilated: boolean): string =>
    family.rule(three ? (ventilated ? 'EN-R14' : 'EN-R12') : ventilated ? 'EN-R13' : 'EN-R11').clause;

  const breachesOf = (trap: CheckedTrap, pipes: readonly CheckedPipe[]): OutOfReach[] => {
    if (trap.way === null || trap.way.line.length === 0) return [];
    const { pipes: own, whole, line, end } = trap.way;
    const judge = (ventilated: boolean, last: PipeId): OutOfReach[] => {
      const { use, required, modelled } = pipes[last]!;
      const way = ventilated ? whole : trap.way!;
      const found =
        appliances === null
          ? reach(way, ventilated, required ?? modelled)
          : (appliances(use, way, ventilated)?.breaches ?? []);
      return found.map((breach) => ({ breach, ventilated, last, element: trap.element }));
    };
    const short = own.at(-1);
    return [
      ...(short === undefined ? [] : judge(false, short)),
      ...(end === 'ventilated' ? judge(true, line.at(-1)!) : []),
    ];
  };
  return {
    id: 'EN-R11',
    run: ({ traps, pipes }) => {
      const worst = new Map<string, OutOfReach>();
      for (const trap of traps)
        for (const one of breachesOf(trap, pipes)) {
          const key = `${one.last} ${one.ventilated} ${one.breach.what}`;
          const known = worst.get(key);
          const isWorse =
            known === undefined ||
            (one.breach.what === 'slope'
              ? one.breach.value < known.breach.value
              : one.breach.value > known.breach.value);
          if (isWorse) worst.set(key, one);
        }
      return [...worst.values()].map((one) => outOfReach(one, pipes, clauseOf(one.ventilated)));
    },
  };
}

interface OutOfReach {
  readonly breach: Breach;
  readonly ventilated: boolean;
  /** Last pipe of the branch. */
  readonly last: PipeId;
  readonly element: ElementId;
}

function outOfReach(
  { breach: { what, value, limit }, ventilated, last, element }: OutOfReach,
  pipes: readonly CheckedPipe[],
  clause: string,
): Finding {
  const { element: pipe, required, modelled } = pipes[last]!;
  const about = pipe === null ? [element] : [element, pipe];
  if (what === 'slope')
    return finding('slope-too-small', about, { slope: value, least: limit, size: modelled ?? required }, clause);
  const measures = {
    length: { lengthM: value, limitM: limit },
    drop: { lengthM: value, limitM: limit },
    bends: { bends: Math.round(value * 10) / 10, bendsMost: limit },
    steep: { slope: value, slopeMost: limit },
    group: { fixtures: value, fixturesMost: limit },
  };
  return finding('branch-too-long', about, { what, ...measures[what], ventilated }, clause);
}

/** Least gradients of branches, and of drains the flattest that the annex has; outside in Germany one in the nominal size. */
function slopes(tools: Tools): Check {
  const { family } = tools;
  const least = leastGradient(tools);
  const drain = leastDrainSlope(tools);
  const clauses = {
    branch: family.rule('EN-R11').clause,
    vented: family.rule('EN-R13').clause,
    drain: family.rule('EN-R30').clause,
  };
  const demandOn = ({ use, required, modelled }: CheckedPipe): { least: number | null; clause: string } => {
    if (isLine(use.drain)) {
      const ventilated = use.reach?.ventilated === true;
      return { least: least(ventilated), clause: ventilated ? clauses.vented : clauses.branch };
    }
    const size = modelled ?? required;
    const nominal = size === null ? null : family.series.sizes[family.series.rank(size)]!.dn;
    const outside = isGerman(tools) && use.drain === 'building-sewer' && nominal !== null ? 1 / nominal : 0;
    return { least: Math.max(drain, outside), clause: clauses.drain };
  };
  return {
    id: 'EN-R30',
    run: ({ pipes }) =>
      pipes.flatMap((pipe) => {
        const { use, element, slopeGround, slopeUncertainty, length, required, modelled } = pipe;
        if (element === null || use.drain === null || use.vertical || use.portion === 'outlet' || use.slope === null)
          return [];
        if (use.slope < 0) return [];
        // A stub between two fittings says nothing of the slope a pipe is laid to.
        if (slopeGround === 'geometry' && length < shortest) return [];
        const demand = demandOn(pipe);
        if (demand.least === null || isSteepEnough(use.slope, slopeUncertainty, demand.least)) return [];
        const facts = { slope: use.slope, least: demand.least, size: modelled ?? required };
        return [finding('slope-too-small', [element], facts, demand.clause)];
      }),
  };
}

const shortest = 0.15;

/** A stack goes on upward to the sky or to a valve (R22, R26). */
function stackTops({ family }: Tools): Check {
  const { clause } = family.rule('EN-R22');
  return {
    id: 'EN-R22',
    run: ({ stacks }) =>
      stacks
        .filter(({ hasStackVent }) => !hasStackVent)
        .map(({ elements, footLoad }) =>
          finding('stack-vent-missing', elements, { loadUnits: unitsOf(footLoad) }, clause),
        ),
  };
}

/** System IV: closets and urinals on one stack, all else on the other (4.2). */
function twoStacks(tools: Tools): Check {
  const { clause } = tools.family.rule('EN-R01');
  const mixed = ({ pipes }: CheckFacts): Finding[] =>
    pipes.flatMap(({ use, element }) => {
      if (use.stack === null || use.pipe !== use.stack.foot || element === null) return [];
      const { counts, fixtures } = use.stack.carries;
      const soil = counts.soil ?? 0;
      return soil === 0 || soil === fixtures
        ? []
        : [finding('appliance-not-allowed', [element], { what: 'mixed', soil, others: fixtures - soil }, clause)];
    });
  return { id: 'EN-R01', run: (facts) => (systemOf(tools) === 'IV' ? mixed(facts) : []) };
}

/** Where no stack is vented, the drain has one vent of its own in Germany and Austria (R44). */
function ventOfDrain(tools: Tools): Check {
  const { family } = tools;
  const least = family.size('no-stack-vent');
  const { rank } = family.series;
  const { clause } = family.rule('EN-R44');
  return {
    id: 'EN-R44',
    run: ({ drains, stacks }) =>
      !isGerman(tools) || stacks.length > 0
        ? []
        : drains
            .filter(({ widestVent }) => widestVent === null || rank(widestVent) < rank(least.value))
            .map(({ elements, widestVent }) =>
              finding('main-vent-missing', elements, { least: least.value, widest: widestVent }, clause),
            ),
  };
}
