import { BufferAttribute, BufferGeometry } from 'three';

/** Collects flat-shaded triangles and lines; points are in metres. */
export class MeshDraft {
  private readonly positions: number[] = [];
  private readonly normals: number[] = [];

  triangle(a: readonly number[], b: readonly number[], c: readonly number[]): void {
    const [ux, uy, uz] = [b[0]! - a[0]!, b[1]! - a[1]!, b[2]! - a[2]!];
    const [vx, vy, vz] = [c[0]! - a[0]!, c[1]! - a[1]!, c[2]! - a[2]!];
    const [nx, ny, nz] = [uy * vz - uz * vy, uz * vx - ux * vz, ux * vy - uy * vx];
    const size = Math.hypot(nx, ny, nz) || 1;
    for (const point of [a, b, c]) {
      this.positions.push(point[0]!, point[1]!, point[2]!);
      this.normals.push(nx / size, ny / size, nz / size);
    }
  }

  quad(a: readonly number[], b: readonly number[], c: readonly number[], d: readonly number[]): void {
    this.triangle(a, b, c);
    this.triangle(a, c, d);
  }

  geometry(): BufferGeometry {
    const geometry = new BufferGeometry();
    geometry.setAttribute('position', new BufferAttribute(new Float32Array(this.positions), 3));
    geometry.setAttribute('normal', new BufferAttribute(new Float32Array(this.normals), 3));
    return geometry;
  }
}

export function lineGeometry(positions: readonly number[]): BufferGeometry {
  const geometry = new BufferGeometry();
  geometry.setAttribute('position', new BufferAttribute(new Float32Array(positions), 3));
  return geometry;
}
