import type { BatteryFacts, BatteryTrap, Guest, WetLine } from '../codes/battery.ts';
import type { JointId, PipeId } from '../network/network.ts';
import type { TrapAir } from '../paths/paths.ts';
import { type Load, noLoad, plusLoad } from '../units/quantity.ts';
import type { BatteryContext, Draft } from './battery-context.ts';
import { circuitLine } from './circuit-line.ts';

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
    open: null,
    stack: stackOfLine(context, line),
    word: context.wordOf(
      traps.map(({ fixture }) => fixture),
      line,
    ),
  };
}

/** The stack that the line runs through, seen from its last section on it. */
function stackOfLine({ stackUses }: BatteryContext, line: readonly PipeId[]): BatteryFacts['stack'] {
  const last = line.findLast((pipe) => stackUses[pipe] !== null);
  return last === undefined ? null : stackUses[last]!;
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
    joinsLevel: paths.vertical[trap.arm.at(-1) ?? -1] !== true,
    reach: trap.arm.reduce((sum, pipe) => (paths.vertical[pipe] === true ? sum : sum + stream.span(pipe)), 0),
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

/** What the row looks like as a wet vent. */
export function wetLine(
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
    offStack: line.filter((pipe) => inStack[pipe] === null).length,
    vertical: line.filter((pipe) => paths.vertical[pipe] === true).length,
    level: line.filter((pipe) => paths.vertical[pipe] !== true).length,
    length: line.reduce((total, pipe) => total + stream.span(pipe), 0),
    passes: line.length === 0 ? noLoad : context.loads.pipes[line.at(-1)!]!.load,
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
