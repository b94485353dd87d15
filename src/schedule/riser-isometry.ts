import type { Vec3 } from '../geometry/vector.ts';

/** A point of the drawing: x to the right, y down. */
export type Flat = readonly [number, number];

export interface Isometry {
  at(point: Vec3): Flat;
  /** Larger is nearer to the eye. */
  depth(point: Vec3): number;
}

/** Drawing units for a metre, and how much of a long empty stretch is kept. */
const perMetre = 84;
const keptOfLong = 0.22;
/** Beyond this an empty stretch counts as long, metres; storeys are high and empty, so upright less is kept. */
const longInPlan = 1;
const longUpright = 0.55;
const cos30 = Math.cos(Math.PI / 6);
const sin30 = 0.5;

/**
 * Plan axes follow the piping's own main direction and go off at 30 degrees to either side, height goes up. Each axis
 * is stretched for itself: small distances keep their size, long empty ones shrink, so nothing changes its order, what
 * is aligned stays aligned, and a loop of pipes still closes.
 */
export function isometry(ways: readonly (readonly Vec3[])[]): Isometry {
  const turn = mainDirection(ways);
  const [c, s] = [Math.cos(turn), Math.sin(turn)];
  const along = ([x, y]: Vec3): number => x * c + y * s;
  const across = ([x, y]: Vec3): number => -x * s + y * c;
  const points = ways.flat();
  const u = squeezed(points.map(along), longInPlan);
  const v = squeezed(points.map(across), longInPlan);
  const z = squeezed(
    points.map((point) => point[2]),
    longUpright,
  );
  return {
    at: (point) => {
      const [a, b, up] = [u(along(point)), v(across(point)), z(point[2])];
      return [rounded((a + b) * cos30), rounded((a - b) * sin30 - up)];
    },
    depth: (point) => along(point) - across(point) + point[2] * 0.001,
  };
}

const rounded = (value: number): number => Math.round(value * 10) / 10;

/** Angle of the plan direction that most pipe length follows, within a quarter turn; level pipes only. */
function mainDirection(ways: readonly (readonly Vec3[])[]): number {
  let [re, im] = [0, 0];
  for (const way of ways)
    for (let at = 1; at < way.length; at++) {
      const [a, b] = [way[at - 1]!, way[at]!];
      const [dx, dy] = [b[0] - a[0], b[1] - a[1]];
      const length = Math.hypot(dx, dy);
      if (length < 0.05) continue;
      // Four times the angle: a direction and its square neighbours add up.
      const angle = 4 * Math.atan2(dy, dx);
      re += length * Math.cos(angle);
      im += length * Math.sin(angle);
    }
  if (Math.hypot(re, im) < 1e-6) return 0;
  const turn = Math.atan2(im, re) / 4;
  return Math.abs(turn) < 1e-4 ? 0 : turn;
}

/** A rising, piecewise straight function from metres to drawing units. */
function squeezed(values: readonly number[], long: number): (value: number) => number {
  const stops = [...new Set(values.map((value) => Math.round(value * 1000) / 1000))].sort((a, b) => a - b);
  const places: number[] = [];
  stops.forEach((stop, at) => {
    const gap = at === 0 ? 0 : stop - stops[at - 1]!;
    places.push((places[at - 1] ?? 0) + perMetre * (Math.min(gap, long) + Math.max(0, gap - long) * keptOfLong));
  });
  return (value) => {
    let low = 0;
    let high = stops.length - 1;
    if (high < 0) return 0;
    while (high - low > 1) {
      const middle = (low + high) >> 1;
      if (stops[middle]! <= value) low = middle;
      else high = middle;
    }
    const [a, b] = [stops[low]!, stops[high]!];
    const t = b === a ? 0 : (value - a) / (b - a);
    return places[low]! + (places[high]! - places[low]!) * Math.max(0, Math.min(1, t));
  };
}
