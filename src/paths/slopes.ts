import { type Finding, finding } from '../findings/finding.ts';
import { isVertical } from '../geometry/vertical.ts';
import { keyMatches } from '../model/answer-keys.ts';
import type { Answers } from '../model/answers.ts';
import type { Element, ElementId, Model } from '../model/model.ts';
import type { Network, Pipe, PipeId } from '../network/network.ts';
import { metres } from '../units/quantity.ts';
import { coordinateMetres, directionDegrees } from '../units/uncertainty.ts';
import type { PipeSlope } from './paths.ts';
import { climbOf, type Water } from './water.ts';

const slopeUncertainty = Math.tan((directionDegrees * Math.PI) / 180);

/** By pipe: at 45 degrees or less to the vertical; null where the model gives neither geometry nor a property. */
export function orientations(model: Model, network: Network): (boolean | null)[] {
  return network.pipes.map((pipe) => {
    const run = runOf(pipe);
    if (run !== null && run.length > 0) return isVertical(run.rise, run.length);
    if (pipe.element === null) return false;
    const element = model.elements[pipe.element]!;
    const flag = element.properties.find(({ name, measure }) => measure === 'flag' && /vertica/i.test(name));
    if (flag !== undefined) return flag.value === true;
    return element.slopes.length > 0 ? false : null;
  });
}

function runOf(pipe: Pipe): { rise: number; plan: number; length: number } | null {
  if (pipe.points === null) return null;
  const first = pipe.points[0]!;
  const last = pipe.points[pipe.points.length - 1]!;
  const plan = Math.hypot(last[0] - first[0], last[1] - first[1]);
  const rise = last[2] - first[2];
  return { rise, plan, length: Math.hypot(plan, rise) };
}

/** Fall of every pipe: drawn, else stated, else answered, else unknown. A drawn fall within its uncertainty is not drawn. */
export function pipeSlopes(
  model: Model,
  network: Network,
  water: Water,
  vertical: readonly (boolean | null)[],
  answers: Answers,
  pumped: ReadonlySet<PipeId>,
  findings: Finding[],
): PipeSlope[] {
  const backfalls: { element: ElementId; climb: number }[] = [];
  const slopes = network.pipes.map((pipe): PipeSlope => {
    const down = water.toward[pipe.id] ?? null;
    const from = down === null ? null : down === pipe.ends[0] ? pipe.ends[1] : pipe.ends[0];
    const climb = from === null ? 0 : climbOf(pipe, from);
    if (climb > 0 && pipe.element !== null && !pumped.has(pipe.id)) backfalls.push({ element: pipe.element, climb });
    if (vertical[pipe.id] === true) return { slope: null, uncertainty: 0, ground: 'geometry', climb: metres(climb) };
    if (pipe.laid !== undefined) {
      const slope = from === null ? Math.abs(pipe.laid) : pipe.ends[0] === from ? pipe.laid : -pipe.laid;
      return { slope, uncertainty: 0, ground: 'answer', climb: metres(climb) };
    }
    const run = runOf(pipe);
    const uncertainty = run === null || run.plan === 0 ? 0 : coordinateMetres / run.plan + slopeUncertainty;
    const fall = run === null || run.plan === 0 ? 0 : signedFall(pipe, run, from);
    if (run !== null && run.plan > 0 && Math.abs(fall) > uncertainty) {
      return { slope: fall, uncertainty, ground: 'geometry', climb: metres(climb) };
    }
    const element = pipe.element === null ? null : model.elements[pipe.element]!;
    const stated = element?.slopes[0]?.slope;
    if (stated !== undefined) return { slope: stated, uncertainty: 0, ground: 'property', climb: metres(climb) };
    const answered = element === null ? undefined : answeredSlope(element, answers);
    if (answered !== undefined) return { slope: answered, uncertainty: 0, ground: 'answer', climb: metres(climb) };
    return { slope: null, uncertainty, ground: 'unknown', climb: metres(climb) };
  });
  for (const { element, climb } of mergeByElement(backfalls))
    findings.push(finding('backfall', [element], { climbM: climb }));
  return slopes;
}

/** Downstream positive on wet pipes; the bare amount on dry ones, where falling either way drains. */
function signedFall(pipe: Pipe, run: { rise: number; plan: number }, from: number | null): number {
  if (from === null) return Math.abs(run.rise) / run.plan;
  return (pipe.ends[0] === from ? -run.rise : run.rise) / run.plan;
}

function answeredSlope(element: Element, answers: Answers): number | undefined {
  for (const [key, answer] of answers.pipes) {
    if (answer.slope !== undefined && keyMatches(key, element)) return answer.slope;
  }
  return undefined;
}

function mergeByElement(
  climbs: readonly { element: ElementId; climb: number }[],
): { element: ElementId; climb: number }[] {
  const sums = new Map<ElementId, number>();
  for (const { element, climb } of climbs) sums.set(element, (sums.get(element) ?? 0) + climb);
  return [...sums].sort(([a], [b]) => a - b).map(([element, climb]) => ({ element, climb }));
}
