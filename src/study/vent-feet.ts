import type { BatteryTrap } from '../codes/battery.ts';
import { pointAlong, polyline } from '../geometry/polyline.ts';
import type { Vec3 } from '../geometry/vector.ts';
import type { Place } from '../network/change.ts';
import type { JointId, Network, Pipe, PipeId } from '../network/network.ts';
import { planTurn } from '../paths/turns.ts';
import type { ChangedPiping } from './changed-piping.ts';
import type { Row } from './row.ts';

/** Where a new vent starts on the piping as it was first: at a joint, or on a pipe so many metres from its end 0. */
export type Foot = { readonly joint: JointId } | { readonly pipe: PipeId; readonly at: number };

/** Room for a fitting beside another one, metres. */
const besideJoint = 0.1;
/** A vent on the branch stands this far behind the fixture's joint, or half way to what comes next, metres. */
const behindFixture = 0.4;
/** The next piece goes on straight within this, degrees. */
const straight = 10;
const steep = Math.SQRT1_2 - 1e-9;

/** The place of a foot in the piping as it is now, and its point; null where it is gone or has no geometry. */
export function placeOf(row: Row, piping: ChangedPiping, foot: Foot): PlaceAt | null {
  if ('joint' in foot) return atJoint(piping.network, foot.joint);
  const along = row.outcome.network.pipes[foot.pipe]!.from + foot.at;
  const part = piping.network.pipes.find(
    ({ id, from, to }) => piping.origin[id] === foot.pipe && along >= from - 1e-9 && along <= to + 1e-9,
  );
  return part === undefined ? null : onWall(piping.network, part, along - part.from);
}

export interface PlaceAt {
  readonly place: Place;
  readonly at: Vec3;
}

/** On a pipe so many metres from its end 0; within the fitting at an end it is the joint itself. */
export function onWall(network: Network, pipe: Pipe, at: number): PlaceAt | null {
  if (at <= 0) return atJoint(network, pipe.ends[0]);
  if (at >= pipe.length) return atJoint(network, pipe.ends[1]);
  return pipe.points === null ? null : { place: { pipe: pipe.id, at }, at: pointAlong(polyline(pipe.points), at) };
}

function atJoint({ joints }: Network, joint: JointId): PlaceAt | null {
  const { at } = joints[joint]!;
  return at === null ? null : { place: { joint }, at };
}

/**
 * Where a trap's own vent starts: at the top of its drain's first drop; else where the drain joins the line, unless
 * `before` asks for a place ahead of that joint or something rises from it; else at a bend on the way, else on the
 * drain itself. null where the drain leaves no room.
 */
export function footOfTrap(row: Row, trap: BatteryTrap, before: boolean): Foot | null {
  const { outcome, stream } = row;
  const { paths } = outcome;
  const drain = drainOf(row, trap);
  if (drain.length === 0) return null;
  const drop = drain.findIndex((pipe, at) => at > 0 && paths.vertical[pipe] === true);
  if (drop > 0 && paths.vertical[drain[drop - 1]!] !== true) {
    const joint = stream.up(drain[drop]!);
    if (isFreeAbove(row, joint)) return { joint };
  }
  const joints = drain.map((pipe) => stream.down(pipe)).reverse();
  const free = joints.slice(before ? 1 : 0).find((joint) => isFreeAbove(row, joint));
  if (free !== undefined) return { joint: free };
  const level = [...drain].reverse().find((pipe) => paths.vertical[pipe] !== true);
  return level === undefined ? null : onPipe(row, level, Math.min(besideJoint, stream.span(level) / 2), 'down');
}

/** From the trap to the joint where its drain joins the line. */
function drainOf({ outcome, stream }: Row, { fixture, joins }: BatteryTrap): PipeId[] {
  const { after } = outcome.paths.traps[fixture]!;
  const water = outcome.paths.fixtures[fixture]!.water.slice(after);
  const last = water.findIndex((pipe) => stream.down(pipe) === joins);
  return last < 0 ? [] : water.slice(0, last + 1);
}

/** Nothing rises from the joint: a vent can. */
export function isFreeAbove({ outcome: { network } }: Pick<Row, 'outcome'>, joint: JointId): boolean {
  return network.joints[joint]!.pipes.every((pipe) => {
    const { points, ends } = network.pipes[pipe]!;
    if (points === null) return false;
    const [near, next] = ends[0] === joint ? [points[0]!, points[1]!] : [points.at(-1)!, points.at(-2)!];
    const length = Math.hypot(next[0] - near[0], next[1] - near[1], next[2] - near[2]);
    return length > 0 && (next[2] - near[2]) / length < steep;
  });
}

/** A place on a pipe, so many metres from the centre of the joint at its upstream or downstream end. */
export function onPipe({ outcome, stream }: Row, pipe: PipeId, away: number, from: 'up' | 'down'): Foot {
  const { ends, length, reach } = outcome.network.pipes[pipe]!;
  const start = from === 'up' ? stream.up(pipe) : stream.down(pipe);
  const atZero = ends[0] === start;
  const own = Math.min(Math.max(away - reach[atZero ? 0 : 1], 0), length);
  return { pipe, at: atZero ? own : length - own };
}

/** On the level line behind a joint, before anything else joins or the line turns; null where there is no such piece. */
export function footBehind(row: Row, joint: JointId): Foot | null {
  const { outcome, stream } = row;
  const { network, paths, shown } = outcome;
  const run: PipeId[] = [];
  let at = joint;
  for (;;) {
    const pipe = stream.outflow[at] ?? null;
    if (pipe === null || paths.vertical[pipe] === true || shown.roles.uses[pipe]!.stack !== null) break;
    if (run.length > 0 && planTurn(network, [run.at(-1)!, pipe], stream.up(run.at(-1)!)) > straight) break;
    run.push(pipe);
    at = stream.down(pipe);
    if (stream.inflows[at]!.length > 1) break;
  }
  const length = run.reduce((sum, pipe) => sum + stream.span(pipe), 0);
  let away = Math.min(behindFixture, length / 2);
  for (const pipe of run) {
    const span = stream.span(pipe);
    if (away <= span) return network.pipes[pipe]!.points === null ? null : onPipe(row, pipe, away, 'up');
    away -= span;
  }
  return null;
}
