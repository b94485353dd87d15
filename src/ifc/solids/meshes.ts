import type { Reader } from '../reader.ts';
import type { Curves } from './curves.ts';
import { FacetedMesh } from './faceted-mesh.ts';
import type { Cylinder, Mesh } from './mesh.ts';
import type { Placements } from './placements.ts';

/** Bodies of faces in one file. */
export class Meshes {
  private readonly reader: Reader;
  private readonly placements: Placements;
  private readonly curves: Curves;
  private readonly lists = new Map<number, readonly number[]>();

  constructor(reader: Reader, placements: Placements, curves: Curves) {
    this.reader = reader;
    this.placements = placements;
    this.curves = curves;
  }

  /** null for a record that is no body of faces. */
  read(record: number): Mesh | null {
    const { reader, placements, curves } = this;
    switch (reader.type(record)) {
      case 'IFCTRIANGULATEDFACESET':
      case 'IFCTRIANGULATEDIRREGULARNETWORK':
        return new ListedMesh(this, reader, record, false);
      case 'IFCPOLYGONALFACESET':
        return new ListedMesh(this, reader, record, true);
      // Of a solid with voids only the outer shell counts: its first reference.
      case 'IFCFACETEDBREP':
      case 'IFCFACETEDBREPWITHVOIDS':
      case 'IFCADVANCEDBREP':
      case 'IFCADVANCEDBREPWITHVOIDS':
        return new FacetedMesh(reader, placements, curves, this.shells(record).slice(0, 1));
      case 'IFCSHELLBASEDSURFACEMODEL':
      case 'IFCFACEBASEDSURFACEMODEL':
        return new FacetedMesh(reader, placements, curves, this.shells(record));
      case 'IFCCLOSEDSHELL':
      case 'IFCOPENSHELL':
      case 'IFCCONNECTEDFACESET':
        return new FacetedMesh(reader, placements, curves, [record]);
      default:
        return null;
    }
  }

  /** Coordinates of a point list in metres, flat. */
  listed(record: number): readonly number[] {
    const known = this.lists.get(record);
    if (known !== undefined) return known;
    const flat = record < 0 ? [] : this.reader.open(record).numbers([]);
    const { metres } = this.placements;
    if (metres !== 1) for (let k = 0; k < flat.length; k++) flat[k] = flat[k]! * metres;
    this.lists.set(record, flat);
    return flat;
  }

  private shells(record: number): number[] {
    const { reader } = this;
    return reader
      .open(record)
      .ids()
      .map((id) => reader.follow(id, record))
      .filter((shell) => shell >= 0);
  }
}

const noCylinders: readonly Cylinder[] = [];
const isCorner = (corner: number, count: number): boolean => Number.isInteger(corner) && corner >= 0 && corner < count;

/** Faces over a list of points. */
class ListedMesh implements Mesh {
  readonly kind = 'mesh';
  private readonly meshes: Meshes;
  private readonly reader: Reader;
  private readonly record: number;
  private readonly isPolygonal: boolean;
  private read: readonly (readonly number[])[] | null = null;

  constructor(meshes: Meshes, reader: Reader, record: number, isPolygonal: boolean) {
    this.meshes = meshes;
    this.reader = reader;
    this.record = record;
    this.isPolygonal = isPolygonal;
  }

  points(): readonly number[] {
    const { reader, record } = this;
    return this.meshes.listed(reader.follow(reader.open(record).id(), record));
  }

  faces(): readonly (readonly number[])[] {
    this.read ??= this.isPolygonal ? this.polygons() : this.triangles();
    return this.read;
  }

  cylinders(): readonly Cylinder[] {
    return noCylinders;
  }

  private triangles(): number[][] {
    const flat = this.reader.open(this.record).skip(3).numbers([]);
    const most = Math.floor(this.points().length / 3);
    const faces: number[][] = [];
    for (let k = 0; k + 2 < flat.length; k += 3) {
      const face = [flat[k]! - 1, flat[k + 1]! - 1, flat[k + 2]! - 1];
      if (face.every((corner) => isCorner(corner, most))) faces.push(face);
    }
    return faces;
  }

  private polygons(): number[][] {
    const { reader, record } = this;
    const most = Math.floor(this.points().length / 3);
    const faces: number[][] = [];
    for (const id of reader.open(record).skip(2).ids()) {
      const face = reader.follow(id, record);
      if (face < 0) continue;
      const corners = reader.open(face).numbers([]);
      for (let k = 0; k < corners.length; k++) corners[k] = corners[k]! - 1;
      if (corners.every((corner) => isCorner(corner, most))) faces.push(corners);
    }
    return faces;
  }
}
