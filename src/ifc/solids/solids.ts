import { add, scale, type Vec3 } from '../../geometry/vector.ts';
import type { Reader } from '../reader.ts';
import { type Curves, curvesOf } from './curves.ts';
import { compose, type Frame, identity } from './frame.ts';
import { meshesOf } from './mesh.ts';
import { operatorFrame } from './operator.ts';
import type { Piece } from './piece.ts';
import type { Placements } from './placements.ts';
import { type Profile, profilesOf } from './profiles.ts';
import { revolved } from './revolved.ts';

/** Shapes within shapes that are followed: mapped items in mapped items, booleans of booleans. */
const deepestShape = 30;

export interface Solids {
  /** Parts of one representation item, in the coordinates of its representation. */
  readonly pieces: (item: number) => readonly Piece[];
  readonly curves: Curves;
}

const none: readonly Piece[] = [];

/** `radians`: one plane angle unit of the file. */
export function solidsOf(reader: Reader, placements: Placements, radians: number): Solids {
  const { index, follow, type } = reader;
  const { args } = index;
  const { metres } = placements;
  const curves = curvesOf(reader, placements, radians);
  const profiles = profilesOf(reader, placements, curves);
  const meshes = meshesOf(reader, placements, curves);
  const maps = new Map<number, readonly Piece[]>();
  const cursor = reader.cursor();

  const placedAt = (id: number, from: number): Frame => {
    const record = follow(id, from);
    return record < 0 ? identity : placements.axes(record);
  };
  const extruded = (record: number): readonly Piece[] => {
    cursor.at(args[record]!);
    const area = cursor.id();
    const position = cursor.id();
    const way = cursor.id();
    const depth = (cursor.number() ?? 0) * metres;
    const profile = profiles.read(follow(area, record));
    if (profile === null || !(depth > 0)) return none;
    const frame = placedAt(position, record);
    const direction = placements.direction(follow(way, record)) ?? [0, 0, 1];
    return [{ shape: sweptStraight(profile, scale(direction, depth)), frame }];
  };
  const disk = (record: number): readonly Piece[] => {
    cursor.at(args[record]!);
    const directrix = cursor.id();
    const outer = (cursor.number() ?? 0) * metres;
    const inner = (cursor.number() ?? 0) * metres;
    const from = cursor.number();
    const to = cursor.number();
    const points = curves.trimmed(follow(directrix, record), from, to);
    if (points === null || points.length < 2 || !(outer > 0)) return none;
    const innerRadius = inner > 0 && inner < outer ? inner : null;
    return [
      { shape: { kind: 'tube', points, outerRadius: outer, innerRadius, ground: 'swept-disk' }, frame: identity },
    ];
  };
  /** A profile led along a curve. Round ones are disks; of the others the box around both is all that is kept. */
  const led = (record: number): readonly Piece[] => {
    cursor.at(args[record]!);
    const area = cursor.id();
    const position = cursor.id();
    const directrix = cursor.id();
    const from = cursor.number();
    const to = cursor.number();
    const profile = profiles.read(follow(area, record));
    const points = curves.trimmed(follow(directrix, record), from, to);
    if (profile === null || points === null || points.length < 2) return none;
    const frame = placedAt(position, record);
    const { round } = profile;
    if (round !== null) {
      const { outer: outerRadius, inner: innerRadius } = round;
      return [{ shape: { kind: 'tube', points, outerRadius, innerRadius, ground: 'swept-disk' }, frame }];
    }
    const reach = Math.max(...profile.outline().map(([x, y]) => Math.hypot(x, y)));
    const base = points.flatMap(([x, y, z]) => [x - reach, y - reach, z - reach, x + reach, y + reach, z + reach]);
    return [{ shape: { kind: 'prism', base, shift: [0, 0, 0] }, frame }];
  };
  const turnedSolid = (record: number): readonly Piece[] => {
    cursor.at(args[record]!);
    const area = cursor.id();
    const position = cursor.id();
    const axis = cursor.id();
    const angle = (cursor.number() ?? 0) * radians;
    const profile = profiles.read(follow(area, record));
    const axisRecord = follow(axis, record);
    if (profile === null || axisRecord < 0 || angle === 0) return none;
    cursor.at(args[axisRecord]!);
    const at = cursor.id();
    const along = cursor.id();
    const centre = placements.point(follow(at, axisRecord));
    const direction = placements.direction(follow(along, axisRecord)) ?? [0, 0, 1];
    return [{ shape: revolved(profile, centre, direction, angle), frame: placedAt(position, record) }];
  };
  /** CSG primitives: block, cylinder, cone, sphere, pyramid. */
  const primitive = (record: number): readonly Piece[] => {
    const kind = type(record);
    cursor.at(args[record]!);
    const position = cursor.id();
    const [a, b, c] = [0, 1, 2].map(() => (cursor.more ? (cursor.number() ?? 0) * metres : 0)) as [
      number,
      number,
      number,
    ];
    const frame = placedAt(position, record);
    if (kind === 'IFCRIGHTCIRCULARCYLINDER' && a > 0 && b > 0) {
      const points: Vec3[] = [
        [0, 0, 0],
        [0, 0, a],
      ];
      return [{ shape: { kind: 'tube', points, outerRadius: b, innerRadius: null, ground: 'extrusion' }, frame }];
    }
    if (kind === 'IFCSPHERE') return [{ shape: box([-a, -a, -a], [a, a, a]), frame }];
    if (kind === 'IFCRIGHTCIRCULARCONE') return [{ shape: box([-b, -b, 0], [b, b, a]), frame }];
    if (kind === 'IFCRIGHTCIRCULARCYLINDER') return none;
    return [{ shape: box([0, 0, 0], [a, b, c]), frame }];
  };
  const boundingBox = (record: number): readonly Piece[] => {
    cursor.at(args[record]!);
    const corner = cursor.id();
    const [x, y, z] = [0, 1, 2].map(() => (cursor.number() ?? 0) * metres) as [number, number, number];
    const [x0, y0, z0] = placements.point(follow(corner, record));
    return [{ shape: box([x0, y0, z0], [x0 + x, y0 + y, z0 + z]), frame: identity }];
  };
  const mapped = (record: number, depth: number): readonly Piece[] => {
    cursor.at(args[record]!);
    const source = follow(cursor.id(), record);
    const target = follow(cursor.id(), record);
    if (source < 0) return none;
    const within = mapPieces(source, depth);
    if (within.length === 0) return none;
    const frame = target < 0 ? identity : operatorFrame(reader, placements, target);
    return within.map((piece) => ({ shape: piece.shape, frame: compose(frame, piece.frame) }));
  };
  const mapPieces = (source: number, depth: number): readonly Piece[] => {
    const known = maps.get(source);
    if (known !== undefined) return known;
    if (depth > deepestShape) {
      reader.troubles.endlessShapes.push(source);
      return none;
    }
    cursor.at(args[source]!);
    const origin = cursor.id();
    const representation = follow(cursor.id(), source);
    if (representation < 0) return none;
    const items = reader.cursor().at(args[representation]!).skip(3).ids();
    const frame = placedAt(origin, source);
    const found: Piece[] = [];
    for (const id of items) {
      for (const piece of pieces(follow(id, representation), depth + 1)) {
        found.push({ shape: piece.shape, frame: compose(frame, piece.frame) });
      }
    }
    maps.set(source, found);
    return found;
  };
  const pieces = (item: number, depth: number): readonly Piece[] => {
    if (item < 0 || depth > deepestShape) return none;
    switch (type(item)) {
      case 'IFCMAPPEDITEM':
        return mapped(item, depth);
      case 'IFCEXTRUDEDAREASOLID':
      case 'IFCEXTRUDEDAREASOLIDTAPERED':
        return extruded(item);
      case 'IFCSWEPTDISKSOLID':
      case 'IFCSWEPTDISKSOLIDPOLYGONAL':
        return disk(item);
      case 'IFCSURFACECURVESWEPTAREASOLID':
      case 'IFCFIXEDREFERENCESWEPTAREASOLID':
      case 'IFCDIRECTRIXCURVESWEPTAREASOLID':
        return led(item);
      case 'IFCREVOLVEDAREASOLID':
      case 'IFCREVOLVEDAREASOLIDTAPERED':
        return turnedSolid(item);
      // Clippings and openings cut the first operand: where it lies is what counts.
      case 'IFCBOOLEANRESULT':
      case 'IFCBOOLEANCLIPPINGRESULT':
        return pieces(follow(cursor.at(args[item]!).skip(1).id(), item), depth + 1);
      case 'IFCCSGSOLID':
        return pieces(follow(cursor.at(args[item]!).id(), item), depth + 1);
      case 'IFCBLOCK':
      case 'IFCRECTANGULARPYRAMID':
      case 'IFCRIGHTCIRCULARCYLINDER':
      case 'IFCRIGHTCIRCULARCONE':
      case 'IFCSPHERE':
        return primitive(item);
      case 'IFCBOUNDINGBOX':
        return boundingBox(item);
      default: {
        const mesh = meshes.read(item);
        return mesh === null ? none : [{ shape: mesh, frame: identity }];
      }
    }
  };
  return { pieces: (item) => pieces(item, 0), curves };
}

function sweptStraight(profile: Profile, shift: Vec3): Piece['shape'] {
  const { round } = profile;
  if (round === null) return { kind: 'prism', base: profile.outline().flat(), shift };
  const { centre, outer: outerRadius, inner: innerRadius } = round;
  return { kind: 'tube', points: [centre, add(centre, shift)], outerRadius, innerRadius, ground: 'extrusion' };
}

const box = ([x0, y0, z0]: Vec3, [x1, y1, z1]: Vec3): Piece['shape'] => ({
  kind: 'prism',
  base: [x0, y0, z0, x1, y0, z0, x1, y1, z0, x0, y1, z0],
  shift: [0, 0, z1 - z0],
});
