import type { FixtureDetail, FixtureKind } from '../model/identity.ts';
import type { Cell } from '../tables/table.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import type { Load } from '../units/quantity.ts';

export interface FixtureRow {
  readonly id: string;
  readonly title: string;
  readonly closet: boolean;
  /** Works by siphonage and carries its trap: the distance to its vent has limits of its own. */
  readonly siphonic: boolean;
  readonly emergency: boolean;
  /** The code does not let the fixture be used; absent where it does. */
  readonly refused?: true;
  /** Least and largest trap that the row prints. */
  readonly leastTrap: NominalSize;
  readonly largestTrap: NominalSize;
  /** Load on a trap of this size. */
  loadAt(trap: NominalSize): { readonly load: Load; readonly cell: Cell };
}

export interface FixtureRows {
  /** Rows that fit what is known of a fixture, lightest first; all rows of the code when the kind is null. */
  rowsFor(kind: FixtureKind | null, detail: FixtureDetail): readonly FixtureRow[];
  /**
   * Uses of the building (setting `use`) any of which alone would settle the row of a fixture that is open; null: its use
   * is set, or is not all that is open. Absent where the code counts no use.
   */
  openUses?(kind: FixtureKind, detail: FixtureDetail): readonly string[] | null;
  /** What would tell apart the rows that a fixture of this kind may be; empty where one row is left. */
  openDetails(kind: FixtureKind, detail: FixtureDetail): readonly OpenDetail[];
}

/** A detail of a fixture that decides what it counts, and what may be said of it. */
export interface OpenDetail {
  /** A field of the fixture's detail, or the setting `use`. */
  readonly field: string;
  readonly choices: readonly (string | number | boolean)[];
}
