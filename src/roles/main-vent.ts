import type { MainVentUse } from '../codes/use.ts';
import type { PipeId } from '../network/network.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import type { BatteryContext } from './battery-context.ts';
import type { DryRole } from './dry-roles.ts';
import type { Stack } from './find-stacks.ts';
import type { VentFoot } from './roles.ts';

/** For every stack vent to the sky: the vents of its building drain, and which stacks come first. */
export function mainVentUses(
  context: BatteryContext,
  feet: readonly VentFoot[],
  dry: ReadonlyMap<PipeId, DryRole>,
): Map<PipeId, MainVentUse> {
  const { stacks, loads } = context;
  const uses = new Map<PipeId, MainVentUse>();
  const systems = new Map<number | null, { feet: VentFoot[]; ways: (readonly PipeId[])[]; before: PipeId[] }>();
  const stackVents = new Map<Stack, VentFoot>();
  for (const foot of feet) {
    const system = systemOfPipe(context, foot.path[0]!);
    const known = systems.get(system);
    if (known === undefined) systems.set(system, { feet: [foot], ways: [foot.path], before: [] });
    else {
      known.feet.push(foot);
      known.ways.push(foot.path);
    }
    const it = dry.get(foot.path[0]!);
    if (it?.role === 'stack-vent' && it.stack !== null && !stackVents.has(it.stack)) stackVents.set(it.stack, foot);
  }
  const drawn = new Map([...systems].map(([system, its]) => [system, widestDrawn(context, its.feet)]));
  const ranked = [...stacks].sort((a, b) => loads.pipes[b.foot]!.load - loads.pipes[a.foot]!.load || a.id - b.id);
  for (const stack of ranked) {
    const system = systemOfPipe(context, stack.top);
    const its = systems.get(system);
    if (its === undefined) continue;
    const own = stackVents.get(stack);
    if (own !== undefined) {
      const use: MainVentUse = {
        own: own.path,
        ways: its.ways,
        drawn: drawn.get(system) ?? null,
        drain: lastPipe(context, system),
        before: [...its.before],
      };
      for (const pipe of own.path) if (!uses.has(pipe)) uses.set(pipe, use);
    }
    its.before.push(stack.foot);
  }
  return uses;
}

/** Where the water of a system leaves the building. */
function lastPipe({ paths }: BatteryContext, system: number | null | undefined): PipeId | null {
  const own = system === null || system === undefined ? [] : paths.systems[system]!.pipes;
  return own.find((pipe) => paths.wet[pipe] && paths.next[pipe] === null) ?? null;
}

/** The widest way to the sky as drawn: each way is as wide as its narrowest pipe; null where sizes are missing. */
export function widestDrawn(
  { loads, code }: Pick<BatteryContext, 'loads' | 'code'>,
  feet: readonly VentFoot[],
): NominalSize | null {
  let widest: NominalSize | null = null;
  for (const { path } of feet) {
    const sizes = path.map((pipe) => loads.modelled[pipe]!.size);
    if (sizes.some((size) => size === null)) continue;
    const narrowest = (sizes as NominalSize[]).reduce((a, b) => (code.series.rank(a) <= code.series.rank(b) ? a : b));
    widest = widest === null ? narrowest : code.series.larger(widest, narrowest);
  }
  return widest;
}

const systemsOf = new WeakMap<object, Map<PipeId, number>>();
function systemOfPipe({ paths }: BatteryContext, pipe: PipeId): number | null {
  let known = systemsOf.get(paths.systems);
  if (known === undefined) {
    known = new Map(paths.systems.flatMap(({ pipes }, index) => pipes.map((one): [PipeId, number] => [one, index])));
    systemsOf.set(paths.systems, known);
  }
  return known.get(pipe) ?? null;
}

/** Pipes of the single widest way to the sky of each system, as drawn: the others are narrower or of unknown size. */
export function onlyWidestVents(context: BatteryContext, feet: readonly VentFoot[]): Set<PipeId> {
  const { code } = context;
  const best = new Map<number | null, { rank: number; paths: (readonly PipeId[])[] }>();
  for (const foot of feet) {
    const width = widestDrawn(context, [foot]);
    if (width === null) continue;
    const system = systemOfPipe(context, foot.path[0]!);
    const rank = code.series.rank(width);
    const known = best.get(system);
    if (known === undefined || rank > known.rank) best.set(system, { rank, paths: [foot.path] });
    else if (rank === known.rank) known.paths.push(foot.path);
  }
  const only = new Set<PipeId>();
  for (const { paths } of best.values()) {
    const passes = new Map<PipeId, number>();
    for (const path of paths) for (const pipe of path) passes.set(pipe, (passes.get(pipe) ?? 0) + 1);
    for (const [pipe, count] of passes) if (count === paths.length) only.add(pipe);
  }
  return only;
}
