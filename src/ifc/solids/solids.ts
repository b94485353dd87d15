import { add, type Vec3 } from '../../geometry/vector.ts';
import type { Cursor } from '../lines/cursor.ts';
import type { Reader } from '../reader.ts';
import { besideArc } from './arc.ts';
import { Curves } from './curves.ts';
import { compose, type Frame, identity } from './frame.ts';
import { Meshes } from './meshes.ts';
import { operatorFrame } from './operator.ts';
import { boxPrism, type Piece, pieceOf, prismOf, tubeOf } from './piece.ts';
import type { Placements } from './placements.ts';
import { outlineOf, Profiles } from './profiles.ts';
import { revolved } from './revolved.ts';

/** Shapes within shapes that are followed: mapped items in mapped items, booleans of booleans. */
const deepestShape = 200;
/** Parts of one shape that are kept: shapes that use shapes that use shapes can grow without end. */
const mostPieces = 50_000;
const none: readonly Piece[] = [];

/** Bodies of one file. */
export class Solids {
  readonly curves: Curves;
  private readonly reader: Reader;
  private readonly placements: Placements;
  private readonly radians: number;
  private readonly profiles: Profiles;
  private readonly meshes: Meshes;
  private readonly cursor: Cursor;
  private readonly maps = new Map<number, readonly Piece[]>();
  private readonly underway = new Set<number>();

  /** `radians`: one plane angle unit of the file. */
  constructor(reader: Reader, placements: Placements, radians: number) {
    this.reader = reader;
    this.placements = placements;
    this.radians = radians;
    this.curves = new Curves(reader, placements, radians);
    this.profiles = new Profiles(reader, placements, this.curves);
    this.meshes = new Meshes(reader, placements, this.curves);
    this.cursor = reader.cursor();
  }

  /** Parts of one representation item, in the coordinates of its representation. */
  pieces(item: number): readonly Piece[] {
    return this.within(item, 0);
  }

  private within(item: number, depth: number): readonly Piece[] {
    if (item < 0 || depth > deepestShape) return none;
    const { reader, cursor } = this;
    switch (reader.type(item)) {
      case 'IFCMAPPEDITEM':
        return this.mapped(item, depth);
      case 'IFCEXTRUDEDAREASOLID':
      case 'IFCEXTRUDEDAREASOLIDTAPERED':
        return this.extruded(item);
      case 'IFCSWEPTDISKSOLID':
      case 'IFCSWEPTDISKSOLIDPOLYGONAL':
        return this.disk(item);
      case 'IFCSURFACECURVESWEPTAREASOLID':
      case 'IFCFIXEDREFERENCESWEPTAREASOLID':
      case 'IFCDIRECTRIXCURVESWEPTAREASOLID':
        return this.led(item);
      case 'IFCREVOLVEDAREASOLID':
      case 'IFCREVOLVEDAREASOLIDTAPERED':
        return this.turned(item);
      // Clippings and openings cut the first operand: where it lies is what counts.
      case 'IFCBOOLEANRESULT':
      case 'IFCBOOLEANCLIPPINGRESULT':
        return this.within(reader.follow(cursor.at(reader.args[item]!).skip(1).id(), item), depth + 1);
      case 'IFCCSGSOLID':
        return this.within(reader.follow(cursor.at(reader.args[item]!).id(), item), depth + 1);
      case 'IFCBLOCK':
      case 'IFCRECTANGULARPYRAMID':
      case 'IFCRIGHTCIRCULARCYLINDER':
      case 'IFCRIGHTCIRCULARCONE':
      case 'IFCSPHERE':
        return this.primitive(item);
      case 'IFCBOUNDINGBOX':
        return this.boundingBox(item);
      default: {
        const mesh = this.meshes.read(item);
        return mesh === null ? none : [pieceOf(mesh, identity)];
      }
    }
  }

  private axesAt(id: number, from: number): Frame {
    const record = this.reader.follow(id, from);
    return record < 0 ? identity : this.placements.axes(record);
  }

  private length(): number {
    return this.cursor.more ? (this.cursor.number() ?? 0) * this.placements.metres : 0;
  }

  private extruded(record: number): readonly Piece[] {
    const { cursor, reader, placements } = this;
    cursor.at(reader.args[record]!);
    const area = cursor.id();
    const position = cursor.id();
    const way = cursor.id();
    const depth = this.length();
    const profile = this.profiles.read(reader.follow(area, record));
    if (profile === null || !(depth > 0)) return none;
    const d = placements.direction(reader.follow(way, record));
    const shift: Vec3 = d === null ? [0, 0, depth] : [d[0] * depth, d[1] * depth, d[2] * depth];
    const frame = this.axesAt(position, record);
    const { round } = profile;
    if (round === null) return [pieceOf(prismOf(profile.corners.flat(), shift), frame)];
    const points = [round.centre, add(round.centre, shift)];
    return [pieceOf(tubeOf(points, round.outer, round.inner, 'extrusion'), frame)];
  }

  private disk(record: number): readonly Piece[] {
    const { cursor, reader } = this;
    cursor.at(reader.args[record]!);
    const directrix = cursor.id();
    const outer = this.length();
    const inner = this.length();
    const from = cursor.number();
    const to = cursor.number();
    const points = this.curves.trimmed(reader.follow(directrix, record), from, to);
    if (points === null || points.length < 2 || !(outer > 0)) return none;
    return [pieceOf(tubeOf(points, outer, inner > 0 && inner < outer ? inner : null, 'swept-disk'), identity)];
  }

  /** A profile led along a curve. Round ones are disks; of the others the box around both is all that is kept. */
  private led(record: number): readonly Piece[] {
    const { cursor, reader } = this;
    cursor.at(reader.args[record]!);
    const area = cursor.id();
    const position = cursor.id();
    const directrix = cursor.id();
    const from = cursor.number();
    const to = cursor.number();
    const profile = this.profiles.read(reader.follow(area, record));
    const points = this.curves.trimmed(reader.follow(directrix, record), from, to);
    if (profile === null || points === null || points.length < 2) return none;
    const frame = this.axesAt(position, record);
    const { round } = profile;
    if (round !== null) {
      const path = besideArc(points, Math.hypot(round.centre[0], round.centre[1]));
      return [pieceOf(tubeOf(path, round.outer, round.inner, 'swept-disk'), frame)];
    }
    const reach = Math.max(...outlineOf(profile).map(([x, y]) => Math.hypot(x, y)));
    const around = points.flatMap(([x, y, z]) => [x - reach, y - reach, z - reach, x + reach, y + reach, z + reach]);
    return [pieceOf(prismOf(around, [0, 0, 0]), frame)];
  }

  private turned(record: number): readonly Piece[] {
    const { cursor, reader, placements } = this;
    cursor.at(reader.args[record]!);
    const area = cursor.id();
    const position = cursor.id();
    const axis = reader.follow(cursor.id(), record);
    const angle = (cursor.number() ?? 0) * this.radians;
    const profile = this.profiles.read(reader.follow(area, record));
    if (profile === null || axis < 0 || angle === 0) return none;
    cursor.at(reader.args[axis]!);
    const centre = placements.point(reader.follow(cursor.id(), axis));
    const along = placements.direction(reader.follow(cursor.id(), axis)) ?? [0, 0, 1];
    return [pieceOf(revolved(profile, centre, along, angle), this.axesAt(position, record))];
  }

  /** CSG primitives: block, cylinder, cone, sphere, pyramid. */
  private primitive(record: number): readonly Piece[] {
    const { cursor, reader } = this;
    cursor.at(reader.args[record]!);
    const position = cursor.id();
    const a = this.length();
    const b = this.length();
    const c = this.length();
    const frame = this.axesAt(position, record);
    switch (reader.type(record)) {
      case 'IFCRIGHTCIRCULARCYLINDER':
        return a > 0 && b > 0
          ? [
              pieceOf(
                tubeOf(
                  [
                    [0, 0, 0],
                    [0, 0, a],
                  ],
                  b,
                  null,
                  'extrusion',
                ),
                frame,
              ),
            ]
          : none;
      case 'IFCRIGHTCIRCULARCONE':
        return [pieceOf(boxPrism([-b, -b, 0], [b, b, a]), frame)];
      case 'IFCSPHERE':
        return [pieceOf(boxPrism([-a, -a, -a], [a, a, a]), frame)];
      default:
        return [pieceOf(boxPrism([0, 0, 0], [a, b, c]), frame)];
    }
  }

  private boundingBox(record: number): readonly Piece[] {
    const { cursor, reader } = this;
    const corner = cursor.at(reader.args[record]!).id();
    const size: Vec3 = [this.length(), this.length(), this.length()];
    const min = this.placements.point(reader.follow(corner, record));
    return [pieceOf(boxPrism(min, add(min, size)), identity)];
  }

  private mapped(record: number, depth: number): readonly Piece[] {
    const { cursor, reader } = this;
    cursor.at(reader.args[record]!);
    const source = reader.follow(cursor.id(), record);
    const target = reader.follow(cursor.id(), record);
    const within = source < 0 ? none : this.mapPieces(source, depth);
    if (within.length === 0) return none;
    const frame = target < 0 ? identity : operatorFrame(reader, this.placements, target);
    if (frame === identity) return within;
    const found: Piece[] = [];
    for (let k = 0; k < within.length; k++) found.push(pieceOf(within[k]!.shape, compose(frame, within[k]!.frame)));
    return found;
  }

  private mapPieces(source: number, depth: number): readonly Piece[] {
    const known = this.maps.get(source);
    if (known !== undefined) return known;
    const { cursor, reader } = this;
    if (this.underway.has(source)) {
      if (!reader.troubles.endlessShapes.includes(source)) reader.troubles.endlessShapes.push(source);
      return none;
    }
    this.underway.add(source);
    cursor.at(reader.args[source]!);
    const origin = cursor.id();
    const representation = reader.follow(cursor.id(), source);
    const items = representation < 0 ? [] : reader.open(representation).skip(3).ids();
    const frame = this.axesAt(origin, source);
    const found: Piece[] = [];
    for (const id of items) {
      for (const piece of this.within(reader.follow(id, representation), depth + 1)) {
        if (found.length < mostPieces) found.push(pieceOf(piece.shape, compose(frame, piece.frame)));
      }
    }
    this.maps.set(source, found);
    this.underway.delete(source);
    return found;
  }
}
