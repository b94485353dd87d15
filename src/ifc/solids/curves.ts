import { add, distance, scale, type Vec3 } from '../../geometry/vector.ts';
import type { Reader } from '../reader.ts';
import { type Frame, moved } from './frame.ts';
import type { Placements } from './placements.ts';
import { splinePoints } from './spline.ts';

/** Largest angle between two neighbouring points of an arc: its length is then right to a thousandth. */
const arcStep = Math.PI / 24;
const deepestCurve = 20;

/** Curves of one file as points in metres, in the coordinates of the item that uses them; 2D curves have z = 0. */
export interface Curves {
  /** Points along a curve; null for a curve without ends (a bare line) and for kinds that are not understood. */
  readonly points: (record: number) => Vec3[] | null;
  /** Points along a curve between two of its own parameters, where a sweep states them. */
  readonly trimmed: (record: number, from: number | null, to: number | null) => Vec3[] | null;
  /** Points of a circle or ellipse from one point on it to another, counter-clockwise where `sense` holds. */
  readonly arcBetween: (record: number, from: Vec3, to: Vec3, sense: boolean) => Vec3[];
}

/** `radians`: one plane angle unit of the file. */
export function curvesOf(reader: Reader, placements: Placements, radians: number): Curves {
  const { index, follow, type } = reader;
  const { args } = index;
  const { point, direction, axes, metres } = placements;

  const polyline = (record: number): Vec3[] => {
    const ids = reader.cursor().at(args[record]!).ids();
    return ids.map((id) => point(follow(id, record)));
  };
  const listed = (record: number): Vec3[] => {
    if (record < 0) return [];
    const isPlane = type(record) === 'IFCCARTESIANPOINTLIST2D';
    const flat = reader.cursor().at(args[record]!).numbers([]);
    const width = isPlane ? 2 : 3;
    const points: Vec3[] = [];
    for (let i = 0; i + width <= flat.length; i += width) {
      points.push([flat[i]! * metres, flat[i + 1]! * metres, isPlane ? 0 : flat[i + 2]! * metres]);
    }
    return points;
  };
  const indexed = (record: number): Vec3[] | null => {
    const cursor = reader.cursor().at(args[record]!);
    const listId = cursor.id();
    const segments = cursor.typedLists();
    const points = listed(follow(listId, record));
    if (segments.length === 0) return points.length > 1 ? points : null;
    const path: Vec3[] = [];
    for (const { type: kind, numbers } of segments) {
      const corners = numbers.map((one) => points[one - 1]).filter((one) => one !== undefined);
      if (corners.length !== numbers.length) return null;
      const piece =
        kind === 'IFCARCINDEX' && corners.length === 3 ? arcThrough(corners[0]!, corners[1]!, corners[2]!) : corners;
      append(path, piece);
    }
    return path;
  };
  const composite = (record: number, depth: number): Vec3[] | null => {
    const path: Vec3[] = [];
    for (const id of reader.cursor().at(args[record]!).ids()) {
      const segment = follow(id, record);
      if (type(segment) !== 'IFCCOMPOSITECURVESEGMENT' && type(segment) !== 'IFCREPARAMETRISEDCOMPOSITECURVESEGMENT')
        return null;
      const cursor = reader.cursor().at(args[segment]!).skip(1);
      const sameSense = cursor.flag() !== false;
      const piece = curve(follow(cursor.id(), segment), depth + 1);
      if (piece === null) return null;
      append(path, sameSense ? piece : piece.reverse());
    }
    return path.length > 1 ? path : null;
  };
  const circle = (record: number): { readonly frame: Frame; readonly a: number; readonly b: number } => {
    const cursor = reader.cursor().at(args[record]!);
    const position = cursor.id();
    const a = (cursor.number() ?? 0) * metres;
    const b = type(record) === 'IFCELLIPSE' ? (cursor.number() ?? 0) * metres : a;
    return { frame: axes(follow(position, record)), a, b };
  };
  const arc = (record: number, from: number, to: number): Vec3[] => {
    const { frame, a, b } = circle(record);
    const steps = Math.max(2, Math.ceil(Math.abs(to - from) / arcStep - 1e-9));
    return Array.from({ length: steps + 1 }, (_, k) => {
      const t = from + ((to - from) * k) / steps;
      return moved(frame, [a * Math.cos(t), b * Math.sin(t), 0]);
    });
  };
  const angleOn = (record: number, place: Vec3): number => {
    const { frame, a, b } = circle(record);
    const [x, y] = seenFrom(frame, place);
    return Math.atan2(y / (b || 1), x / (a || 1));
  };
  /** Counter-clockwise from one angle up to the other where `sense` holds, else down to it; alike means all round. */
  const arcFrom = (record: number, from: number, to: number, sense: boolean): Vec3[] => {
    const turn = 2 * Math.PI;
    const sweep = sense ? to - from : from - to;
    const rest = ((sweep % turn) + turn) % turn;
    const angle = rest < 1e-9 ? turn : rest;
    return arc(record, from, sense ? from + angle : from - angle);
  };
  const onLine = (record: number, parameter: number): Vec3 => {
    const cursor = reader.cursor().at(args[record]!);
    const start = cursor.id();
    const vector = follow(cursor.id(), record);
    const from = point(follow(start, record));
    if (vector < 0) return from;
    cursor.at(args[vector]!);
    const along = cursor.id();
    const magnitude = (cursor.number() ?? 1) * metres;
    return add(from, scale(direction(follow(along, vector)) ?? [0, 0, 1], magnitude * parameter));
  };
  const trimmedCurve = (record: number, depth: number): Vec3[] | null => {
    const cursor = reader.cursor().at(args[record]!);
    const basis = follow(cursor.id(), record);
    const first = trim(cursor.mixed());
    const second = trim(cursor.mixed());
    const sense = cursor.flag() !== false;
    const kind = type(basis);
    const pointOf = (id: number): Vec3 | null => (id === 0 ? null : point(follow(id, record)));
    if (kind === 'IFCLINE') {
      const from = pointOf(first.id) ?? (first.parameter === null ? null : onLine(basis, first.parameter));
      const to = pointOf(second.id) ?? (second.parameter === null ? null : onLine(basis, second.parameter));
      return from === null || to === null ? null : [from, to];
    }
    if (kind === 'IFCCIRCLE' || kind === 'IFCELLIPSE') {
      const angle = (one: Trim): number | null => {
        const place = pointOf(one.id);
        if (place === null) return one.parameter === null ? null : one.parameter * radians;
        return angleOn(basis, place);
      };
      const from = angle(first);
      const to = angle(second);
      return from === null || to === null ? null : arcFrom(basis, from, to, sense);
    }
    // Trims of other curves are rare: the parts of a path are trimmed only where two straight ends are cut.
    return curve(basis, depth + 1);
  };
  const curve = (record: number, depth: number): Vec3[] | null => {
    if (record < 0 || depth > deepestCurve) return null;
    switch (type(record)) {
      case 'IFCPOLYLINE':
      case 'IFCPOLYLOOP':
        return polyline(record);
      case 'IFCINDEXEDPOLYCURVE':
        return indexed(record);
      case 'IFCCOMPOSITECURVE':
      case 'IFC2DCOMPOSITECURVE':
        return composite(record, depth);
      case 'IFCTRIMMEDCURVE':
        return trimmedCurve(record, depth);
      case 'IFCCIRCLE':
      case 'IFCELLIPSE':
        return arc(record, 0, 2 * Math.PI);
      case 'IFCBSPLINECURVEWITHKNOTS':
      case 'IFCRATIONALBSPLINECURVEWITHKNOTS':
      case 'IFCBSPLINECURVE':
      case 'IFCBEZIERCURVE':
        return splinePoints(reader, placements, record);
      case 'IFCGEOMETRICCURVESET':
      case 'IFCGEOMETRICSET': {
        const ids = reader.cursor().at(args[record]!).ids();
        return ids.length === 1 ? curve(follow(ids[0]!, record), depth + 1) : null;
      }
      default:
        return null;
    }
  };
  const trimmed = (record: number, from: number | null, to: number | null): Vec3[] | null => {
    if (type(record) === 'IFCLINE')
      return from === null || to === null ? null : [onLine(record, from), onLine(record, to)];
    const whole = curve(record, 0);
    // On a polyline one is the length of one leg. Many writers put 0 and 1 for "all of it", so that is what it means.
    if (whole === null || type(record) !== 'IFCPOLYLINE' || from === null || to === null || (from === 0 && to === 1))
      return whole;
    const legs = whole.length - 1;
    return from < 0 || to > legs || from >= to ? whole : legsBetween(whole, from, to);
  };
  return {
    points: (record) => curve(record, 0),
    trimmed,
    arcBetween: (record, from, to, sense) => arcFrom(record, angleOn(record, from), angleOn(record, to), sense),
  };
}

interface Trim {
  readonly id: number;
  readonly parameter: number | null;
}

const trim = ({ ids, numbers }: { readonly ids: readonly number[]; readonly numbers: readonly number[] }): Trim => ({
  id: ids[0] ?? 0,
  parameter: numbers[0] ?? null,
});

/** Adds the points of the next piece of a path, its first one only where the path does not stand there already. */
function append(path: Vec3[], piece: readonly Vec3[]): void {
  const last = path.at(-1);
  const [first] = piece;
  const joined = last !== undefined && first !== undefined && distance(last, first) < 1e-6;
  for (let k = joined ? 1 : 0; k < piece.length; k++) path.push(piece[k]!);
}

function legsBetween(points: readonly Vec3[], from: number, to: number): Vec3[] {
  const at = (parameter: number): Vec3 => {
    const leg = Math.min(Math.floor(parameter), points.length - 2);
    const part = parameter - leg;
    return add(scale(points[leg]!, 1 - part), scale(points[leg + 1]!, part));
  };
  const inner = points.filter((_, k) => k > from && k < to);
  return [at(from), ...inner, at(to)];
}

/** Coordinates of a world point within a turned frame. */
export function seenFrom(f: Frame, [x, y, z]: Vec3): Vec3 {
  const [dx, dy, dz] = [x - f[9], y - f[10], z - f[11]];
  return [f[0] * dx + f[1] * dy + f[2] * dz, f[3] * dx + f[4] * dy + f[5] * dz, f[6] * dx + f[7] * dy + f[8] * dz];
}

/** Points on the arc that begins at `a`, passes `b` and ends at `c`; the three themselves when they stand in a line. */
export function arcThrough(a: Vec3, b: Vec3, c: Vec3): Vec3[] {
  const ab: Vec3 = [b[0] - a[0], b[1] - a[1], b[2] - a[2]];
  const ac: Vec3 = [c[0] - a[0], c[1] - a[1], c[2] - a[2]];
  const n: Vec3 = [ab[1] * ac[2] - ab[2] * ac[1], ab[2] * ac[0] - ab[0] * ac[2], ab[0] * ac[1] - ab[1] * ac[0]];
  const nn = n[0] ** 2 + n[1] ** 2 + n[2] ** 2;
  const abab = ab[0] ** 2 + ab[1] ** 2 + ab[2] ** 2;
  const acac = ac[0] ** 2 + ac[1] ** 2 + ac[2] ** 2;
  if (nn <= 1e-12 * abab * acac) return [a, b, c];
  // Centre of the circle through three points: a + (|ac|² (n × … ) …) / 2 |n|².
  const cross = (u: Vec3, v: Vec3): Vec3 => [
    u[1] * v[2] - u[2] * v[1],
    u[2] * v[0] - u[0] * v[2],
    u[0] * v[1] - u[1] * v[0],
  ];
  const toCentre = scale(add(scale(cross(n, ab), acac), scale(cross(ac, n), abab)), 1 / (2 * nn));
  const centre = add(a, toCentre);
  const radius = Math.hypot(...toCentre);
  const x = scale(toCentre, -1 / radius);
  const z = scale(n, 1 / Math.sqrt(nn));
  const y = cross(z, x);
  const rel: Vec3 = [c[0] - centre[0], c[1] - centre[1], c[2] - centre[2]];
  let sweep = Math.atan2(rel[0] * y[0] + rel[1] * y[1] + rel[2] * y[2], rel[0] * x[0] + rel[1] * x[1] + rel[2] * x[2]);
  if (sweep <= 1e-9) sweep += 2 * Math.PI;
  const steps = Math.max(2, Math.ceil(sweep / arcStep - 1e-9));
  return Array.from({ length: steps + 1 }, (_, k) => {
    if (k === steps) return c;
    const t = (sweep * k) / steps;
    return add(centre, add(scale(x, radius * Math.cos(t)), scale(y, radius * Math.sin(t))));
  });
}
