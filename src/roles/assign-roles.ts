import type { EntryRule, PlumbingCode } from '../codes/plumbing-code.ts';
import { isReading, type Reading } from '../codes/reading.ts';
import type { Role } from '../codes/role.ts';
import type { StackLeft, StackUse } from '../codes/stack-use.ts';
import type { PipeUse, TankKind } from '../codes/use.ts';
import { type Finding, finding, type WithFindings } from '../findings/finding.ts';
import type { Building } from '../loads/building.ts';
import type { Loads } from '../loads/loads.ts';
import { keyMatches } from '../model/answer-keys.ts';
import type { Identity } from '../model/identity.ts';
import type { JointId, Network, PipeId } from '../network/network.ts';
import { wayToSky } from '../paths/air.ts';
import type { FixtureId, Paths, TrapAir } from '../paths/paths.ts';
import { airOfRows } from './battery-air.ts';
import type { BatteryContext } from './battery-context.ts';
import { drainEnds, drainRoles } from './drain-roles.ts';
import { type DryRole, dryRoles, ventTree } from './dry-roles.ts';
import { freeTraps } from './feet.ts';
import { findStacks, type Stack, type StackContext } from './find-stacks.ts';
import { floorsOf } from './floors.ts';
import { formBatteries } from './form-batteries.ts';
import { mainVentUses, onlyWidestVents } from './main-vent.ts';
import { openRows } from './open-rows.ts';
import { outsideBuilding } from './outline.ts';
import type { Battery, Roles, VentFoot } from './roles.ts';
import { throughShortBranches } from './short-branches.ts';
import { stackEntries } from './stack-entries.ts';
import { stackJoints } from './stack-joints.ts';
import { stackUses } from './stack-uses.ts';
import { trapArms } from './trap-arms.ts';
import { trapWays } from './trap-ways.ts';
import { ventUses } from './vent-uses.ts';
import { venting } from './venting.ts';
import { type WetFoot, wetFeet } from './wet-feet.ts';
import { wetUses } from './wet-uses.ts';

export interface RoleFacts extends Building {
  readonly paths: Paths;
  readonly loads: Loads;
}

/** What each pipe is, who uses it, and how each row of fixtures is read, in one scenario. */
export function assignRoles(facts: RoleFacts): WithFindings<Roles> {
  const { model, identities, network, paths, loads, code, outline } = facts;
  const findings: Finding[] = [];
  const { stream } = paths;
  const floors = floorsOf(model, network, paths.fixtures);
  const outlet = outletPipes(network, paths);
  const stackContext = { network, paths, stream, loads, floors };
  const stacks = findStacks(stackContext, outlet);
  if (floors.assumed && stacks.length > 0) findings.push(finding('storeys-assumed', [], { heightM: 3 }));
  const inStack: (Stack | null)[] = network.pipes.map(() => null);
  for (const stack of stacks) for (const pipe of stack.pipes) inStack[pipe] = stack;
  const identityOf = (fixture: FixtureId): Identity => identities[paths.fixtures[fixture]!.element]!;
  const drawn = ventFeet(network, paths, paths.traps);
  const liveAt = new Map<JointId, PipeId>(drawn.map(({ joint, path }) => [joint, path[0]!]));
  const context: BatteryContext = {
    ...stackContext,
    code,
    stacks,
    inStack,
    stackUses: stackUses(stackContext, stacks),
    stackAbove: stackAbove(paths, stacks),
    free: freeTraps(network, paths, loads, code, stacks, (fixture) => {
      const { kind, detail } = identityOf(fixture);
      return { kind, emergency: detail.emergency };
    }),
    tankAt: (joint) => tankAmong(network.joints[joint]!.elements.map((element) => identities[element])),
    kindOf: (fixture) => identityOf(fixture).kind,
    frequencyOf: (fixture) => identityOf(fixture).detail.frequency ?? null,
    live: (joint) => liveAt.get(joint) ?? null,
    wordOf: (fixtures, pipes) => designersWord(facts, fixtures, pipes),
  };
  const places = stackJoints(context);
  const rows = formBatteries(context, places, (battery) => answeredReading(facts, battery));
  const batteries = [...rows, ...openRows(context, rows)];
  const air = airOfRows(context, drawn, batteries);
  const feet = ventFeet(network, paths, air);
  const tree = ventTree(feet);
  const feetOfVentStacks = wetFeet(context, feet, places);
  const dry = dryRoles(context, tree, batteries, places, feetOfVentStacks);
  const vents = ventUses(context, tree, dry, batteries, places, feetOfVentStacks);
  const drains = drainRoles(
    stackContext,
    outlet,
    inStack,
    stacks,
    batteries,
    outsideBuilding(outline, network, paths, code.sewerBegins),
  );
  const wet = wetUses(context, drains, batteries, feetOfVentStacks);

  const ways = code.shortBranch === undefined ? null : trapWays(context, drains);
  const mainVents = mainVentUses(context, feet, dry);
  const largest = onlyWidestVents(context, feet);
  const inArm = new Set(air.flatMap(({ arm, foot }) => (foot === null ? [] : arm)));
  const ends = drainEnds(paths, drains);
  const entered = new Map<PipeId, StackUse>();
  const leaves = new Map<number, StackLeft[]>();
  for (const { serves, leaves: at } of vents.values())
    if (serves !== null && at !== null) leaves.set(serves, [...(leaves.get(serves) ?? []), at]);
  const offsets = new Map<PipeId, number>();
  for (const stack of stacks) {
    if (code.entries !== undefined) {
      const entries = entriesOf(facts, stackContext, stack, code.entries, leaves);
      for (const pipe of stack.pipes) entered.set(pipe, { ...context.stackUses[pipe]!, ...entries });
    }
    for (const { pipes, length } of stack.offsets) for (const pipe of pipes) offsets.set(pipe, length);
  }
  const uses = network.pipes.map(({ id }): PipeUse => {
    const { load, closets, counts, from, to } = loads.pipes[id]!;
    const isWet = paths.wet[id]!;
    const own = wet.get(id);
    const vent = dry.get(id);
    const role: Role = isWet ? (own?.role ?? drains[id]!) : (vent?.role ?? 'idle');
    const battery = own?.battery ?? vent?.battery ?? null;
    const fixtures = loads.order.slice(from, Math.min(to, from + 3));
    const drain = drains[id];
    const first = drain === 'fixture-drain' ? fixtures[0] : undefined;
    return {
      pipe: id,
      role,
      also: own?.also ?? [],
      portion: isWet
        ? outlet[id]
          ? 'outlet'
          : (own?.portion ?? null)
        : own === undefined && vent !== undefined && hasWetPortion(batteries, feetOfVentStacks, vent)
          ? 'dry'
          : null,
      load,
      closets,
      counts,
      fixtures: to - from,
      largest: loads.pipes[id]!.largest,
      steady: loads.pipes[id]!.steady,
      statedUses: loads.pipes[id]!.statedUses,
      vertical: paths.vertical[id] === true,
      slope: paths.slopes[id]!.slope,
      trap: first === undefined ? null : loads.fixtures[first]!.trap,
      trapStated: first !== undefined && statedTraps.has(loads.fixtures[first]!.trapFrom),
      outlet: outlet[id] && fixtures.length > 0 ? largestOutlet(loads, code, fixtures) : null,
      inArm: inArm.has(id),
      endsAt: ends[id] ?? null,
      reach: ways?.reach.get(id) ?? null,
      inflows: isWet ? stream.inflows[stream.up(id)]! : [],
      joining: isWet ? stream.dry[stream.up(id)]!.filter((pipe) => dry.has(pipe)) : (tree.below.get(id) ?? []),
      stack: entered.get(id) ?? context.stackUses[id]!,
      offset: offsets.get(id) ?? null,
      battery: battery === null ? null : { facts: batteries[battery]!.facts, reading: batteries[battery]!.reading },
      vent: vents.get(id) ?? null,
      standsIn: own?.standsIn ?? null,
      wetPortion: own?.wetPortion ?? null,
      drain: drain ?? null,
      mainVent: mainVents.get(id) ?? null,
      isMainVent: largest.has(id),
    };
  });
  return {
    value: {
      uses,
      stacks,
      batteries,
      air,
      venting: throughShortBranches(context, venting(context, air, feet, dry, batteries), ways),
      arms: trapArms(network, paths, air),
      ways: ways?.traps ?? [],
      feet,
      floors,
    },
    findings,
  };
}

/** A sump, an interceptor or a manhole among what stands at a joint. */
function tankAmong(parts: readonly (Identity | undefined)[]): TankKind | null {
  for (const it of parts) {
    if (it?.part === 'tank' && it.detail.style === 'interceptor') return 'interceptor';
    if (it?.part === 'tank' && (it.detail.style === 'sump' || it.detail.style === 'pump')) return 'sump';
    if (it?.part === 'chamber') return 'manhole';
  }
  return null;
}

const statedTraps: ReadonlySet<string> = new Set(['drawn', 'property', 'answer']);

/** How a stack is entered and vented beside its own top. The lightest reading takes entries nobody knows for swept. */
function entriesOf(
  { model, loads }: RoleFacts,
  context: StackContext,
  stack: Stack,
  rule: EntryRule,
  leavesOf: ReadonlyMap<number, readonly StackLeft[]>,
): Pick<StackUse, 'entries' | 'ventStack'> {
  const open = loads.scenario === 'lightest' ? 'swept' : 'square';
  const leaves = leavesOf.get(stack.id) ?? [];
  const best = (['foot', 'drain', 'above a branch'] as const).find((one) => leaves.includes(one)) ?? null;
  return { entries: stackEntries(context, model, stack, rule, open), ventStack: best };
}

/** Pipes between a fixture and its trap. */
function outletPipes(network: Network, paths: Paths): boolean[] {
  const outlet = network.pipes.map(() => false);
  for (const { fixture, after } of paths.traps) {
    for (const pipe of paths.fixtures[fixture]!.water.slice(0, after)) outlet[pipe] = true;
  }
  return outlet;
}

/** Every dry foot from which air reaches the sky, with the traps that breathe through it. */
function ventFeet(network: Network, paths: Paths, air: readonly TrapAir[]): VentFoot[] {
  const traps = new Map<JointId, FixtureId[]>();
  for (const { foot, fixture } of air) {
    if (foot !== null) traps.set(foot, [...(traps.get(foot) ?? []), fixture]);
  }
  const feet: VentFoot[] = [];
  for (const { id, feet: joints, mouths } of paths.pieces) {
    if (mouths.length === 0) continue;
    for (const joint of joints) {
      const path = wayToSky(network, paths, joint, id);
      if (path.length > 0) feet.push({ joint, piece: id, path, traps: traps.get(joint) ?? [] });
    }
  }
  return feet.sort((a, b) => a.joint - b.joint || a.piece - b.piece);
}

function stackAbove(paths: Paths, stacks: readonly Stack[]): boolean[] {
  const above = paths.wet.map(() => false);
  for (const { foot } of stacks) {
    for (let pipe = paths.next[foot] ?? null; pipe !== null && !above[pipe]; pipe = paths.next[pipe] ?? null)
      above[pipe] = true;
  }
  return above;
}

const hasWetPortion = (
  batteries: readonly Battery[],
  wet: ReadonlyMap<JointId, WetFoot>,
  { role, battery, foot }: DryRole,
): boolean =>
  (role === 'vent-stack' && foot !== null && wet.has(foot.joint)) ||
  (role === 'circuit-vent' && battery !== null && batteries[battery]!.facts.circuit.wetPortion.length > 0);

function largestOutlet(loads: Loads, code: PlumbingCode, fixtures: readonly FixtureId[]) {
  return fixtures.map((fixture) => loads.fixtures[fixture]!.row.leastTrap).reduce((a, b) => code.series.larger(a, b));
}

/** What the designer calls the row, where names, systems or properties of its parts say one thing. */
function designersWord(
  { identities, network, paths }: RoleFacts,
  fixtures: readonly FixtureId[],
  pipes: readonly PipeId[],
): Reading | null {
  const words = new Set<string>();
  for (const fixture of fixtures) {
    const { reading } = identities[paths.fixtures[fixture]!.element]!;
    if (reading !== null) words.add(reading);
  }
  for (const pipe of pipes) {
    const { element } = network.pipes[pipe]!;
    const reading = element === null ? null : identities[element]!.reading;
    if (reading !== null) words.add(reading);
  }
  const [only] = words;
  return words.size === 1 && isReading(only) ? only : null;
}

function answeredReading({ model, paths, answers }: RoleFacts, { facts }: Battery): Reading | null {
  for (const [key, { reading }] of answers.batteries) {
    if (!isReading(reading)) continue;
    if (facts.traps.some(({ fixture }) => keyMatches(key, model.elements[paths.fixtures[fixture]!.element]!)))
      return reading;
  }
  return null;
}
