import type { DrainRole, Portion, Role } from '../codes/role.ts';
import type { StandIn } from '../codes/use.ts';
import type { PipeId } from '../network/network.ts';
import type { BatteryContext } from './battery-facts.ts';
import type { Battery } from './roles.ts';

export interface WetUse {
  readonly role: Role;
  readonly also: readonly Role[];
  readonly portion: Portion | null;
  readonly battery: number | null;
  readonly standsIn: StandIn | null;
}

/** Wet pipes that also vent, and drains that stand in for a vent. Other wet pipes are not in the map. */
export function wetUses(
  { code }: BatteryContext,
  drains: readonly (DrainRole | null)[],
  batteries: readonly Battery[],
): Map<PipeId, WetUse> {
  const uses = new Map<PipeId, WetUse>();
  const drainName = (pipe: PipeId): Role[] => {
    const role = drains[pipe];
    return role === null || role === undefined ? [] : [role];
  };
  batteries.forEach(({ facts, reading }, battery) => {
    if (reading === 'wet-vent') {
      for (const pipe of facts.line)
        uses.set(pipe, { role: 'wet-vent', also: drainName(pipe), portion: null, battery, standsIn: null });
      return;
    }
    if (reading !== 'circuit-vent') return;
    const { wetPortion, branch, relief, additional, traps } = facts.circuit;
    const also = (pipe: PipeId): Role[] => (drains[pipe] === 'fixture-drain' ? ['fixture-drain'] : ['branch']);
    for (const pipe of wetPortion)
      uses.set(pipe, { role: 'circuit-vent', also: also(pipe), portion: 'wet', battery, standsIn: null });
    for (const pipe of branch)
      uses.set(pipe, { role: 'circuit-vented-branch', also: drainName(pipe), portion: null, battery, standsIn: null });
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
      });
    };
    if (relief?.kind === 'drain') standIn(relief.by, 'relief-vent', relief.load, relief.fixtures);
    for (const { by, dry } of additional)
      if (!dry) standIn(by, 'additional-circuit-vent', facts.circuit.traps[0]!.load, []);
  });
  return uses;
}
