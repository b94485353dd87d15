import type { Building } from '../building.ts';
import { between, type Point, type Polyline } from './polylines.ts';

export interface Ray {
  readonly from: Point;
  /** Unit length. */
  readonly toward: Point;
}

export interface Hit {
  readonly is: 'pipe' | 'fixture';
  /** A section for a pipe, a row of the result for a fixture. */
  readonly index: number;
  readonly depth: number;
  /** On the pipe's axis, or where the ray meets the fixture's box. */
  readonly at: Point;
  /** Nearest end of the pipe's own axis. */
  readonly end: Point | null;
}

/**
 * The nearest visible thing under the ray. Plain arithmetic over all axes: fifty thousand pipes take a few
 * milliseconds, and a hair-thin pipe can still be hit, since `slack` (metres at one metre's depth) widens each.
 */
export function pick(
  building: Building,
  polylines: readonly (Polyline | null)[],
  ray: Ray,
  slack: number,
  inside: (at: Point) => boolean,
  visible: Uint8Array,
): Hit | null {
  let best: Hit | null = null;
  let bestScore = Number.POSITIVE_INFINITY;
  for (const line of polylines) {
    if (line === null || visible[line.section] === 0) continue;
    const radius = building.radius[line.section]!;
    for (let at = 1; at < line.points.length; at++) {
      const a = line.points[at - 1]!;
      const b = line.points[at]!;
      const near = nearest(ray, a, b);
      if (near.depth <= 0) continue;
      const reach = radius + slack * near.depth;
      if (near.gap > reach) continue;
      // Of two pipes at nearly the same depth the one that the ray goes through more truly wins.
      const score = near.depth + (near.gap / reach) * Math.max(radius * 4, slack * near.depth * 4);
      if (score >= bestScore || !inside(near.at)) continue;
      bestScore = score;
      const [first, last] = [line.points[line.bodyFrom]!, line.points[line.bodyTo]!];
      const end = apart2(first, near.at) <= apart2(last, near.at) ? first : last;
      best = { is: 'pipe', index: line.section, depth: near.depth, at: near.at, end };
    }
  }
  const { fixtures } = building.data.scene;
  for (let fixture = 0; fixture < fixtures.minX.length; fixture++) {
    const depth = intoBox(ray, building, fixture);
    if (depth === null || depth >= bestScore) continue;
    const at = between(ray.from, add(ray.from, ray.toward), depth);
    if (!inside(at)) continue;
    bestScore = depth;
    best = { is: 'fixture', index: fixture, depth, at, end: null };
  }
  return best;
}

const add = (a: Point, b: Point): Point => [a[0] + b[0], a[1] + b[1], a[2] + b[2]];
const apart2 = (a: Point, b: Point): number => (a[0] - b[0]) ** 2 + (a[1] - b[1]) ** 2 + (a[2] - b[2]) ** 2;

/** Closest approach of a ray and the stretch from `a` to `b`. */
function nearest(ray: Ray, a: Point, b: Point): { readonly depth: number; readonly gap: number; readonly at: Point } {
  const [dx, dy, dz] = ray.toward;
  const [ex, ey, ez] = [b[0] - a[0], b[1] - a[1], b[2] - a[2]];
  const [wx, wy, wz] = [a[0] - ray.from[0], a[1] - ray.from[1], a[2] - ray.from[2]];
  const de = dx * ex + dy * ey + dz * ez;
  const ee = ex * ex + ey * ey + ez * ez;
  const dw = dx * wx + dy * wy + dz * wz;
  const ew = ex * wx + ey * wy + ez * wz;
  const below = ee - de * de;
  const t = below < 1e-12 ? 0 : Math.max(0, Math.min(1, (dw * de - ew) / below));
  const at: Point = [a[0] + ex * t, a[1] + ey * t, a[2] + ez * t];
  const depth = dx * (at[0] - ray.from[0]) + dy * (at[1] - ray.from[1]) + dz * (at[2] - ray.from[2]);
  const foot: Point = [ray.from[0] + dx * depth, ray.from[1] + dy * depth, ray.from[2] + dz * depth];
  return { depth, gap: Math.sqrt(apart2(foot, at)), at };
}

function intoBox(ray: Ray, building: Building, fixture: number): number | null {
  const { minX, minY, minZ, maxX, maxY, maxZ } = building.data.scene.fixtures;
  const low = [minX[fixture]! / 1000, minY[fixture]! / 1000, minZ[fixture]! / 1000];
  const high = [maxX[fixture]! / 1000, maxY[fixture]! / 1000, maxZ[fixture]! / 1000];
  let near = 0;
  let far = Number.POSITIVE_INFINITY;
  for (const axis of [0, 1, 2] as const) {
    if (high[axis]! <= low[axis]!) return null;
    const speed = ray.toward[axis];
    const [a, b] = [(low[axis]! - ray.from[axis]) / speed, (high[axis]! - ray.from[axis]) / speed];
    if (Number.isNaN(a) || Number.isNaN(b)) return null;
    near = Math.max(near, Math.min(a, b));
    far = Math.min(far, Math.max(a, b));
  }
  return near <= far ? near : null;
}
