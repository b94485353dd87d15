import type { Reading, VentUse } from '../codes/use.ts';
import type { StatedUses } from '../codes/way.ts';
import { statedUses } from '../loads/uses-apart.ts';
import type { JointId, PipeId } from '../network/network.ts';
import type { FixtureId } from '../paths/paths.ts';
import { spaceTurn } from '../paths/turns.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import type { Load } from '../units/quantity.ts';
import type { BatteryContext } from './battery-facts.ts';
import type { DryRole, VentTree } from './dry-roles.ts';
import { type Stack, stackUseAt } from './find-stacks.ts';
import type { Battery, VentFoot } from './roles.ts';
import type { StackPlace } from './stack-joints.ts';
import { footLengths, ventLengths } from './vent-lengths.ts';
import type { WetFoot } from './wet-feet.ts';

/** Vents that follow another pipe's size: no load, no length, unless traps breathe through them as well. */
const followers: ReadonlySet<string> = new Set([
  'relief-vent',
  'additional-circuit-vent',
  'yoke-vent',
  'offset-relief-vent',
]);

/** Readings under which a stack is its own vent. */
const ownVents: ReadonlySet<Reading> = new Set(['waste-stack-vent', 'single-stack']);

/** Load, length and largest trap that enter the vent tables, for every used dry pipe. */
export function ventUses(
  context: BatteryContext,
  tree: VentTree,
  roles: ReadonlyMap<PipeId, DryRole>,
  batteries: readonly Battery[],
  places: ReadonlyMap<JointId, StackPlace>,
  wet: ReadonlyMap<JointId, WetFoot>,
): Map<PipeId, VentUse> {
  const { stream, stacks, loads, code, kindOf } = context;
  const uses = new Map<PipeId, VentUse>();
  const gathered = new Map<PipeId, Gathered>();
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
  const open = new Set<FixtureId>(
    batteries.flatMap(({ facts }) => (facts.open === null ? [] : facts.traps.map(({ fixture }) => fixture))),
  );
  for (const pipe of tree.order) {
    const own = tree.footOf.get(pipe);
    const sum: Gathered = { fixtures: new Set(), stacks: new Set(), traps: new Set(), feet: [] };
    for (const below of tree.below.get(pipe) ?? []) join(sum, gathered.get(below)!);
    if (own !== undefined) join(sum, gatheredAt(own, roles.get(pipe)!, batteries, open));
    gathered.set(pipe, sum);
  }
  const lengths = ventLengths(
    context,
    tree,
    roles,
    (pipe) => gathered.get(pipe)!.feet,
    (pipe) => gathered.get(pipe)!.fixtures.size > 0,
    footLengths(context, tree, roles, batteries, wet),
  );
  for (const pipe of tree.order) {
    const it = roles.get(pipe)!;
    const sum = gathered.get(pipe)!;
    const stack = it.stack === null ? null : stackUses.get(it.stack.id)!;
    const length = lengths.get(pipe) ?? null;
    const traps = [...sum.traps];
    uses.set(pipe, {
      load: loadOf(context, sum, stacks),
      length: length?.total ?? null,
      level: length?.level ?? null,
      bends: it.foot === null ? null : bendsOf(context, roles, it.foot),
      valve: sum.feet.length > 0 && sum.feet.every(({ piece }) => breathesByValve(context, piece)),
      largest: Math.max(0, ...[...sum.fixtures].map((fixture) => loads.fixtures[fixture]!.load)) as Load,
      statedUses: usesOf(context, [...sum.fixtures]),
      closets: traps.filter((fixture) => loads.fixtures[fixture]!.row.closet).length,
      counts: Object.fromEntries(
        code.counts.map(({ id, takes }) => [
          id,
          traps.filter((fixture) => takes({ kind: kindOf(fixture), ...loads.fixtures[fixture]! })).length,
        ]),
      ),
      largestTrap: largestTrap(context, sum, it, batteries),
      stack: it.role === 'stack-vent' || it.role === 'vent-stack' ? stack : null,
      stackReading:
        it.stack === null
          ? null
          : (batteries.find(({ facts, reading }) => facts.stack?.id === it.stack?.id && ownVents.has(reading))
              ?.reading ?? null),
      stacks: [...sum.stacks].sort((a, b) => a - b).map((id) => stackUses.get(id)!),
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
      serves: it.stack?.id ?? null,
      tank: it.role === 'tank-vent' && it.foot !== null ? tankOf(context, it.foot.joint) : null,
      offset: it.role === 'offset-relief-vent' ? (places.get(it.foot!.joint)?.offset ?? null) : null,
      leaves: it.role === 'vent-stack' ? leavesAt(it.foot?.joint ?? null, places) : null,
    });
  }
  return uses;
}

/** Loads of fixtures whose frequency of use is stated, as on a drain that carried them. */
const usesOf = ({ frequencyOf, loads }: BatteryContext, fixtures: readonly FixtureId[]): StatedUses =>
  statedUses(fixtures.map((fixture) => ({ frequency: frequencyOf(fixture), load: loads.fixtures[fixture]!.load })));

/** Turns of a vent as long as it is what it starts as. */
function bendsOf({ network }: BatteryContext, roles: ReadonlyMap<PipeId, DryRole>, { path, joint }: VentFoot): number {
  const role = roles.get(path[0]!)!.role;
  const ends = path.findIndex((pipe) => roles.get(pipe)!.role !== role);
  return spaceTurn(network, ends < 0 ? path : path.slice(0, ends), joint) / quarter;
}

const quarter = 90;

/** Every way out of the piece is an air admittance valve. */
const breathesByValve = ({ paths }: BatteryContext, piece: number): boolean =>
  paths.pieces[piece]!.mouths.every(({ how }) => how === 'valve');

function tankOf({ tankAt, stream }: BatteryContext, foot: JointId): VentUse['tank'] {
  const kind = tankAt(foot);
  return kind === null ? null : { kind, inlets: stream.inflows[foot]! };
}

/** Where on its stack a vent stack starts; one whose lower part is wet starts at the stack too. */
function leavesAt(foot: JointId | null, places: ReadonlyMap<JointId, StackPlace>): VentUse['leaves'] {
  const at = foot === null ? undefined : places.get(foot)?.at;
  return at === 'drain' ? 'drain' : at === 'between' ? 'above a branch' : 'foot';
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

function gatheredAt(
  foot: VentFoot,
  { role, stack, battery }: DryRole,
  batteries: readonly Battery[],
  open: ReadonlySet<FixtureId>,
): Gathered {
  const row = battery === null || batteries[battery]!.facts.open !== null ? null : batteries[battery]!;
  const members = row?.facts.traps.map(({ fixture }) => fixture) ?? [];
  // A battery's own list counts: guests are not in it, and a longer row reaches past its first foot. Vents that follow
  // the circuit vent are sized without the row; only a trap past it that breathes here counts.
  const traps =
    row === null
      ? foot.traps
      : followers.has(role)
        ? foot.traps.filter((trap) => !members.includes(trap))
        : [...members, ...foot.traps.filter((trap) => open.has(trap))];
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
