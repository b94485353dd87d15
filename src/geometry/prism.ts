import type { PlanPoint } from './plan-outline.ts';
import { distance, type Vec3 } from './vector.ts';

/** An upright body: an outline in plan, of any shape that does not cross itself, between two heights. Metres. */
export interface Prism {
  readonly outline: readonly PlanPoint[];
  readonly low: number;
  readonly high: number;
}

export interface Stretch {
  /** Metres along the polyline. */
  readonly from: number;
  readonly to: number;
  /** Unit direction of the leg it lies on. */
  readonly direction: Vec3;
}

/** The stretches of a polyline inside a prism, in order, cut at its corners. */
export function stretchesInside(points: readonly Vec3[], prism: Prism): Stretch[] {
  const stretches: Stretch[] = [];
  let along = 0;
  for (let at = 1; at < points.length; at++) {
    const [a, b] = [points[at - 1]!, points[at]!];
    const length = distance(a, b);
    if (length === 0) continue;
    const direction: Vec3 = [(b[0] - a[0]) / length, (b[1] - a[1]) / length, (b[2] - a[2]) / length];
    for (const [from, to] of sharesInside(a, b, prism))
      stretches.push({ from: along + from * length, to: along + to * length, direction });
    along += length;
  }
  return stretches;
}

/** Shares of the leg from `a` to `b` that lie inside: cut at every face, and each part asked in its middle. */
function sharesInside(a: Vec3, b: Vec3, { outline, low, high }: Prism): [number, number][] {
  const cuts = [0, 1];
  const cutAt = (share: number): void => {
    if (share > 0 && share < 1) cuts.push(share);
  };
  const rise = b[2] - a[2];
  if (rise !== 0) for (const level of [low, high]) cutAt((level - a[2]) / rise);
  outline.forEach((p, index) => {
    const q = outline[(index + 1) % outline.length]!;
    const [ex, ey] = [q[0] - p[0], q[1] - p[1]];
    const [dx, dy] = [b[0] - a[0], b[1] - a[1]];
    const turn = dx * ey - dy * ex;
    if (turn !== 0) cutAt(((p[0] - a[0]) * ey - (p[1] - a[1]) * ex) / turn);
  });
  cuts.sort((m, n) => m - n);
  const inside: [number, number][] = [];
  for (let at = 1; at < cuts.length; at++) {
    const [from, to] = [cuts[at - 1]!, cuts[at]!];
    if (to - from <= 1e-9) continue;
    const middle = (from + to) / 2;
    const z = a[2] + rise * middle;
    const plan: PlanPoint = [a[0] + (b[0] - a[0]) * middle, a[1] + (b[1] - a[1]) * middle];
    if (z < low || z > high || !insideOutline(outline, plan)) continue;
    const last = inside.at(-1);
    if (last !== undefined && from - last[1] <= 1e-9) last[1] = to;
    else inside.push([from, to]);
  }
  return inside;
}

/** By the even number of edges that a ray crosses. */
export function insideOutline(outline: readonly PlanPoint[], [x, y]: PlanPoint): boolean {
  let inside = false;
  outline.forEach((p, index) => {
    const q = outline[(index + 1) % outline.length]!;
    if (p[1] > y !== q[1] > y && x < p[0] + ((y - p[1]) / (q[1] - p[1])) * (q[0] - p[0])) inside = !inside;
  });
  return inside;
}
