import { add, cross, distance, dot, length, scale, subtract, unit, type Vec3 } from '../../geometry/vector.ts';
import type { Mesh } from './mesh.ts';
import type { Piece } from './piece.ts';
import { principalDirections } from './principal-directions.ts';

/** A tube that a mesh turned out to be, in the mesh's own coordinates, radii in metres. */
export interface FittedTube {
  readonly points: readonly Vec3[];
  readonly outer: number;
  readonly inner: number | null;
  /** Root mean square distance of the corners from the tube's walls. */
  readonly residual: number;
}

/** Straight tube that the corners of a mesh lie on; null where they lie on none. */
export function fitTube(mesh: Mesh): FittedTube | null {
  const points = pointsOf(mesh.points());
  if (points.length < 12) return null;
  let best: StraightFit | null = null;
  for (const along of candidates(mesh, points)) {
    const fit = straightFit(points, along);
    if (fit !== null && (best === null || fit.residual < best.residual)) best = fit;
    if (best !== null && best.residual < goodFit * best.walls.at(-1)!.radius) break;
  }
  return best === null ? null : tubeOf(best, mesh);
}

const goodFit = 1e-4;
/** Corners may stray this far from a wall, as a part of the radius. */
const wallTolerance = 0.015;

function pointsOf(flat: readonly number[]): Vec3[] {
  const points: Vec3[] = [];
  for (let k = 0; k + 2 < flat.length; k += 3) points.push([flat[k]!, flat[k + 1]!, flat[k + 2]!]);
  return points;
}

/** Directions that the axis may have: of cylinders that the file names, of the corners' spread, of the longest edges. */
function* candidates(mesh: Mesh, points: readonly Vec3[]): Generator<Vec3> {
  for (const { along } of mesh.cylinders().slice(0, 4)) yield along;
  yield* principalDirections(points);
  yield* longEdges(mesh, points);
}

const mostEdges = 12;

function longEdges(mesh: Mesh, points: readonly Vec3[]): Vec3[] {
  const found: { readonly along: Vec3; readonly size: number }[] = [];
  for (const face of mesh.faces()) {
    for (let k = 0; k < face.length; k++) {
      const [a, b] = [points[face[k]!], points[face[(k + 1) % face.length]!]];
      if (a === undefined || b === undefined) continue;
      const size = distance(a, b);
      const shortest = found.length < mostEdges ? 0 : found.at(-1)!.size;
      if (size <= shortest) continue;
      const along = unit(subtract(b, a));
      if (found.some((one) => Math.abs(dot(one.along, along)) > 1 - 1e-8)) continue;
      found.push({ along, size });
      found.sort((p, q) => q.size - p.size);
      if (found.length > mostEdges) found.pop();
    }
  }
  return found.map(({ along }) => along);
}

interface Wall {
  readonly radius: number;
  readonly count: number;
}

interface StraightFit {
  readonly origin: Vec3;
  readonly along: Vec3;
  readonly from: number;
  readonly to: number;
  /** Smallest radius first. */
  readonly walls: readonly Wall[];
  readonly residual: number;
}

/** Fewest directions, seen along the axis, in which a wall must have corners: four make a duct. */
const fewestSides = 6;

function straightFit(points: readonly Vec3[], along: Vec3): StraightFit | null {
  const x = unit(cross(along, Math.abs(along[2]) < 0.9 ? [0, 0, 1] : [1, 0, 0]));
  const y = cross(along, x);
  const u = points.map((point) => dot(point, x));
  const v = points.map((point) => dot(point, y));
  const centre = circleCentre(u, v);
  if (centre === null) return null;
  const radii = u.map((one, k) => Math.hypot(one - centre[0], v[k]! - centre[1]));
  const largest = Math.max(...radii);
  if (!(largest > 0)) return null;
  const order = radii.map((_, k) => k).sort((a, b) => radii[a]! - radii[b]!);
  const walls: Wall[] = [];
  let squares = 0;
  for (let k = 0; k < order.length; ) {
    const first = radii[order[k]!]!;
    let end = k + 1;
    while (end < order.length && radii[order[end]!]! - radii[order[end - 1]!]! < wallTolerance * 0.1 * largest) end++;
    const members = order.slice(k, end);
    const mean = members.reduce((sum, one) => sum + radii[one]!, 0) / members.length;
    const spread = radii[members.at(-1)!]! - first;
    // Corners on the axis close the ends of a solid pipe.
    if (mean > 0.05 * largest) {
      if (spread > 2 * wallTolerance * largest) return null;
      if (sides(members, u, v, centre) < fewestSides) return null;
      for (const one of members) squares += (radii[one]! - mean) ** 2;
      walls.push({ radius: mean, count: members.length });
    }
    k = end;
  }
  if (walls.length === 0 || walls.length > 12) return null;
  const t = points.map((point) => dot(point, along));
  const [from, to] = [Math.min(...t), Math.max(...t)];
  if (to - from < 1e-6) return null;
  return {
    origin: add(scale(x, centre[0]), scale(y, centre[1])),
    along,
    from,
    to,
    walls,
    residual: Math.sqrt(squares / points.length),
  };
}

/** Number of different directions in which points stand around a centre, counted in steps of five degrees. */
function sides(
  members: readonly number[],
  u: readonly number[],
  v: readonly number[],
  [x, y]: readonly [number, number],
): number {
  const seen = new Set<number>();
  for (const k of members) seen.add(Math.round(Math.atan2(v[k]! - y, u[k]! - x) * (36 / Math.PI)) % 72);
  return seen.size;
}

/** Centre of the circle that fits points in a plane best (Kåsa's linear least squares); null for points on a line. */
function circleCentre(u: readonly number[], v: readonly number[]): readonly [number, number] | null {
  const n = u.length;
  const mean = (values: readonly number[]): number => values.reduce((sum, value) => sum + value, 0) / n;
  const [mu, mv] = [mean(u), mean(v)];
  let [uu, vv, uv, ur, vr] = [0, 0, 0, 0, 0];
  for (let k = 0; k < n; k++) {
    const [a, b] = [u[k]! - mu, v[k]! - mv];
    const rr = a * a + b * b;
    uu += a * a;
    vv += b * b;
    uv += a * b;
    ur += a * rr;
    vr += b * rr;
  }
  const determinant = uu * vv - uv * uv;
  if (Math.abs(determinant) <= 1e-12 * uu * vv || uu === 0 || vv === 0) return null;
  return [mu + (ur * vv - vr * uv) / (2 * determinant), mv + (vr * uu - ur * uv) / (2 * determinant)];
}

/** Outer and inner wall: of several steps in the wall those that run along most of the pipe. */
function tubeOf(fit: StraightFit, mesh: Mesh): FittedTube {
  const { origin, along, from, to, walls, residual } = fit;
  const ends = [add(origin, scale(along, from)), add(origin, scale(along, to))];
  const covered = walls.length === 1 ? [1] : coverage(fit, mesh);
  const long = walls.filter((_, k) => covered[k]! >= 0.5);
  const outer = long.at(-1) ?? walls[covered.indexOf(Math.max(...covered))]!;
  const inside = long.filter(({ radius }) => radius < outer.radius).at(-1);
  return { points: ends, outer: outer.radius, inner: inside?.radius ?? null, residual };
}

/** For each wall, the part of the pipe's length that faces of that radius cover. */
function coverage({ origin, along, from, to, walls }: StraightFit, mesh: Mesh): number[] {
  const points = pointsOf(mesh.points());
  const wallOf = points.map((point) => {
    const offset = subtract(point, origin);
    const radius = length(subtract(offset, scale(along, dot(offset, along))));
    return walls.findIndex((wall) => Math.abs(wall.radius - radius) < wallTolerance * wall.radius);
  });
  const areas = walls.map(() => 0);
  for (const face of mesh.faces()) {
    const wall = wallOf[face[0]!] ?? -1;
    if (wall < 0 || face.some((one) => wallOf[one] !== wall)) continue;
    areas[wall]! += sideArea(
      face.map((one) => points[one]!),
      along,
    );
  }
  return areas.map((area, k) => area / (2 * Math.PI * walls[k]!.radius * (to - from)));
}

/** Area of a face seen from the side: faces across the pipe (its ends) count nothing. */
function sideArea(corners: readonly Vec3[], along: Vec3): number {
  let normal: Vec3 = [0, 0, 0];
  const [first] = corners;
  for (let k = 2; k < corners.length; k++) {
    normal = add(normal, cross(subtract(corners[k - 1]!, first!), subtract(corners[k]!, first!)));
  }
  return length(subtract(normal, scale(along, dot(normal, along)))) / 2;
}

/** Radii of a body around an axis that the file gives; null where the body is not round about it. */
export function radiusAround(
  axis: readonly Vec3[],
  body: readonly Piece[],
): { readonly outer: number; readonly inner: number | null; readonly residual: number } | null {
  for (const { shape } of body) {
    if (shape.kind !== 'mesh') continue;
    const fitted = axis.length === 2 ? fitTube(shape) : null;
    if (fitted !== null) return fitted;
  }
  return null;
}
