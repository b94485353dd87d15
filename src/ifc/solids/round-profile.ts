import { distance, type Vec3 } from '../../geometry/vector.ts';

/** Fewest corners of a polygon that may stand for a circle. */
const fewestCorners = 6;
/** How much the distances from centre to corners may differ, as a part of the radius. */
const roundTolerance = 0.01;
/** Widest chord of an outline that still goes round, as a part of the radius: a hexagon's is 1. */
const widestChord = 1.1;
/** Least length of an outline that goes round, as a part of the radius: a hexagon's is 6, a flat arc's much less. */
const leastLength = 5;

/** Centre and radius of an outline whose points all lie on one circle and leave no wide gap; else null. */
export function roundness(points: readonly Vec3[]): { readonly centre: Vec3; readonly radius: number } | null {
  const isClosed = points.length > 1 && distance(points[0]!, points.at(-1)!) < 1e-9;
  const ring = isClosed ? points.slice(0, -1) : points;
  if (ring.length < fewestCorners) return null;
  const centre = circleThrough(ring);
  if (centre === null) return null;
  let [least, most, widest, total] = [Infinity, 0, 0, 0];
  for (const [k, one] of ring.entries()) {
    const radius = distance(one, centre);
    least = Math.min(least, radius);
    most = Math.max(most, radius);
    const chord = distance(one, ring[(k + 1) % ring.length]!);
    widest = Math.max(widest, chord);
    total += chord;
  }
  const isRound = most - least <= roundTolerance * most && widest <= widestChord * most && total >= leastLength * most;
  return most > 0 && isRound ? { centre, radius: most } : null;
}

/** Centre of the circle through three points far apart on a ring. */
function circleThrough(ring: readonly Vec3[]): Vec3 | null {
  const [a, b, c] = [ring[0]!, ring[Math.floor(ring.length / 3)]!, ring[Math.floor((2 * ring.length) / 3)]!];
  // Seen from the first point: squares of large coordinates would leave nothing of the differences.
  const [bx, by, cx, cy] = [b[0] - a[0], b[1] - a[1], c[0] - a[0], c[1] - a[1]];
  const d = 2 * (bx * cy - by * cx);
  if (Math.abs(d) < 1e-15) return null;
  const [bb, cc] = [bx * bx + by * by, cx * cx + cy * cy];
  return [a[0] + (cy * bb - by * cc) / d, a[1] + (bx * cc - cx * bb) / d, a[2]];
}
