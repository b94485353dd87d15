import { directionOf, type Polyline } from '../geometry/polyline.ts';
import type { Vec3 } from '../geometry/vector.ts';
import { noLength } from './tolerance.ts';

/** Between two borders along an axis: metres from the axis's first point. */
export interface Border {
  readonly at: number;
  /** Node that stands there; null where only the orientation changes. */
  readonly node: number | null;
}

const cosineOf45 = Math.cos(Math.PI / 4);
/** 0.01 degrees: what coordinates can tell. */
const angleUncertainty = (0.01 * Math.PI) / 180;

/** A direction at 45 degrees or less to the vertical counts as vertical. */
export const isVertical = (direction: Vec3): boolean =>
  Math.abs(direction[2]) >= cosineOf45 - angleUncertainty * Math.sin(Math.PI / 4);

/**
 * Borders along a pipe, its two ends included: where something stands on the wall, and where vertical and horizontal
 * meet. A change of orientation at a place that has a node already adds none.
 */
export function bordersOf(
  axis: Polyline,
  ends: readonly [number, number],
  walls: readonly Border[],
): readonly Border[] {
  const turns: Border[] = [];
  for (let leg = 1; leg + 1 < axis.points.length; leg++) {
    const at = axis.along[leg]!;
    const turnsHere = isVertical(directionOf(axis, leg - 1)) !== isVertical(directionOf(axis, leg));
    if (turnsHere && !walls.some((wall) => Math.abs(wall.at - at) <= noLength)) turns.push({ at, node: null });
  }
  const between = [...walls, ...turns].sort((a, b) => a.at - b.at || (a.node ?? -1) - (b.node ?? -1));
  return [{ at: 0, node: ends[0] }, ...between, { at: axis.length, node: ends[1] }];
}
