import type { ElementId, Model } from '../model/model.ts';
import type { Network } from '../network/network.ts';
import type { FixturePath } from '../paths/paths.ts';

export interface Floors {
  /** Lowest first, metres. Storey of plumbing i lies between floor i and floor i + 1. */
  readonly elevations: readonly number[];
  /** No storeys in the model: one for each 3 m. */
  readonly assumed: boolean;
  /** Storey of plumbing at a height: the highest floor not above it; 0 below the lowest. */
  at(z: number): number;
  /** Storey a fixture stands on: the model's word, else the height of its outlet. */
  of(fixture: FixturePath): number;
  /** The heights between `low` and `high` cover at least half of some storey. */
  passes(low: number, high: number): boolean;
}

const assumedHeight = 3;
/** Storeys of several files, and half-storeys of one, that lie closer are one floor. */
const sameFloor = 0.6;
/** A closet's outlet may lie this far below its floor. */
const belowFloor = 0.5;

export function floorsOf(model: Model, network: Network, fixtures: readonly FixturePath[]): Floors {
  const stated: number[] = [];
  for (const { elevation } of model.storeys) {
    const last = stated[stated.length - 1];
    if (last === undefined || elevation - last > sameFloor) stated.push(elevation);
  }
  const assumed = stated.length === 0;
  const elevations = assumed ? assumedFloors(network, fixtures) : stated;
  const at = (z: number): number =>
    Math.max(
      0,
      elevations.findLastIndex((elevation) => elevation <= z + belowFloor),
    );
  const floorOfStorey = model.storeys.map(({ elevation }) =>
    Math.max(
      0,
      elevations.findLastIndex((e) => e <= elevation + 1e-9),
    ),
  );
  const storeyOf = (element: ElementId): number | null => {
    const storey = model.elements[element]!.storey;
    return storey === null || assumed ? null : (floorOfStorey[storey] ?? null);
  };
  return {
    elevations,
    assumed,
    at,
    of: ({ element, outlet }) => storeyOf(element) ?? at(network.joints[outlet]!.at?.[2] ?? 0),
    passes: (low, high) =>
      elevations.some((floor, index) => {
        const top = elevations[index + 1] ?? floor + assumedHeight;
        return Math.min(high, top) - Math.max(low, floor) >= (top - floor) / 2 - 1e-9;
      }),
  };
}

/** From the lowest fixture up to the highest joint. */
function assumedFloors(network: Network, fixtures: readonly FixturePath[]): number[] {
  const outlets = fixtures.flatMap(({ outlet }) => network.joints[outlet]!.at?.[2] ?? []);
  if (outlets.length === 0) return [0];
  const low = Math.min(...outlets);
  let top = low;
  for (const { at } of network.joints) if (at !== null && at[2] > top) top = at[2];
  return Array.from(
    { length: Math.max(1, Math.ceil((top - low) / assumedHeight)) },
    (_, floor) => low + floor * assumedHeight,
  );
}
