import type { Loads } from '../loads/loads.ts';
import type { Network, PipeId } from '../network/network.ts';
import type { Paths } from '../paths/paths.ts';
import type { Stream } from '../paths/stream.ts';
import type { Floors } from './floors.ts';

/** A vertical chain, offsets included, that passes at least one storey and takes two or more fixtures. */
export interface Stack {
  readonly id: number;
  /** In flow order, offsets included. */
  readonly pipes: readonly PipeId[];
  readonly offsets: readonly { readonly pipes: readonly PipeId[]; readonly length: number }[];
  readonly top: PipeId;
  readonly foot: PipeId;
  /** Storeys from which fixtures drain, lowest first. */
  readonly served: readonly number[];
  /** Storeys that the chain passes or serves. */
  readonly height: number;
  readonly closets: number;
}

export interface StackContext {
  readonly network: Network;
  readonly paths: Paths;
  readonly stream: Stream;
  readonly loads: Loads;
  readonly floors: Floors;
}

/** A limb shorter than this, metres, is a drop in a drain and makes no offset of what lies beside it. */
const leastLimb = 1;

interface Limb {
  readonly pipes: PipeId[];
  readonly low: number;
  readonly high: number;
}

/** A level drain that drops on its way to the top of a stack is a branch of it: no storey is passed before the stack begins. */
const isDropAbove = (limb: Limb, below: Limb, floors: Floors): boolean =>
  floors.passes(below.low, below.high) && !floors.passes(limb.low, limb.high);

export function findStacks(context: StackContext, outlet: readonly boolean[]): Stack[] {
  const { paths, loads, floors } = context;
  const limbs = findLimbs(context, outlet);
  const limbOfTop = new Map<PipeId, Limb>(limbs.map((limb) => [limb.pipes[0]!, limb]));
  const follower = new Map<Limb, { way: PipeId[]; limb: Limb }>();
  const feeders = new Map<Limb, number>();
  for (const limb of limbs) {
    if (limb.high - limb.low < leastLimb) continue;
    const way: PipeId[] = [];
    let pipe = paths.next[limb.pipes.at(-1)!] ?? null;
    while (pipe !== null && paths.vertical[pipe] !== true) {
      way.push(pipe);
      pipe = paths.next[pipe] ?? null;
    }
    const below = pipe === null ? undefined : limbOfTop.get(pipe);
    if (way.length === 0 || below === undefined || below.high - below.low < leastLimb) continue;
    if (isDropAbove(limb, below, floors)) continue;
    follower.set(limb, { way, limb: below });
    feeders.set(below, (feeders.get(below) ?? 0) + 1);
  }
  const continued = new Set<Limb>();
  for (const [limb, { limb: below }] of follower) {
    if (feeders.get(below) === 1) continued.add(below);
    else follower.delete(limb);
  }
  const stacks: Stack[] = [];
  for (const first of limbs) {
    if (continued.has(first)) continue;
    const chain = [first];
    const pipes = [...first.pipes];
    const offsets: { pipes: PipeId[]; length: number }[] = [];
    for (let step = follower.get(first); step !== undefined; step = follower.get(step.limb)) {
      offsets.push({ pipes: step.way, length: step.way.reduce((sum, pipe) => sum + context.stream.span(pipe), 0) });
      pipes.push(...step.way, ...step.limb.pipes);
      chain.push(step.limb);
    }
    const foot = pipes.at(-1)!;
    const { from, to, closets } = loads.pipes[foot]!;
    const low = chain.at(-1)!.low;
    if (to - from < 2 || !floors.passes(low, first.high)) continue;
    const served = [...new Set(loads.order.slice(from, to).map((fixture) => floors.of(paths.fixtures[fixture]!)))].sort(
      (a, b) => a - b,
    );
    const passed = floors.elevations.filter((_, storey) =>
      floors.passes(
        Math.max(low, floors.elevations[storey]!),
        Math.min(first.high, floors.elevations[storey + 1] ?? first.high),
      ),
    ).length;
    stacks.push({
      id: stacks.length,
      pipes,
      offsets,
      top: pipes[0]!,
      foot,
      served,
      height: Math.max(passed, served.length),
      closets,
    });
  }
  return stacks;
}

/** Vertical wet pipes in a line; where several fall into one, the heaviest goes on and the others end there. */
function findLimbs({ network, paths, loads }: StackContext, outlet: readonly boolean[]): Limb[] {
  const isLimb = (pipe: PipeId): boolean => paths.wet[pipe]! && paths.vertical[pipe] === true && !outlet[pipe];
  const above = new Map<PipeId, PipeId>();
  for (const pipe of paths.inFlowOrder) {
    const next = paths.next[pipe] ?? null;
    if (next === null || !isLimb(pipe) || !isLimb(next)) continue;
    const rival = above.get(next);
    if (rival === undefined || loads.pipes[pipe]!.load > loads.pipes[rival]!.load) above.set(next, pipe);
  }
  const goesOn = new Set(above.values());
  const limbs: Limb[] = [];
  for (const foot of paths.inFlowOrder) {
    if (!isLimb(foot) || goesOn.has(foot)) continue;
    const pipes: PipeId[] = [foot];
    for (let pipe = above.get(foot); pipe !== undefined; pipe = above.get(pipe)) pipes.unshift(pipe);
    const heights = pipes.flatMap((pipe) =>
      network.pipes[pipe]!.ends.flatMap((joint) => network.joints[joint]!.at?.[2] ?? []),
    );
    limbs.push({ pipes, low: Math.min(...heights), high: Math.max(...heights) });
  }
  return limbs.sort((a, b) => a.pipes[0]! - b.pipes[0]!);
}
