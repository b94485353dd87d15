import type { Vec3 } from '../../geometry/vector.ts';

/** A body given by its faces. Points and faces are read when somebody asks; the second time costs nothing. */
export interface Mesh {
  readonly kind: 'mesh';
  /** Flat x, y, z in metres, each corner once. */
  points(): readonly number[];
  /** Outer loops of the faces as numbers of points. */
  faces(): readonly (readonly number[])[];
  /** Cylinders that faces lie on, where the file says so. */
  cylinders(): readonly Cylinder[];
}

export interface Cylinder {
  readonly at: Vec3;
  readonly along: Vec3;
  readonly radius: number;
}
