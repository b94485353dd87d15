import type { PlanPoint } from '../geometry/plan-outline.ts';
import { stretchesInside } from '../geometry/prism.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import type { Outcome } from '../verdicts/outcome.ts';
import type { RowPiece } from './row-pieces.ts';

export interface FloorHole {
  readonly size: NominalSize | null;
}

/** A pipe that passes this share of a slab's thickness goes through it. */
const through = 0.5;
/** Pieces of one pipe through one slab stand within this of one another in plan, metres. */
const sameSpot = 0.05;

/**
 * Holes through floors, by slab and then by piece: one for all pieces that follow one another through a slab. Where the
 * model draws no slabs, through the levels of its storeys.
 */
export function floorHoles({ model, network, code }: Outcome, pieces: readonly RowPiece[]): FloorHole[] {
  const floors = model.slabs.flatMap(({ box, outline }) => {
    if (box === null) return [];
    const { min, max } = box;
    const corners: PlanPoint[] = [
      [min[0], min[1]],
      [max[0], min[1]],
      [max[0], max[1]],
      [min[0], max[1]],
    ];
    return [{ outline: outline?.map(([x, y]): PlanPoint => [x, y]) ?? corners, low: min[2], high: max[2] }];
  });
  const levels = floors.length > 0 ? floors : model.storeys.map(({ elevation }) => levelAt(elevation));
  return levels.flatMap((floor) => {
    const spots: { at: PlanPoint; length: number; size: NominalSize | null }[] = [];
    for (const { pipe, size } of pieces) {
      const { points } = network.pipes[pipe]!;
      if (points === null) continue;
      const inside = stretchesInside(points, floor).filter(({ direction }) => Math.abs(direction[2]) > Math.SQRT1_2);
      const length = inside.reduce((sum, { from, to }) => sum + to - from, 0);
      if (length === 0) continue;
      const at: PlanPoint = [points[0]![0], points[0]![1]];
      const known = spots.find((spot) => Math.hypot(spot.at[0] - at[0], spot.at[1] - at[1]) <= sameSpot);
      if (known === undefined) spots.push({ at, length, size });
      else {
        known.length += length;
        known.size = known.size === null || size === null ? (known.size ?? size) : code.series.larger(known.size, size);
      }
    }
    return spots.filter(({ length }) => length >= through * (floor.high - floor.low)).map(({ size }) => ({ size }));
  });
}

/** A floor of which only the level is known, wide enough for any building. */
function levelAt(elevation: number) {
  const far = 1e6;
  const outline: PlanPoint[] = [
    [-far, -far],
    [far, -far],
    [far, far],
    [-far, far],
  ];
  return { outline, low: elevation - 0.01, high: elevation + 0.01 };
}
