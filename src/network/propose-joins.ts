import { boxCentre, grown, nearestInBox } from '../geometry/box.ts';
import { boxGrid } from '../geometry/box-grid.ts';
import { directionOf, footOn, type Polyline } from '../geometry/polyline.ts';
import { type Box, cross, distance, dot, length, scale, subtract, type Vec3 } from '../geometry/vector.ts';
import { legsOf } from './legs.ts';
import { endPoint, type Piping } from './piping.ts';
import { leastSocket, lookAround, type Reach } from './tolerance.ts';

/** An end and something it may be joined to. `cost` orders what competes: the gap, and what tells equal gaps apart. */
export interface Proposal {
  readonly end: number;
  readonly to:
    | { readonly is: 'body'; readonly body: number }
    | { readonly is: 'end'; readonly end: number }
    | { readonly is: 'wall'; readonly pipe: number; readonly at: number };
  readonly gap: number;
  readonly cost: number;
  /** False: near enough to name, too far to join. */
  readonly within: boolean;
}

/** What an end looks like to its surroundings. */
export interface EndView {
  readonly node: number;
  readonly pipe: number;
  readonly at: Vec3;
  /** Unit vector out of the pipe. */
  readonly outward: Vec3;
  readonly diameter: number;
}

export function endView({ pipes }: Piping, node: number): EndView | null {
  const { axis, diameter } = pipes[node >> 1]!;
  if (axis === null) return null;
  const side = (node & 1) as 0 | 1;
  return { node, pipe: node >> 1, at: endPoint(axis, side), outward: outwardOf(axis, side), diameter };
}

export const outwardOf = (axis: Polyline, side: 0 | 1): Vec3 =>
  side === 1 ? directionOf(axis, axis.points.length - 2) : scale(directionOf(axis, 0), -1);

/** Bodies that pipes end in; fixtures find their outlets later, among the ends that nothing else wants. */
export const takesEnds = (part: string): boolean => part !== 'fixture' && part !== 'unknown-terminal';

/** All that the given ends may be joined to, within reach or a little beyond it. In no stated order. */
export function proposeJoins(
  piping: Piping,
  ends: readonly number[],
  allEnds: readonly number[],
  reach: Reach,
): Proposal[] {
  if (ends.length === 0) return [];
  const { bodies } = piping;
  const bodyGrid = boxGrid(bodies.map(({ part, box }) => (takesEnds(part) ? box : null)));
  const views = allEnds.map((node) => endView(piping, node));
  const endGrid = boxGrid(views.map((view) => (view === null ? null : { min: view.at, max: view.at })));
  const legs = legsOf(piping);
  const legGrid = boxGrid(legs.boxes);

  const proposals: Proposal[] = [];
  for (const node of ends) {
    const end = endView(piping, node);
    if (end === null) continue;
    const far = Math.max(lookAround, reach.ofEnd(end.diameter));
    const mine: Proposal[] = [];
    const around = grown({ min: end.at, max: end.at }, far);
    bodyGrid.touching(around, (body) => add1(mine, toBody(end, body, piping, reach)));
    if (mine.some(({ to, within, gap }) => within && gap <= asNear && takesAny(to, piping))) {
      proposals.push(...mine);
      continue;
    }
    endGrid.touching(grown(around, Math.max(fittingLength * end.diameter, leastSocket)), (i) => {
      const other = views[i];
      if (other) add1(mine, toEnd(end, other, piping, reach));
    });
    const looked = new Set<number>([end.pipe]);
    legGrid.touching(around, (i) => {
      const pipe = legs.pipe[i]!;
      if (looked.has(pipe)) return;
      looked.add(pipe);
      add1(mine, toWall(end, pipe, piping, reach));
    });
    proposals.push(...preferBodies(mine));
  }
  return proposals;
}

function add1(list: Proposal[], proposal: Proposal | null): void {
  if (proposal !== null) list.push(proposal);
}

const takesAny = (to: Proposal['to'], { bodies }: Piping): boolean =>
  to.is === 'body' && bodies[to.body]!.capacity === null;

/**
 * What lies in a fitting is not joined pipe to pipe besides: where a body is as near as the rest, or nearly, the rest
 * waits until that body has turned out to be full.
 */
function preferBodies(proposals: readonly Proposal[]): readonly Proposal[] {
  const nearest = (is: boolean): number =>
    Math.min(...proposals.filter(({ to, within }) => within && (to.is === 'body') === is).map(({ gap }) => gap));
  if (nearest(true) > nearest(false) + asNear) return proposals;
  return proposals.map((proposal) =>
    proposal.to.is === 'body' || !proposal.within ? proposal : { ...proposal, cost: proposal.cost + lastResort },
  );
}

const asNear = 0.002;
/** Metres of cost beyond any that a gap makes. */
const lastResort = 10;

/** An end that stops short of a body must at least look toward it. */
const looksToward = 0.3;
/** A body is wide enough for the bore of the pipe that ends in it; walls and sockets may be drawn thinner. */
const boreShare = 0.6;

/**
 * Metres by which an end sticks out of a body's box, its bore counted: whatever way a model is turned, the box of a
 * fitting holds the bore of its own pipes, and seldom that of the pipe beside it.
 */
function outOfBox({ at, outward, diameter }: EndView, { min, max }: Box): number {
  const out = [0, 1, 2].map((i) => {
    const wide = (boreShare * diameter * Math.sqrt(Math.max(0, 1 - outward[i]! ** 2))) / 2;
    const half = Math.min(wide, (max[i]! - min[i]!) / 2);
    return Math.max(0, min[i]! - at[i]! + half, at[i]! + half - max[i]!);
  });
  return Math.hypot(out[0]!, out[1]!, out[2]!);
}

function toBody(end: EndView, index: number, { bodies }: Piping, reach: Reach): Proposal | null {
  const body = bodies[index]!;
  const box = body.box!;
  const toSpot = Math.min(...body.spots.map((spot) => distance(spot, end.at)));
  const gap = Math.min(outOfBox(end, box), toSpot);
  const toward = subtract(nearestInBox(end.at, box), end.at);
  const off = length(toward);
  if (gap > 0.001 && off > 0 && dot(toward, end.outward) < looksToward * off) return null;
  const within = gap <= reach.ofEnd(end.diameter);
  const aside = body.spots.length > 0 ? toSpot : offCourse(end, boxCentre(box));
  return { end: end.node, to: { is: 'body', body: index }, gap, cost: gap + 0.1 * Math.min(aside, 1), within };
}

/** How far the middle of a body lies from an end; one that lies behind it is not what the pipe runs to. */
const offCourse = ({ at, outward }: EndView, middle: Vec3): number =>
  distance(middle, at) + 2 * Math.max(0, -dot(subtract(middle, at), outward));

const distanceFromLine = (point: Vec3, on: Vec3, direction: Vec3): number =>
  length(cross(subtract(point, on), direction));

/** Two directions of one line, within about ten degrees. */
const oneLine = 0.985;

function toEnd(end: EndView, other: EndView, { pipes }: Piping, reach: Reach): Proposal | null {
  if (end.pipe === other.pipe) return null;
  const to = { is: 'end', end: other.node } as const;
  const limit = Math.min(reach.ofEnd(end.diameter), reach.ofEnd(other.diameter));
  const apart = distance(end.at, other.at);
  if (apart > limit && dot(end.outward, other.outward) < -oneLine) {
    // A spigot in its socket: each end lies inside the other pipe.
    const past = dot(subtract(end.at, other.at), end.outward);
    const aside = distanceFromLine(end.at, other.at, other.outward);
    const shorter = Math.min(pipes[end.pipe]!.axis!.length, pipes[other.pipe]!.axis!.length);
    const deepest = Math.min(Math.max(Math.min(end.diameter, other.diameter), leastSocket), shorter / 2);
    if (past > 0 && past <= deepest && aside <= limit)
      return { end: end.node, to, gap: aside, cost: aside, within: true };
  }
  if (apart > Math.max(limit, lookAround) && !facesOver(end, other, apart)) return null;
  return { end: end.node, to, gap: apart, cost: apart, within: apart <= limit };
}

/** Two ends that look at each other over the length of a fitting: one is missing there. */
function facesOver(end: EndView, other: EndView, apart: number): boolean {
  const way = subtract(other.at, end.at);
  return (
    apart <= fittingLength * Math.max(end.diameter, other.diameter) &&
    dot(way, end.outward) > looksToward * apart &&
    dot(way, other.outward) < -looksToward * apart
  );
}

/** Longest way through a fitting, in outside diameters (common practice, no source). */
export const fittingLength = 2;

/** Flatter than this (sine of about ten degrees) two pipes run beside each other. */
const steepEnough = 0.17;

function toWall(end: EndView, pipe: number, { pipes }: Piping, reach: Reach): Proposal | null {
  const { axis, diameter } = pipes[pipe]!;
  const foot = footOn(axis!, end.at);
  const gap = Math.max(0, foot.off - diameter / 2);
  const run = directionOf(axis!, foot.leg);
  if (length(cross(run, end.outward)) < steepEnough) return null;
  if (foot.off > diameter / 2) {
    const toward = subtract(foot.point, end.at);
    if (dot(toward, end.outward) < looksToward * foot.off) return null;
  }
  const within = gap <= reach.ofEnd(end.diameter);
  if (!within && gap > lookAround) return null;
  return {
    end: end.node,
    to: { is: 'wall', pipe, at: meetingAlong(end, axis!, foot, diameter) },
    gap,
    cost: gap,
    within,
  };
}

/** Where the axis of the end crosses the axis of the run: the place of the tee, downstream of the foot at a wye. */
function meetingAlong(end: EndView, axis: Polyline, foot: ReturnType<typeof footOn>, diameter: number): number {
  const run = directionOf(axis, foot.leg);
  const between = subtract(foot.point, end.at);
  const c = dot(run, end.outward);
  const sine = 1 - c * c;
  // Nearest approach of two lines, measured along the run from the foot.
  const along = (dot(between, end.outward) * c - dot(between, run)) / sine;
  const limit = 3 * Math.max(diameter / 2, foot.off);
  const start = axis.along[foot.leg]!;
  const stop = axis.along[foot.leg + 1]!;
  if (Math.abs(along) > limit) return foot.at;
  return Math.min(Math.max(foot.at + along, start), stop);
}
