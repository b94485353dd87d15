import { planDistance } from '../geometry/vector.ts';
import type { JointId, Pipe, PipeId } from '../network/network.ts';
import { otherEnd } from '../network/other-end.ts';
import { coordinateMetres } from '../units/uncertainty.ts';
import { cheapestWays, type Ways } from './cheapest-ways.ts';
import type { Piece } from './connected-pieces.ts';
import type { DrainSystem } from './paths.ts';
import { type SewerEnd, type SewerEndFacts, sewerEndOf } from './sewer-end.ts';

/** Where the water of one connected piece leaves, and the first pipe of the way there. */
export interface WaysOut {
  /** The end of the whole piece first. */
  readonly ends: readonly (SewerEnd & Pick<DrainSystem, 'pipes'>)[];
  readonly via: (joint: JointId) => PipeId | null;
}

export interface WayFacts extends SewerEndFacts {
  /** Cost of moving through a pipe from one of its joints. */
  readonly cost: (pipe: PipeId, from: JointId) => number;
  /** Order of pipes that lines and numbering do not decide. */
  readonly rank: Int32Array;
}

/** No slip of drawing lifts a riser by more than this, metres: above it stands a vent, or a pump. */
const steepestClimb = 1;
/** Costs that no level or falling way comes to. */
const climbs = 5;

/**
 * Ways of water out of a piece. Drains that only vents hold together leave apart: each by the ends that are named or
 * answered, or, where its water would have to rise in a riser to reach one, by an open end of its own. Where it has none, it
 * climbs. null: the piece has no end.
 */
export function waysOut(piece: Piece, outlets: readonly JointId[], facts: WayFacts): WaysOut | null {
  const { network, cost, rank } = facts;
  const main = sewerEndOf(piece, facts);
  if (main === null) return null;
  const falling = (pipe: PipeId, _to: JointId, from: JointId): number =>
    isRiserUp(network.pipes[pipe]!, from, facts.isVent[pipe]!) ? Number.POSITIVE_INFINITY : cost(pipe, from);
  const ends: SewerEnd[] = [main];
  let ways = cheapestWays(network, [main.joint], falling, rank);
  for (const joint of main.others) {
    if (ways.cost[joint]! < climbs) continue;
    ends.push({ ...main, joint });
    ways = cheapestWays(
      network,
      ends.map((end) => end.joint),
      falling,
      rank,
    );
  }
  const via = new Map<JointId, PipeId | null>(piece.joints.map((joint) => [joint, ways.via[joint] ?? null]));
  const stranded = outlets.filter((joint) => ways.cost[joint] === Number.POSITIVE_INFINITY);
  for (const part of stranded.length === 0 ? [] : partsOf(stranded, falling, facts)) {
    const end = sewerEndOf(part, facts);
    const inside = new Set(part.joints);
    const own: Ways =
      end === null
        ? cheapestWays(network, [main.joint], (pipe, _to, from) => cost(pipe, from), rank)
        : cheapestWays(
            network,
            [end.joint],
            (pipe, to, from) =>
              inside.has(to) && inside.has(from) ? falling(pipe, to, from) : Number.POSITIVE_INFINITY,
            rank,
          );
    if (end !== null) ends.push(end);
    for (const joint of end === null ? piece.joints : part.joints)
      if (via.get(joint) === null && joint !== main.joint) via.set(joint, own.via[joint] ?? null);
  }
  const way = (joint: JointId): PipeId | null => via.get(joint) ?? null;
  return {
    ends: ends.length === 1 ? [{ ...main, pipes: piece.pipes }] : withPipes(ends, piece, outlets, way, facts),
    via: way,
  };
}

/** Water would have to rise in a vent, or in a riser by more than drawing can err. */
function isRiserUp({ points, ends, laid }: Pipe, from: JointId, isVent: boolean): boolean {
  if (points === null || laid !== undefined) return false;
  const [first, last] = [points[0]!, points[points.length - 1]!];
  const rise = (last[2] - first[2]) * (ends[0] === from ? 1 : -1);
  return rise > (isVent ? coordinateMetres : steepestClimb) && rise > planDistance(first, last);
}

/** What water from the stranded outlets can reach without rising; outlets that reach a place in common are one part. */
function partsOf(
  outlets: readonly JointId[],
  cost: (pipe: PipeId, to: JointId, from: JointId) => number,
  { network }: WayFacts,
): readonly Piece[] {
  const partOf = new Map<JointId, Set<JointId>>();
  for (const outlet of outlets) {
    const reached = new Set<JointId>([outlet]);
    for (const joint of reached)
      for (const pipe of network.joints[joint]!.pipes) {
        const to = otherEnd(network, pipe, joint);
        if (cost(pipe, to, joint) !== Number.POSITIVE_INFINITY) reached.add(to);
      }
    const merged = new Set([...reached].flatMap((joint) => [joint, ...(partOf.get(joint) ?? [])]));
    for (const joint of merged) partOf.set(joint, merged);
  }
  return [...new Set(partOf.values())].map((part) => {
    const pipes = new Set([...part].flatMap((joint) => network.joints[joint]!.pipes));
    return {
      joints: [...part].sort((a, b) => a - b),
      pipes: [...pipes].filter((pipe) => network.pipes[pipe]!.ends.every((end) => part.has(end))).sort((a, b) => a - b),
    };
  });
}

/**
 * Each pipe belongs to the end by which its water leaves; a vent to that of the drain it stands on, else to the one its
 * way down would come to, and what reaches none to the first.
 */
function withPipes(
  ends: readonly SewerEnd[],
  { joints, pipes }: Piece,
  outlets: readonly JointId[],
  via: (joint: JointId) => PipeId | null,
  { network }: WayFacts,
): WaysOut['ends'] {
  const places = new Map<JointId, number>(ends.map(({ joint }, at) => [joint, at]));
  for (const start of joints) {
    const walked: JointId[] = [];
    let joint = start;
    while (!places.has(joint)) {
      walked.push(joint);
      places.set(joint, 0);
      const pipe = via(joint);
      if (pipe === null) break;
      joint = otherEnd(network, pipe, joint);
    }
    for (const one of walked) places.set(one, places.get(joint)!);
  }
  const wet = new Set<JointId>();
  for (const outlet of outlets)
    for (let joint = outlet; !wet.has(joint); ) {
      wet.add(joint);
      const pipe = via(joint);
      if (pipe === null) break;
      joint = otherEnd(network, pipe, joint);
    }
  const upper = (pipe: PipeId): JointId => {
    const [a, b] = network.pipes[pipe]!.ends;
    if (wet.has(a) !== wet.has(b)) return wet.has(a) ? a : b;
    return via(a) === pipe ? a : b;
  };
  return ends.map((end, at) => ({ ...end, pipes: pipes.filter((pipe) => places.get(upper(pipe)) === at) }));
}
