import { distance, type Vec3 } from '../../geometry/vector.ts';
import type { Reader } from '../reader.ts';
import type { Curves } from './curves.ts';
import { type Frame, identity, moved, scaleOf } from './frame.ts';
import { operatorFrame } from './operator.ts';
import type { Placements } from './placements.ts';

/** A cross-section in its own plane (z = 0), metres. */
export interface Profile {
  /** Set where the outline is round: a circle, or a curve or polygon that cannot be told from one. */
  readonly round: { readonly centre: Vec3; readonly outer: number; readonly inner: number | null } | null;
  /** Points of the outline, round ones included. */
  readonly outline: () => Vec3[];
}

export interface Profiles {
  /** null for a record that is no profile or has no size. */
  readonly read: (record: number) => Profile | null;
}

const deepestProfile = 10;
/** Corners of the polygon that stands for a circle where points are wanted. */
const corners = 24;

export function profilesOf(reader: Reader, placements: Placements, curves: Curves): Profiles {
  const { index, follow, type } = reader;
  const { metres } = placements;
  const cursor = reader.cursor();

  /** Frame and dimensions of a profile with a position: circle, rectangle, the steel shapes. */
  const placed = (record: number): { readonly frame: Frame; readonly sizes: number[] } => {
    cursor.at(index.args[record]!).skip(2);
    const position = cursor.id();
    const sizes: number[] = [];
    while (cursor.more && sizes.length < 4) sizes.push((cursor.number() ?? 0) * metres);
    const at = follow(position, record);
    return { frame: at < 0 ? identity : placements.axes(at), sizes };
  };
  const circle = (record: number, isHollow: boolean): Profile | null => {
    const { frame, sizes } = placed(record);
    const [radius = 0, wall = 0] = sizes;
    if (!(radius > 0)) return null;
    const inner = isHollow && wall > 0 && wall < radius ? radius - wall : null;
    return roundProfile([frame[9], frame[10], frame[11]], radius, inner);
  };
  const rectangle = (record: number): Profile | null => {
    const { frame, sizes } = placed(record);
    const [x = 0, y = 0] = sizes;
    return x > 0 && y > 0 ? outlined(rectangleAround(frame, x / 2, y / 2)) : null;
  };
  const ellipse = (record: number): Profile | null => {
    const { frame, sizes } = placed(record);
    const [a = 0, b = 0] = sizes;
    if (!(a > 0 && b > 0)) return null;
    if (Math.abs(a - b) < 1e-6 * a) return roundProfile([frame[9], frame[10], frame[11]], a, null);
    return outlined(polygon(corners).map(([x, y]) => moved(frame, [a * x, b * y, 0])));
  };
  const arbitrary = (record: number): Profile | null => {
    cursor.at(index.args[record]!).skip(2);
    const outer = cursor.id();
    const hasVoids = type(record) === 'IFCARBITRARYPROFILEDEFWITHVOIDS';
    const voids = hasVoids ? cursor.ids() : [];
    const points = curves.points(follow(outer, record));
    if (points === null || points.length < 3) return null;
    const ring = roundness(points);
    if (ring === null) return outlined(points);
    const inner = voids.length === 1 ? curves.points(follow(voids[0]!, record)) : null;
    const bore = inner === null ? null : roundness(inner);
    const isCentred = bore !== null && distance(bore.centre, ring.centre) < 0.1 * ring.radius;
    return roundProfile(ring.centre, ring.radius, isCentred ? bore.radius : null);
  };
  const derived = (record: number, depth: number): Profile | null => {
    cursor.at(index.args[record]!).skip(2);
    const parent = cursor.id();
    const operator = cursor.id();
    const within = read(follow(parent, record), depth + 1);
    if (within === null) return null;
    const at = follow(operator, record);
    const frame = at < 0 ? identity : operatorFrame(reader, placements, at);
    const { round } = within;
    if (round === null) return outlined(within.outline().map((one) => moved(frame, one)));
    const k = scaleOf(frame);
    return roundProfile(moved(frame, round.centre), round.outer * k, round.inner === null ? null : round.inner * k);
  };
  const composite = (record: number, depth: number): Profile | null => {
    const ids = cursor.at(index.args[record]!).skip(2).ids();
    const parts = ids.map((id) => read(follow(id, record), depth + 1)).filter((part) => part !== null);
    const [only] = parts;
    return parts.length === 1 ? only! : parts.length === 0 ? null : outlined(parts.flatMap((part) => part.outline()));
  };
  /** Steel shapes: only the box around them is of use here. */
  const steel = (record: number): Profile | null => {
    const { frame, sizes } = placed(record);
    const [a = 0, b = 0] = sizes;
    const isWideFirst = type(record) === 'IFCISHAPEPROFILEDEF' || type(record) === 'IFCASYMMETRICISHAPEPROFILEDEF';
    const [x, y] = isWideFirst ? [a, b] : [b, a];
    return x > 0 && y > 0 ? outlined(rectangleAround(frame, x / 2, y / 2)) : null;
  };
  const read = (record: number, depth: number): Profile | null => {
    if (record < 0 || depth > deepestProfile) return null;
    switch (type(record)) {
      case 'IFCCIRCLEHOLLOWPROFILEDEF':
        return circle(record, true);
      case 'IFCCIRCLEPROFILEDEF':
        return circle(record, false);
      case 'IFCRECTANGLEPROFILEDEF':
      case 'IFCRECTANGLEHOLLOWPROFILEDEF':
      case 'IFCROUNDEDRECTANGLEPROFILEDEF':
        return rectangle(record);
      case 'IFCELLIPSEPROFILEDEF':
        return ellipse(record);
      case 'IFCARBITRARYCLOSEDPROFILEDEF':
      case 'IFCARBITRARYPROFILEDEFWITHVOIDS':
        return arbitrary(record);
      case 'IFCDERIVEDPROFILEDEF':
      case 'IFCMIRROREDPROFILEDEF':
        return derived(record, depth);
      case 'IFCCOMPOSITEPROFILEDEF':
        return composite(record, depth);
      case 'IFCISHAPEPROFILEDEF':
      case 'IFCASYMMETRICISHAPEPROFILEDEF':
      case 'IFCUSHAPEPROFILEDEF':
      case 'IFCLSHAPEPROFILEDEF':
      case 'IFCTSHAPEPROFILEDEF':
      case 'IFCCSHAPEPROFILEDEF':
      case 'IFCZSHAPEPROFILEDEF':
        return steel(record);
      default:
        return null;
    }
  };
  return { read: (record) => read(record, 0) };
}

const outlined = (points: Vec3[]): Profile => ({ round: null, outline: () => points });

const roundProfile = (centre: Vec3, outer: number, inner: number | null): Profile => ({
  round: { centre, outer, inner },
  outline: () => polygon(corners).map(([x, y]) => [centre[0] + outer * x, centre[1] + outer * y, centre[2]]),
});

const polygon = (n: number): [number, number][] =>
  Array.from({ length: n }, (_, k) => [Math.cos((2 * Math.PI * k) / n), Math.sin((2 * Math.PI * k) / n)]);

const rectangleAround = (frame: Frame, x: number, y: number): Vec3[] =>
  (
    [
      [-x, -y, 0],
      [x, -y, 0],
      [x, y, 0],
      [-x, y, 0],
    ] as const
  ).map((corner) => moved(frame, corner));

/** Fewest corners of a polygon that may stand for a circle. */
const fewestCorners = 6;
/** How much the distances from centre to corners may differ, as a part of the radius. */
const roundTolerance = 0.01;

/** Centre and radius of an outline whose points all lie on one circle and leave no wide gap; else null. */
export function roundness(points: readonly Vec3[]): { readonly centre: Vec3; readonly radius: number } | null {
  const isClosed = distance(points[0]!, points.at(-1)!) < 1e-9;
  const ring = isClosed ? points.slice(0, -1) : points;
  const n = ring.length;
  if (n < fewestCorners) return null;
  // The middle of the box is the centre whatever the spacing of the points; the mean of the points is not.
  let [x0, y0, x1, y1] = [Infinity, Infinity, -Infinity, -Infinity];
  for (const [x, y] of ring) {
    x0 = Math.min(x0, x);
    y0 = Math.min(y0, y);
    x1 = Math.max(x1, x);
    y1 = Math.max(y1, y);
  }
  const fitted = circleThrough(ring) ?? { x: (x0 + x1) / 2, y: (y0 + y1) / 2 };
  const centre: Vec3 = [fitted.x, fitted.y, ring[0]![2]];
  const distances = ring.map((one) => distance(one, centre));
  const radius = Math.max(...distances);
  if (!(radius > 0) || radius - Math.min(...distances) > roundTolerance * radius) return null;
  // Points on half a circle are no circle: no chord of the outline may pass near the centre.
  const widest = Math.max(...ring.map((one, k) => distance(one, ring[(k + 1) % n]!)));
  return widest > radius * 1.1 ? null : { centre, radius };
}

/** Circle through three points far apart on a ring. */
function circleThrough(ring: readonly Vec3[]): { readonly x: number; readonly y: number } | null {
  const [a, b, c] = [ring[0]!, ring[Math.floor(ring.length / 3)]!, ring[Math.floor((2 * ring.length) / 3)]!];
  const d = 2 * (a[0] * (b[1] - c[1]) + b[0] * (c[1] - a[1]) + c[0] * (a[1] - b[1]));
  const [aa, bb, cc] = [a[0] ** 2 + a[1] ** 2, b[0] ** 2 + b[1] ** 2, c[0] ** 2 + c[1] ** 2];
  if (Math.abs(d) < 1e-15) return null;
  return {
    x: (aa * (b[1] - c[1]) + bb * (c[1] - a[1]) + cc * (a[1] - b[1])) / d,
    y: (aa * (c[0] - b[0]) + bb * (a[0] - c[0]) + cc * (b[0] - a[0])) / d,
  };
}
