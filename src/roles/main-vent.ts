import type { MainVentUse } from '../codes/use.ts';
import type { PipeId } from '../network/network.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import type { BatteryContext } from './battery-facts.ts';
import type { DryRole } from './dry-roles.ts';
import type { VentFoot } from './roles.ts';

/** For every stack vent to the sky: the other vents of its building drain, and which stacks come first. */
export function mainVentUses(
  context: BatteryContext,
  feet: readonly VentFoot[],
  dry: ReadonlyMap<PipeId, DryRole>,
): Map<PipeId, MainVentUse> {
  const { stacks, loads } = context;
  const uses = new Map<PipeId, MainVentUse>();
  const systemOf = systemByFoot(context, feet);
  const ranked = [...stacks].sort((a, b) => loads.pipes[b.foot]!.load - loads.pipes[a.foot]!.load || a.id - b.id);
  ranked.forEach((stack, place) => {
    const own = feet.find(({ path }) => dry.get(path[0]!)?.role === 'stack-vent' && dry.get(path[0]!)?.stack === stack);
    if (own === undefined) return;
    const system = systemOf.get(own);
    const rivals = feet.filter((foot) => foot !== own && systemOf.get(foot) === system);
    const use: MainVentUse = {
      others: rivals.map(({ path }) => path),
      drawn: widestDrawn(context, [own, ...rivals]),
      before: ranked
        .slice(0, place)
        .filter(({ top }) => systemOfPipe(context, top) === system)
        .map(({ foot }) => foot),
    };
    for (const pipe of own.path) if (!uses.has(pipe)) uses.set(pipe, use);
  });
  return uses;
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

function systemByFoot(context: BatteryContext, feet: readonly VentFoot[]): Map<VentFoot, number | null> {
  return new Map(feet.map((foot) => [foot, systemOfPipe(context, foot.path[0]!)]));
}

const systems = new WeakMap<object, Map<PipeId, number>>();
function systemOfPipe({ paths }: BatteryContext, pipe: PipeId): number | null {
  let known = systems.get(paths.systems);
  if (known === undefined) {
    known = new Map(paths.systems.flatMap(({ pipes }, index) => pipes.map((one): [PipeId, number] => [one, index])));
    systems.set(paths.systems, known);
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
    const shared = paths[0]!.filter((pipe) => paths.every((path) => path.includes(pipe)));
    for (const pipe of paths.length === 1 ? paths[0]! : shared) only.add(pipe);
  }
  return only;
}
