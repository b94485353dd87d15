import type { BatteryFacts, BatteryTrap, CircuitLine, Guest, Relief, WetLine } from '../codes/battery.ts';
import type { PlumbingCode } from '../codes/plumbing-code.ts';
import type { Reading, TankKind } from '../codes/use.ts';
import type { FixtureKind } from '../model/identity.ts';
import type { JointId, PipeId } from '../network/network.ts';
import type { FixtureId, TrapAir } from '../paths/paths.ts';
import { planTurn } from '../paths/turns.ts';
import { type Load, noLoad, plusLoad } from '../units/quantity.ts';
import type { FreeTrap } from './feet.ts';
import type { Stack, StackContext } from './find-stacks.ts';

export interface BatteryContext extends StackContext {
  readonly code: PlumbingCode;
  readonly stacks: readonly Stack[];
  /** Pipe belongs to a stack, offsets included. By pipe id. */
  readonly inStack: readonly (Stack | null)[];
  /** A stack's foot lies upstream of the pipe. By pipe id. */
  readonly stackAbove: readonly boolean[];
  readonly free: readonly (FreeTrap | null)[];
  /** Tank or manhole that stands at a joint. */
  readonly tankAt: (joint: JointId) => TankKind | null;
  readonly kindOf: (fixture: FixtureId) => FixtureKind | null;
  /** Joint with a live dry vent standing on it. By joint id. */
  readonly live: (joint: JointId) => PipeId | null;
  readonly wordOf: (fixtures: readonly FixtureId[], pipes: readonly PipeId[]) => Reading | null;
}

/** A battery as it is about to be judged: its foot, its traps, and feet further down its line that may belong to it. */
export interface Draft {
  readonly foot: JointId;
  readonly traps: readonly TrapAir[];
  /** Further feet on the line, in flow order: those of additional circuit vents, where it is circuit vented. */
  readonly additional: readonly JointId[];
}

export function batteryFacts(context: BatteryContext, draft: Draft, id: number): BatteryFacts {
  const line = lineOf(context, draft);
  const places = placesOf(context, draft.foot, line);
  const traps = draft.traps
    .map((trap) => batteryTrap(context, trap, places))
    .sort((a, b) => a.place - b.place || a.fixture - b.fixture);
  const guests = guestsOf(context, draft, line, places);
  return {
    id,
    foot: draft.foot,
    feet: draft.additional,
    line,
    traps,
    guests,
    wet: wetLine(context, line, traps, guests),
    circuit: circuitLine(context, draft, line, traps, places),
    word: context.wordOf(
      traps.map(({ fixture }) => fixture),
      line,
    ),
  };
}

/** The way of water from the foot to the joint of the last trap. */
function lineOf({ stream }: BatteryContext, { foot, traps }: Draft): PipeId[] {
  const ends = new Set(traps.map(({ armEnd }) => armEnd));
  ends.delete(foot);
  const line: PipeId[] = [];
  let joint = foot;
  for (let pipe = stream.outflow[joint] ?? null; ends.size > 0 && pipe !== null; pipe = stream.outflow[joint] ?? null) {
    line.push(pipe);
    joint = stream.down(pipe);
    ends.delete(joint);
  }
  return line;
}

function placesOf({ stream }: BatteryContext, foot: JointId, line: readonly PipeId[]): Map<JointId, number> {
  const places = new Map<JointId, number>([[foot, 0]]);
  line.forEach((pipe, at) => {
    places.set(stream.down(pipe), at + 1);
  });
  return places;
}

function batteryTrap(context: BatteryContext, trap: TrapAir, places: ReadonlyMap<JointId, number>): BatteryTrap {
  const { loads, paths, floors, free, stream } = context;
  const { row, load, trap: size } = loads.fixtures[trap.fixture]!;
  const joins = trap.armEnd!;
  const drops = trap.arm.filter((pipe) => paths.vertical[pipe] === true);
  return {
    fixture: trap.fixture,
    kind: context.kindOf(trap.fixture),
    row,
    size,
    load,
    closet: row.closet,
    emergency: row.emergency,
    free: free[trap.fixture] !== null,
    ownVent: trap.through.length === 0,
    drops: { pipes: drops.length, height: drops.reduce((sum, pipe) => sum + stream.span(pipe), 0) },
    joins,
    place: places.get(joins) ?? 0,
    storey: floors.of(paths.fixtures[trap.fixture]!),
  };
}

/** Fixtures that drain into the line and breathe elsewhere. */
function guestsOf(
  { loads, paths, floors, stream, kindOf }: BatteryContext,
  { foot, traps }: Draft,
  line: readonly PipeId[],
  places: ReadonlyMap<JointId, number>,
): Guest[] {
  const own = new Set(traps.map(({ fixture }) => fixture));
  const last = line.at(-1);
  if (last === undefined) return [];
  const { from, to } = loads.pipes[last]!;
  const guests: Guest[] = [];
  for (const fixture of loads.order.slice(from, to)) {
    if (own.has(fixture)) continue;
    let joins: JointId = foot;
    for (const pipe of paths.fixtures[fixture]!.water) {
      const joint = stream.down(pipe);
      if (!places.has(joint)) continue;
      joins = joint;
      break;
    }
    const { load, row } = loads.fixtures[fixture]!;
    guests.push({ fixture, kind: kindOf(fixture), row, load, storey: floors.of(paths.fixtures[fixture]!), joins });
  }
  return guests.sort((a, b) => a.fixture - b.fixture);
}

function wetLine(
  context: BatteryContext,
  line: readonly PipeId[],
  traps: readonly BatteryTrap[],
  guests: readonly Guest[],
): WetLine {
  const { inStack, paths, stream } = context;
  const lastPlace = Math.max(...traps.map(({ place }) => place));
  const atEnd = traps.filter(({ place, free }) => place === lastPlace && !free);
  // The most downstream one, or the two that join there symmetrically, do not pass the wet vent.
  const leftOut = atEnd.slice(0, 2).map(({ fixture }) => fixture);
  const closets = traps.filter(({ closet }) => closet).length;
  const draining = [...traps, ...guests].filter(({ fixture }) => !leftOut.includes(fixture));
  const counted = draining.filter((one) => closets === 0 || !context.loads.fixtures[one.fixture]!.row.closet);
  const sum = (list: readonly { load: Load }[]): Load =>
    list.reduce((total, { load }) => plusLoad(total, load), noLoad);
  const all = [...traps, ...guests];
  const lowest = Math.min(...all.map(({ storey }) => storey));
  const upper = [...new Set(all.map(({ storey }) => storey))].filter((storey) => storey > lowest).sort((a, b) => a - b);
  return {
    load: sum(counted),
    leftOut,
    closets,
    storeys: upper.length + 1,
    upperStoreys: upper.map((storey) => ({ storey, load: sum(all.filter((one) => one.storey === storey)) })),
    offsets: offsetsOf(context, line),
    stack: line.some((pipe) => inStack[pipe] !== null),
    vertical: line.filter((pipe) => paths.vertical[pipe] === true).length,
    level: line.filter((pipe) => paths.vertical[pipe] !== true).length,
    length: line.reduce((total, pipe) => total + stream.span(pipe), 0),
  };
}

/** Level pieces of the line between vertical ones, and whether anything joins in them. */
function offsetsOf({ paths, stream }: BatteryContext, line: readonly PipeId[]): WetLine['offsets'] {
  const offsets: { length: number; joined: boolean }[] = [];
  let level: PipeId[] = [];
  let seenVertical = false;
  for (const pipe of line) {
    if (paths.vertical[pipe] === true) {
      if (seenVertical && level.length > 0) {
        const inner = level.slice(0, -1).map((one) => stream.down(one));
        offsets.push({
          length: level.reduce((sum, one) => sum + stream.span(one), 0),
          joined: inner.some((joint) => stream.inflows[joint]!.length > 1),
        });
      }
      level = [];
      seenVertical = true;
    } else level.push(pipe);
  }
  return offsets;
}

function circuitLine(
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
  const relief = findRelief(context, end, draft);
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
    ...carried(context, end),
    trapsAtStart: served.filter(({ joins }) => joins === start).length,
    relief,
    additional,
    stretches: stretchesWith(additional),
  };
}

/** What the branch carries past its last trap, and whether the stack it ends at has drainage from above. */
function carried(
  { stream, loads, inStack, paths }: BatteryContext,
  end: JointId,
): Pick<CircuitLine, 'load' | 'closets' | 'soilAbove'> {
  let last = stream.outflow[end] ?? null;
  const { load, closets } = last === null ? { load: noLoad, closets: 0 } : loads.pipes[last]!;
  while (last !== null && inStack[last] === null) last = paths.next[last] ?? null;
  const above = last === null ? [] : stream.inflows[stream.up(last)]!;
  return { load, closets, soilAbove: above.some((pipe) => inStack[pipe] !== null) };
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
      const fixtures = loads.order.slice(first, to);
      const vented = fixtures.some(
        (fixture) => paths.traps[fixture]!.foot !== null && paths.traps[fixture]!.foot !== draft.foot,
      );
      if (passed.length === 0 && vented && load <= code.batteryLimits.reliefDrainLoad)
        passed.push({ joint, by: one, kind: 'drain', load, fixtures });
    }
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
