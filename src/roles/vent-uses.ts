import type { VentUse } from '../codes/use.ts';
import type { PipeId } from '../network/network.ts';
import type { FixtureId } from '../paths/paths.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import type { Load } from '../units/quantity.ts';
import type { BatteryContext } from './battery-facts.ts';
import type { DryRole, VentTree } from './dry-roles.ts';
import { type Stack, stackUseAt } from './find-stacks.ts';
import type { Battery, VentFoot } from './roles.ts';

const stackish: ReadonlySet<string> = new Set(['stack-vent', 'vent-stack', 'vent-header']);
/** Vents that follow another pipe's size: no load, no length, unless traps breathe through them as well. */
const followers: ReadonlySet<string> = new Set([
  'relief-vent',
  'additional-circuit-vent',
  'yoke-vent',
  'offset-relief-vent',
]);

/** Load, length and largest trap that enter the vent tables, for every used dry pipe. */
export function ventUses(
  context: BatteryContext,
  tree: VentTree,
  roles: ReadonlyMap<PipeId, DryRole>,
  batteries: readonly Battery[],
): Map<PipeId, VentUse> {
  const { stream, stacks } = context;
  const uses = new Map<PipeId, VentUse>();
  const gathered = new Map<PipeId, Gathered>();
  const ends = footLengths(context, tree, roles, batteries);
  const stackUses = new Map<number, ReturnType<typeof stackUseAt>>(
    stacks.map((stack) => [stack.id, stackUseAt(context, stack, stack.foot)]),
  );
  const firstOfBattery = new Map<number, PipeId>();
  const ventOfStack = new Map<number, PipeId>();
  for (const pipe of tree.order) {
    const it = roles.get(pipe)!;
    if (it.role === 'circuit-vent' && it.battery !== null && !firstOfBattery.has(it.battery))
      firstOfBattery.set(it.battery, pipe);
    if (it.role === 'stack-vent' && it.stack !== null && !ventOfStack.has(it.stack.id))
      ventOfStack.set(it.stack.id, pipe);
  }
  for (const pipe of tree.order) {
    const own = tree.footOf.get(pipe);
    const sum: Gathered = { fixtures: new Set(), stacks: new Set(), traps: new Set(), feet: [] };
    for (const below of tree.below.get(pipe) ?? []) join(sum, gathered.get(below)!);
    if (own !== undefined) join(sum, gatheredAt(own, roles.get(pipe)!, batteries));
    gathered.set(pipe, sum);
  }
  const branchLength = branchVentLengths(tree, roles, gathered, ends);
  for (const pipe of tree.order) {
    const it = roles.get(pipe)!;
    const sum = gathered.get(pipe)!;
    const stack = it.stack === null ? null : stackUses.get(it.stack.id)!;
    const length = (): number | null => {
      if (it.role === 'branch-vent') return branchLength.get(pipe) ?? null;
      if (it.role === 'vent-header') return Math.max(...sum.feet.map((foot) => ends.toSky.get(foot)!));
      if (it.role === 'stack-vent' || it.role === 'vent-stack')
        return it.foot === null ? null : ends.toSky.get(it.foot)!;
      if (
        it.role === 'circuit-vent' ||
        it.role === 'continuous-vent' ||
        (followers.has(it.role) && sum.fixtures.size > 0)
      )
        return it.foot === null ? null : ends.toStackish.get(it.foot)!;
      return null;
    };
    uses.set(pipe, {
      load: loadOf(context, sum, stacks),
      length: length(),
      largestTrap: largestTrap(context, sum, it, batteries),
      stack: it.role === 'stack-vent' || it.role === 'vent-stack' ? stack : null,
      follows:
        it.role === 'relief-vent' || it.role === 'additional-circuit-vent'
          ? (firstOfBattery.get(it.battery ?? -1) ?? null)
          : it.role === 'offset-relief-vent' && it.stack !== null
            ? (ventOfStack.get(it.stack.id) ?? null)
            : null,
      between:
        it.role === 'yoke-vent' && it.stack !== null ? yokeEnds(context, tree, roles, pipe, it.stack, it.foot!) : null,
      foot: it.foot?.joint ?? stream.up(pipe),
      wetVentStoreys:
        it.battery !== null && batteries[it.battery]!.reading === 'wet-vent'
          ? batteries[it.battery]!.facts.wet.storeys
          : 0,
    });
  }
  return uses;
}

interface Gathered {
  /** Fixtures whose own load counts, each once. */
  readonly fixtures: Set<FixtureId>;
  readonly stacks: Set<number>;
  /** Every trap that breathes here. */
  readonly traps: Set<FixtureId>;
  readonly feet: VentFoot[];
}

function join(sum: Gathered, other: Gathered): void {
  for (const fixture of other.fixtures) sum.fixtures.add(fixture);
  for (const stack of other.stacks) sum.stacks.add(stack);
  for (const trap of other.traps) sum.traps.add(trap);
  for (const foot of other.feet) sum.feet.push(foot);
}

function gatheredAt(foot: VentFoot, { role, stack, battery }: DryRole, batteries: readonly Battery[]): Gathered {
  const row = battery === null ? null : batteries[battery]!;
  const members = row?.facts.traps.map(({ fixture }) => fixture) ?? [];
  // A battery's own list counts: guests are not in it, and a longer row reaches past its first foot. Vents that follow
  // the circuit vent are sized without the row; only a trap past it that breathes here counts.
  const traps =
    row === null ? foot.traps : followers.has(role) ? foot.traps.filter((trap) => !members.includes(trap)) : members;
  const isStack = role === 'stack-vent' || role === 'vent-stack';
  return {
    fixtures: new Set(traps),
    stacks: new Set(isStack && stack !== null ? [stack.id] : []),
    traps: new Set(traps),
    feet: [foot],
  };
}

/**
 * Whole loads at the feet of the stacks, and the fixtures of other vents that drain into none of them. A bathroom group
 * whose air passes whole counts its own figure, as on a drain.
 */
function loadOf({ loads }: BatteryContext, sum: Gathered, stacks: readonly Stack[]): Load {
  let total = 0;
  const drained = [...sum.stacks].map((id) => loads.pipes[stacks[id]!.foot]!);
  for (const { load } of withoutNested(drained)) total += load;
  const place = placeInOrder(loads.order);
  const counted = new Set<FixtureId>();
  for (const fixture of sum.fixtures) {
    const at = place.get(fixture)!;
    if (!drained.some(({ from, to }) => at >= from && at < to)) counted.add(fixture);
  }
  for (const fixture of counted) total += loads.fixtures[fixture]!.load;
  const groups = new Set([...counted].flatMap((fixture) => loads.groupOf[fixture] ?? []));
  for (const group of groups) {
    const { members, figure } = loads.groups[group]!;
    if (!members.every((member) => counted.has(member))) continue;
    total -= Math.max(0, members.reduce((all, member) => all + loads.fixtures[member]!.load, 0) - figure);
  }
  return total as Load;
}

/** A stack that drains into another of the list is counted with that one. */
const withoutNested = <T extends { from: number; to: number }>(stretches: readonly T[]): T[] =>
  stretches.filter((one) => !stretches.some((other) => other !== one && other.from <= one.from && other.to >= one.to));

const places = new WeakMap<readonly FixtureId[], Map<FixtureId, number>>();
function placeInOrder(order: readonly FixtureId[]): Map<FixtureId, number> {
  const known = places.get(order) ?? new Map(order.map((fixture, at) => [fixture, at]));
  places.set(order, known);
  return known;
}

function largestTrap(
  { loads, code }: BatteryContext,
  sum: Gathered,
  { battery, role }: DryRole,
  batteries: readonly Battery[],
): NominalSize | null {
  const traps = [...sum.traps].map((fixture) => loads.fixtures[fixture]!.trap);
  if (battery !== null && followers.has(role)) traps.push(...batteries[battery]!.facts.traps.map(({ size }) => size));
  const [first, ...rest] = traps;
  return first === undefined ? null : rest.reduce((a, b) => code.series.larger(a, b), first);
}

interface FootLengths {
  /** From the drainage connection to the next stack vent, vent stack, header or open air. */
  readonly toStackish: ReadonlyMap<VentFoot, number>;
  readonly toSky: ReadonlyMap<VentFoot, number>;
}

function footLengths(
  { stream }: BatteryContext,
  tree: VentTree,
  roles: ReadonlyMap<PipeId, DryRole>,
  batteries: readonly Battery[],
): FootLengths {
  const toStackish = new Map<VentFoot, number>();
  const toSky = new Map<VentFoot, number>();
  for (const foot of tree.footOf.values()) {
    let sky = 0;
    let near = 0;
    let arrived = false;
    const start = roles.get(foot.path[0]!)!;
    for (const pipe of foot.path) {
      if (!arrived && stackish.has(roles.get(pipe)!.role) && !stackish.has(start.role)) arrived = true;
      sky += stream.span(pipe);
      if (!arrived) near += stream.span(pipe);
    }
    // A circuit vent is measured from the branch: its wet portion counts.
    const row = start.battery === null ? null : batteries[start.battery]!;
    const wet =
      start.role === 'circuit-vent' && row !== null
        ? row.facts.circuit.wetPortion.reduce((sum, pipe) => sum + stream.span(pipe), 0)
        : 0;
    toStackish.set(foot, near + wet);
    toSky.set(foot, sky + wet);
  }
  return { toStackish, toSky };
}

/** The most distant drainage connection of a branch vent, the same for every part of it. */
function branchVentLengths(
  tree: VentTree,
  roles: ReadonlyMap<PipeId, DryRole>,
  gathered: ReadonlyMap<PipeId, Gathered>,
  ends: FootLengths,
): Map<PipeId, number> {
  const lengths = new Map<PipeId, number>();
  for (const pipe of [...tree.order].reverse()) {
    if (roles.get(pipe)!.role !== 'branch-vent') continue;
    const above = tree.above.get(pipe) ?? null;
    const known = above === null ? undefined : lengths.get(above);
    lengths.set(pipe, known ?? Math.max(...gathered.get(pipe)!.feet.map((foot) => ends.toStackish.get(foot)!)));
  }
  return lengths;
}

/** The stack's pipe below a yoke vent's foot, and the vent stack's where it arrives. */
function yokeEnds(
  { stream }: BatteryContext,
  tree: VentTree,
  roles: ReadonlyMap<PipeId, DryRole>,
  pipe: PipeId,
  stack: Stack,
  foot: VentFoot,
): readonly [PipeId, PipeId] | null {
  const onStack = stack.pipes.find((one) => stream.up(one) === foot.joint) ?? stack.foot;
  for (let at: PipeId | null = pipe; at !== null; at = tree.above.get(at) ?? null) {
    if (roles.get(at)!.role === 'vent-stack') return [onStack, at];
  }
  return null;
}
