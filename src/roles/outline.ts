import { distanceFromHull, type PlanPoint } from '../geometry/plan-outline.ts';
import type { Network } from '../network/network.ts';
import type { Paths } from '../paths/paths.ts';

/** Coordinates and the cut at the outline carry about a millimetre. */
const coordinate = 0.005;

/**
 * Wet pipes past the point where the building sewer begins, and everything downstream of one. Only water that comes from
 * inside leaves the building: piping that stands wholly outside the outline is not judged by it. By pipe id.
 */
export function outsideBuilding(
  outline: readonly PlanPoint[] | null,
  network: Network,
  paths: Paths,
  sewerBegins: number,
): boolean[] {
  const outside = network.pipes.map(() => false);
  if (outline === null) return outside;
  const fromInside = network.pipes.map(() => false);
  for (const pipe of paths.inFlowOrder) {
    const { points, ends } = network.pipes[pipe]!;
    if (points !== null) {
      const upstream = paths.toward[pipe] === ends[1] ? points[0]! : points.at(-1)!;
      const away = distanceFromHull(outline, upstream);
      fromInside[pipe] ||= away === 0;
      outside[pipe] ||= fromInside[pipe]! && away >= sewerBegins - coordinate;
    }
    const next = paths.next[pipe];
    if (next === null || next === undefined) continue;
    fromInside[next] ||= fromInside[pipe]!;
    outside[next] ||= outside[pipe]!;
  }
  return outside;
}
