import { distance, type Vec3 } from '../../geometry/vector.ts';
import type { Cursor } from '../lines/cursor.ts';
import type { Reader } from '../reader.ts';
import type { Curves } from './curves.ts';
import { type Frame, identity, moved, scaleOf } from './frame.ts';
import { operatorFrame } from './operator.ts';
import type { Placements } from './placements.ts';
import { roundness } from './round-profile.ts';

/** A cross-section in its own plane (z = 0), metres. */
export interface Profile {
  /** Set where the outline is round: a circle, or a curve or polygon that cannot be told from one. */
  readonly round: Round | null;
  /** Points of the outline; empty for round ones, see `outlineOf`. */
  readonly corners: readonly Vec3[];
}

export interface Round {
  readonly centre: Vec3;
  readonly outer: number;
  readonly inner: number | null;
}

/** Corners of the polygon that stands for a circle where points are wanted. */
const circleCorners = 24;

export function outlineOf({ round, corners }: Profile): readonly Vec3[] {
  if (round === null) return corners;
  const { centre, outer } = round;
  return Array.from({ length: circleCorners }, (_, k) => {
    const t = (2 * Math.PI * k) / circleCorners;
    return [centre[0] + outer * Math.cos(t), centre[1] + outer * Math.sin(t), centre[2]];
  });
}

const noCorners: readonly Vec3[] = [];
const outlined = (corners: readonly Vec3[]): Profile => ({ round: null, corners });
const roundProfile = (centre: Vec3, outer: number, inner: number | null): Profile => ({
  round: { centre, outer, inner },
  corners: noCorners,
});

const deepestProfile = 10;
/** Corners of one outline that are kept: profiles made of profiles can grow without end. */
const mostCorners = 20_000;

export class Profiles {
  private readonly reader: Reader;
  private readonly placements: Placements;
  private readonly curves: Curves;
  private readonly cursor: Cursor;
  /** Profiles are shared by many solids in some files. */
  private readonly known = new Map<number, Profile | null>();

  constructor(reader: Reader, placements: Placements, curves: Curves) {
    this.reader = reader;
    this.placements = placements;
    this.curves = curves;
    this.cursor = reader.cursor();
  }

  /** null for a record that is no profile or has no size. */
  read(record: number): Profile | null {
    return this.within(record, 0);
  }

  private within(record: number, depth: number): Profile | null {
    if (record < 0 || depth > deepestProfile) return null;
    switch (this.reader.type(record)) {
      case 'IFCCIRCLEHOLLOWPROFILEDEF':
        return this.circle(record, true);
      case 'IFCCIRCLEPROFILEDEF':
        return this.circle(record, false);
      case 'IFCRECTANGLEPROFILEDEF':
      case 'IFCRECTANGLEHOLLOWPROFILEDEF':
      case 'IFCROUNDEDRECTANGLEPROFILEDEF':
        return this.rectangle(record);
    }
    const before = this.known.get(record);
    if (before !== undefined) return before;
    const profile = this.other(record, depth);
    this.known.set(record, profile);
    return profile;
  }

  private other(record: number, depth: number): Profile | null {
    switch (this.reader.type(record)) {
      case 'IFCELLIPSEPROFILEDEF':
        return this.ellipse(record);
      case 'IFCARBITRARYCLOSEDPROFILEDEF':
      case 'IFCARBITRARYPROFILEDEFWITHVOIDS':
        return this.arbitrary(record);
      case 'IFCDERIVEDPROFILEDEF':
      case 'IFCMIRROREDPROFILEDEF':
        return this.derived(record, depth);
      case 'IFCCOMPOSITEPROFILEDEF':
        return this.composite(record, depth);
      case 'IFCISHAPEPROFILEDEF':
      case 'IFCASYMMETRICISHAPEPROFILEDEF':
        return this.steel(record, true);
      case 'IFCUSHAPEPROFILEDEF':
      case 'IFCLSHAPEPROFILEDEF':
      case 'IFCTSHAPEPROFILEDEF':
      case 'IFCCSHAPEPROFILEDEF':
      case 'IFCZSHAPEPROFILEDEF':
        return this.steel(record, false);
      default:
        return null;
    }
  }

  /** Leaves the cursor in front of the dimensions of a profile that has a position. */
  private frameOf(record: number): Frame {
    const at = this.reader.follow(this.cursor.at(this.reader.args[record]!).skip(2).id(), record);
    return at < 0 ? identity : this.placements.axes(at);
  }

  private dimension(): number {
    return this.cursor.more ? (this.cursor.number() ?? 0) * this.placements.metres : 0;
  }

  private circle(record: number, isHollow: boolean): Profile | null {
    const frame = this.frameOf(record);
    const radius = this.dimension();
    const wall = isHollow ? this.dimension() : 0;
    if (!(radius > 0)) return null;
    return roundProfile([frame[9], frame[10], frame[11]], radius, wall > 0 && wall < radius ? radius - wall : null);
  }

  private rectangle(record: number): Profile | null {
    const frame = this.frameOf(record);
    const x = this.dimension() / 2;
    const y = this.dimension() / 2;
    return x > 0 && y > 0 ? outlined(rectangleAround(frame, x, y)) : null;
  }

  private ellipse(record: number): Profile | null {
    const frame = this.frameOf(record);
    const a = this.dimension();
    const b = this.dimension();
    if (!(a > 0 && b > 0)) return null;
    if (Math.abs(a - b) < 1e-6 * a) return roundProfile([frame[9], frame[10], frame[11]], a, null);
    const unit = outlineOf(roundProfile([0, 0, 0], 1, null));
    return outlined(unit.map((one) => moved(frame, [a * one[0], b * one[1], 0])));
  }

  private arbitrary(record: number): Profile | null {
    const { reader, curves } = this;
    const cursor = reader.open(record).skip(2);
    const outer = cursor.id();
    const voids = reader.type(record) === 'IFCARBITRARYPROFILEDEFWITHVOIDS' ? cursor.ids() : [];
    const points = curves.points(reader.follow(outer, record));
    if (points === null || points.length < 3) return null;
    const ring = roundness(points);
    if (ring === null) return outlined(points);
    const inner = voids.length === 1 ? curves.points(reader.follow(voids[0]!, record)) : null;
    const bore = inner === null ? null : roundness(inner);
    const isCentred = bore !== null && distance(bore.centre, ring.centre) < 0.1 * ring.radius;
    return roundProfile(ring.centre, ring.radius, isCentred ? bore.radius : null);
  }

  private derived(record: number, depth: number): Profile | null {
    const { reader } = this;
    const cursor = reader.open(record).skip(2);
    const parent = cursor.id();
    const operator = reader.follow(cursor.id(), record);
    const within = this.within(reader.follow(parent, record), depth + 1);
    if (within === null) return null;
    const frame = operator < 0 ? identity : operatorFrame(reader, this.placements, operator);
    const { round } = within;
    if (round === null) return outlined(within.corners.map((one) => moved(frame, one)));
    const k = scaleOf(frame);
    return roundProfile(moved(frame, round.centre), round.outer * k, round.inner === null ? null : round.inner * k);
  }

  private composite(record: number, depth: number): Profile | null {
    const parts = this.reader
      .open(record)
      .skip(2)
      .ids()
      .map((id) => this.within(this.reader.follow(id, record), depth + 1))
      .filter((part) => part !== null);
    const [only] = parts;
    return only === undefined
      ? null
      : parts.length === 1
        ? only
        : outlined(parts.flatMap(outlineOf).slice(0, mostCorners));
  }

  /** Steel shapes: only the box around them is of use here. */
  private steel(record: number, isWidthFirst: boolean): Profile | null {
    const frame = this.frameOf(record);
    const a = this.dimension() / 2;
    const b = this.dimension() / 2;
    if (!(a > 0 && b > 0)) return null;
    return outlined(isWidthFirst ? rectangleAround(frame, a, b) : rectangleAround(frame, b, a));
  }
}

const rectangleAround = (frame: Frame, x: number, y: number): Vec3[] => [
  moved(frame, [-x, -y, 0]),
  moved(frame, [x, -y, 0]),
  moved(frame, [x, y, 0]),
  moved(frame, [-x, y, 0]),
];
