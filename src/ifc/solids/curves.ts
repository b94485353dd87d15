import { add, distance, scale, type Vec3 } from '../../geometry/vector.ts';
import type { Reader } from '../reader.ts';
import { arcSteps, arcThrough } from './arc.ts';
import { type Frame, moved, seenFrom } from './frame.ts';
import type { Placements } from './placements.ts';
import { splinePoints } from './spline.ts';

const deepestCurve = 20;
/** Longest path that is read: curves made of curves can grow without end. */
const mostPoints = 200_000;

/** Curves of one file as points in metres, in the coordinates of the item that uses them; 2D curves have z = 0. */
export class Curves {
  private readonly reader: Reader;
  private readonly placements: Placements;
  private readonly radians: number;

  /** `radians`: one plane angle unit of the file. */
  constructor(reader: Reader, placements: Placements, radians: number) {
    this.reader = reader;
    this.placements = placements;
    this.radians = radians;
  }

  /** Points along a curve; null for a curve without ends (a bare line) and for kinds that are not understood. */
  points(record: number): Vec3[] | null {
    return this.curve(record, 0);
  }

  /** Points along a curve between two of its own parameters, where a sweep states them. */
  trimmed(record: number, from: number | null, to: number | null): Vec3[] | null {
    const kind = this.reader.type(record);
    if (kind === 'IFCLINE') {
      return from === null || to === null ? null : [this.onLine(record, from), this.onLine(record, to)];
    }
    const arc = from === null || to === null ? null : this.partOfCircle(record, from, to);
    const whole = arc ?? this.curve(record, 0);
    if (whole === null || kind !== 'IFCPOLYLINE' || from === null || to === null) return whole;
    // On a polyline one is the length of one leg. Many writers put 0 and 1 for "all of it", so that is what it means.
    const legs = whole.length - 1;
    return (from === 0 && to === 1) || from < 0 || to > legs || from >= to ? whole : legsBetween(whole, from, to);
  }

  /** The part of a trimmed circle that a sweep asks for by the circle's own parameter; null for all round and other curves. */
  private partOfCircle(record: number, from: number, to: number): Vec3[] | null {
    const { reader, radians } = this;
    if (reader.type(record) !== 'IFCTRIMMEDCURVE') return null;
    const basis = reader.follow(reader.open(record).id(), record);
    const angle = (to - from) * radians;
    if (reader.type(basis) !== 'IFCCIRCLE' || angle <= 1e-6 || angle >= 2 * Math.PI - 1e-6) return null;
    // A sweep from 0 to 1 says "all of it", whatever the unit of angles.
    return from === 0 && to === 1 ? null : this.arc(basis, from * radians, to * radians);
  }

  /** Points of a circle or ellipse from one point on it to another, counter-clockwise where `sense` holds. */
  arcBetween(record: number, from: Vec3, to: Vec3, sense: boolean): Vec3[] {
    return this.arcFrom(record, this.angleOn(record, from), this.angleOn(record, to), sense);
  }

  private curve(record: number, depth: number): Vec3[] | null {
    if (record < 0 || depth > deepestCurve) return null;
    const { reader } = this;
    switch (reader.type(record)) {
      case 'IFCPOLYLINE':
      case 'IFCPOLYLOOP':
        return this.polyline(record);
      case 'IFCINDEXEDPOLYCURVE':
        return this.indexed(record);
      case 'IFCCOMPOSITECURVE':
      case 'IFC2DCOMPOSITECURVE':
        return this.composite(record, depth);
      case 'IFCTRIMMEDCURVE':
        return this.trimmedCurve(record, depth);
      case 'IFCCIRCLE':
      case 'IFCELLIPSE':
        return this.arc(record, 0, 2 * Math.PI);
      case 'IFCBSPLINECURVEWITHKNOTS':
      case 'IFCRATIONALBSPLINECURVEWITHKNOTS':
      case 'IFCBSPLINECURVE':
      case 'IFCBEZIERCURVE':
        return splinePoints(reader, this.placements, record);
      case 'IFCGEOMETRICCURVESET':
      case 'IFCGEOMETRICSET': {
        const ids = reader.open(record).ids();
        return ids.length === 1 ? this.curve(reader.follow(ids[0]!, record), depth + 1) : null;
      }
      default:
        return null;
    }
  }

  private polyline(record: number): Vec3[] {
    const { reader, placements } = this;
    return reader
      .open(record)
      .ids()
      .map((id) => placements.point(reader.follow(id, record)));
  }

  private listed(record: number): Vec3[] {
    if (record < 0) return [];
    const { metres } = this.placements;
    const isPlane = this.reader.type(record) === 'IFCCARTESIANPOINTLIST2D';
    const flat = this.reader.open(record).numbers([]);
    const width = isPlane ? 2 : 3;
    const points: Vec3[] = [];
    for (let i = 0; i + width <= flat.length; i += width) {
      points.push([flat[i]! * metres, flat[i + 1]! * metres, isPlane ? 0 : flat[i + 2]! * metres]);
    }
    return points;
  }

  private indexed(record: number): Vec3[] | null {
    const cursor = this.reader.open(record);
    const listId = cursor.id();
    const segments = cursor.typedLists();
    const points = this.listed(this.reader.follow(listId, record));
    if (segments.length === 0) return points.length > 1 ? points : null;
    const path: Vec3[] = [];
    for (const { type, numbers } of segments) {
      const corners = numbers.map((one) => points[one - 1]).filter((one) => one !== undefined);
      if (corners.length !== numbers.length) return null;
      const isArc = type === 'IFCARCINDEX' && corners.length === 3;
      append(path, isArc ? arcThrough(corners[0]!, corners[1]!, corners[2]!) : corners);
    }
    return path;
  }

  private composite(record: number, depth: number): Vec3[] | null {
    const { reader } = this;
    const path: Vec3[] = [];
    for (const id of reader.open(record).ids()) {
      const segment = reader.follow(id, record);
      const kind = reader.type(segment);
      if (kind !== 'IFCCOMPOSITECURVESEGMENT' && kind !== 'IFCREPARAMETRISEDCOMPOSITECURVESEGMENT') return null;
      const cursor = reader.open(segment).skip(1);
      const sameSense = cursor.flag() !== false;
      const piece = this.curve(reader.follow(cursor.id(), segment), depth + 1);
      if (piece === null || path.length > mostPoints) return null;
      append(path, sameSense ? piece : piece.reverse());
    }
    return path.length > 1 ? path : null;
  }

  private trimmedCurve(record: number, depth: number): Vec3[] | null {
    const { reader } = this;
    const cursor = reader.open(record);
    const basis = reader.follow(cursor.id(), record);
    const first = this.trim(cursor.mixed(), record);
    const second = this.trim(cursor.mixed(), record);
    const sense = cursor.flag() !== false;
    const kind = reader.type(basis);
    if (kind === 'IFCLINE') {
      const from = first.point ?? (first.parameter === null ? null : this.onLine(basis, first.parameter));
      const to = second.point ?? (second.parameter === null ? null : this.onLine(basis, second.parameter));
      return from === null || to === null ? null : [from, to];
    }
    if (kind === 'IFCCIRCLE' || kind === 'IFCELLIPSE') {
      const from = this.angleOf(first, basis);
      const to = this.angleOf(second, basis);
      return from === null || to === null ? null : this.arcFrom(basis, from, to, sense);
    }
    // Trims of other curves are rare, and cut little off them.
    return this.curve(basis, depth + 1);
  }

  private trim(
    { ids, numbers }: { readonly ids: readonly number[]; readonly numbers: readonly number[] },
    from: number,
  ): Trim {
    const [id = 0] = ids;
    return {
      point: id === 0 ? null : this.placements.point(this.reader.follow(id, from)),
      parameter: numbers[0] ?? null,
    };
  }

  private angleOf({ point, parameter }: Trim, circle: number): number | null {
    if (point !== null) return this.angleOn(circle, point);
    return parameter === null ? null : parameter * this.radians;
  }

  private circle(record: number): { readonly frame: Frame; readonly a: number; readonly b: number } {
    const { metres } = this.placements;
    const cursor = this.reader.open(record);
    const position = cursor.id();
    const a = (cursor.number() ?? 0) * metres;
    const b = this.reader.type(record) === 'IFCELLIPSE' ? (cursor.number() ?? 0) * metres : a;
    return { frame: this.placements.axes(this.reader.follow(position, record)), a, b };
  }

  private arc(record: number, from: number, to: number): Vec3[] {
    const { frame, a, b } = this.circle(record);
    const steps = arcSteps(to - from);
    return Array.from({ length: steps + 1 }, (_, k) => {
      const t = from + ((to - from) * k) / steps;
      return moved(frame, [a * Math.cos(t), b * Math.sin(t), 0]);
    });
  }

  private angleOn(record: number, place: Vec3): number {
    const { frame, a, b } = this.circle(record);
    const seen = seenFrom(frame, place);
    return Math.atan2(seen[1] / (b || 1), seen[0] / (a || 1));
  }

  /** Counter-clockwise from one angle up to the other where `sense` holds, else down to it; alike means all round. */
  private arcFrom(record: number, from: number, to: number, sense: boolean): Vec3[] {
    const turn = 2 * Math.PI;
    const sweep = sense ? to - from : from - to;
    const rest = ((sweep % turn) + turn) % turn;
    const angle = rest < 1e-9 ? turn : rest;
    return this.arc(record, from, sense ? from + angle : from - angle);
  }

  private onLine(record: number, parameter: number): Vec3 {
    const { reader, placements } = this;
    const cursor = reader.open(record);
    const start = cursor.id();
    const vector = reader.follow(cursor.id(), record);
    const from = placements.point(reader.follow(start, record));
    if (vector < 0) return from;
    cursor.at(reader.args[vector]!);
    const along = cursor.id();
    const magnitude = (cursor.number() ?? 1) * placements.metres;
    const direction = placements.direction(reader.follow(along, vector)) ?? [0, 0, 1];
    return add(from, scale(direction, magnitude * parameter));
  }
}

interface Trim {
  readonly point: Vec3 | null;
  readonly parameter: number | null;
}

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
