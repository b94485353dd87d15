import type { Box, Vec3 } from '../../geometry/vector.ts';

/**
 * An affine map of space: the images of the x, y and z unit vectors, then that of the origin, in metres. Placements
 * are turned and shifted only; mapped items may scale as well.
 */
export type Frame = readonly [
  number,
  number,
  number,
  number,
  number,
  number,
  number,
  number,
  number,
  number,
  number,
  number,
];

export const identity: Frame = [1, 0, 0, 0, 1, 0, 0, 0, 1, 0, 0, 0];

/** First `b`, then `a`. */
export function compose(a: Frame, b: Frame): Frame {
  if (a === identity) return b;
  if (b === identity) return a;
  return [
    a[0] * b[0] + a[3] * b[1] + a[6] * b[2],
    a[1] * b[0] + a[4] * b[1] + a[7] * b[2],
    a[2] * b[0] + a[5] * b[1] + a[8] * b[2],
    a[0] * b[3] + a[3] * b[4] + a[6] * b[5],
    a[1] * b[3] + a[4] * b[4] + a[7] * b[5],
    a[2] * b[3] + a[5] * b[4] + a[8] * b[5],
    a[0] * b[6] + a[3] * b[7] + a[6] * b[8],
    a[1] * b[6] + a[4] * b[7] + a[7] * b[8],
    a[2] * b[6] + a[5] * b[7] + a[8] * b[8],
    a[0] * b[9] + a[3] * b[10] + a[6] * b[11] + a[9],
    a[1] * b[9] + a[4] * b[10] + a[7] * b[11] + a[10],
    a[2] * b[9] + a[5] * b[10] + a[8] * b[11] + a[11],
  ];
}

export function moved(f: Frame, point: Vec3): Vec3 {
  const x = point[0];
  const y = point[1];
  const z = point[2];
  return [
    f[0] * x + f[3] * y + f[6] * z + f[9],
    f[1] * x + f[4] * y + f[7] * z + f[10],
    f[2] * x + f[5] * y + f[8] * z + f[11],
  ];
}

/** A direction, turned (and scaled, where the frame scales) but not shifted. */
export const turned = (f: Frame, [x, y, z]: Vec3): Vec3 => [
  f[0] * x + f[3] * y + f[6] * z,
  f[1] * x + f[4] * y + f[7] * z,
  f[2] * x + f[5] * y + f[8] * z,
];

export const originOf = (f: Frame): Vec3 => [f[9], f[10], f[11]];

/** How much longer the frame makes a length; the mean of its three directions where they differ. */
export function scaleOf(f: Frame): number {
  const k = Math.cbrt(
    Math.abs(
      f[0] * (f[4] * f[8] - f[5] * f[7]) - f[3] * (f[1] * f[8] - f[2] * f[7]) + f[6] * (f[1] * f[5] - f[2] * f[4]),
    ),
  );
  return Math.abs(k - 1) < 1e-9 ? 1 : k;
}

/** A box that grows point by point. */
export interface GrowingBox {
  readonly min: [number, number, number];
  readonly max: [number, number, number];
}

export const emptyBox = (): GrowingBox => ({
  min: [Infinity, Infinity, Infinity],
  max: [-Infinity, -Infinity, -Infinity],
});

export function include(box: GrowingBox, x: number, y: number, z: number): void {
  const { min, max } = box;
  if (x < min[0]) min[0] = x;
  if (y < min[1]) min[1] = y;
  if (z < min[2]) min[2] = z;
  if (x > max[0]) max[0] = x;
  if (y > max[1]) max[1] = y;
  if (z > max[2]) max[2] = z;
}

/** Includes every point of a flat list x, y, z, x, … as the frame places it. */
export function includeAll(box: GrowingBox, f: Frame, flat: readonly number[]): void {
  for (let i = 0; i + 2 < flat.length; i += 3) {
    const x = flat[i]!;
    const y = flat[i + 1]!;
    const z = flat[i + 2]!;
    include(
      box,
      f[0] * x + f[3] * y + f[6] * z + f[9],
      f[1] * x + f[4] * y + f[7] * z + f[10],
      f[2] * x + f[5] * y + f[8] * z + f[11],
    );
  }
}

/** Farthest from zero that anything built can stand, in metres: past it a number is a fault, and squares overflow. */
const farthest = 1e10;

/** True for coordinates of somewhere: numbers all three, not beyond all measure. */
export const isPlace = (x: number, y: number, z: number): boolean =>
  Math.abs(x) < farthest && Math.abs(y) < farthest && Math.abs(z) < farthest;

/** null when nothing was included, or something that is no place. */
export function boxOf({ min, max }: GrowingBox): Box | null {
  if (!isPlace(min[0], min[1], min[2]) || !isPlace(max[0], max[1], max[2])) return null;
  return { min: [min[0], min[1], min[2]], max: [max[0], max[1], max[2]] };
}

/** Coordinates of a world point within a turned frame that does not scale. */
export function seenFrom(f: Frame, point: Vec3): Vec3 {
  const x = point[0] - f[9];
  const y = point[1] - f[10];
  const z = point[2] - f[11];
  return [f[0] * x + f[1] * y + f[2] * z, f[3] * x + f[4] * y + f[5] * z, f[6] * x + f[7] * y + f[8] * z];
}
