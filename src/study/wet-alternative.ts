import { type Attempt, asModelled, attempt } from './attempt.ts';
import { unchanged, without } from './changed-piping.ts';
import type { Row } from './row.ts';

/** The row wet vented: its main vent stays, relief and additional circuit vents go. */
export function wetAlternative(row: Row): Attempt {
  const { battery, outcome } = row;
  if (battery.reading === 'wet-vent') return asModelled(row);
  return attempt(row, without(unchanged(outcome), needlessVents(row)), 'wet-vent');
}

/** Pipes of vents that only a circuit-vented row needs. One that it shares with another row stays. */
export function needlessVents({ vents, battery }: Row): Set<number & { readonly __pipe: true }> {
  const shared = battery.facts.circuit.relief?.kind === 'shared';
  return new Set(
    vents.filter(({ as }) => as === 'additional' || (as === 'relief' && !shared)).flatMap(({ pipes }) => pipes),
  );
}
