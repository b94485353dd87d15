import type { PipeId } from '../network/network.ts';
import type { TrapAir } from '../paths/paths.ts';
import type { BatteryContext } from './battery-context.ts';
import type { DryRole } from './dry-roles.ts';
import type { Battery, VentFoot, Venting } from './roles.ts';

/** How each trap is vented, by fixture: the role of its vent, the rule that frees it, or unvented. */
export function venting(
  { free }: BatteryContext,
  air: readonly TrapAir[],
  feet: readonly VentFoot[],
  dry: ReadonlyMap<PipeId, DryRole>,
  batteries: readonly Battery[],
): Venting[] {
  const batteryOf = new Map<number, number>();
  batteries.forEach(({ facts }, index) => {
    for (const { fixture } of facts.traps) batteryOf.set(fixture, index);
  });
  const footAt = new Map(feet.map((foot) => [`${foot.joint}/${foot.piece}`, foot]));
  return air.map(({ fixture, foot, piece, through }): Venting => {
    const freed = free[fixture] ?? null;
    const index = batteryOf.get(fixture) ?? null;
    const vents = foot === null ? [] : (footAt.get(`${foot}/${piece}`)?.path ?? []);
    const row = index === null ? null : batteries[index]!;
    const own = through.length === 0;
    if (row !== null && row.facts.open !== null) return { how: row.reading, vents, free: null, battery: index };
    if (foot === null || (row === null && !own)) {
      return { how: freed === null ? 'unvented' : 'free', vents: [], free: freed, battery: null };
    }
    if (row !== null && (!own || row.reading === 'circuit-vent')) {
      return {
        how: row.reading === 'individual-vent' && !own ? 'unvented' : row.reading,
        vents,
        free: null,
        battery: index,
      };
    }
    return { how: dry.get(vents[0]!)?.role ?? 'individual-vent', vents, free: null, battery: index };
  });
}
