import type { JointId, PipeId } from '../network/network.ts';
import type { Paths, TrapAir } from '../paths/paths.ts';
import type { Battery } from './roles.ts';

/**
 * The way of air to every trap once its row is known: where a row reaches past the vent of a guest, its traps breathe
 * through the row's own vent, though the guest's stands nearer. All others as the paths have them. By fixture id.
 */
export function airOfRows({ traps: found }: Paths, batteries: readonly Battery[]): TrapAir[] {
  const air = [...found];
  for (const { facts } of batteries) {
    const main = facts.traps.map(({ fixture }) => found[fixture]!).find(({ foot }) => foot === facts.foot);
    if (main === undefined) continue;
    const onLine = new Set<JointId | null>([facts.foot, ...facts.feet]);
    for (const { fixture, place, ownVent } of facts.traps) {
      const trap = found[fixture]!;
      if (ownVent || onLine.has(trap.foot)) continue;
      const through: PipeId[] = facts.line.slice(0, place).reverse();
      air[fixture] = { ...trap, through, foot: main.foot, piece: main.piece, dry: main.dry };
    }
  }
  return air;
}
