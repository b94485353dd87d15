import type { FixtureRows } from '../fixture-row.ts';
import { signsOf } from './open-details.ts';

/** Uses that each settle the row of a fixture: where the setting is open and nothing but it. */
export const openUses =
  (
    set: string | null,
    uses: readonly string[],
    rowsOf: (use: string) => FixtureRows,
  ): NonNullable<FixtureRows['openUses']> =>
  (kind, detail) =>
    set === null && uses.every((use) => signsOf(rowsOf(use).rowsFor(kind, detail)).size === 1) ? uses : null;
