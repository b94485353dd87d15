import type { Building } from '../building.ts';

/** A point of the scene in metres from its origin, z up. */
export type Point = readonly [number, number, number];

export interface Polyline {
  readonly section: number;
  readonly points: readonly Point[];
  /** Where the pipe itself begins and ends in `points`; what lies outside runs on to the middle of a fitting. */
  readonly bodyFrom: number;
  readonly bodyTo: number;
}

const thousandth = 1 / 1000;
/** A pipe end is joined to the middle of its fitting by a stub; farther than this nothing is drawn between. */
const longestStub = 1.2;
const shortestStub = 0.002;

/** The drawn way of a section in the order of its own points; null where the model gives no geometry. */
export function polylineOf(building: Building, section: number): Polyline | null {
  const { pipes } = building.data.scene;
  const start = building.pointStart[section]!;
  const end = building.pointStart[section + 1]!;
  if (end - start < 2) return null;
  const points: Point[] = [];
  for (let at = start; at < end; at++)
    points.push([pipes.x[at]! * thousandth, pipes.y[at]! * thousandth, pipes.z[at]! * thousandth]);
  const head = stub(building, pipes.jointA[section]!, points[0]!);
  const tail = stub(building, pipes.jointB[section]!, points.at(-1)!);
  const bodyFrom = head === null ? 0 : 1;
  const bodyTo = bodyFrom + points.length - 1;
  return {
    section,
    points: [...(head === null ? [] : [head]), ...points, ...(tail === null ? [] : [tail])],
    bodyFrom,
    bodyTo,
  };
}

/** Where a joint stands, or null where the model does not say. */
export function jointPoint(building: Building, joint: number): Point | null {
  const { pipes } = building.data.scene;
  if (pipes.jointKnown[joint] !== 1) return null;
  return [pipes.jointX[joint]! * thousandth, pipes.jointY[joint]! * thousandth, pipes.jointZ[joint]! * thousandth];
}

function stub(building: Building, joint: number, end: Point): Point | null {
  const at = jointPoint(building, joint);
  if (at === null) return null;
  const gap = apart(at, end);
  return gap > shortestStub && gap < longestStub ? at : null;
}

export const apart = (a: Point, b: Point): number => Math.hypot(a[0] - b[0], a[1] - b[1], a[2] - b[2]);

export const between = (a: Point, b: Point, t: number): Point => [
  a[0] + (b[0] - a[0]) * t,
  a[1] + (b[1] - a[1]) * t,
  a[2] + (b[2] - a[2]) * t,
];

export const lengthOf = (points: readonly Point[]): number => {
  let sum = 0;
  for (let at = 1; at < points.length; at++) sum += apart(points[at - 1]!, points[at]!);
  return sum;
};

/** The point at `t` (0 to 1) of the length of a polyline. */
export function pointAlong(points: readonly Point[], t: number): Point {
  let rest = lengthOf(points) * t;
  for (let at = 1; at < points.length; at++) {
    const [a, b] = [points[at - 1]!, points[at]!];
    const step = apart(a, b);
    if (rest <= step) return between(a, b, step === 0 ? 0 : rest / step);
    rest -= step;
  }
  return points.at(-1) ?? [0, 0, 0];
}
