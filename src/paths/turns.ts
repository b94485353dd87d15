import { dot, subtract, unit, type Vec3 } from '../geometry/vector.ts';
import type { JointId, Network, PipeId } from '../network/network.ts';
import { otherEnd } from '../network/other-end.ts';

const degrees = 180 / Math.PI;
/** A direction with less of itself in plan belongs to a vertical pipe. */
const flatEnough = 0.5;

/** Points of a pipe, run from the joint `from`; empty where the model has no geometry. */
export function pointsFrom(network: Network, pipe: PipeId, from: JointId): readonly Vec3[] {
  const { points, ends } = network.pipes[pipe]!;
  if (points === null) return [];
  return ends[0] === from ? points : [...points].reverse();
}

/** Sum of the turns in plan along pipes in order, degrees. Vertical pieces have no direction in plan and are passed. */
export const planTurn = (network: Network, pipes: readonly PipeId[], from: JointId): number =>
  turnAlong(
    directionsAlong(network, pipes, from)
      .filter(([x, y]) => Math.hypot(x, y) > flatEnough)
      .map(([x, y]): Vec3 => unit([x, y, 0])),
  );

/** Sum of the turns in space along pipes in order, degrees. */
export const spaceTurn = (network: Network, pipes: readonly PipeId[], from: JointId): number =>
  turnAlong(directionsAlong(network, pipes, from));

function directionsAlong(network: Network, pipes: readonly PipeId[], from: JointId): Vec3[] {
  const directions: Vec3[] = [];
  let joint = from;
  for (const pipe of pipes) {
    const points = pointsFrom(network, pipe, joint);
    for (let at = 1; at < points.length; at++) directions.push(unit(subtract(points[at]!, points[at - 1]!)));
    joint = otherEnd(network, pipe, joint);
  }
  return directions;
}

function turnAlong(drawn: readonly Vec3[]): number {
  let sum = 0;
  for (let at = 1; at < drawn.length; at++) {
    sum += Math.acos(Math.min(1, Math.max(-1, dot(drawn[at]!, drawn[at - 1]!)))) * degrees;
  }
  return sum;
}
