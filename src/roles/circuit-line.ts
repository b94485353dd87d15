import type { BatteryTrap, CircuitLine, Relief } from '../codes/battery.ts';
import type { JointId, PipeId } from '../network/network.ts';
import { planTurn } from '../paths/turns.ts';
import { noLoad } from '../units/quantity.ts';
import type { BatteryContext, Draft } from './battery-context.ts';

/** What a row looks like when it is circuit vented. */
export function circuitLine(
  context: BatteryContext,
  draft: Draft,
  line: readonly PipeId[],
  traps: readonly BatteryTrap[],
  places: ReadonlyMap<JointId, number>,
): CircuitLine {
  const { paths, stream, inStack, stackAbove } = context;
  const drop = line.findIndex((pipe) => paths.vertical[pipe] !== true);
  const vertical = line.slice(0, drop < 0 ? line.length : drop);
  const base = vertical.length === 0 ? draft.foot : stream.down(vertical.at(-1)!);
  const basePlace = places.get(base) ?? 0;
  // A vertical wet pipe onto the drain of the first trap is the wet portion of a circuit vent; onto an elbow it is not.
  const portion = vertical.length > 0 && traps.some(({ place, ownVent }) => place === basePlace && !ownVent);
  const wetPortion = portion ? vertical : [];
  const start = portion ? base : draft.foot;
  const startPlace = portion ? basePlace : 0;
  const onVent = portion ? traps.filter(({ place }) => place < startPlace) : [];
  const served = traps.filter(({ place }) => place >= startPlace);
  const toLastTrap = line.slice(startPlace);
  const end = toLastTrap.length === 0 ? start : stream.down(toLastTrap.at(-1)!);
  const whole = carried(context, end, toLastTrap);
  const found = findRelief(context, end, draft);
  // A vented drain further down is a relief vent only where the code asks for one.
  const relief = found?.kind === 'drain' && !context.code.batteryLimits.reliefDue(whole) ? null : found;
  const branch = [...toLastTrap, ...pipesBetween(context, end, relief?.joint ?? end)];
  const stretchesWith = (vents: CircuitLine['additional']): CircuitLine['stretches'] =>
    stretchesOf(context, [start, ...vents.map(({ joint }) => joint), relief?.joint ?? end], branch, served);
  const dry = dryAdditional(context, draft, toLastTrap);
  const { additionalAfter, turnDegrees } = context.code.batteryLimits;
  const due = stretchesWith(dry).some((one) => one.traps > additionalAfter || one.turnDegrees > turnDegrees);
  // A vented drain stands in for an additional circuit vent only where one is due.
  const additional = due ? withStandIns(context, dry, toLastTrap, served) : dry;
  return {
    start,
    wetPortion,
    onVent: onVent.map(({ fixture, load, joins }) => ({ fixture, load, joins })),
    traps: served,
    branch,
    toLastTrap,
    vertical: toLastTrap.filter((pipe) => paths.vertical[pipe] === true).length,
    stackUpstream: toLastTrap.some((pipe) => inStack[pipe] !== null || stackAbove[pipe]),
    ...whole,
    steepest: steepestOf(context, toLastTrap),
    trapsAtStart: served.filter(({ joins }) => joins === start).length,
    relief,
    additional,
    stretches: stretchesWith(additional),
  };
}

/**
 * What the branch carries, fixtures that join past its last trap one by one included, and whether the stack it ends at has
 * drainage from above.
 */
function carried(
  { stream, loads, inStack, stackAbove, paths }: BatteryContext,
  end: JointId,
  toLastTrap: readonly PipeId[],
): Pick<CircuitLine, 'load' | 'closets' | 'counts' | 'soilAbove'> {
  const goesOn = (pipe: PipeId): boolean => inStack[pipe] === null && !stackAbove[pipe];
  let pipe = stream.outflow[end] ?? null;
  let last = toLastTrap.at(-1) ?? null;
  while (pipe !== null && goesOn(pipe)) {
    last = pipe;
    const joint = stream.down(pipe);
    const others = stream.inflows[joint]!.filter((one) => one !== last);
    if (paths.vertical[pipe] === true || others.some((one) => loads.pipes[one]!.to - loads.pipes[one]!.from > 1)) break;
    pipe = stream.outflow[joint] ?? null;
  }
  const { load, closets, counts } = last === null ? { load: noLoad, closets: 0, counts: {} } : loads.pipes[last]!;
  let below = stream.outflow[end] ?? null;
  while (below !== null && inStack[below] === null) below = paths.next[below] ?? null;
  const above = below === null ? [] : stream.inflows[stream.up(below)]!;
  return { load, closets, counts, soilAbove: above.some((one) => inStack[one] !== null) };
}

function steepestOf({ paths }: BatteryContext, pipes: readonly PipeId[]): number | null {
  const slopes = pipes.flatMap((pipe) => {
    const { slope, ground, uncertainty } = paths.slopes[pipe]!;
    return slope === null ? [] : [ground === 'geometry' ? slope - uncertainty : slope];
  });
  return slopes.length === 0 ? null : Math.max(...slopes);
}

function stretchesOf(
  context: BatteryContext,
  joints: readonly JointId[],
  branch: readonly PipeId[],
  served: readonly BatteryTrap[],
): CircuitLine['stretches'] {
  const { stream, network } = context;
  const along = new Map<JointId, number>([[joints[0]!, 0]]);
  branch.forEach((pipe, at) => {
    along.set(stream.down(pipe), at + 1);
  });
  return joints.slice(1).map((to, index) => {
    const from = joints[index]!;
    const [a, b] = [along.get(from) ?? 0, along.get(to) ?? branch.length];
    const traps = served.filter(({ joins }) => {
      const place = along.get(joins) ?? 0;
      return place <= b && (index === 0 ? place >= a : place > a);
    }).length;
    return { traps, turnDegrees: planTurn(network, branch.slice(a, b), from), from, to };
  });
}

function dryAdditional(
  { live, stream }: BatteryContext,
  draft: Draft,
  line: readonly PipeId[],
): CircuitLine['additional'] {
  return line.slice(0, -1).flatMap((pipe) => {
    const joint = stream.down(pipe);
    const by = draft.additional.includes(joint) ? live(joint) : null;
    return by === null ? [] : [{ joint, by, dry: true }];
  });
}

/** Vented drains that join the line beside the dry vents, in flow order. */
function withStandIns(
  { stream, paths, loads }: BatteryContext,
  dry: CircuitLine['additional'],
  line: readonly PipeId[],
  served: readonly BatteryTrap[],
): CircuitLine['additional'] {
  const own = new Set(served.map(({ fixture }) => fixture));
  return line.slice(0, -1).flatMap((pipe): CircuitLine['additional'] => {
    const joint = stream.down(pipe);
    const known = dry.find((one) => one.joint === joint);
    if (known !== undefined) return [known];
    const by = stream.inflows[joint]!.find((one) => {
      if (one === pipe) return false;
      const { from, to } = loads.pipes[one]!;
      const guests = loads.order.slice(from, to);
      return (
        guests.length > 0 &&
        guests.every((one) => !own.has(one)) &&
        guests.some((one) => paths.traps[one]!.foot !== null)
      );
    });
    return by === undefined ? [] : [{ joint, by, dry: false }];
  });
}

/** A dry vent, or a vented drain light enough to stand in for it, on the level branch past its last trap. */
function findRelief(context: BatteryContext, from: JointId, draft: Draft): Relief | null {
  const { stream, paths, live, loads, inStack, code } = context;
  let joint = from;
  const passed: Relief[] = [];
  for (let pipe = stream.outflow[joint] ?? null; pipe !== null; pipe = stream.outflow[joint] ?? null) {
    if (paths.vertical[pipe] === true || inStack[pipe] !== null) break;
    joint = stream.down(pipe);
    const out = stream.outflow[joint] ?? null;
    const others = stream.inflows[joint]!.filter((one) => one !== pipe);
    const dry = live(joint);
    if (dry !== null && (out === null || inStack[out] === null)) {
      const shared = others.some((one) => sharesLine(context, one, draft));
      return { joint, by: dry, kind: shared ? 'shared' : 'dry', load: noLoad, fixtures: [] };
    }
    if (out !== null && inStack[out] !== null) break;
    for (const one of others) {
      const { from: first, to, load } = loads.pipes[one]!;
      if (passed.length > 0 || load > code.batteryLimits.reliefDrainLoad) continue;
      const fixtures = loads.order.slice(first, to);
      const vented = fixtures.some(
        (fixture) => paths.traps[fixture]!.foot !== null && paths.traps[fixture]!.foot !== draft.foot,
      );
      if (vented) passed.push({ joint, by: one, kind: 'drain', load, fixtures });
    }
    // Where a line as heavy comes in, the branch has ended: a vent further down is another pipe's.
    if (others.some((one) => loads.pipes[one]!.load >= loads.pipes[pipe!]!.load)) break;
  }
  return passed[0] ?? null;
}

/** Another row of traps comes in at the same joint: their relief vent is one. */
function sharesLine({ loads, paths }: BatteryContext, pipe: PipeId, { foot }: Draft): boolean {
  const { from, to } = loads.pipes[pipe]!;
  const traps = loads.order.slice(from, to).map((fixture) => paths.traps[fixture]!);
  return traps.filter((trap) => trap.foot !== null && trap.foot !== foot && trap.through.length > 0).length > 0;
}

function pipesBetween({ stream }: BatteryContext, from: JointId, to: JointId): PipeId[] {
  const pipes: PipeId[] = [];
  let joint = from;
  while (joint !== to) {
    const pipe = stream.outflow[joint] ?? null;
    if (pipe === null) break;
    pipes.push(pipe);
    joint = stream.down(pipe);
  }
  return pipes;
}
