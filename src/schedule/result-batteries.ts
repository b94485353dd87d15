import type { Broken } from '../codes/battery.ts';
import type { Battery, ReadingGround } from '../roles/roles.ts';
import { noLoad, plusLoad, unitsOf } from '../units/quantity.ts';
import type { Outcome } from '../verdicts/outcome.ts';
import type { BrokenCondition, ResultBattery, ResultJoint, ResultSystem } from './result.ts';
import { type ResultIndex, roundMetres } from './result-index.ts';
import { printedFacts } from './result-trail.ts';

export function battery(
  { facts, reading, why, broken, others }: Battery,
  outcome: Outcome,
  index: ResultIndex,
): ResultBattery {
  const pipes = reading === 'circuit-vent' ? [...facts.circuit.wetPortion, ...facts.circuit.branch] : facts.line;
  const conditions = (list: readonly Broken[]): BrokenCondition[] =>
    list.map(({ rule, clause, facts: numbers }) => ({
      rule,
      title: outcome.code.ruleTitle(rule),
      clause,
      facts: printedFacts(outcome, index, numbers),
    }));
  return {
    id: index.batteryName(facts.id),
    fixtures: facts.traps.map(({ fixture }) => index.fixtureId(fixture)),
    pipes: index.idsOf(pipes),
    reading,
    why: grounds[why],
    broken: conditions(broken),
    others: others.map((one) => ({
      reading: one.reading,
      holds: one.broken.length === 0,
      broken: conditions(one.broken),
    })),
  };
}

const grounds: Readonly<Record<ReadingGround, string>> = {
  answer: 'the answers file says so',
  'designer-says': 'the model says so and it holds',
  'only-known': 'the code knows no other: it has neither wet vents nor circuit vents',
  'only-one-holds': 'it is the only reading whose conditions hold',
  'first-that-holds': 'several readings hold and the code comes to it first',
  'dry-relief-vent': 'a dry relief vent joins downstream, which nobody draws for a wet vent',
  'no-dry-relief-vent': 'both readings hold and no dry relief vent is drawn',
  'fewer-broken': 'no reading holds and it breaks the fewest conditions',
  tie: 'no reading holds, and what it breaks speaks for it',
};

/** Connected pieces of drainage with their sewer end, in the order they were found. */
export function systems({ paths, network, pipes }: Outcome, index: ResultIndex): ResultSystem[] {
  return paths.systems.map(({ sewerEnd, how, isCutOff, pipes: own }) => {
    const lasts = own.filter((pipe) => paths.wet[pipe] && paths.stream.down(pipe) === sewerEnd);
    const last = lasts[0];
    const element = last === undefined ? null : network.pipes[last]!.element;
    const sum = (of: 'least' | 'most'): number =>
      unitsOf(lasts.reduce((all, pipe) => plusLoad(all, pipes[pipe]!.load[of]), noLoad));
    const load = { least: sum('least'), most: sum('most') };
    const inside = new Set(own);
    return {
      sewerEnd: { at: network.joints[sewerEnd]!.at, pipe: element === null ? null : index.idOf(element), how },
      ...(isCutOff ? { isCutOff } : {}),
      pipes: new Set(own.flatMap((pipe) => network.pipes[pipe]!.element ?? [])).size,
      fixtures: paths.fixtures.filter(({ water }) => water[0] !== undefined && inside.has(water[0])).length,
      load,
    };
  });
}

export function joints(
  { network }: Outcome,
  index: ResultIndex,
): { ports: number; geometry: number; inferred: ResultJoint[] } {
  const inferred = network.joints.flatMap(({ inferred: how }): ResultJoint[] =>
    how === null ? [] : [{ about: how.between.map(index.idOf), how: how.how, gap: roundMetres(how.gap) }],
  );
  return { ...network.joined, inferred };
}
