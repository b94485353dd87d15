import type { Vec3 } from '../../geometry/vector.ts';
import type { Frame } from './frame.ts';
import type { Mesh } from './mesh.ts';

/**
 * One part of a product's shape in metres, still in the coordinates of the item that gives it; `frame` carries it into
 * the product's own. Parts of a shape that many products share are the same objects, each time with another frame.
 */
export interface Piece {
  readonly shape: Tube | Prism | Mesh;
  readonly frame: Frame;
}

/** A round sweep: an extruded circle, a swept disk, a turned circle. */
export interface Tube {
  readonly kind: 'tube';
  readonly points: readonly Vec3[];
  readonly outerRadius: number;
  /** null where the solid is not hollow. */
  readonly innerRadius: number | null;
  readonly ground: 'extrusion' | 'swept-disk';
}

/** Anything else extruded: a duct, a slab, a wall. */
export interface Prism {
  readonly kind: 'prism';
  /** Outer outline, flat x, y, z. */
  readonly base: readonly number[];
  /** From the base to the top. */
  readonly shift: Vec3;
}
