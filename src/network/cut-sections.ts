import { directionOf, type Polyline } from '../geometry/polyline.ts';
import { isVertical } from '../geometry/vertical.ts';
import { noLength } from './tolerance.ts';

/** Between two borders along an axis: metres from the axis's first point. */
export interface Border {
  readonly at: number;
  /** Node that stands there; null where only the orientation changes. */
  readonly node: number | null;
}

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
    const turnsHere = isVertical(directionOf(axis, leg - 1)[2]) !== isVertical(directionOf(axis, leg)[2]);
    if (turnsHere && !walls.some((wall) => Math.abs(wall.at - at) <= noLength)) turns.push({ at, node: null });
  }
  const between = [...walls, ...turns].sort((a, b) => a.at - b.at || (a.node ?? -1) - (b.node ?? -1));
  return [{ at: 0, node: ends[0] }, ...between, { at: axis.length, node: ends[1] }];
}
