import {
  allFixtureRows,
  type FixtureColumns,
  fixtureRowsFor,
  loadAtTrap,
  type FixtureRow as PrintedRow,
  trapRange,
  unlistedFixture,
} from '../../tables/fixture-rows.ts';
import type { Load } from '../../units/quantity.ts';
import type { FixtureRow, FixtureRows } from '../fixture-row.ts';
import type { Tools } from '../tools.ts';
import { openDetails } from './open-details.ts';

/** Which columns of the fixture table hold, and the facts that go with them: one entry for each use that is open. */
export interface RowColumns extends FixtureColumns {
  /** What is known of every fixture of the building, such as its use. */
  readonly facts: Readonly<Record<string, string>>;
}

export interface RowSigns {
  readonly columns: readonly RowColumns[];
  /** Works by siphonage and carries its trap: its arm has limits of its own. */
  readonly isSiphonic: (key: string, kind: string | null) => boolean;
  readonly isEmergency: (key: string) => boolean;
}

/** Loads of fixtures: the family's fixture table, and its table by trap where that says nothing. Lightest row first. */
export function fixtureRows(
  { family }: Pick<Tools, 'family'>,
  { columns, isSiphonic, isEmergency }: RowSigns,
): FixtureRows {
  const fixtures = family.table('fixtures');
  const bind = (row: PrintedRow, kind: string | null): FixtureRow => {
    const { least, largest } = trapRange(row, family);
    return {
      id: row.key,
      title: row.title,
      closet: kind === 'water-closet',
      siphonic: isSiphonic(row.key, kind),
      emergency: isEmergency(row.key),
      leastTrap: least,
      largestTrap: largest,
      loadAt: (trap) => {
        const cell = loadAtTrap(row, trap, family) ?? loadAtTrap(row, largest, family);
        if (cell === null) throw new Error(`${family.code} has no load for ${row.key}`);
        return { load: cell.value as Load, cell };
      },
    };
  };
  const unlisted = unlistedFixture(family);
  const cache = new Map<string, readonly FixtureRow[]>();
  const rowsFor: FixtureRows['rowsFor'] = (kind, detail) => {
    const key = [kind, ...Object.entries(detail).flat()].join('|');
    const known = cache.get(key);
    if (known !== undefined) return known;
    const rows = columns.flatMap(({ facts, ...named }) =>
      kind === null
        ? allFixtureRows(family.kinds, fixtures, named, facts).map((row) => bind(row, row.kind))
        : fixtureRowsFor(family.kinds, fixtures, { kind, ...detail, ...facts }, named).map((row) => bind(row, kind)),
    );
    if (rows.length === 0 && unlisted !== null) rows.push(bind(unlisted, kind));
    const sorted = rows.sort((a, b) => a.loadAt(a.leastTrap).load - b.loadAt(b.leastTrap).load);
    cache.set(key, sorted);
    return sorted;
  };
  return { rowsFor, openDetails: openDetails(family.kinds, rowsFor) };
}
