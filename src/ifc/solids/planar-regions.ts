import { cross, dot, length, subtract, type Vec3 } from '../../geometry/vector.ts';

/** Faces whose normals differ by less than this, in radians squared over two, lie in one plane. */
const samePlane = 5e-5;

/** Faces that hang together and lie in one plane, by their numbers: the triangles of a flat end are one region. */
export function planarRegions(
  points: readonly Vec3[],
  faces: readonly (readonly number[])[],
): readonly (readonly number[])[] {
  const normals = faces.map((face) => normalOf(face, points));
  const parent = faces.map((_, k) => k);
  const root = (k: number): number => {
    let at = k;
    while (parent[at] !== at) {
      parent[at] = parent[parent[at]!]!;
      at = parent[at]!;
    }
    return at;
  };
  const byEdge = new Map<number, number>();
  for (const [k, face] of faces.entries()) {
    for (let j = 0; j < face.length; j++) {
      const [a, b] = [face[j]!, face[(j + 1) % face.length]!];
      const edge = Math.min(a, b) * points.length + Math.max(a, b);
      const other = byEdge.get(edge);
      if (other === undefined) byEdge.set(edge, k);
      else if (1 - dot(normals[k]!, normals[other]!) < samePlane) parent[root(k)] = root(other);
    }
  }
  const regions = new Map<number, number[]>();
  for (let k = 0; k < faces.length; k++) {
    const list = regions.get(root(k));
    if (list === undefined) regions.set(root(k), [k]);
    else list.push(k);
  }
  return [...regions.values()];
}

/** Unit normal of a face, from all its corners; zero where it has no area. */
export function normalOf(face: readonly number[], points: readonly Vec3[]): Vec3 {
  const first = points[face[0]!]!;
  let [x, y, z] = [0, 0, 0];
  for (let k = 2; k < face.length; k++) {
    const part = cross(subtract(points[face[k - 1]!]!, first), subtract(points[face[k]!]!, first));
    x += part[0];
    y += part[1];
    z += part[2];
  }
  const size = length([x, y, z]);
  return size === 0 ? [0, 0, 0] : [x / size, y / size, z / size];
}
