import { cross, dot, length, subtract, type Vec3 } from './vector.ts';

export interface Line {
  readonly point: Vec3;
  /** Unit vector. */
  readonly direction: Vec3;
}

/** Lines closer to parallel than this (sine of about 4.6 degrees) say nothing on where they meet. */
const leastSine = 0.08;

/**
 * The point with the least sum of squared distances to all lines: where they meet, or the middle of where they pass.
 * null when all are parallel, or nearly so.
 */
export function meetingPoint(lines: readonly Line[]): Vec3 | null {
  if (!anyTwoCross(lines)) return null;
  const origin = lines[0]!.point;
  // Sum of (I - u uT) x = sum of (I - u uT) p, solved about the first line's point to keep digits far from zero.
  let [a, b, c, d, e, f] = [0, 0, 0, 0, 0, 0];
  let [rx, ry, rz] = [0, 0, 0];
  for (const { point, direction: u } of lines) {
    const p = subtract(point, origin);
    const along = dot(p, u);
    a += 1 - u[0] * u[0];
    b -= u[0] * u[1];
    c -= u[0] * u[2];
    d += 1 - u[1] * u[1];
    e -= u[1] * u[2];
    f += 1 - u[2] * u[2];
    rx += p[0] - u[0] * along;
    ry += p[1] - u[1] * along;
    rz += p[2] - u[2] * along;
  }
  const c0: Vec3 = [a, b, c];
  const c1: Vec3 = [b, d, e];
  const c2: Vec3 = [c, e, f];
  const r: Vec3 = [rx, ry, rz];
  const determinant = dot(c0, cross(c1, c2));
  const solve = (x: Vec3, y: Vec3, z: Vec3): number => dot(x, cross(y, z)) / determinant;
  return [origin[0] + solve(r, c1, c2), origin[1] + solve(c0, r, c2), origin[2] + solve(c0, c1, r)];
}

function anyTwoCross(lines: readonly Line[]): boolean {
  for (let i = 0; i < lines.length; i++)
    for (let j = i + 1; j < lines.length; j++)
      if (length(cross(lines[i]!.direction, lines[j]!.direction)) >= leastSine) return true;
  return false;
}
