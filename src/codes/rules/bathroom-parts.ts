import type { FixtureRow } from '../fixture-row.ts';

export type BathroomPart = 'closet' | 'lavatory' | 'bath' | 'shower' | 'bidet' | 'emergency-drain';

/** How many of each part one bathroom group holds; parts of one name share their number. */
export type GroupSize = Readonly<Record<BathroomPart, { readonly slot: string; readonly most: number }>>;

/** Fewest bathroom groups that hold all of them; what belongs to no group is left to the caller. */
export function groupsNeeded(parts: readonly (BathroomPart | null)[], size: GroupSize): number {
  const slots = new Map<string, { count: number; most: number }>();
  for (const part of parts) {
    if (part === null) continue;
    const { slot, most } = size[part];
    slots.set(slot, { count: (slots.get(slot)?.count ?? 0) + 1, most });
  }
  return Math.max(0, ...[...slots.values()].map(({ count, most }) => Math.ceil(count / most)));
}

/** Part of a group by the fixture's row. */
export const partBy =
  (rows: Readonly<Record<string, BathroomPart>>) =>
  ({ id, closet }: FixtureRow): BathroomPart | null =>
    closet ? 'closet' : (rows[id.split(' / ')[0] ?? ''] ?? null);
