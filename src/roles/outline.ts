import type { Box, Vec3 } from '../geometry/vector.ts';
import type { Model } from '../model/model.ts';
import type { Network } from '../network/network.ts';
import type { Paths } from '../paths/paths.ts';

/** The building drain ends, and the building sewer begins, this far outside the wall, metres (NPC Division A 1.4.1.2.). */
export const sewerBegins = 1;

/** Boxes of walls and slabs that stand for the building in plan; empty where the model draws none. */
export const buildingBoxes = (model: Model): Box[] =>
  [...model.walls, ...model.slabs].flatMap(({ box }) => (box === null ? [] : [box]));

/** Wet level pipes that lie wholly past the point where the sewer begins, and all pipes downstream of one. By pipe id. */
export function outsideBuilding(model: Model, network: Network, paths: Paths): boolean[] {
  const outside = network.pipes.map(() => false);
  const whole = envelope(buildingBoxes(model));
  if (whole === null) return outside;
  for (const pipe of paths.inFlowOrder) {
    const { points } = network.pipes[pipe]!;
    if (points === null) continue;
    const up = paths.toward[pipe] === network.pipes[pipe]!.ends[1] ? points[0]! : points.at(-1)!;
    outside[pipe] = outside[pipe] || distanceOutside(whole, up) >= sewerBegins - 0.001;
    const next = paths.next[pipe];
    if (outside[pipe] && next !== null && next !== undefined) outside[next] = true;
  }
  return outside;
}

function envelope(boxes: readonly Box[]): Box | null {
  if (boxes.length === 0) return null;
  const pick = (of: (box: Box) => Vec3, least: boolean, axis: 0 | 1 | 2): number =>
    boxes.map((box) => of(box)[axis]).reduce((a, b) => (least ? Math.min(a, b) : Math.max(a, b)));
  return {
    min: [pick(({ min }) => min, true, 0), pick(({ min }) => min, true, 1), pick(({ min }) => min, true, 2)],
    max: [pick(({ max }) => max, false, 0), pick(({ max }) => max, false, 1), pick(({ max }) => max, false, 2)],
  };
}

/** Distance in plan from a box, metres; 0 inside. */
export function distanceOutside(box: Box, at: Vec3): number {
  const dx = Math.max(box.min[0] - at[0], 0, at[0] - box.max[0]);
  const dy = Math.max(box.min[1] - at[1], 0, at[1] - box.max[1]);
  return Math.hypot(dx, dy);
}
