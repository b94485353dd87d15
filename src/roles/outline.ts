import { distanceFromHull, type PlanPoint } from '../geometry/plan-outline.ts';
import type { Network } from '../network/network.ts';
import type { Paths } from '../paths/paths.ts';

/** Coordinates and the cut at the outline carry about a millimetre. */
const coordinate = 0.005;

/** Wet pipes past the point where the building sewer begins, and everything downstream of one. By pipe id. */
export function outsideBuilding(
  outline: readonly PlanPoint[] | null,
  network: Network,
  paths: Paths,
  sewerBegins: number,
): boolean[] {
  const outside = network.pipes.map(() => false);
  if (outline === null) return outside;
  for (const pipe of paths.inFlowOrder) {
    const { points, ends } = network.pipes[pipe]!;
    if (points !== null) {
      const upstream = paths.toward[pipe] === ends[1] ? points[0]! : points.at(-1)!;
      outside[pipe] ||= distanceFromHull(outline, upstream) >= sewerBegins - coordinate;
    }
    const next = paths.next[pipe];
    if (outside[pipe] && next !== null && next !== undefined) outside[next] = true;
  }
  return outside;
}
