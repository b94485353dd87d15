import type { Reading } from '../codes/reading.ts';
import type { StackUse } from '../codes/stack-use.ts';
import type { VentUse } from '../codes/use.ts';
import type { JointId, PipeId } from '../network/network.ts';
import { spaceTurn } from '../paths/turns.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import type { BatteryContext } from './battery-context.ts';
import type { DryRole, VentTree } from './dry-roles.ts';
import type { Stack } from './find-stacks.ts';
import { type AirTotals, airTotals, followers, type Gathered, gatherAir } from './gathered-air.ts';
import type { Battery, VentFoot } from './roles.ts';
import type { StackPlace } from './stack-joints.ts';
import { footLengths, ventLengths } from './vent-lengths.ts';
import type { WetFoot } from './wet-feet.ts';

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
  const { stream, stacks } = context;
  const uses = new Map<PipeId, VentUse>();
  const gathered = gatherAir(tree, roles, batteries);
  const stackUses = stacks.map(({ foot }) => context.stackUses[foot]!);
  // What holds for a whole run of pipes, or for all pipes of one foot, is found once.
  const runs = new Map<Gathered, VentRun>();
  const bends = new Map<VentFoot, number>();
  const firstOfBattery = new Map<number, PipeId>();
  const ventOfStack = new Map<number, PipeId>();
  for (const pipe of tree.order) {
    const it = roles.get(pipe)!;
    if (it.role === 'circuit-vent' && it.battery !== null && !firstOfBattery.has(it.battery))
      firstOfBattery.set(it.battery, pipe);
    if (it.role === 'stack-vent' && it.stack !== null && !ventOfStack.has(it.stack.id))
      ventOfStack.set(it.stack.id, pipe);
  }
  const lengths = ventLengths(
    context,
    tree,
    roles,
    (pipe) => gathered.get(pipe)!.feet,
    (pipe) => gathered.get(pipe)!.traps.size > 0,
    footLengths(context, tree, roles, batteries, wet),
  );
  const ownVented = new Map<number, Reading>();
  for (const { facts, reading } of batteries) {
    if (facts.stack !== null && ownVents.has(reading) && !ownVented.has(facts.stack.id))
      ownVented.set(facts.stack.id, reading);
  }
  for (const pipe of tree.order) {
    const it = roles.get(pipe)!;
    const sum = gathered.get(pipe)!;
    const length = lengths.get(pipe) ?? null;
    let run = runs.get(sum);
    if (run === undefined) {
      run = ventRun(context, sum, stackUses);
      runs.set(sum, run);
    }
    if (it.foot !== null && !bends.has(it.foot)) bends.set(it.foot, bendsOf(context, roles, it.foot));
    const { load, largest, statedUses, closets, counts, largestTrap } = run.air;
    uses.set(pipe, {
      load,
      largest,
      statedUses,
      closets,
      counts,
      length: length?.total ?? null,
      level: length?.level ?? null,
      bends: it.foot === null ? null : bends.get(it.foot)!,
      valve: run.valve,
      largestTrap: withRow(context, largestTrap, it, batteries),
      stack:
        (it.role === 'stack-vent' || it.role === 'vent-stack') && it.stack !== null ? stackUses[it.stack.id]! : null,
      stackReading: it.stack === null ? null : (ownVented.get(it.stack.id) ?? null),
      stacks: run.stacks,
      follows:
        it.role === 'relief-vent' || it.role === 'additional-circuit-vent'
          ? (firstOfBattery.get(it.battery ?? -1) ?? null)
          : it.role === 'offset-relief-vent' && it.stack !== null
            ? (ventOfStack.get(it.stack.id) ?? null)
            : null,
      between:
        it.role === 'yoke-vent' && it.stack !== null ? yokeEnds(context, tree, roles, pipe, it.stack, it.foot!) : null,
      drain: it.foot === null ? null : (stream.outflow[it.foot.joint] ?? null),
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

/** What the pipes of a run in which nothing joins have in common. */
interface VentRun {
  readonly air: AirTotals;
  readonly stacks: readonly StackUse[];
  readonly valve: boolean;
}

const ventRun = (context: BatteryContext, sum: Gathered, stackUses: readonly StackUse[]): VentRun => ({
  air: airTotals(context, sum),
  stacks: [...sum.stacks].sort((a, b) => a - b).map((id) => stackUses[id]!),
  valve: sum.feet.length > 0 && sum.feet.every(({ piece }) => breathesByValve(context, piece)),
});

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

/** The largest trap; of a vent that follows a row's vent, the row's own as well. */
function withRow(
  { code }: BatteryContext,
  own: NominalSize | null,
  { battery, role }: DryRole,
  batteries: readonly Battery[],
): NominalSize | null {
  if (battery === null || !followers.has(role)) return own;
  return batteries[battery]!.facts.traps.reduce(
    (largest: NominalSize | null, { size }) => (largest === null ? size : code.series.larger(largest, size)),
    own,
  );
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
