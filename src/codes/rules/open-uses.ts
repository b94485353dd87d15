import type { FixtureRows } from '../fixture-row.ts';
import { signsOf } from './open-details.ts';

/** Uses that each settle the row of a fixture: where the setting is open and nothing but it. */
export function openUses(
  set: string | null,
  uses: readonly string[],
  rowsOf: (use: string) => FixtureRows,
): NonNullable<FixtureRows['openUses']> {
  if (set !== null) return () => null;
  const each = uses.map(rowsOf);
  return (kind, detail) => (each.every((rows) => signsOf(rows.rowsFor(kind, detail)).size === 1) ? uses : null);
}
