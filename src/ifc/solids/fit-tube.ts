import { cross, unit, type Vec3 } from '../../geometry/vector.ts';
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
  let best: StraightFit | null = null;
  const isGood = (): boolean => best !== null && best.residual < goodFit * best.walls.at(-1)!;
  const attempt = (directions: readonly Vec3[]): void => {
    for (const along of directions) {
      if (isGood()) return;
      const fit = straightFit(flat, along);
      if (fit !== null && (best === null || fit.residual < best.residual)) best = fit;
    }
  };
  attempt(
    mesh
      .cylinders()
      .slice(0, 4)
      .map(({ along }) => along),
  );
  attempt(principalDirections(flat));
  if (!isGood()) attempt(longEdges(mesh, flat));
  return best === null ? null : tubeOf(best, mesh, flat);
}

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
/** Fewest directions, seen along the axis, in which a wall must have corners: four make a duct. */
const fewestSides = 6;
const mostWalls = 12;

function straightFit(flat: readonly number[], along: Vec3): StraightFit | null {
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
  if (!(largest > 0)) return null;
  const sorted = radii.slice().sort();
  const walls: number[] = [];
  let squares = 0;
  for (let k = 0; k < n; ) {
    const first = sorted[k]!;
    let end = k + 1;
    let sum = first;
    while (end < n && sorted[end]! - sorted[end - 1]! < sameWall * largest) sum += sorted[end++]!;
    const last = sorted[end - 1]!;
    const mean = sum / (end - k);
    // Corners on the axis close the ends of a solid pipe.
    if (mean > 0.05 * largest) {
      if (last - first > 2 * wallTolerance * largest) return null;
      if (walls.length === mostWalls || sides(across, up, radii, u, v, first, last) < fewestSides) return null;
      for (let j = k; j < end; j++) squares += (sorted[j]! - mean) ** 2;
      walls.push(mean);
    }
    k = end;
  }
  return walls.length === 0 ? null : { along, x, y, u, v, from, to, walls, residual: Math.sqrt(squares / n) };
}

const seen = new Uint8Array(72);

/** Number of different directions, in steps of five degrees, in which the corners of one wall stand. */
function sides(
  across: Float64Array,
  up: Float64Array,
  radii: Float64Array,
  u: number,
  v: number,
  least: number,
  most: number,
): number {
  seen.fill(0);
  let count = 0;
  for (let k = 0; k < radii.length; k++) {
    if (radii[k]! < least || radii[k]! > most) continue;
    const step = (Math.round(Math.atan2(up[k]! - v, across[k]! - u) * (36 / Math.PI)) + 72) % 72;
    if (seen[step] === 0) count++;
    seen[step] = 1;
  }
  return count;
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

/** Outer and inner wall: of several steps in the wall those that run along most of the pipe. */
function tubeOf(fit: StraightFit, mesh: Mesh, flat: readonly number[]): FittedTube {
  const { along, x, y, u, v, from, to, walls, residual } = fit;
  const at = (t: number): Vec3 => [
    x[0] * u + y[0] * v + along[0] * t,
    x[1] * u + y[1] * v + along[1] * t,
    x[2] * u + y[2] * v + along[2] * t,
  ];
  const points = [at(from), at(to)];
  if (walls.length === 1) return { points, outer: walls[0]!, inner: null, residual };
  const covered = coverage(fit, mesh, flat);
  const long = walls.filter((_, k) => covered[k]! >= 0.5);
  const outer = long.at(-1) ?? walls[covered.indexOf(Math.max(...covered))]!;
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
  let nx = 0;
  let ny = 0;
  let nz = 0;
  const o = face[0]! * 3;
  for (let k = 2; k < face.length; k++) {
    const p = face[k - 1]! * 3;
    const q = face[k]! * 3;
    const [ax, ay, az] = [flat[p]! - flat[o]!, flat[p + 1]! - flat[o + 1]!, flat[p + 2]! - flat[o + 2]!];
    const [bx, by, bz] = [flat[q]! - flat[o]!, flat[q + 1]! - flat[o + 1]!, flat[q + 2]! - flat[o + 2]!];
    nx += ay * bz - az * by;
    ny += az * bx - ax * bz;
    nz += ax * by - ay * bx;
  }
  const lengthwise = nx * along[0] + ny * along[1] + nz * along[2];
  return Math.sqrt(Math.max(0, nx * nx + ny * ny + nz * nz - lengthwise * lengthwise)) / 2;
}
