import type { BatteryFacts } from '../codes/battery.ts';
import type { Reading } from '../codes/reading.ts';
import type { DrainRole, Portion, Role, WetVentRole } from '../codes/role.ts';
import type { PipeUse, StandIn } from '../codes/use.ts';
import type { JointId, PipeId } from '../network/network.ts';
import { noLoad, plusLoad } from '../units/quantity.ts';
import type { BatteryContext } from './battery-context.ts';
import type { Battery } from './roles.ts';
import type { WetFoot } from './wet-feet.ts';

export interface WetUse {
  readonly role: Role;
  readonly also: readonly Role[];
  readonly portion: Portion | null;
  readonly battery: number | null;
  readonly standsIn: StandIn | null;
  /** Of a wet portion: everything that drains into the whole of it. */
  readonly wetPortion: PipeUse['wetPortion'];
}

/** What the line of a row is called, by how the row is read. */
const lineRoles: Readonly<Partial<Record<Reading, WetVentRole>>> = {
  'wet-vent': 'wet-vent',
  'common-vent': 'common-vent',
  'waste-stack-vent': 'waste-stack-vent',
  'combination-waste-and-vent': 'combination-waste-and-vent',
  'single-stack': 'single-stack',
};
const wholeStack: ReadonlySet<WetVentRole> = new Set(['waste-stack-vent', 'single-stack']);

/** Wet pipes that also vent, and drains that stand in for a vent. Other wet pipes are not in the map. */
export function wetUses(
  context: BatteryContext,
  drains: readonly (DrainRole | null)[],
  batteries: readonly Battery[],
  feet: ReadonlyMap<JointId, WetFoot>,
): Map<PipeId, WetUse> {
  const { code, loads } = context;
  const uses = new Map<PipeId, WetUse>();
  const drainName = (pipe: PipeId): Role[] => {
    const role = drains[pipe];
    return role === null || role === undefined ? [] : [role];
  };
  batteries.forEach(({ facts, reading }, battery) => {
    // Two drains that run together to their common vent are arms: nobody else's air passes.
    if (reading === 'common-vent' && facts.open !== null) return;
    if (reading === 'single-stack') drainsToStack(facts, battery);
    const role = lineRoles[reading];
    if (role !== undefined) {
      // All of a stack that is its own vent is of one size, also below its last drain.
      const stack = facts.stack === null || !wholeStack.has(role) ? null : context.stacks[facts.stack.id]!;
      for (const pipe of stack?.pipes ?? facts.line)
        uses.set(pipe, {
          role,
          also: drainName(pipe),
          portion: null,
          battery,
          standsIn: null,
          wetPortion: null,
        });
      return;
    }
    if (reading !== 'circuit-vent') return;
    const { wetPortion, branch, relief, additional, traps } = facts.circuit;
    const also = (pipe: PipeId): Role[] => (drains[pipe] === 'fixture-drain' ? ['fixture-drain'] : ['branch']);
    const onVent = facts.circuit.onVent.reduce((sum, { load }) => plusLoad(sum, load), noLoad);
    for (const pipe of wetPortion)
      uses.set(pipe, {
        role: 'circuit-vent',
        also: also(pipe),
        portion: 'wet',
        battery,
        standsIn: null,
        wetPortion: { load: onVent, closets: 0 },
      });
    for (const pipe of branch)
      uses.set(pipe, {
        role: 'circuit-vented-branch',
        also: drainName(pipe),
        portion: null,
        battery,
        standsIn: null,
        wetPortion: null,
      });
    const largestTrap = traps.map(({ size }) => size).reduce((a, b) => code.series.larger(a, b));
    const standIn = (pipe: PipeId, as: StandIn['as'], load: StandIn['load'], fixtures: StandIn['fixtures']): void => {
      const known = uses.get(pipe);
      const role = known?.role ?? drains[pipe] ?? 'unknown';
      uses.set(pipe, {
        role,
        also: [...(known?.also ?? []), as],
        portion: known?.portion ?? null,
        battery: known?.battery ?? battery,
        standsIn: { as, load, largestTrap, fixtures },
        wetPortion: known?.wetPortion ?? null,
      });
    };
    if (relief?.kind === 'drain') standIn(relief.by, 'relief-vent', relief.load, relief.fixtures);
    for (const { by, dry } of additional)
      if (!dry) standIn(by, 'additional-circuit-vent', facts.circuit.traps[0]!.load, []);
  });
  for (const { pipes } of feet.values()) {
    const { load, closets } = loads.pipes[pipes.at(-1)!]!;
    for (const pipe of pipes) {
      uses.set(pipe, {
        role: 'vent-stack',
        also: drainName(pipe),
        portion: 'wet',
        battery: uses.get(pipe)?.battery ?? null,
        standsIn: null,
        wetPortion: { load, closets },
      });
    }
  }
  return uses;

  /** Between each trap and a single stack the code has limits of its own: those drains belong to the row. */
  function drainsToStack({ traps }: BatteryFacts, battery: number): void {
    for (const { fixture } of traps) {
      const { after } = context.paths.traps[fixture]!;
      for (const pipe of context.paths.fixtures[fixture]!.water.slice(after)) {
        if (context.inStack[pipe] !== null) break;
        const role = drains[pipe] ?? 'unknown';
        uses.set(pipe, { role, also: [], portion: null, battery, standsIn: null, wetPortion: null });
      }
    }
  }
}
