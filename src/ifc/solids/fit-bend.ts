import { cross, distance, dot, subtract, unit, type Vec3 } from '../../geometry/vector.ts';
import { distanceToPath } from './fit-around.ts';
import type { FittedTube } from './fit-tube.ts';
import { mergedCorners } from './merged-corners.ts';
import type { Mesh } from './mesh.ts';
import { planarRegions } from './planar-regions.ts';

/** Fewest corners of a ring. */
const fewestSides = 6;
/** How much the two ends of a pipe may differ in radius; a reducer is no pipe. */
const sameRadius = 0.05;
/** Root mean square distance from the wall, as a part of the radius, past which a body is no bent tube. */
const worstResidual = 0.08;
const mostRings = 5000;

/**
 * Tube along a bent path: from one round flat end, ring by ring over the sides, to the other. null where there are not
 * two such ends, or the rings between them do not stay round. What lies inside a hollow pipe is not looked at.
 */
export function fitBend(mesh: Mesh): FittedTube | null {
  const { points, faces } = mergedCorners(mesh);
  const regions = planarRegions(points, faces);
  const caps: Cap[] = [];
  for (const region of regions) {
    const cap = roundCap(
      region.map((face) => faces[face]!),
      points,
    );
    if (cap !== null) caps.push({ ...cap, faces: region });
  }
  caps.sort((a, b) => b.radius - a.radius);
  const [start, end] = caps;
  if (start === undefined || end === undefined || start.radius - end.radius > sameRadius * start.radius) return null;
  const isCap = new Set([...start.faces, ...end.faces]);
  const rings = ringsFrom(
    start.ring,
    end.ring,
    faces.filter((_, k) => !isCap.has(k)),
    points.length,
  );
  if (rings === null) return null;
  const path = rings.map((ring) => middleOf(ring, points));
  const outer = (start.radius + end.radius) / 2;
  let squares = 0;
  let count = 0;
  for (const ring of rings) {
    for (const corner of ring) {
      squares += (distanceToPath(points[corner]!, path) - outer) ** 2;
      count++;
    }
  }
  const residual = Math.sqrt(squares / count);
  return residual > worstResidual * outer ? null : { points: path, outer, inner: null, residual };
}

interface Cap {
  readonly faces: readonly number[];
  /** Corners of the outer circle. */
  readonly ring: readonly number[];
  readonly radius: number;
}

/** The outer circle of a flat region; null where its outer corners stand on none. */
function roundCap(region: readonly (readonly number[])[], points: readonly Vec3[]): Omit<Cap, 'faces'> | null {
  const corners = [...new Set(region.flat())];
  if (corners.length < fewestSides) return null;
  const centre = middleOf(outermost(corners, points), points);
  const far = Math.max(...corners.map((corner) => distance(points[corner]!, centre)));
  const ring = corners.filter((corner) => distance(points[corner]!, centre) > far * 0.98);
  if (ring.length < fewestSides) return null;
  const middle = middleOf(ring, points);
  const radii = ring.map((corner) => distance(points[corner]!, middle));
  const radius = radii.reduce((sum, one) => sum + one, 0) / radii.length;
  if (radii.some((one) => Math.abs(one - radius) > 0.02 * radius)) return null;
  return widestGap(ring, middle, points) < 1.4 ? { ring, radius } : null;
}

/** Corners that stand farthest from the middle of all: of a ring cut out of a disk the inner ones drop out. */
function outermost(corners: readonly number[], points: readonly Vec3[]): readonly number[] {
  const middle = middleOf(corners, points);
  const far = Math.max(...corners.map((corner) => distance(points[corner]!, middle)));
  const outer = corners.filter((corner) => distance(points[corner]!, middle) > far * 0.9);
  return outer.length < 3 ? corners : outer;
}

/** Widest angle, in radians, between neighbours of a ring as seen from its middle. */
function widestGap(ring: readonly number[], middle: Vec3, points: readonly Vec3[]): number {
  const x = unit(subtract(points[ring[0]!]!, middle));
  const spans = ring.map((corner) => cross(x, subtract(points[corner]!, middle)));
  const z = unit(spans.reduce((best, one) => (dot(one, one) > dot(best, best) ? one : best)));
  const y = cross(z, x);
  const angles = ring
    .map((corner) => {
      const out = subtract(points[corner]!, middle);
      return Math.atan2(dot(out, y), dot(out, x));
    })
    .sort((a, b) => a - b);
  const last = angles[0]! + 2 * Math.PI - angles.at(-1)!;
  return angles.slice(1).reduce((widest, angle, k) => Math.max(widest, angle - angles[k]!), last);
}

function middleOf(corners: readonly number[], points: readonly Vec3[]): Vec3 {
  let [x, y, z] = [0, 0, 0];
  for (const corner of corners) {
    const point = points[corner]!;
    x += point[0];
    y += point[1];
    z += point[2];
  }
  return [x / corners.length, y / corners.length, z / corners.length];
}

/** Layers of corners from one ring over the faces to another, both included; null where the other is not reached. */
function ringsFrom(
  first: readonly number[],
  last: readonly number[],
  faces: readonly (readonly number[])[],
  corners: number,
): readonly (readonly number[])[] | null {
  const facesAt: number[][] = Array.from({ length: corners }, () => []);
  for (const [k, face] of faces.entries()) for (const corner of face) facesAt[corner]!.push(k);
  const isSeen = new Uint8Array(corners);
  for (const corner of first) isSeen[corner] = 1;
  const goal = new Set(last);
  const rings: (readonly number[])[] = [first];
  let ring = first;
  while (ring.length > 0 && rings.length < mostRings) {
    const next: number[] = [];
    for (const corner of ring) {
      for (const face of facesAt[corner]!) {
        for (const other of faces[face]!) {
          if (isSeen[other] === 1) continue;
          isSeen[other] = 1;
          next.push(other);
        }
      }
    }
    if (next.length < fewestSides) return null;
    rings.push(next);
    if (next.some((corner) => goal.has(corner))) return next.every((corner) => goal.has(corner)) ? rings : null;
    ring = next;
  }
  return null;
}
