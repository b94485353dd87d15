import { dot, type Vec3 } from '../../geometry/vector.ts';
import { areaVector, faceNormals, longEdges } from './likely-axes.ts';
import type { Mesh } from './mesh.ts';
import { principalDirections } from './principal-directions.ts';
import { goesRound, seenAlong } from './seen-along.ts';

/** A tube that a mesh turned out to be, in the mesh's own coordinates, radii in metres. */
export interface FittedTube {
  readonly points: readonly Vec3[];
  readonly outer: number;
  readonly inner: number | null;
  /** Root mean square distance of the corners from the tube's walls. */
  readonly residual: number;
}

/** A fit as good as the decimals of its file lets it be: no other direction needs to be tried. */
const goodFit = 1e-4;
const fewestPoints = 12;

/** Straight tube that the corners of a mesh lie on; null where they lie on none. */
export function fitStraight(mesh: Mesh): FittedTube | null {
  const flat = mesh.points();
  if (flat.length < fewestPoints * 3) return null;
  const named = mesh.cylinders().slice(0, 4);
  const likely = [...named.map(({ along }) => along), ...principalDirections(flat)];
  let fit = best(flat, likely, straightFit);
  if (!isGood(fit)) fit = better(fit, best(flat, [...faceNormals(mesh, flat), ...longEdges(mesh, flat)], straightFit));
  return fit === null ? null : tubeOf(fit, mesh, flat);
}

/**
 * The straight tube that the corners lie near, as for coordinates rounded to centimetres: the residual says how near.
 * Asked for where no straight and no bent tube fits well.
 */
export function fitLoosely(mesh: Mesh): FittedTube | null {
  const flat = mesh.points();
  if (flat.length < fewestPoints * 3) return null;
  const fit = best(flat, principalDirections(flat), looseFit);
  return fit === null ? null : tubeOf(fit, mesh, flat);
}

type Fit = (flat: readonly number[], along: Vec3) => StraightFit | null;

function best(flat: readonly number[], directions: readonly Vec3[], fitter: Fit): StraightFit | null {
  let found: StraightFit | null = null;
  for (const along of directions) {
    found = better(found, fitter(flat, along));
    if (isGood(found)) break;
  }
  return found;
}

const isGood = (fit: StraightFit | null): boolean => fit !== null && fit.residual < goodFit * fit.walls.at(-1)!;
const better = (a: StraightFit | null, b: StraightFit | null): StraightFit | null =>
  a === null || (b !== null && b.residual < a.residual) ? b : a;

interface StraightFit {
  readonly along: Vec3;
  /** Two directions across, and where along them the axis lies. */
  readonly x: Vec3;
  readonly y: Vec3;
  readonly u: number;
  readonly v: number;
  /** From end to end along the axis. */
  readonly from: number;
  readonly to: number;
  /** Radii of the walls, smallest first. */
  readonly walls: readonly number[];
  readonly residual: number;
}

/** Corners may stray this far from a wall, as a part of the largest radius. */
const wallTolerance = 0.015;
/** Corners whose distances from the axis differ by less than this belong to one wall. */
const sameWall = 0.0015;
const mostWalls = 12;

/** Walls are rings of corners that share a distance from the axis; every corner belongs to one. */
function straightFit(flat: readonly number[], along: Vec3): StraightFit | null {
  const seen = seenAlong(flat, along);
  if (seen === null) return null;
  const { radii, largest } = seen;
  const sorted = radii.slice().sort();
  const walls: number[] = [];
  let squares = 0;
  for (let k = 0; k < sorted.length; ) {
    const first = sorted[k]!;
    let end = k + 1;
    let sum = first;
    while (end < sorted.length && sorted[end]! - sorted[end - 1]! < sameWall * largest) sum += sorted[end++]!;
    const last = sorted[end - 1]!;
    const mean = sum / (end - k);
    // Corners on the axis close the ends of a solid pipe.
    if (mean > 0.05 * largest) {
      if (last - first > 2 * wallTolerance * largest) return null;
      if (walls.length === mostWalls || !goesRound(seen, first, last)) return null;
      for (let j = k; j < end; j++) squares += (sorted[j]! - mean) ** 2;
      walls.push(mean);
    }
    k = end;
  }
  if (walls.length === 0) return null;
  const { x, y, u, v, from, to } = seen;
  return { along, x, y, u, v, from, to, walls, residual: Math.sqrt(squares / radii.length) };
}

/** Root mean square distance from the wall, as a part of the radius, that a loose fit may have. */
const looseTolerance = 0.12;

/** One wall at the mean distance of all corners. */
function looseFit(flat: readonly number[], along: Vec3): StraightFit | null {
  const seen = seenAlong(flat, along);
  if (seen === null || !goesRound(seen, 0, Infinity)) return null;
  const { radii, x, y, u, v, from, to } = seen;
  const mean = radii.reduce((sum, radius) => sum + radius, 0) / radii.length;
  const residual = Math.sqrt(radii.reduce((sum, radius) => sum + (radius - mean) ** 2, 0) / radii.length);
  return residual > looseTolerance * mean ? null : { along, x, y, u, v, from, to, walls: [mean], residual };
}

/** Part of a tube's length that some wall must cover: a ball and a cone have rings of corners, too. */
const leastCoverage = 0.4;

/** Outer and inner wall: of several steps in the wall those that run along most of the pipe. */
function tubeOf(fit: StraightFit, mesh: Mesh, flat: readonly number[]): FittedTube | null {
  const { along, x, y, u, v, from, to, walls, residual } = fit;
  const at = (t: number): Vec3 => [
    x[0] * u + y[0] * v + along[0] * t,
    x[1] * u + y[1] * v + along[1] * t,
    x[2] * u + y[2] * v + along[2] * t,
  ];
  const points = [at(from), at(to)];
  if (walls.length === 1) return { points, outer: walls[0]!, inner: null, residual };
  const covered = coverage(fit, mesh, flat);
  const most = Math.max(...covered);
  if (most < leastCoverage) return null;
  const long = walls.filter((_, k) => covered[k]! >= 0.5);
  const outer = long.at(-1) ?? walls[covered.indexOf(most)]!;
  return { points, outer, inner: long.filter((radius) => radius < outer).at(-1) ?? null, residual };
}

/** For each wall, the part of the pipe's length that faces of that radius cover. */
function coverage({ along, x, y, u, v, from, to, walls }: StraightFit, mesh: Mesh, flat: readonly number[]): number[] {
  const wallOf = new Int16Array(flat.length / 3);
  for (let k = 0, i = 0; i < flat.length; k++, i += 3) {
    const du = flat[i]! * x[0] + flat[i + 1]! * x[1] + flat[i + 2]! * x[2] - u;
    const dv = flat[i]! * y[0] + flat[i + 1]! * y[1] + flat[i + 2]! * y[2] - v;
    const radius = Math.sqrt(du * du + dv * dv);
    wallOf[k] = walls.findIndex((wall) => Math.abs(wall - radius) < wallTolerance * wall);
  }
  const areas = walls.map(() => 0);
  for (const face of mesh.faces()) {
    const wall = wallOf[face[0] ?? -1] ?? -1;
    if (wall >= 0 && face.every((corner) => wallOf[corner] === wall)) areas[wall]! += sideArea(face, flat, along);
  }
  return areas.map((area, k) => area / (2 * Math.PI * walls[k]! * (to - from)));
}

/** Area of a face seen from the side: faces across the pipe (its ends) count nothing. */
function sideArea(face: readonly number[], flat: readonly number[], along: Vec3): number {
  const n = areaVector(face, flat);
  const lengthwise = dot(n, along);
  return Math.sqrt(Math.max(0, dot(n, n) - lengthwise * lengthwise));
}
