import { distance } from '../geometry/vector.ts';
import type { Model } from '../model/model.ts';
import { bodyNode, endPoint, isEnd, type Piping } from './piping.ts';
import type { Proposal } from './propose-joins.ts';
import { tieBreaker } from './tie-breaker.ts';
import { type Reach, samePlace } from './tolerance.ts';
import type { Welds } from './welds.ts';

/**
 * Decides between proposals over the whole model at once: nearest first, so that the order of elements in the file never
 * matters; equal ones by GlobalId. An end joins one thing; ends that meet at one point must all be within reach of each other.
 */
export function settleJoins(
  proposals: readonly Proposal[],
  model: Model,
  piping: Piping,
  welds: Welds,
  reach: Reach,
): void {
  const order = inOrder(
    proposals.filter(({ within }) => within),
    model,
    piping,
    welds,
  );
  const mates = new Map<number, number[]>();
  for (const proposal of order) {
    const { end, to, gap } = proposal;
    if (to.is === 'body') {
      const { capacity } = piping.bodies[to.body]!;
      const node = bodyNode(piping, to.body);
      const full = capacity !== null && welds.degree[to.body]! >= capacity;
      // A short pipe between two fittings may lie in the box of one with both its ends.
      if (welds.isHeld(end) || full || welds.root(end ^ 1) === welds.root(node)) continue;
      welds.join(end, node, 'end-in-fitting', gap);
    } else if (to.is === 'end') joinEnds(end, to.end, gap, mates, piping, welds, reach);
    else if (!welds.isHeld(end)) joinWall(end, to.pipe, to.at, gap, piping, welds, reach);
  }
}

function joinEnds(
  a: number,
  b: number,
  gap: number,
  mates: Map<number, number[]>,
  piping: Piping,
  welds: Welds,
  reach: Reach,
): void {
  if (welds.isHeld(a) && welds.isHeld(b)) return;
  const [free, other] = welds.isHeld(a) ? [b, a] : [a, b];
  if (welds.isHeld(other) && welds.bodyOf(other) >= 0) return;
  const group = mates.get(other) ?? [other];
  if (group.length > 1 && !group.every((mate) => withinReach(free, mate, piping, reach))) return;
  const grown = [...group, free];
  for (const mate of grown) mates.set(mate, grown);
  welds.join(free, other, 'end-to-end', gap);
}

function withinReach(a: number, b: number, { pipes }: Piping, reach: Reach): boolean {
  const [p, q] = [pipes[a >> 1]!, pipes[b >> 1]!];
  if (p.axis === null || q.axis === null) return true;
  const apart = distance(endPoint(p.axis, (a & 1) as 0 | 1), endPoint(q.axis, (b & 1) as 0 | 1));
  return apart <= Math.max(reach.ofEnd(p.diameter), reach.ofEnd(q.diameter));
}

/** An end on a wall close to that pipe's own end meets it there: a corner, or a tee whose run is drawn in two. */
function joinWall(
  end: number,
  pipe: number,
  at: number,
  gap: number,
  piping: Piping,
  welds: Welds,
  reach: Reach,
): void {
  const run = piping.pipes[pipe]!;
  const { diameter } = piping.pipes[end >> 1]!;
  const side = at <= run.axis!.length / 2 ? 0 : 1;
  const toEnd = side === 0 ? at : run.axis!.length - at;
  const near = 2 * pipe + side;
  const bare = welds.bodyOf(near) < 0;
  if (toEnd <= (bare ? Math.max(diameter / 2 + reach.ofEnd(diameter), samePlace) : samePlace)) {
    welds.join(end, near, 'end-on-wall', gap);
    return;
  }
  welds.join(end, welds.wall(pipe, at), 'end-on-wall', gap);
}

function inOrder(proposals: Proposal[], model: Model, piping: Piping, welds: Welds): readonly Proposal[] {
  const tie = tieBreaker(model);
  const target = ({ to }: Proposal): number =>
    to.is === 'body'
      ? piping.bodies[to.body]!.element
      : to.is === 'end'
        ? welds.elementOf(to.end)
        : piping.pipes[to.pipe]!.element;
  const kind = { body: 0, end: 1, wall: 2 } as const;
  // Costs that differ by less than a micrometre are equal: turning a model must not decide.
  const cost = Float64Array.from(proposals, (proposal) => 4 * Math.round(proposal.cost * 1e6) + kind[proposal.to.is]);
  const order = Int32Array.from(proposals, (_, i) => i).sort((i, j) => {
    const difference = cost[i]! - cost[j]!;
    if (difference !== 0) return difference;
    const [a, b] = [proposals[i]!, proposals[j]!];
    return tie(welds.elementOf(a.end), welds.elementOf(b.end)) || tie(target(a), target(b)) || a.end - b.end;
  });
  return Array.from(order, (i) => proposals[i]!);
}

/** Ends that nothing has been joined to. */
export const freeEnds = (piping: Piping, welds: Welds): number[] =>
  Array.from({ length: 2 * piping.pipes.length }, (_, node) => node).filter(
    (node) => isEnd(piping, node) && !welds.isHeld(node) && piping.pipes[node >> 1]!.axis !== null,
  );
