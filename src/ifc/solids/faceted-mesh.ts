import type { Vec3 } from '../../geometry/vector.ts';
import type { Cursor } from '../lines/cursor.ts';
import { readTriple } from '../lines/number.ts';
import type { Reader } from '../reader.ts';
import type { Curves } from './curves.ts';
import type { Cylinder, Mesh } from './mesh.ts';
import type { Placements } from './placements.ts';

/** Bodies with more corners than this are read no further: no pipe or fixture needs them, and one file may hold many. */
const mostPoints = 200_000;

/** Shells of faces with bounds and loops, plain or with curved edges. */
export class FacetedMesh implements Mesh {
  readonly kind = 'mesh';
  private readonly reader: Reader;
  private readonly placements: Placements;
  private readonly curves: Curves;
  private readonly shells: readonly number[];
  private flat: number[] | null = null;
  private readonly loops: number[][] = [];
  private readonly round: Cylinder[] = [];
  /** Numbers of corners by the records of their points: a corner that many faces share is read once. */
  private readonly corners = new Map<number, number>();

  constructor(reader: Reader, placements: Placements, curves: Curves, shells: readonly number[]) {
    this.reader = reader;
    this.placements = placements;
    this.curves = curves;
    this.shells = shells;
  }

  points(): readonly number[] {
    return this.read();
  }

  faces(): readonly (readonly number[])[] {
    this.read();
    return this.loops;
  }

  cylinders(): readonly Cylinder[] {
    this.read();
    return this.round;
  }

  private read(): number[] {
    if (this.flat !== null) return this.flat;
    const flat: number[] = [];
    this.flat = flat;
    const { reader } = this;
    const cursor = reader.cursor();
    for (const shell of this.shells) {
      for (const id of cursor.at(reader.args[shell]!).ids()) {
        if (flat.length > mostPoints * 3) break;
        const face = reader.follow(id, shell);
        if (face >= 0) this.face(face, cursor, flat);
      }
    }
    this.corners.clear();
    return flat;
  }

  private face(face: number, cursor: Cursor, flat: number[]): void {
    const { reader } = this;
    const bounds = cursor.at(reader.args[face]!).ids();
    const surface = cursor.more ? reader.follow(cursor.id(), face) : -1;
    if (reader.type(surface) === 'IFCCYLINDRICALSURFACE') this.cylinder(surface, cursor);
    let outer = -1;
    for (let k = 0; k < bounds.length; k++) {
      const bound = reader.follow(bounds[k]!, face);
      if (bound < 0) continue;
      const isOuter = outer < 0 || reader.type(bound) === 'IFCFACEOUTERBOUND';
      const loop = reader.follow(cursor.at(reader.args[bound]!).id(), bound);
      const ring: number[] = [];
      this.loop(loop, cursor, ring, flat);
      if (!isOuter) continue;
      if (outer < 0) {
        outer = this.loops.length;
        this.loops.push(ring);
      } else this.loops[outer] = ring;
    }
  }

  private loop(loop: number, cursor: Cursor, ring: number[], flat: number[]): void {
    const { reader } = this;
    const kind = reader.type(loop);
    if (kind === 'IFCPOLYLOOP') {
      const ids = cursor.at(reader.args[loop]!).ids();
      for (let k = 0; k < ids.length; k++) ring.push(this.corner(reader.follow(ids[k]!, loop), flat));
    } else if (kind === 'IFCEDGELOOP') {
      for (const id of cursor.at(reader.args[loop]!).ids()) this.edge(reader.follow(id, loop), cursor, ring, flat);
    } else if (kind === 'IFCVERTEXLOOP') {
      ring.push(this.corner(this.vertexPoint(cursor.at(reader.args[loop]!).id(), loop, cursor), flat));
    }
  }

  private corner(record: number, flat: number[]): number {
    const known = this.corners.get(record);
    if (known !== undefined) return known;
    const { reader } = this;
    const { metres } = this.placements;
    const number = flat.length / 3;
    if (record < 0) flat.push(0, 0, 0);
    else {
      const t = readTriple(reader.index.bytes, reader.args[record]! + 1);
      flat.push(t[0]! * metres, t[1]! * metres, t[2]! * metres);
    }
    this.corners.set(record, number);
    return number;
  }

  private vertexPoint(id: number, from: number, cursor: Cursor): number {
    const vertex = this.reader.follow(id, from);
    return vertex < 0 ? -1 : this.reader.follow(cursor.at(this.reader.args[vertex]!).id(), vertex);
  }

  /** An oriented edge: its first vertex, and where it is round the points of its bulge. */
  private edge(oriented: number, cursor: Cursor, ring: number[], flat: number[]): void {
    if (oriented < 0) return;
    const { reader, placements } = this;
    cursor.at(reader.args[oriented]!).skip(2);
    const edge = reader.follow(cursor.id(), oriented);
    const isForward = cursor.flag() !== false;
    if (edge < 0) return;
    cursor.at(reader.args[edge]!);
    const startId = cursor.id();
    const endId = cursor.id();
    const curve = cursor.more ? reader.follow(cursor.id(), edge) : -1;
    const sameSense = cursor.more ? cursor.flag() !== false : true;
    const start = this.vertexPoint(startId, edge, cursor);
    const end = this.vertexPoint(endId, edge, cursor);
    const first = isForward ? start : end;
    if (first >= 0) ring.push(this.corner(first, flat));
    const bulge = this.bulge(curve, placements.point(start), placements.point(end), sameSense);
    for (const one of isForward ? bulge : bulge.reverse()) ring.push(loose(one, flat));
  }

  /** Points of a curved edge between its vertices; none for straight ones. */
  private bulge(curve: number, start: Vec3, end: Vec3, sameSense: boolean): Vec3[] {
    switch (this.reader.type(curve)) {
      case 'IFCCIRCLE':
      case 'IFCELLIPSE':
        return this.curves.arcBetween(curve, start, end, sameSense).slice(1, -1);
      case 'IFCBSPLINECURVE':
      case 'IFCBSPLINECURVEWITHKNOTS':
      case 'IFCRATIONALBSPLINECURVEWITHKNOTS':
      case 'IFCPOLYLINE':
      case 'IFCTRIMMEDCURVE': {
        const points = (this.curves.points(curve) ?? []).slice(1, -1);
        return sameSense ? points : points.reverse();
      }
      default:
        return [];
    }
  }

  private cylinder(surface: number, cursor: Cursor): void {
    const { reader, placements } = this;
    const position = cursor.at(reader.args[surface]!).id();
    const radius = (cursor.number() ?? 0) * placements.metres;
    const f = placements.axes(reader.follow(position, surface));
    if (radius > 0) this.round.push({ at: [f[9], f[10], f[11]], along: [f[6], f[7], f[8]], radius });
  }
}

function loose(one: Vec3, flat: number[]): number {
  flat.push(one[0], one[1], one[2]);
  return flat.length / 3 - 1;
}
