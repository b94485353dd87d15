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

// Made in one place each, so that all have their fields in one order: the reader's inner loops run on that.
export const pieceOf = (shape: Piece['shape'], frame: Frame): Piece => ({ shape, frame });

export const tubeOf = (
  points: readonly Vec3[],
  outerRadius: number,
  innerRadius: number | null,
  ground: Tube['ground'],
): Tube => ({ kind: 'tube', points, outerRadius, innerRadius, ground });

export const prismOf = (base: readonly number[], shift: Vec3): Prism => ({ kind: 'prism', base, shift });

/** An upright box as a prism. */
export const boxPrism = (min: Vec3, max: Vec3): Prism =>
  prismOf(
    [min[0], min[1], min[2], max[0], min[1], min[2], max[0], max[1], min[2], min[0], max[1], min[2]],
    [0, 0, max[2] - min[2]],
  );
