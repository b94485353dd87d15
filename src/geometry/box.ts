import type { Box, Vec3 } from './vector.ts';

/** Smallest box around points; null for none. */
export function boxAround(points: Iterable<Vec3>): Box | null {
  let [x0, y0, z0] = [Infinity, Infinity, Infinity];
  let [x1, y1, z1] = [-Infinity, -Infinity, -Infinity];
  for (const [x, y, z] of points) {
    if (x < x0) x0 = x;
    if (y < y0) y0 = y;
    if (z < z0) z0 = z;
    if (x > x1) x1 = x;
    if (y > y1) y1 = y;
    if (z > z1) z1 = z;
  }
  return x1 < x0 ? null : { min: [x0, y0, z0], max: [x1, y1, z1] };
}

/** True for a box of finite numbers whose corners stand the right way round. */
export const isSound = ({ min, max }: Box): boolean =>
  [0, 1, 2].every(
    (i) => min[i]! <= max[i]! && min[i]! > Number.NEGATIVE_INFINITY && max[i]! < Number.POSITIVE_INFINITY,
  );

/** The box grown by `by` metres on every side. */
export const grown = ({ min, max }: Box, by: number): Box => ({
  min: [min[0] - by, min[1] - by, min[2] - by],
  max: [max[0] + by, max[1] + by, max[2] + by],
});

export const boxCentre = ({ min, max }: Box): Vec3 => [
  (min[0] + max[0]) / 2,
  (min[1] + max[1]) / 2,
  (min[2] + max[2]) / 2,
];

export const boxSize = ({ min, max }: Box): Vec3 => [max[0] - min[0], max[1] - min[1], max[2] - min[2]];

const clamp = (value: number, low: number, high: number): number => Math.min(Math.max(value, low), high);

/** Point of the box nearest to `point`: the point itself when it lies inside. */
export const nearestInBox = (point: Vec3, { min, max }: Box): Vec3 => [
  clamp(point[0], min[0], max[0]),
  clamp(point[1], min[1], max[1]),
  clamp(point[2], min[2], max[2]),
];

/** Metres from a point to a box; 0 inside. */
export const distanceToBox = (point: Vec3, { min, max }: Box): number =>
  Math.hypot(
    Math.max(min[0] - point[0], 0, point[0] - max[0]),
    Math.max(min[1] - point[1], 0, point[1] - max[1]),
    Math.max(min[2] - point[2], 0, point[2] - max[2]),
  );

/** Metres between two boxes; 0 where they touch or overlap. */
export const distanceOfBoxes = (a: Box, b: Box): number =>
  Math.hypot(
    Math.max(a.min[0] - b.max[0], 0, b.min[0] - a.max[0]),
    Math.max(a.min[1] - b.max[1], 0, b.min[1] - a.max[1]),
    Math.max(a.min[2] - b.max[2], 0, b.min[2] - a.max[2]),
  );
