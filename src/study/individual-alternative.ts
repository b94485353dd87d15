import type { BatteryTrap } from '../codes/battery.ts';
import type { JointId } from '../network/network.ts';
import { type Attempt, asModelled, attempt, type Obstacle } from './attempt.ts';
import { unchanged, without } from './changed-piping.ts';
import { nameOf } from './fixture-name.ts';
import type { Row } from './row.ts';
import { type Foot, footOfTrap } from './vent-feet.ts';
import { ventsFrom } from './vent-route.ts';
import { needlessVents } from './wet-alternative.ts';

/**
 * The row vented trap by trap: each that has no vent of its own gets one at the end of its arm, two that meet at one
 * joint share theirs. One that leaves no place for a vent stands against it.
 */
export function individualAlternative(row: Row): Attempt | readonly Obstacle[] {
  const { battery, outcome } = row;
  if (battery.reading === 'individual-vent') return asModelled(row);
  const byJoint = new Map<JointId, BatteryTrap[]>();
  for (const trap of battery.facts.traps) {
    if (trap.ownVent || trap.free) continue;
    byJoint.set(trap.joins, [...(byJoint.get(trap.joins) ?? []), trap]);
  }
  const feet: { foot: Foot; name: string }[] = [];
  for (const traps of byJoint.values()) {
    const shared = traps.length > 2 ? null : footOfTrap(row, traps[0]!, false);
    const together = shared !== null && 'joint' in shared && shared.joint === traps[0]!.joins;
    if (together) feet.push({ foot: shared, name: `Vent of ${traps.map((trap) => nameOf(row, trap)).join(' and ')}` });
    for (const trap of together ? [] : traps) {
      const foot = footOfTrap(row, trap, true);
      if (foot === null) return [withoutPlace(row, traps)];
      feet.push({ foot, name: `Vent of ${nameOf(row, trap)}` });
    }
  }
  const piping = ventsFrom(row, without(unchanged(outcome), needlessVents(row)), feet);
  return piping === null ? [withoutPlace(row, battery.facts.traps)] : attempt(row, piping, 'individual-vent');
}

const withoutPlace = ({ outcome: { paths } }: Row, traps: readonly BatteryTrap[]): Obstacle => ({
  rule: null,
  clause: null,
  facts: { noPlace: true, traps: traps.length },
  finding: 'unvented-trap',
  about: traps.map(({ fixture }) => paths.fixtures[fixture]!.element),
});
