import type { StackJoin, StackUse } from '../codes/stack-use.ts';
import { carriedBy } from '../loads/carried.ts';
import type { PipeId } from '../network/network.ts';
import type { FixtureId } from '../paths/paths.ts';
import { type Load, noLoad } from '../units/quantity.ts';
import type { Stack, StackContext } from './find-stacks.ts';

/** Every stack as a sizing rule sees it from each of its sections; null for pipes of none. By pipe id. */
export function stackUses(context: StackContext, stacks: readonly Stack[]): (StackUse | null)[] {
  const uses: (StackUse | null)[] = context.network.pipes.map(() => null);
  for (const stack of stacks) alongStack(context, stack, uses);
  return uses;
}

/** From the top down: each section carries what the one above it does, and what joins between them. */
function alongStack(context: StackContext, stack: Stack, uses: (StackUse | null)[]): void {
  const { loads, paths, stream } = context;
  const { load: footLoad, closets: footClosets, counts: footCounts } = loads.pipes[stack.foot]!;
  const whole = {
    id: stack.id,
    foot: stack.foot,
    footLoad,
    footClosets,
    footCounts,
    carries: carriedBy(loads, stack.foot),
    rise: stack.pipes.reduce((sum, pipe) => (paths.vertical[pipe] === true ? sum + stream.span(pipe) : sum), 0),
  };
  const joinAt = stack.pipes.map((pipe, at) => joinsAt(context, pipe, stack.pipes[at - 1]));
  const allJoins = joinAt.flatMap((join) => join ?? []);
  const storeys = storeyLoads(context);
  let joined = 0;
  let joins: readonly StackJoin[] = [];
  stack.pipes.forEach((pipe, at) => {
    storeys.carry(pipe);
    if (joinAt[at] !== null) {
      joined++;
      joins = allJoins.slice(0, joined);
    }
    uses[pipe] = { ...whole, heaviestStorey: storeys.heaviest(), joins, allJoins };
  });
}

/** What drains, or fixtures at the joint itself, bring into a stack at the head of one of its pipes; null: nothing. */
function joinsAt({ network, stream, paths, loads }: StackContext, pipe: PipeId, before?: PipeId): StackJoin | null {
  const joint = stream.up(pipe);
  const drains = stream.inflows[joint]!.filter((one) => one !== before);
  const own = paths.entering[pipe]!;
  if (drains.length === 0 && own.length === 0) return null;
  const load =
    drains.reduce((sum, one) => sum + loads.pipes[one]!.load, 0) +
    own.reduce((sum, fixture) => sum + loads.fixtures[fixture]!.load, 0);
  return { height: network.joints[joint]!.at?.[2] ?? null, load: load as Load };
}

/**
 * What each storey puts into a stack down to a section. A bathroom group that drains in whole from one storey counts its
 * own figure.
 */
function storeyLoads({ loads, paths, floors }: StackContext) {
  const byStorey = new Map<number, number>();
  const ofGroup = new Map<number, number>();
  let [first, end] = [0, 0];
  const storeyOf = (fixture: FixtureId): number => floors.of(paths.fixtures[fixture]!);
  const add = (fixture: FixtureId): void => {
    const storey = storeyOf(fixture);
    byStorey.set(storey, (byStorey.get(storey) ?? 0) + loads.fixtures[fixture]!.load);
    const group = loads.groupOf[fixture] ?? null;
    if (group === null) return;
    const inside = (ofGroup.get(group) ?? 0) + 1;
    ofGroup.set(group, inside);
    const { members, figure } = loads.groups[group]!;
    if (inside < members.length || members.some((member) => storeyOf(member) !== storey)) return;
    const sum = members.reduce((total, member) => total + loads.fixtures[member]!.load, 0);
    byStorey.set(storey, byStorey.get(storey)! - Math.max(0, sum - figure));
  };
  return {
    /** Fixtures of a pipe are one stretch of the order, which holds those of the pipe above it. */
    carry(pipe: PipeId): void {
      const { from, to } = loads.pipes[pipe]!;
      const isFirst = first === end;
      for (let at = from; at < (isFirst ? to : first); at++) add(loads.order[at]!);
      for (let at = isFirst ? to : end; at < to; at++) add(loads.order[at]!);
      [first, end] = [from, to];
    },
    /** Of equal ones the lowest. */
    heaviest(): StackUse['heaviestStorey'] {
      let found = { storey: 0, load: noLoad };
      for (const [storey, load] of byStorey)
        if (load > found.load || (load === found.load && load > 0 && storey < found.storey))
          found = { storey, load: load as Load };
      return found;
    },
  };
}
