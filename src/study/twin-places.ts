import { grown } from '../geometry/box.ts';
import { boxGrid } from '../geometry/box-grid.ts';
import { distance, subtract, type Vec3 } from '../geometry/vector.ts';
import type { PipeId } from '../network/network.ts';
import type { FixtureId } from '../paths/paths.ts';
import type { Outcome } from '../verdicts/outcome.ts';
import type { Unit } from './twin-units.ts';

/** Things at one place in two parts lie within this of each other, metres. */
export const same = 0.15;

/** Where the things of all parts stand and who uses them, gathered once: parts are compared many times. */
export interface TwinPlaces {
  readonly outcome: Outcome;
  /** Where a fixture's outlet stands, counted from its part's origin; null without geometry. */
  fixtureAt(unit: Unit, fixture: FixtureId): Vec3 | null;
  /** Middle of a pipe, counted likewise. */
  pipeAt(unit: Unit, pipe: PipeId): Vec3 | null;
  /** Some pipe of that kind, wet or dry, has its middle at this place of the part, whomever it serves. */
  hasPipeAt(unit: Unit, at: Vec3, wet: boolean): boolean;
  /** Traps whose vents pass a pipe. By pipe id. */
  readonly ventedThrough: Int32Array;
  /** What errors are about. */
  readonly wrong: ReadonlySet<number>;
}

export function twinPlaces(outcome: Outcome): TwinPlaces {
  const { network, paths, shown, findings } = outcome;
  const middles = network.pipes.map(({ points }): Vec3 | null => {
    if (points === null) return null;
    const [a, b] = [points[0]!, points[points.length - 1]!];
    return [(a[0] + b[0]) / 2, (a[1] + b[1]) / 2, (a[2] + b[2]) / 2];
  });
  const grid = boxGrid(middles.map((middle) => (middle === null ? null : { min: middle, max: middle })));
  const ventedThrough = new Int32Array(network.pipes.length);
  for (const { vents } of shown.roles.venting) for (const pipe of new Set(vents)) ventedThrough[pipe]!++;
  const from = (at: Vec3 | null, { origin }: Unit): Vec3 | null => (at === null ? null : subtract(at, origin));
  return {
    outcome,
    fixtureAt: (unit, fixture) => from(network.joints[paths.fixtures[fixture]!.outlet]!.at, unit),
    pipeAt: (unit, pipe) => from(middles[pipe]!, unit),
    hasPipeAt: (unit, at, wet) => {
      const [x, y, z] = unit.origin;
      const world: Vec3 = [at[0] + x, at[1] + y, at[2] + z];
      let found = false;
      // The grid only proposes: the last digits of two sums differ.
      grid.touching(grown({ min: world, max: world }, 2 * same), (pipe) => {
        const middle = paths.wet[pipe] === wet ? from(middles[pipe]!, unit) : null;
        if (middle !== null && distance(at, middle) <= same) found = true;
      });
      return found;
    },
    ventedThrough,
    wrong: new Set(findings.flatMap(({ severity, about }) => (severity === 'error' ? about : []))),
  };
}

/**
 * Things of a part in the order given, found by place: those within `same` of a point along x, of which the caller
 * measures the rest. Without a place a thing is never found.
 */
export function alongX<T>(things: readonly T[], placeOf: (thing: T) => Vec3 | null): (at: Vec3) => readonly T[] {
  const placed = things.flatMap((thing, order) => {
    const at = placeOf(thing);
    return at === null ? [] : [{ thing, order, x: at[0] }];
  });
  placed.sort((a, b) => a.x - b.x || a.order - b.order);
  return ([x]) => {
    let [low, high] = [0, placed.length];
    while (low < high) {
      const middle = (low + high) >> 1;
      if (placed[middle]!.x < x - 2 * same) low = middle + 1;
      else high = middle;
    }
    const found: typeof placed = [];
    for (let at = low; at < placed.length && placed[at]!.x <= x + 2 * same; at++) found.push(placed[at]!);
    return found.sort((a, b) => a.order - b.order).map(({ thing }) => thing);
  };
}
