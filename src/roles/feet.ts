import type { FreeTrapFacts, PlumbingCode } from '../codes/plumbing-code.ts';
import type { Loads } from '../loads/loads.ts';
import type { JointId, Network, PipeId } from '../network/network.ts';
import type { FixtureId, Paths, TrapAir } from '../paths/paths.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import type { Stack } from './find-stacks.ts';
import { fallAlong } from './trap-arms.ts';

/** The traps that breathe through one foot, those with their own vent and those upstream of which it stands. */
export interface FootTraps {
  readonly foot: JointId;
  readonly piece: number;
  readonly traps: readonly TrapAir[];
}

/** By foot, in the order of joints; traps by fixture. */
export function trapsByFoot(paths: Paths): FootTraps[] {
  const feet = new Map<JointId, TrapAir[]>();
  for (const trap of paths.traps) {
    if (trap.foot === null) continue;
    const there = feet.get(trap.foot);
    if (there === undefined) feet.set(trap.foot, [trap]);
    else there.push(trap);
  }
  return [...feet].sort(([a], [b]) => a - b).map(([foot, traps]) => ({ foot, piece: traps[0]!.piece ?? 0, traps }));
}

export interface FreeTrap {
  readonly rule: string;
  readonly clause: string;
}

/** Traps that a rule of the code frees of a vent, by fixture; null for all others. */
export function freeTraps(
  network: Network,
  paths: Paths,
  loads: Loads,
  code: PlumbingCode,
  stacks: readonly Stack[],
  identity: (fixture: FixtureId) => Pick<FreeTrapFacts, 'kind' | 'emergency'>,
): (FreeTrap | null)[] {
  const { stream } = paths;
  const fed = stackSizes(paths, loads, code, stacks);
  return paths.traps.map(({ fixture, after }) => {
    const { water } = paths.fixtures[fixture]!;
    const drain: PipeId[] = [];
    for (let at = after; at < water.length; at++) {
      const pipe = water[at]!;
      drain.push(pipe);
      if (stream.inflows[stream.down(pipe)]!.length > 1) break;
    }
    const first = drain[0];
    const last = drain.at(-1);
    const z = (joint: JointId): number | null => network.joints[joint]!.at?.[2] ?? null;
    const top = first === undefined ? null : z(stream.up(first));
    const bottom = last === undefined ? null : z(stream.down(last));
    const fall =
      first === undefined || top === null || bottom === null
        ? null
        : fallAlong(network, drain, stream.up(first), top - bottom);
    return code.freeOfVent({
      ...identity(fixture),
      trap: loads.fixtures[fixture]!.trap,
      length: drain.length === 0 ? null : drain.reduce((sum, pipe) => sum + stream.span(pipe), 0),
      fall: fall === null ? null : Math.max(0, fall),
      stackAbove: fed.get(water[after + drain.length] ?? null) ?? null,
    });
  });
}

/** The largest stack, as drawn, whose water passes each pipe below its foot. */
function stackSizes(
  paths: Paths,
  loads: Loads,
  { series }: PlumbingCode,
  stacks: readonly Stack[],
): ReadonlyMap<PipeId | null, NominalSize> {
  const found = new Map<PipeId, NominalSize>();
  for (const { foot } of stacks) {
    const { size } = loads.modelled[foot]!;
    if (size === null) continue;
    for (let pipe = paths.next[foot] ?? null; pipe !== null; pipe = paths.next[pipe] ?? null) {
      const known = found.get(pipe);
      if (known !== undefined && series.rank(known) >= series.rank(size)) break;
      found.set(pipe, size);
    }
  }
  return found;
}
