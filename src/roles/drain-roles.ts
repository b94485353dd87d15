import type { DrainRole } from '../codes/role.ts';
import type { JointId, PipeId } from '../network/network.ts';
import type { Paths } from '../paths/paths.ts';
import type { Stack, StackContext } from './find-stacks.ts';
import type { Battery } from './roles.ts';

/** What every wet pipe is as a drain; null for dry pipes. Portion `outlet` marks what lies before a trap. */
export function drainRoles(
  context: StackContext,
  outlet: readonly boolean[],
  inStack: readonly (Stack | null)[],
  stacks: readonly Stack[],
  batteries: readonly Battery[],
  outside: readonly boolean[],
): (DrainRole | null)[] {
  const { network, paths, loads } = context;
  const oneTrap = throughOneTrap(paths);
  const roles: (DrainRole | null)[] = network.pipes.map(({ id }) => {
    if (!paths.wet[id]) return null;
    if (outlet[id]) return 'fixture-drain';
    const stack = inStack[id];
    if (stack !== null && stack !== undefined) return 'stack';
    const { from, to } = loads.pipes[id]!;
    return to - from < 2 || oneTrap[id] ? 'fixture-drain' : 'branch';
  });
  const inBattery = new Set(batteries.flatMap(({ facts }) => facts.line));
  for (const pipe of buildingDrain(context, inStack, stacks, batteries)) {
    if (!inBattery.has(pipe) && !outlet[pipe]) roles[pipe] = 'building-drain';
  }
  for (const { id } of network.pipes) if (roles[id] !== null && outside[id]) roles[id] = 'building-sewer';
  return roles;
}

/**
 * Of branches and fixture drains, what their way downstream comes to first: a stack, or the building drain, which is also
 * what leaves the building without one. By pipe id.
 */
export function drainEnds(
  { inFlowOrder, next }: Paths,
  drains: readonly (DrainRole | null)[],
): ('stack' | 'building-drain' | null)[] {
  const ends: ('stack' | 'building-drain' | null)[] = drains.map(() => null);
  const isLine = (pipe: PipeId): boolean => drains[pipe] === 'branch' || drains[pipe] === 'fixture-drain';
  for (const pipe of [...inFlowOrder].reverse()) {
    if (!isLine(pipe)) continue;
    const down = next[pipe];
    ends[pipe] =
      down === null || down === undefined
        ? 'building-drain'
        : isLine(down)
          ? ends[down]!
          : drains[down] === 'stack'
            ? 'stack'
            : 'building-drain';
  }
  return ends;
}

/** By pipe id: all water that passes came through one drawn trap, whatever number of fixtures stand over it. */
function throughOneTrap({ inFlowOrder, entering, traps, next, wet }: Paths): boolean[] {
  const none = -1;
  const several = -2;
  const trapOf = new Int32Array(wet.length).fill(none);
  const add = (pipe: PipeId, trap: number): void => {
    trapOf[pipe] = trapOf[pipe] === none || trapOf[pipe] === trap ? trap : several;
  };
  for (const pipe of inFlowOrder) {
    for (const fixture of entering[pipe]!) {
      const { how, at } = traps[fixture]!;
      add(pipe, how === 'drawn' ? at : several);
    }
    const down = next[pipe];
    if (down !== null && down !== undefined) add(down, trapOf[pipe]!);
  }
  return Array.from(trapOf, (trap) => trap >= 0);
}

/**
 * From the feet of the stacks to the sewer; without stacks from below the last row or drop (DESIGN, roles), unless the
 * piping is cut off: nobody knows what it goes on as.
 */
function buildingDrain(
  context: StackContext,
  inStack: readonly (Stack | null)[],
  stacks: readonly Stack[],
  batteries: readonly Battery[],
): Set<PipeId> {
  const { paths } = context;
  const drain = new Set<PipeId>();
  const withStack = new Set<PipeId>();
  for (const { foot } of stacks) {
    const below = downstreamOf(context, foot);
    for (const pipe of below) withStack.add(pipe);
    if (below.some((pipe) => inStack[pipe] !== null)) continue;
    for (const pipe of below) drain.add(pipe);
  }
  for (const { pipes, isCutOff } of paths.systems) {
    if (isCutOff) continue;
    const own = pipes.filter((pipe) => paths.wet[pipe]);
    if (own.some((pipe) => inStack[pipe] !== null)) continue;
    for (const pipe of drainWithoutStack(context, own, batteries)) drain.add(pipe);
  }
  return drain;
}

function downstreamOf({ paths }: StackContext, pipe: PipeId): PipeId[] {
  const below: PipeId[] = [];
  for (let next = paths.next[pipe] ?? null; next !== null; next = paths.next[next] ?? null) below.push(next);
  return below;
}

function drainWithoutStack(context: StackContext, own: readonly PipeId[], batteries: readonly Battery[]): PipeId[] {
  const { paths, stream, loads } = context;
  const last = own.find((pipe) => paths.next[pipe] === null);
  if (last === undefined) return [];
  const trunk: PipeId[] = [last];
  for (;;) {
    const heaviest = [...stream.inflows[stream.up(trunk[0]!)]!].sort(
      (a, b) => loads.pipes[b]!.load - loads.pipes[a]!.load || a - b,
    )[0];
    if (heaviest === undefined) break;
    trunk.unshift(heaviest);
  }
  const rowEnds = new Set<JointId>(batteries.flatMap(({ facts }) => facts.line.map((pipe) => stream.down(pipe))));
  const lastRow = trunk.findLastIndex((pipe) => rowEnds.has(stream.down(pipe)));
  const isBranch = (pipe: PipeId): boolean => loads.pipes[pipe]!.to - loads.pipes[pipe]!.from >= 2;
  const meeting = trunk.findIndex(
    (pipe, at) => at > lastRow && stream.inflows[stream.up(pipe)]!.filter(isBranch).length >= 2,
  );
  if (meeting >= 0) return trunk.slice(meeting);
  const lastFixture = trunk.findLastIndex((pipe) => stream.inflows[stream.up(pipe)]!.length > 1);
  const drop = trunk.findLastIndex((pipe, at) => at >= lastFixture && at > lastRow && paths.vertical[pipe] === true);
  return drop < 0 ? [] : trunk.slice(drop + 1);
}
