import { add, distance, dot, scale, subtract, unit, type Vec3 } from './vector.ts';

/** A polyline with the distance along it at each of its points. At least two points, no two neighbours alike. */
export interface Polyline {
  readonly points: readonly Vec3[];
  /** Metres from the first point, by point. */
  readonly along: readonly number[];
  readonly length: number;
}

export function polyline(points: readonly Vec3[]): Polyline {
  const along = [0];
  let total = 0;
  for (let i = 1; i < points.length; i++) {
    total += distance(points[i - 1]!, points[i]!);
    along.push(total);
  }
  return { points, along, length: total };
}

/** Where a point is nearest to a polyline: how far along, how far off, and the foot itself. */
export interface Foot {
  readonly at: number;
  readonly off: number;
  readonly point: Vec3;
  readonly leg: number;
}

export function footOn({ points, along }: Polyline, point: Vec3): Foot {
  let best: Foot | null = null;
  for (let leg = 0; leg + 1 < points.length; leg++) {
    const a = points[leg]!;
    const ab = subtract(points[leg + 1]!, a);
    const square = dot(ab, ab);
    const t = square === 0 ? 0 : Math.min(Math.max(dot(subtract(point, a), ab) / square, 0), 1);
    const foot = add(a, scale(ab, t));
    const off = distance(foot, point);
    if (best === null || off < best.off) best = { at: along[leg]! + t * Math.sqrt(square), off, point: foot, leg };
  }
  if (best === null) throw new Error('a polyline of one point has no foot');
  return best;
}

/** Leg that holds the place `at` metres along: the earlier one at a point where two meet. */
function legAt({ along }: Polyline, at: number): number {
  let low = 0;
  let high = along.length - 2;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (along[middle + 1]! >= at) high = middle;
    else low = middle + 1;
  }
  return low;
}

export function pointAlong(line: Polyline, at: number): Vec3 {
  const leg = legAt(line, at);
  const a = line.points[leg]!;
  const b = line.points[leg + 1]!;
  const span = line.along[leg + 1]! - line.along[leg]!;
  const t = span === 0 ? 0 : Math.min(Math.max((at - line.along[leg]!) / span, 0), 1);
  if (t === 1) return b;
  return t === 0 ? a : add(a, scale(subtract(b, a), t));
}

/** Unit direction of a leg, from its first point to its second. */
export const directionOf = ({ points }: Polyline, leg: number): Vec3 => unit(subtract(points[leg + 1]!, points[leg]!));

/** The points from `from` to `to` metres along, both included, with the corners between. */
export function cutOut(line: Polyline, from: number, to: number): readonly Vec3[] {
  const inside = line.points.filter((_, i) => line.along[i]! > from && line.along[i]! < to);
  return [pointAlong(line, from), ...inside, pointAlong(line, to)];
}
