import type { VentUse } from '../codes/use.ts';
import { statedUses } from '../loads/uses-apart.ts';
import type { PipeId } from '../network/network.ts';
import type { FixtureId } from '../paths/paths.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import { type Load, noLoad } from '../units/quantity.ts';
import type { BatteryContext } from './battery-context.ts';
import type { DryRole, VentTree } from './dry-roles.ts';
import type { Stack } from './find-stacks.ts';
import type { Battery, VentFoot } from './roles.ts';

/** Whose air passes a dry pipe. One object for a run of pipes in which nothing joins. */
export interface Gathered {
  /** Every trap that breathes here, each once. */
  readonly traps: ReadonlySet<FixtureId>;
  readonly stacks: ReadonlySet<number>;
  readonly feet: readonly VentFoot[];
}

/** Vents that follow another pipe's size: no load, no length, unless traps breathe through them as well. */
export const followers: ReadonlySet<string> = new Set([
  'relief-vent',
  'additional-circuit-vent',
  'yoke-vent',
  'offset-relief-vent',
]);

/** From the feet to the sky, by dry pipe. */
export function gatherAir(
  tree: VentTree,
  roles: ReadonlyMap<PipeId, DryRole>,
  batteries: readonly Battery[],
): ReadonlyMap<PipeId, Gathered> {
  const open = new Set<FixtureId>(
    batteries.flatMap(({ facts }) => (facts.open === null ? [] : facts.traps.map(({ fixture }) => fixture))),
  );
  const gathered = new Map<PipeId, Gathered>();
  for (const pipe of tree.order) {
    const parts = (tree.below.get(pipe) ?? []).map((below) => gathered.get(below)!);
    const own = tree.footOf.get(pipe);
    if (own !== undefined) parts.push(atFoot(own, roles.get(pipe)!, batteries, open));
    gathered.set(pipe, parts.length === 1 ? parts[0]! : joined(parts));
  }
  return gathered;
}

function joined(parts: readonly Gathered[]): Gathered {
  const traps = new Set<FixtureId>();
  const stacks = new Set<number>();
  const feet: VentFoot[] = [];
  for (const part of parts) {
    for (const trap of part.traps) traps.add(trap);
    for (const stack of part.stacks) stacks.add(stack);
    for (const foot of part.feet) feet.push(foot);
  }
  return { traps, stacks, feet };
}

function atFoot(
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
  return { traps: new Set(traps), stacks: new Set(isStack && stack !== null ? [stack.id] : []), feet: [foot] };
}

export type AirTotals = Pick<VentUse, 'load' | 'largest' | 'statedUses' | 'closets' | 'counts'> & {
  readonly largestTrap: NominalSize | null;
};

/** What the traps that breathe through a pipe come to. */
export function airTotals(context: BatteryContext, sum: Gathered): AirTotals {
  const { loads, code, kindOf, frequencyOf } = context;
  const counts: Record<string, number> = {};
  for (const { id } of code.counts) counts[id] = 0;
  const stated: { frequency: number | null; load: Load }[] = [];
  let largest = noLoad;
  let largestTrap: NominalSize | null = null;
  let closets = 0;
  for (const fixture of sum.traps) {
    const { row, trap, load } = loads.fixtures[fixture]!;
    if (load > largest) largest = load;
    largestTrap = largestTrap === null ? trap : code.series.larger(largestTrap, trap);
    if (row.closet) closets++;
    stated.push({ frequency: frequencyOf(fixture), load });
    const kind = kindOf(fixture);
    for (const { id, takes } of code.counts) if (takes({ kind, row, trap, load })) counts[id]!++;
  }
  return { load: loadOf(context, sum), largest, statedUses: statedUses(stated), closets, counts, largestTrap };
}

/**
 * Whole loads at the feet of the stacks, and the fixtures of other vents that drain into none of them. A bathroom group
 * whose air passes whole counts its own figure, as on a drain.
 */
function loadOf({ loads, stacks }: BatteryContext, sum: Gathered): Load {
  const drained = outermost([...sum.stacks].map((id) => loads.pipes[(stacks[id] as Stack).foot]!));
  let total = drained.reduce((all, { load }) => all + load, 0);
  const place = placeInOrder(loads.order);
  const counted = new Set<FixtureId>();
  for (const fixture of sum.traps) {
    if (!isWithin(drained, place.get(fixture)!)) counted.add(fixture);
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

interface Stretch {
  readonly from: number;
  readonly to: number;
  readonly load: Load;
}

/** A stack that drains into another of the list is counted with that one. In order, without overlap. */
function outermost(stretches: readonly Stretch[]): Stretch[] {
  const found: Stretch[] = [];
  for (const one of [...stretches].sort((a, b) => a.from - b.from || b.to - a.to)) {
    const last = found.at(-1);
    if (last === undefined || one.from >= last.to) found.push(one);
  }
  return found;
}

/** Whether a place lies in one of the stretches, which are in order. */
function isWithin(stretches: readonly Stretch[], at: number): boolean {
  let low = 0;
  let high = stretches.length - 1;
  while (low <= high) {
    const middle = (low + high) >> 1;
    const { from, to } = stretches[middle]!;
    if (at < from) high = middle - 1;
    else if (at >= to) low = middle + 1;
    else return true;
  }
  return false;
}

const places = new WeakMap<readonly FixtureId[], Map<FixtureId, number>>();
function placeInOrder(order: readonly FixtureId[]): Map<FixtureId, number> {
  const known = places.get(order) ?? new Map(order.map((fixture, at) => [fixture, at]));
  places.set(order, known);
  return known;
}
