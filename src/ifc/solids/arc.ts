import { add, cross, dot, scale, subtract, type Vec3 } from '../../geometry/vector.ts';

/** Largest angle between two neighbouring points of an arc: its length is then right to a thousandth. */
const arcStep = Math.PI / 24;

/** A full circle takes 48; an angle past many turns is a slip of the pen. */
const mostSteps = 480;

/** Chords that stand for an arc of so many radians. */
export const arcSteps = (angle: number): number =>
  Math.min(mostSteps, Math.max(2, Math.ceil(Math.abs(angle) / arcStep - 1e-9)));

/** Points on the arc that begins at `a`, passes `b` and ends at `c`; the three themselves when they stand in a line. */
export function arcThrough(a: Vec3, b: Vec3, c: Vec3): Vec3[] {
  const ab = subtract(b, a);
  const ac = subtract(c, a);
  const n = cross(ab, ac);
  const nn = dot(n, n);
  if (nn <= 1e-12 * dot(ab, ab) * dot(ac, ac)) return [a, b, c];
  const toCentre = centreFrom(ab, ac, n);
  const centre = add(a, toCentre);
  const radius = Math.hypot(...toCentre);
  const x = scale(toCentre, -1 / radius);
  const y = cross(scale(n, 1 / Math.sqrt(nn)), x);
  const end = subtract(c, centre);
  const turned = Math.atan2(dot(end, y), dot(end, x));
  const sweep = turned <= 1e-9 ? turned + 2 * Math.PI : turned;
  const steps = arcSteps(sweep);
  return Array.from({ length: steps + 1 }, (_, k) => {
    if (k === steps) return c;
    const t = (sweep * k) / steps;
    return add(centre, add(scale(x, radius * Math.cos(t)), scale(y, radius * Math.sin(t))));
  });
}

/** From the first of three points on a circle to its centre; `n` is the product of the ways to the other two. */
function centreFrom(ab: Vec3, ac: Vec3, n: Vec3): Vec3 {
  const sum = add(scale(cross(n, ab), dot(ac, ac)), scale(cross(ac, n), dot(ab, ab)));
  return scale(sum, 1 / (2 * dot(n, n)));
}

/**
 * Path of a circle's centre that stands `offset` beside the curve it is led along. Around an arc it stands outside, on
 * the same centre: that is how bends are drawn whose profile begins on the curve. Along other curves the side cannot
 * be told, and the curve itself is taken.
 */
export function besideArc(points: readonly Vec3[], offset: number): readonly Vec3[] {
  if (offset < 1e-6 || points.length < 3) return points;
  const [a, b, c] = [points[0]!, points[points.length >> 1]!, points.at(-1)!];
  const ab = subtract(b, a);
  const ac = subtract(c, a);
  const n = cross(ab, ac);
  if (dot(n, n) <= 1e-12 * dot(ab, ab) * dot(ac, ac)) return points;
  const centre = add(a, centreFrom(ab, ac, n));
  const radius = Math.hypot(...subtract(a, centre));
  const isArc = points.every((point) => Math.abs(Math.hypot(...subtract(point, centre)) - radius) < 1e-3 * radius);
  return isArc ? points.map((point) => add(centre, scale(subtract(point, centre), 1 + offset / radius))) : points;
}
