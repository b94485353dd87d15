import { cross, dot, unit, type Vec3 } from '../../geometry/vector.ts';
import type { Mesh } from './mesh.ts';
import { principalDirections } from './principal-directions.ts';

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

const mostNormals = 4;

/** Directions that the largest flat parts face: the ends of a short pipe face along its axis. */
function faceNormals(mesh: Mesh, flat: readonly number[]): Vec3[] {
  const found: { along: Vec3; area: number }[] = [];
  for (const face of mesh.faces()) {
    const n = areaVector(face, flat);
    const area = Math.sqrt(n[0] * n[0] + n[1] * n[1] + n[2] * n[2]);
    if (!(area > 0)) continue;
    const along: Vec3 = [n[0] / area, n[1] / area, n[2] / area];
    const same = found.find((one) => Math.abs(dot(one.along, along)) > 1 - 1e-9);
    if (same !== undefined) same.area += area;
    else if (found.length < mostDirections) found.push({ along, area });
  }
  return found
    .sort((a, b) => b.area - a.area)
    .slice(0, mostNormals)
    .map(({ along }) => along);
}

const mostDirections = 200;
const mostEdges = 12;

/** Directions of the longest edges: the sides of a pipe that is cut off askew still run along its axis. */
function longEdges(mesh: Mesh, flat: readonly number[]): Vec3[] {
  const found: { readonly along: Vec3; readonly size: number }[] = [];
  for (const face of mesh.faces()) {
    for (let k = 0; k < face.length; k++) {
      const a = face[k]! * 3;
      const b = face[(k + 1) % face.length]! * 3;
      const x = flat[b]! - flat[a]!;
      const y = flat[b + 1]! - flat[a + 1]!;
      const z = flat[b + 2]! - flat[a + 2]!;
      const size = Math.sqrt(x * x + y * y + z * z);
      const shortest = found.length < mostEdges ? 0 : found.at(-1)!.size;
      if (!(size > shortest)) continue;
      const same = found.some(({ along }) => Math.abs(along[0] * x + along[1] * y + along[2] * z) > size * (1 - 1e-8));
      if (same) continue;
      found.push({ along: [x / size, y / size, z / size], size });
      found.sort((p, q) => q.size - p.size);
      if (found.length > mostEdges) found.pop();
    }
  }
  return found.map(({ along }) => along);
}

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

/** Points as seen along a direction, around the centre that fits them best. */
interface Seen {
  readonly x: Vec3;
  readonly y: Vec3;
  readonly u: number;
  readonly v: number;
  readonly from: number;
  readonly to: number;
  readonly across: Float64Array;
  readonly up: Float64Array;
  readonly radii: Float64Array;
  readonly largest: number;
}

function seenAlong(flat: readonly number[], along: Vec3): Seen | null {
  const n = flat.length / 3;
  const x = unit(cross(along, Math.abs(along[2]) < 0.9 ? [0, 0, 1] : [1, 0, 0]));
  const y = cross(along, x);
  const across = new Float64Array(n);
  const up = new Float64Array(n);
  let from = Infinity;
  let to = -Infinity;
  let mu = 0;
  let mv = 0;
  for (let k = 0, i = 0; k < n; k++, i += 3) {
    const px = flat[i]!;
    const py = flat[i + 1]!;
    const pz = flat[i + 2]!;
    const t = px * along[0] + py * along[1] + pz * along[2];
    if (t < from) from = t;
    if (t > to) to = t;
    mu += across[k] = px * x[0] + py * x[1] + pz * x[2];
    mv += up[k] = px * y[0] + py * y[1] + pz * y[2];
  }
  const centre = circleCentre(across, up, mu / n, mv / n);
  if (centre === null || !(to - from > 1e-6)) return null;
  const { u, v } = centre;
  const radii = new Float64Array(n);
  let largest = 0;
  for (let k = 0; k < n; k++) {
    const du = across[k]! - u;
    const dv = up[k]! - v;
    const radius = Math.sqrt(du * du + dv * dv);
    radii[k] = radius;
    if (radius > largest) largest = radius;
  }
  return largest > 0 ? { x, y, u, v, from, to, across, up, radii, largest } : null;
}

const steps = 72;
/** Widest gap between neighbouring corners of a wall, seen along the axis, in steps of five degrees: a hexagon has 60°. */
const widestGap = 14;
const taken = new Uint8Array(steps);

/** True where the corners between two radii stand all around the centre; four of them make a duct. */
function goesRound({ across, up, radii, u, v }: Seen, least: number, most: number): boolean {
  taken.fill(0);
  for (let k = 0; k < radii.length; k++) {
    if (radii[k]! < least || radii[k]! > most) continue;
    taken[(Math.round(Math.atan2(up[k]! - v, across[k]! - u) * (steps / 2 / Math.PI)) + steps) % steps] = 1;
  }
  const first = taken.indexOf(1);
  if (first < 0) return false;
  let gap = 0;
  for (let k = first + 1; k <= first + steps; k++) {
    gap = taken[k % steps] === 1 ? 0 : gap + 1;
    if (gap > widestGap) return false;
  }
  return true;
}

/** Centre of the circle that fits points in a plane best (Kåsa's linear least squares); null for points on a line. */
function circleCentre(
  across: Float64Array,
  up: Float64Array,
  mu: number,
  mv: number,
): { readonly u: number; readonly v: number } | null {
  let uu = 0;
  let vv = 0;
  let uv = 0;
  let ur = 0;
  let vr = 0;
  for (let k = 0; k < across.length; k++) {
    const a = across[k]! - mu;
    const b = up[k]! - mv;
    const rr = a * a + b * b;
    uu += a * a;
    vv += b * b;
    uv += a * b;
    ur += a * rr;
    vr += b * rr;
  }
  const determinant = uu * vv - uv * uv;
  if (!(Math.abs(determinant) > 1e-12 * uu * vv)) return null;
  return { u: mu + (ur * vv - vr * uv) / (2 * determinant), v: mv + (vr * uu - ur * uv) / (2 * determinant) };
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

/** Normal of a face, as long as the face is large. */
function areaVector(face: readonly number[], flat: readonly number[]): Vec3 {
  let nx = 0;
  let ny = 0;
  let nz = 0;
  const o = face[0]! * 3;
  for (let k = 2; k < face.length; k++) {
    const p = face[k - 1]! * 3;
    const q = face[k]! * 3;
    const ax = flat[p]! - flat[o]!;
    const ay = flat[p + 1]! - flat[o + 1]!;
    const az = flat[p + 2]! - flat[o + 2]!;
    const bx = flat[q]! - flat[o]!;
    const by = flat[q + 1]! - flat[o + 1]!;
    const bz = flat[q + 2]! - flat[o + 2]!;
    nx += ay * bz - az * by;
    ny += az * bx - ax * bz;
    nz += ax * by - ay * bx;
  }
  return [nx / 2, ny / 2, nz / 2];
}
