import type { Vec3 } from './vector.ts';

export type PlanPoint = readonly [number, number];

/** Convex hull in plan, counter-clockwise; turning or shifting the points turns or shifts it. Empty below three points. */
export function planHull(points: readonly PlanPoint[]): PlanPoint[] {
  const sorted = [...points].sort((a, b) => a[0] - b[0] || a[1] - b[1]);
  if (sorted.length < 3) return [];
  const half = (list: readonly PlanPoint[]): PlanPoint[] => {
    const chain: PlanPoint[] = [];
    for (const point of list) {
      while (chain.length >= 2 && crossOf(chain.at(-2)!, chain.at(-1)!, point) <= 0) chain.pop();
      chain.push(point);
    }
    return chain.slice(0, -1);
  };
  const hull = [...half(sorted), ...half([...sorted].reverse())];
  return hull.length < 3 ? [] : hull;
}

const crossOf = (o: PlanPoint, a: PlanPoint, b: PlanPoint): number =>
  (a[0] - o[0]) * (b[1] - o[1]) - (a[1] - o[1]) * (b[0] - o[0]);

/** Distance in plan from a convex outline, metres; 0 inside. */
export function distanceFromHull(hull: readonly PlanPoint[], at: Vec3 | PlanPoint): number {
  const point: PlanPoint = [at[0], at[1]];
  if (hull.every((a, index) => crossOf(a, hull[(index + 1) % hull.length]!, point) >= 0)) return 0;
  let nearest = Number.POSITIVE_INFINITY;
  hull.forEach((a, index) => {
    const b = hull[(index + 1) % hull.length]!;
    const [dx, dy] = [b[0] - a[0], b[1] - a[1]];
    const along = Math.min(
      1,
      Math.max(0, ((point[0] - a[0]) * dx + (point[1] - a[1]) * dy) / (dx * dx + dy * dy || 1)),
    );
    nearest = Math.min(nearest, Math.hypot(point[0] - a[0] - dx * along, point[1] - a[1] - dy * along));
  });
  return nearest;
}
