import { dot, type Vec3 } from '../../geometry/vector.ts';
import type { Mesh } from './mesh.ts';

const mostNormals = 4;

/** Directions that the largest flat parts face: the ends of a short pipe face along its axis. */
export function faceNormals(mesh: Mesh, flat: readonly number[]): Vec3[] {
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
export function longEdges(mesh: Mesh, flat: readonly number[]): Vec3[] {
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

/** Normal of a face, as long as the face is large. */
export function areaVector(face: readonly number[], flat: readonly number[]): Vec3 {
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
