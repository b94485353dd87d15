import type { Vec3 } from '../../geometry/vector.ts';
import type { Reader } from '../reader.ts';
import type { Curves } from './curves.ts';
import type { Placements } from './placements.ts';

/** A body given by its faces. Points and faces are read when somebody asks; the second time costs nothing. */
export interface Mesh {
  readonly kind: 'mesh';
  /** Flat x, y, z in metres, each corner once. */
  readonly points: () => readonly number[];
  /** Outer loops of the faces as numbers of points. */
  readonly faces: () => readonly (readonly number[])[];
  /** Cylinders that faces lie on, where the file says so. */
  readonly cylinders: () => readonly Cylinder[];
}

export interface Cylinder {
  readonly at: Vec3;
  readonly along: Vec3;
  readonly radius: number;
}

/** Bodies with more corners than this are read no further: no pipe or fixture needs them, and one file may hold many. */
const mostPoints = 200_000;
const noCylinders: readonly Cylinder[] = [];

export interface Meshes {
  /** null for a record that is no body of faces. */
  readonly read: (record: number) => Mesh | null;
}

interface Faces {
  readonly points: number[];
  readonly faces: number[][];
  readonly cylinders: Cylinder[];
}

export function meshesOf(reader: Reader, placements: Placements, curves: Curves): Meshes {
  const { index, follow, type } = reader;
  const { args } = index;
  const { metres } = placements;
  const lists = new Map<number, number[]>();

  const listedPoints = (record: number): number[] => {
    const known = lists.get(record);
    if (known !== undefined) return known;
    const flat = record < 0 ? [] : reader.cursor().at(args[record]!).numbers([]);
    for (let k = 0; k < flat.length; k++) flat[k]! *= metres;
    lists.set(record, flat);
    return flat;
  };
  const tessellated = (record: number): Mesh => {
    const list = follow(reader.cursor().at(args[record]!).id(), record);
    const isPolygonal = type(record) === 'IFCPOLYGONALFACESET';
    return {
      kind: 'mesh',
      points: () => listedPoints(list),
      faces: once(() => (isPolygonal ? polygonalFaces(record) : triangles(record))),
      cylinders: () => noCylinders,
    };
  };
  const triangles = (record: number): number[][] => {
    const flat = reader.cursor().at(args[record]!).skip(3).numbers([]);
    const faces: number[][] = [];
    for (let k = 0; k + 2 < flat.length; k += 3) faces.push([flat[k]! - 1, flat[k + 1]! - 1, flat[k + 2]! - 1]);
    return faces;
  };
  const polygonalFaces = (record: number): number[][] => {
    const faces = reader.cursor().at(args[record]!).skip(2).ids();
    return faces.map((id) => {
      const face = follow(id, record);
      return face < 0
        ? []
        : reader
            .cursor()
            .at(args[face]!)
            .numbers([])
            .map((one) => one - 1);
    });
  };

  /** Walks shells, faces, bounds and loops; a corner that many faces share is read once. */
  const walked = (shells: (into: number[]) => void): Faces => {
    const found: Faces = { points: [], faces: [], cylinders: [] };
    const known = new Map<number, number>();
    const cursor = reader.cursor();
    const numbers: number[] = [];
    const corner = (record: number): number => {
      const before = known.get(record);
      if (before !== undefined) return before;
      numbers.length = 0;
      if (record >= 0) cursor.at(args[record]!).numbers(numbers);
      const number = found.points.length / 3;
      found.points.push((numbers[0] ?? 0) * metres, (numbers[1] ?? 0) * metres, (numbers[2] ?? 0) * metres);
      known.set(record, number);
      return number;
    };
    const loose = (one: Vec3): number => {
      found.points.push(one[0], one[1], one[2]);
      return found.points.length / 3 - 1;
    };
    const list: number[] = [];
    shells(list);
    for (const shell of list) {
      for (const id of reader.cursor().at(args[shell]!).ids()) {
        if (found.points.length > mostPoints * 3) return found;
        const face = follow(id, shell);
        if (face < 0) continue;
        const faceCursor = reader.cursor().at(args[face]!);
        const bounds = faceCursor.ids();
        const surface = faceCursor.more ? follow(faceCursor.id(), face) : -1;
        if (type(surface) === 'IFCCYLINDRICALSURFACE') {
          const cylinder = reader.cursor().at(args[surface]!);
          const position = cylinder.id();
          const radius = (cylinder.number() ?? 0) * metres;
          const f = placements.axes(follow(position, surface));
          if (radius > 0) found.cylinders.push({ at: [f[9], f[10], f[11]], along: [f[6], f[7], f[8]], radius });
        }
        bounds.forEach((boundId, k) => {
          const bound = follow(boundId, face);
          if (bound < 0) return;
          const loop = follow(reader.cursor().at(args[bound]!).id(), bound);
          const isOuter = bounds.length === 1 || type(bound) === 'IFCFACEOUTERBOUND' || k === 0;
          const ring: number[] = [];
          if (type(loop) === 'IFCPOLYLOOP') {
            for (const point of reader.cursor().at(args[loop]!).ids()) ring.push(corner(follow(point, loop)));
          } else if (type(loop) === 'IFCEDGELOOP') {
            for (const edge of reader.cursor().at(args[loop]!).ids())
              edgePoints(follow(edge, loop), ring, corner, loose);
          } else if (type(loop) === 'IFCVERTEXLOOP') {
            const vertex = follow(reader.cursor().at(args[loop]!).id(), loop);
            if (vertex >= 0) ring.push(corner(follow(reader.cursor().at(args[vertex]!).id(), vertex)));
          }
          if (isOuter) found.faces.push(ring);
        });
      }
    }
    return found;
  };
  const edgePoints = (
    oriented: number,
    ring: number[],
    corner: (record: number) => number,
    loose: (one: Vec3) => number,
  ): void => {
    if (oriented < 0) return;
    const cursor = reader.cursor().at(args[oriented]!).skip(2);
    const edge = follow(cursor.id(), oriented);
    const isForward = cursor.flag() !== false;
    if (edge < 0) return;
    cursor.at(args[edge]!);
    const [start, end, geometry] = [cursor.id(), cursor.id(), cursor.id()];
    const sameSense = cursor.flag() !== false;
    const pointOf = (id: number): number => {
      const vertex = follow(id, edge);
      return vertex < 0 ? -1 : follow(reader.cursor().at(args[vertex]!).id(), vertex);
    };
    const first = pointOf(isForward ? start : end);
    if (first >= 0) ring.push(corner(first));
    // A round edge bulges between its vertices; all other curved edges are taken as straight.
    const curve = follow(geometry, edge);
    const kind = type(curve);
    if (kind !== 'IFCCIRCLE' && kind !== 'IFCELLIPSE') return;
    const between = curves.arcBetween(
      curve,
      placements.point(pointOf(start)),
      placements.point(pointOf(end)),
      sameSense,
    );
    const inner = between.slice(1, -1);
    for (const one of isForward ? inner : inner.reverse()) ring.push(loose(one));
  };
  const faceted = (shells: (into: number[]) => void): Mesh => {
    const read = once(() => walked(shells));
    return { kind: 'mesh', points: () => read().points, faces: () => read().faces, cylinders: () => read().cylinders };
  };
  const shellsIn =
    (record: number) =>
    (into: number[]): void => {
      for (const id of reader.cursor().at(args[record]!).ids()) {
        const shell = follow(id, record);
        if (shell >= 0) into.push(shell);
      }
    };
  return {
    read: (record) => {
      switch (type(record)) {
        case 'IFCTRIANGULATEDFACESET':
        case 'IFCTRIANGULATEDIRREGULARNETWORK':
        case 'IFCPOLYGONALFACESET':
          return tessellated(record);
        case 'IFCFACETEDBREP':
        case 'IFCFACETEDBREPWITHVOIDS':
        case 'IFCADVANCEDBREP':
        case 'IFCADVANCEDBREPWITHVOIDS':
        case 'IFCSHELLBASEDSURFACEMODEL':
        case 'IFCFACEBASEDSURFACEMODEL':
          return faceted((into) => {
            const shell: number[] = [];
            shellsIn(record)(shell);
            // Of a solid with voids only the outer shell counts: its first reference.
            const isSolid = type(record).includes('BREP');
            into.push(...(isSolid ? shell.slice(0, 1) : shell));
          });
        case 'IFCCLOSEDSHELL':
        case 'IFCOPENSHELL':
        case 'IFCCONNECTEDFACESET':
          return faceted((into) => into.push(record));
        default:
          return null;
      }
    },
  };
}

function once<T>(read: () => T): () => T {
  let value: T | undefined;
  return () => {
    value ??= read();
    return value;
  };
}
