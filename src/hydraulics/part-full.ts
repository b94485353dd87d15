/** A round pipe that water fills to some depth. Metres, square metres, radians. */
export interface PartFull {
  /** Angle at the centre over the wetted part. */
  readonly angle: number;
  readonly area: number;
  readonly wetted: number;
  /** Area over wetted perimeter: what friction formulas read. */
  readonly radius: number;
  /** Width of the water's surface. */
  readonly surface: number;
}

/** Geometry alone. `depth` runs from the invert, above nothing up to the bore. */
export function partFull(bore: number, depth: number): PartFull {
  const angle = 2 * Math.acos(1 - (2 * depth) / bore);
  const area = (bore ** 2 / 8) * (angle - Math.sin(angle));
  const wetted = (bore * angle) / 2;
  return { angle, area, wetted, radius: area / wetted, surface: bore * Math.sin(angle / 2) };
}
