import type { BatteryFacts, BatteryTrap, Guest } from '../battery.ts';
import type { FixtureRow } from '../fixture-row.ts';
import { type BathroomPart, type GroupSize, groupsNeeded } from './bathroom-parts.ts';

/** What keeps a wet vent to the fixtures of bathroom groups, as far as a row goes beyond it. */
export interface BathroomFaults {
  /** Traps and guests that belong to no group, and their kinds, each once. */
  readonly outside: number;
  readonly kinds: readonly string[];
  readonly groups: number;
  readonly storeys: number;
}

/** Everything that drains into the wet vent: its traps, and fixtures with vents of their own that join before its end. */
export function bathroomFaults(
  { traps, guests, wet }: BatteryFacts,
  partOf: (row: FixtureRow) => BathroomPart | null,
  size: GroupSize,
): BathroomFaults {
  const last = Math.max(...traps.map(({ place }) => place));
  const ends = new Set(traps.filter(({ place }) => place === last).map(({ joins }) => joins));
  const inside: readonly (BatteryTrap | Guest)[] = [...traps, ...guests.filter(({ joins }) => !ends.has(joins))];
  const outside = inside.filter(({ row }) => partOf(row) === null);
  return {
    outside: outside.length,
    kinds: [...new Set(outside.map(({ kind }) => kind ?? 'unidentified fixture'))].sort(),
    groups: groupsNeeded(
      inside.map(({ row }) => partOf(row)),
      size,
    ),
    storeys: wet.storeys,
  };
}
