import type { Reading } from '../codes/reading.ts';
import type { Role } from '../codes/role.ts';
import { islandDescent } from '../codes/rules/island.ts';
import type { JointId, PipeId } from '../network/network.ts';
import type { FixtureId } from '../paths/paths.ts';
import type { BatteryContext } from './battery-context.ts';
import type { Stack } from './find-stacks.ts';
import type { Battery, VentFoot } from './roles.ts';
import type { StackPlace } from './stack-joints.ts';
import { descentOf } from './vent-dip.ts';
import { risesOverStorey, type WetFoot } from './wet-feet.ts';

export interface DryRole {
  readonly role: Role;
  /** Foot whose own vent the pipe still is; null once two vents have met. */
  readonly foot: VentFoot | null;
  readonly stack: Stack | null;
  readonly battery: number | null;
}

export interface VentTree {
  /** Dry pipe toward the sky after each dry pipe; null at a mouth. Used pipes only. */
  readonly above: ReadonlyMap<PipeId, PipeId | null>;
  /** Dry pipes that come together into a pipe at its lower joint. */
  readonly below: ReadonlyMap<PipeId, readonly PipeId[]>;
  /** From the feet to the sky: every pipe after those below it. */
  readonly order: readonly PipeId[];
  /** Foot at which a pipe starts. */
  readonly footOf: ReadonlyMap<PipeId, VentFoot>;
}

export function ventTree(feet: readonly VentFoot[]): VentTree {
  const above = new Map<PipeId, PipeId | null>();
  const below = new Map<PipeId, PipeId[]>();
  const footOf = new Map<PipeId, VentFoot>();
  for (const foot of feet) {
    foot.path.forEach((pipe, at) => {
      if (at === 0) footOf.set(pipe, foot);
      if (above.has(pipe)) return;
      const next = foot.path[at + 1] ?? null;
      above.set(pipe, next);
      if (next !== null) below.set(next, [...(below.get(next) ?? []), pipe]);
    });
  }
  const waiting = new Map([...above.keys()].map((pipe) => [pipe, below.get(pipe)?.length ?? 0]));
  const order = [...waiting]
    .filter(([, count]) => count === 0)
    .map(([pipe]) => pipe)
    .sort((a, b) => a - b);
  for (let at = 0; at < order.length; at++) {
    const next = above.get(order[at]!) ?? null;
    if (next === null) continue;
    const left = waiting.get(next)! - 1;
    waiting.set(next, left);
    if (left === 0) order.push(next);
  }
  for (const list of below.values()) list.sort((a, b) => a - b);
  return { above, below, order, footOf };
}

/** Role of every used dry pipe, from where it starts and what it meets on the way to the sky. */
export function dryRoles(
  context: BatteryContext,
  tree: VentTree,
  batteries: readonly Battery[],
  places: ReadonlyMap<JointId, StackPlace>,
  wet: ReadonlyMap<JointId, WetFoot>,
): Map<PipeId, DryRole> {
  const roles = new Map<PipeId, DryRole>();
  const start = footRoles(context, batteries, places, wet);
  for (const pipe of tree.order) {
    const below = (tree.below.get(pipe) ?? []).map((one) => roles.get(one)!).filter(({ role }) => role !== 'idle');
    const foot = tree.footOf.get(pipe);
    if (foot !== undefined && below.length === 0) roles.set(pipe, start(foot));
    else roles.set(pipe, meet(below));
  }
  nameYokes(context, tree, roles);
  return roles;
}

/** What vents that meet become. */
function meet(below: readonly DryRole[]): DryRole {
  const [only] = below;
  if (only === undefined) return { role: 'idle', foot: null, stack: null, battery: null };
  if (below.length === 1) return only;
  const stackish = below.filter(({ role }) => role === 'stack-vent' || role === 'vent-stack' || role === 'vent-header');
  const stacks = new Set(stackish.map(({ stack }) => stack?.id));
  const first = stackish[0];
  if (first === undefined) return { role: 'branch-vent', foot: null, stack: null, battery: null };
  if (stackish.some(({ role }) => role === 'vent-header') || stacks.size > 1) {
    return { role: 'vent-header', foot: null, stack: null, battery: null };
  }
  return stackish.find(({ role }) => role === 'stack-vent') ?? first;
}

/** A stack's vent that ends in the vent stack between the ends of both is a yoke vent. */
function nameYokes(context: BatteryContext, tree: VentTree, roles: Map<PipeId, DryRole>): void {
  for (const pipe of tree.order) {
    const it = roles.get(pipe)!;
    if (it.role !== 'yoke-vent') continue;
    const next = tree.above.get(pipe) ?? null;
    const role = next === null ? null : roles.get(next)!.role;
    if (role !== 'yoke-vent' && role !== 'vent-stack') demote(context, tree, roles, pipe);
  }
}

/**
 * A foot on a stack whose vent meets no vent stack: a vent stack itself, though its foot lies too high, where it rises
 * over a storey and no trap needs it; else what the traps that breathe through it make of it.
 */
function demote(context: BatteryContext, tree: VentTree, roles: Map<PipeId, DryRole>, last: PipeId): void {
  for (let pipe: PipeId | undefined = last; pipe !== undefined; pipe = tree.below.get(pipe)?.[0]) {
    const it = roles.get(pipe)!;
    if (it.role !== 'yoke-vent') return;
    const { traps, path } = it.foot!;
    const stands = traps.length === 0 && risesOverStorey(context, path);
    roles.set(
      pipe,
      stands ? { ...it, role: 'vent-stack' } : { ...it, role: byTraps(trapsIn(context, traps)), stack: null },
    );
  }
}

/** Dry vent of a row by how the row is read; a continuous vent for the others. */
const ventOf: Readonly<Partial<Record<Reading, Role>>> = {
  'circuit-vent': 'circuit-vent',
  'common-vent': 'dual-vent',
  'ventilated-branch': 'branch-vent',
};

/** Traps, not fixtures: several may stand over one drawn trap. */
function trapsIn({ paths }: BatteryContext, fixtures: readonly FixtureId[]): number {
  const shared = new Set<JointId>();
  let own = 0;
  for (const fixture of fixtures) {
    const { how, at } = paths.traps[fixture]!;
    if (how === 'drawn') shared.add(at);
    else own++;
  }
  return own + shared.size;
}

const byTraps = (traps: number): Role =>
  traps === 0 ? 'idle' : traps === 1 ? 'individual-vent' : traps === 2 ? 'dual-vent' : 'continuous-vent';

function footRoles(
  context: BatteryContext,
  batteries: readonly Battery[],
  onStack: ReadonlyMap<JointId, StackPlace>,
  wet: ReadonlyMap<JointId, WetFoot>,
): (foot: VentFoot) => DryRole {
  const { stream, stacks } = context;
  const topOf = new Map<JointId, Stack>(stacks.map((stack) => [stream.up(stack.top), stack]));
  const reliefAt = new Map<JointId, number>();
  const additionalAt = new Map<JointId, number>();
  const footOf = new Map<JointId, number>();
  batteries.forEach(({ facts, reading }, index) => {
    // A row that breathes from a vent at its lower end leaves the foot to one that begins there.
    if (facts.open === null || (facts.open.end === 'vent' && !footOf.has(facts.foot))) footOf.set(facts.foot, index);
    if (reading !== 'circuit-vent') return;
    const { relief, additional } = facts.circuit;
    if (relief !== null && relief.kind !== 'drain') reliefAt.set(relief.joint, index);
    for (const { joint, dry } of additional) if (dry) additionalAt.set(joint, index);
  });
  return (foot) => {
    const { joint, traps, path } = foot;
    const of = (role: Role, stack: Stack | null, battery: number | null): DryRole => ({ role, foot, stack, battery });
    const top = topOf.get(joint);
    if (top !== undefined) return of('stack-vent', top, footOf.get(joint) ?? null);
    const place = onStack.get(joint);
    if (place !== undefined) {
      if ((place.at === 'foot' || place.at === 'drain') && risesOverStorey(context, path))
        return of('vent-stack', place.stack, null);
      if (place.at === 'offset') return of('offset-relief-vent', place.stack, null);
      if (place.at === 'between' && !footOf.has(joint)) return of('yoke-vent', place.stack, null);
    }
    if (traps.length === 0 && context.tankAt(joint) !== null) return of('tank-vent', null, null);
    const wetFoot = wet.get(joint);
    if (wetFoot !== undefined) return of('vent-stack', wetFoot.stack, null);
    const relief = reliefAt.get(joint);
    if (relief !== undefined) return of('relief-vent', null, relief);
    const additional = additionalAt.get(joint);
    if (additional !== undefined) return of('additional-circuit-vent', null, additional);
    const battery = footOf.get(joint);
    if (battery !== undefined) {
      const { reading, facts } = batteries[battery]!;
      const alone = facts.open !== null && traps.length === 1;
      return of(alone ? 'individual-vent' : (ventOf[reading] ?? 'continuous-vent'), null, battery);
    }
    if (traps.length > 0 && context.code.islandVents && descentOf(context.network, foot) > islandDescent)
      return of('island-vent', null, null);
    return of(byTraps(trapsIn(context, traps)), null, null);
  };
}
