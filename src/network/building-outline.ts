import { distanceFromHull, type PlanPoint, planHull } from '../geometry/plan-outline.ts';
import { distance, type Vec3 } from '../geometry/vector.ts';
import type { Identity } from '../model/identity.ts';
import type { Fabric, Model } from '../model/model.ts';
import type { Network } from './network.ts';
import { type Cut, splitPipes } from './split-pipes.ts';

/** Outline of the building in plan, from its walls and slabs; null where the model draws neither. */
export function buildingOutline(model: Model): readonly PlanPoint[] | null {
  const hull = planHull([...model.walls, ...model.slabs].flatMap(cornersOf));
  return hull.length === 0 ? null : hull;
}

/** True corners where the shape gives them; a box only where it does not. */
function cornersOf({ outline, box }: Fabric): PlanPoint[] {
  if (outline !== null) return outline.map(([x, y]): PlanPoint => [x, y]);
  if (box === null) return [];
  const { min, max } = box;
  return [
    [min[0], min[1]],
    [max[0], min[1]],
    [max[0], max[1]],
    [min[0], max[1]],
  ];
}

/** Level pipes that leave the building are cut where the building sewer begins: `beyond` metres past the outline. */
export function cutAtOutline(
  outline: readonly PlanPoint[] | null,
  identities: readonly Identity[],
  network: Network,
  beyond: number,
): Network {
  if (outline === null) return network;
  const cuts: Cut[] = [];
  for (const { id, element, points } of network.pipes) {
    if (element === null || points === null || identities[element]?.medium === 'vent') continue;
    if (points.every((point) => distanceFromHull(outline, point) === 0)) continue;
    const away = points.map((point) => distanceFromHull(outline, point) - beyond);
    for (let at = 1; at < points.length; at++) {
      const [a, b] = [away[at - 1]!, away[at]!];
      if (a * b >= 0 || Math.min(Math.abs(a), Math.abs(b)) < leastPiece) continue;
      const before = points
        .slice(0, at)
        .reduce((sum, point, index) => (index === 0 ? 0 : sum + distance(points[index - 1]!, point)), 0);
      cuts.push({ pipe: id, at: before + crossing(outline, points[at - 1]!, points[at]!, beyond) });
      break;
    }
  }
  return splitPipes(network, cuts);
}

/** A piece shorter than this is no section of its own, metres. */
const leastPiece = 0.05;

/** Metres from `a` toward `b` at which the distance from the outline is `beyond`; halving keeps it exact to 0.1 mm. */
function crossing(outline: readonly PlanPoint[], a: Vec3, b: Vec3, beyond: number): number {
  const length = distance(a, b);
  const at = (share: number): number =>
    distanceFromHull(outline, [a[0] + (b[0] - a[0]) * share, a[1] + (b[1] - a[1]) * share]) - beyond;
  const rising = at(1) > at(0);
  let [low, high] = [0, 1];
  while ((high - low) * length > 0.0001) {
    const middle = (low + high) / 2;
    if (at(middle) > 0 === rising) high = middle;
    else low = middle;
  }
  return ((low + high) / 2) * length;
}
