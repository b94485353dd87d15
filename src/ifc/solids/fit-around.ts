import { distance, type Vec3 } from '../../geometry/vector.ts';
import { moved } from './frame.ts';
import type { Piece } from './piece.ts';

export interface FittedRadius {
  readonly outer: number;
  readonly residual: number;
}

const sameWall = 0.02;
const fewestCorners = 6;
/** A body whose corners stray further than this from one distance, as a part of it, is not round about the axis. */
const worstResidual = 0.05;

/**
 * Radius of a body of faces around an axis that the file gives: the distance at which most of its corners stand, of
 * equals the largest. null where no distance is common, as around a duct.
 */
export function radiusAround(axis: readonly Vec3[], body: readonly Piece[]): FittedRadius | null {
  const distances: number[] = [];
  for (const { shape, frame } of body) {
    if (shape.kind !== 'mesh') continue;
    const flat = shape.points();
    for (let i = 0; i + 2 < flat.length; i += 3) {
      distances.push(distanceToPath(moved(frame, [flat[i]!, flat[i + 1]!, flat[i + 2]!]), axis));
    }
  }
  distances.sort((a, b) => a - b);
  const largest = distances.at(-1) ?? 0;
  let best: { readonly from: number; readonly to: number } | null = null;
  for (let from = 0; from < distances.length; ) {
    let to = from + 1;
    while (to < distances.length && distances[to]! - distances[to - 1]! < sameWall * largest) to++;
    if (
      to - from >= fewestCorners &&
      distances[from]! > 0.05 * largest &&
      to - from >= (best === null ? 0 : best.to - best.from)
    ) {
      best = { from, to };
    }
    from = to;
  }
  if (best === null) return null;
  const wall = distances.slice(best.from, best.to);
  const outer = wall.reduce((sum, one) => sum + one, 0) / wall.length;
  const residual = Math.sqrt(wall.reduce((sum, one) => sum + (one - outer) ** 2, 0) / wall.length);
  return residual > worstResidual * outer ? null : { outer, residual };
}

/** Metres from a point to a polyline. */
export function distanceToPath(point: Vec3, path: readonly Vec3[]): number {
  let least = Infinity;
  for (let k = 1; k < path.length; k++) {
    const a = path[k - 1]!;
    const b = path[k]!;
    const d: Vec3 = [b[0] - a[0], b[1] - a[1], b[2] - a[2]];
    const size = d[0] * d[0] + d[1] * d[1] + d[2] * d[2];
    const along = (point[0] - a[0]) * d[0] + (point[1] - a[1]) * d[1] + (point[2] - a[2]) * d[2];
    const t = size === 0 ? 0 : Math.min(1, Math.max(0, along / size));
    least = Math.min(least, distance(point, [a[0] + d[0] * t, a[1] + d[1] * t, a[2] + d[2] * t]));
  }
  return least;
}
