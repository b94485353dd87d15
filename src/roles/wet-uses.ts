import type { DrainRole, Portion, Role } from '../codes/role.ts';
import type { PipeUse, StandIn } from '../codes/use.ts';
import type { JointId, PipeId } from '../network/network.ts';
import { noLoad, plusLoad } from '../units/quantity.ts';
import type { BatteryContext } from './battery-facts.ts';
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

/** Wet pipes that also vent, and drains that stand in for a vent. Other wet pipes are not in the map. */
export function wetUses(
  { code, loads }: BatteryContext,
  drains: readonly (DrainRole | null)[],
  batteries: readonly Battery[],
  feet: ReadonlyMap<JointId, WetFoot>,
): Map<PipeId, WetUse> {
  const uses = new Map<PipeId, WetUse>();
  const drainName = (pipe: PipeId): Role[] => {
    const role = drains[pipe];
    return role === null || role === undefined ? [] : [role];
  };
  batteries.forEach(({ facts, reading }, battery) => {
    if (reading === 'wet-vent') {
      for (const pipe of facts.line)
        uses.set(pipe, {
          role: 'wet-vent',
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
}
