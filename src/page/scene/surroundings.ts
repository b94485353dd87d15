import type { Building } from '../building.ts';
import type { Bounds } from './orbit.ts';

export function boxOf(building: Building, fixture: number): Bounds | null {
  const { minX, minY, minZ, maxX, maxY, maxZ } = building.data.scene.fixtures;
  if (maxX[fixture]! <= minX[fixture]!) return null;
  return {
    min: [minX[fixture]! / 1000, minY[fixture]! / 1000, minZ[fixture]! / 1000],
    max: [maxX[fixture]! / 1000, maxY[fixture]! / 1000, maxZ[fixture]! / 1000],
  };
}

export function fixtureBounds(building: Building): Bounds | null {
  const boxes = building.result.fixtures.flatMap((_, row) => boxOf(building, row) ?? []);
  if (boxes.length === 0) return null;
  const edge = (end: 'min' | 'max', of: (...values: number[]) => number) => (axis: 0 | 1 | 2) =>
    of(...boxes.map((box) => box[end][axis]));
  const [low, high] = [edge('min', Math.min), edge('max', Math.max)];
  return { min: [low(0), low(1), low(2)], max: [high(0), high(1), high(2)] };
}

/** The whole building where there is no piping in it; a room's worth of nothing where there is no building either. */
export function fabricBounds(building: Building): Bounds {
  const { x, y, base, top } = building.data.scene.fabric;
  if (x.length === 0) return { min: [-2, -2, 0], max: [2, 2, 3] };
  const least = (values: Int32Array): number => values.reduce((a, b) => Math.min(a, b)) / 1000;
  const most = (values: Int32Array): number => values.reduce((a, b) => Math.max(a, b)) / 1000;
  return { min: [least(x), least(y), least(base)], max: [most(x), most(y), most(top)] };
}

/** The walls round the piping belong to the first picture; a whole site beside it does not. */
export function withFabric(building: Building, piped: Bounds): Bounds {
  const { fabric } = building.data.scene;
  const span = Math.max(...([0, 1, 2] as const).map((axis) => piped.max[axis] - piped.min[axis]), 4);
  const min: [number, number, number] = [...piped.min];
  const max: [number, number, number] = [...piped.max];
  const stretch = (axis: 0 | 1 | 2, millimetres: number): void => {
    const metres = millimetres / 1000;
    if (metres < piped.min[axis] - span || metres > piped.max[axis] + span) return;
    min[axis] = Math.min(min[axis], metres);
    max[axis] = Math.max(max[axis], metres);
  };
  for (const x of fabric.x) stretch(0, x);
  for (const y of fabric.y) stretch(1, y);
  for (const z of [...fabric.base, ...fabric.top]) stretch(2, z);
  return { min, max };
}

export const widened = ({ min, max }: Bounds, by: number): Bounds => ({
  min: [min[0] - by, min[1] - by, min[2] - by],
  max: [max[0] + by, max[1] + by, max[2] + by],
});

export const within = (a: Bounds, b: Bounds): Bounds => ({
  min: [Math.max(a.min[0], b.min[0]), Math.max(a.min[1], b.min[1]), Math.max(a.min[2], b.min[2])],
  max: [Math.min(a.max[0], b.max[0]), Math.min(a.max[1], b.max[1]), Math.min(a.max[2], b.max[2])],
});

/** How far below a floor the pipes hang that serve it, and so how far below the next one a storey's picture ends. */
const underFloor = 0.6;

/** What is seen of one storey: from the pipes under its floor to just under those of the next. */
export function storeyBox(building: Building, storey: number | null): Bounds | null {
  if (storey === null) return null;
  const { storeys } = building.data.scene;
  const floor = (index: number): number | undefined => {
    const elevation = storeys[index]?.elevation;
    return elevation === undefined ? undefined : elevation / 1000 - underFloor;
  };
  const low = storey === 0 ? -1e9 : (floor(storey) ?? -1e9);
  return { min: [-1e9, -1e9, low], max: [1e9, 1e9, floor(storey + 1) ?? 1e9] };
}
