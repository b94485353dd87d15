import type { Facts } from '../findings/finding.ts';
import type { PipeId } from '../network/network.ts';
import type { Outcome } from '../verdicts/outcome.ts';
import type { TrailStep } from './result.ts';
import { type ResultIndex, roundMetres } from './result-index.ts';

/** Every demand on a pipe, in the order of the code's rules, and which governs. */
export function resultTrail(outcome: Outcome, index: ResultIndex, pipe: PipeId): TrailStep[] {
  const { trail, governing } = outcome.shown.sizes[pipe]!;
  const isAnswered = outcome.paths.slopes[pipe]!.ground === 'answer';
  return trail.map((step) => ({
    rule: step.rule,
    title: outcome.code.ruleTitle(step.rule),
    clause: step.clause,
    table: step.cell === null || step.cell.place.table === 'limits' ? null : step.cell.place.table,
    row: step.cell === null || step.cell.place.table === 'limits' ? null : step.cell.place.row,
    facts: {
      ...printedFacts(outcome, index, step.facts),
      ...(typeof step.facts.storey === 'number' ? { storey: storeyName(outcome, step.facts.storey) } : {}),
      ...(isAnswered && typeof step.facts.slope === 'number' ? { slopeAnswered: true } : {}),
    },
    asks: step.asks === null ? null : index.size(step.asks),
    governs: governing.includes(step),
    trust: step.provisional ? 'provisional' : (step.cell?.trust ?? step.trust),
    ...(step.smaller == null ? {} : { smaller: { size: index.size(step.smaller.size), limit: step.smaller.limit } }),
  }));
}

/** The model's own name of a storey of plumbing; where it has none they are counted from the lowest. */
function storeyName({ model, shown }: Outcome, storey: number): string {
  const elevation = shown.roles.floors.elevations[storey];
  return model.storeys.find((one) => one.elevation === elevation)?.name ?? `storey ${storey + 1}`;
}

/** Pipes that facts name become GlobalIds, lengths are rounded to what coordinates can tell. */
export function printedFacts({ network, paths }: Outcome, index: ResultIndex, facts: Facts): Record<string, unknown> {
  return Object.fromEntries(
    Object.entries(facts).map(([key, value]): [string, unknown] => {
      if (key === 'fromPipe' && typeof value === 'number') return ['upstream', elementBehind(value as PipeId)];
      if (key === 'battery' && typeof value === 'number') return [key, index.batteryName(value)];
      return [key, typeof value === 'number' ? roundMetres(value) : value];
    }),
  );

  function elementBehind(pipe: PipeId): string | null {
    const { element } = network.pipes[pipe]!;
    if (element !== null) return index.idOf(element);
    const joint = network.joints[paths.stream.up(pipe)]!;
    return joint.elements[0] === undefined ? null : index.idOf(joint.elements[0]);
  }
}
