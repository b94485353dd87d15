import type { Model } from '../model/model.ts';
import type { Network } from '../network/network.ts';
import type { Paths } from '../paths/paths.ts';
import type { ResultFixture } from '../schedule/result.ts';

/** Who drains and who breathes through which pipe of the network. -1 is none. */
export interface PathColumns {
  /** By pipe: the next one downstream, in a dry pipe the next toward the sky. */
  readonly next: Int32Array;
  /** By pipe: 1 when water (dry: air from the foot) runs from its first point to its last, -1 against it, 0 unknown. */
  readonly flow: Int32Array;
  readonly wet: Int32Array;
  /** By fixture of the result: first pipe of its water path; the rest follows `next`. */
  readonly first: Int32Array;
  /** By fixture: count of pipes before its trap; -1 where the trap is unknown. */
  readonly trapAfter: Int32Array;
  /** By fixture: counts of the pipes of its air path in `air`: trap arm, wet pipes upstream, dry pipes to the sky. */
  readonly armCount: Int32Array;
  readonly throughCount: Int32Array;
  readonly dryCount: Int32Array;
  /** By fixture: joint where the trap sits. */
  readonly trapJoint: Int32Array;
  /** The pipes of all air paths, one fixture after the other. */
  readonly air: Int32Array;
}

export function pathColumns(
  model: Model,
  network: Network,
  paths: Paths,
  rows: readonly ResultFixture[],
  rowAt: ReadonlyMap<string, number>,
): PathColumns {
  const count = rows.length;
  const filled = (value: number): Int32Array => new Int32Array(count).fill(value);
  const first = filled(-1);
  const trapAfter = filled(-1);
  const trapJoint = filled(-1);
  const armCount = filled(0);
  const throughCount = filled(0);
  const dryCount = filled(0);
  const rowOf = new Map<number, number>();
  for (const fixture of paths.fixtures) {
    const element = model.elements[fixture.element];
    const row = element && rowAt.get(`${element.globalId} ${element.stepId}`);
    if (row === undefined) continue;
    rowOf.set(fixture.id, row);
    first[row] = fixture.water[0] ?? -1;
  }
  const airs: (readonly number[])[] = rows.map(() => []);
  for (const trap of paths.traps) {
    const row = rowOf.get(trap.fixture);
    if (row === undefined) continue;
    trapAfter[row] = trap.after;
    trapJoint[row] = trap.at;
    armCount[row] = trap.arm.length;
    throughCount[row] = trap.through.length;
    dryCount[row] = trap.dry.length;
    airs[row] = [...trap.arm, ...trap.through, ...trap.dry];
  }
  return {
    next: nextPipes(network, paths),
    flow: Int32Array.from(network.pipes, ({ id, ends }) => {
      const toward = paths.toward[id];
      if (toward == null || ends[0] === ends[1]) return 0;
      return toward === ends[1] ? 1 : toward === ends[0] ? -1 : 0;
    }),
    wet: Int32Array.from(network.pipes, ({ id }) => (paths.wet[id] === true ? 1 : 0)),
    first,
    trapAfter,
    trapJoint,
    armCount,
    throughCount,
    dryCount,
    air: Int32Array.from(airs.flat()),
  };
}

function nextPipes(network: Network, paths: Paths): Int32Array {
  const next = Int32Array.from(network.pipes, ({ id }) => paths.next[id] ?? -1);
  for (const { dry } of paths.traps)
    for (let index = 0; index + 1 < dry.length; index++) {
      const pipe = dry[index]!;
      if (next[pipe] === -1) next[pipe] = dry[index + 1]!;
    }
  return next;
}
