import type { FixtureKind } from '../../model/identity.ts';
import type { SharedTrapRule } from '../plumbing-code.ts';

export interface OneTrapRule {
  /** Kinds of which several bowls over one trap count as one. */
  readonly bowls: ReadonlySet<FixtureKind>;
  /** Most bowls that one trap may take. */
  readonly most: number;
  /** Kinds that add nothing where they drain through a bowl. */
  readonly through: ReadonlySet<FixtureKind>;
}

/** Bowls over one trap count once, the heaviest of them; what drains through a bowl counts nothing, unless commercial. */
export const countBowlsOnce =
  ({ bowls, most, through }: OneTrapRule): SharedTrapRule =>
  (fixtures) => {
    const isBowl = fixtures.map(({ kind, domestic }) => kind !== null && bowls.has(kind) && domestic !== false);
    const counts = fixtures.map(
      ({ kind, domestic }) => !(isBowl.includes(true) && domestic !== false && kind !== null && through.has(kind)),
    );
    const sorts = new Set(fixtures.flatMap(({ kind }, at) => (isBowl[at] ? [kind] : [])));
    for (const sort of sorts) {
      const alike = fixtures.flatMap(({ kind }, at) => (isBowl[at] && kind === sort ? [at] : []));
      if (alike.length > most) continue;
      const heaviest = alike.reduce((a, b) => (fixtures[b]!.load > fixtures[a]!.load ? b : a));
      for (const at of alike) counts[at] = at === heaviest;
    }
    return counts;
  };
