import type { Vec3 } from '../../geometry/vector.ts';
import type { Mesh } from './mesh.ts';

/** Corners that stand in one place are one corner: some programs give every triangle corners of its own. */
export function mergedCorners(mesh: Mesh): {
  readonly points: readonly Vec3[];
  readonly faces: readonly (readonly number[])[];
} {
  const flat = mesh.points();
  let size = 0;
  for (const one of flat) size = Math.max(size, Math.abs(one));
  const grid = Math.max(size * 1e-7, 1e-9);
  const points: Vec3[] = [];
  const known = new Map<string, number>();
  const numbers: number[] = [];
  for (let i = 0; i + 2 < flat.length; i += 3) {
    const key = `${Math.round(flat[i]! / grid)} ${Math.round(flat[i + 1]! / grid)} ${Math.round(flat[i + 2]! / grid)}`;
    let number = known.get(key);
    if (number === undefined) {
      number = points.length;
      points.push([flat[i]!, flat[i + 1]!, flat[i + 2]!]);
      known.set(key, number);
    }
    numbers.push(number);
  }
  const faces = mesh
    .faces()
    .map((face) =>
      face.map((corner) => numbers[corner]!).filter((corner, k, all) => corner !== all[(k + 1) % all.length]),
    )
    .filter((face) => face.length > 2);
  return { points, faces };
}
