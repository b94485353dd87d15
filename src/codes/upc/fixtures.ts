import type { FixtureDetail, FixtureKind } from '../../model/identity.ts';
import { rowsHolding } from '../../tables/find-row.ts';
import type { Load } from '../../units/quantity.ts';
import type { FixtureRows } from '../fixture-row.ts';
import type { CountedFixture, FixtureCount, PlumbingCode, RowLoadRule } from '../plumbing-code.ts';
import { type GroupSize, partBy } from '../rules/bathroom-parts.ts';
import { fixtureRows } from '../rules/fixture-rows.ts';
import { countBowlsOnce } from '../rules/one-trap.ts';
import { openUses } from '../rules/open-uses.ts';
import { steadyLoadBy } from '../rules/steady-load.ts';
import type { Tools } from '../tools.ts';

/**
 * Loads of Table 702.1 in the column of the use that the user set, else private to public; assembly is never guessed (R03,
 * R07). An emergency floor drain is printed for public use alone, and is nothing in a home either.
 */
export function fixtures(tools: Tools): FixtureRows {
  const rowsOf = (uses: readonly string[]): FixtureRows =>
    fixtureRows(tools, {
      columns: uses.map((use) => ({ load: use, outlet: 'trap', facts: { use } })),
      isSiphonic: (_, kind) => kind === 'water-closet',
      isEmergency: (key) => key === 'floor-drain-emergency',
    });
  const uses = usesOf(tools);
  const [own, emergency] = [rowsOf(uses), rowsOf(['public'])];
  const bookFor = (kind: FixtureKind | null, detail: FixtureDetail): FixtureRows =>
    kind === 'floor-drain' && detail.emergency === true ? emergency : own;
  return {
    rowsFor: (kind, detail) => bookFor(kind, detail).rowsFor(kind, detail),
    openDetails: (kind, detail) => bookFor(kind, detail).openDetails(kind, detail),
    openUses: openUses(uses.length === 1 ? uses[0]! : null, [...uses, 'assembly'], (use) => rowsOf([use])),
  };
}

const usesOf = ({ settings }: Tools): readonly string[] =>
  typeof settings.use === 'string' ? [settings.use] : ['private', 'public'];

/** What a row is of a bathroom group (chapter 2, R06). */
export const partOf = partBy({
  lavatory: 'lavatory',
  'lavatories-set': 'lavatory',
  bathtub: 'bath',
  shower: 'shower',
  'bidet-1.25': 'bidet',
  'bidet-1.5': 'bidet',
  'floor-drain-emergency': 'emergency-drain',
});

/** One closet, two lavatories, one bathtub and one shower, and with them a bidet and an emergency floor drain (chapter 2, R06). */
export const groupSize = ({ family }: Tools): GroupSize => ({
  closet: { slot: 'closet', most: family.number('group-closets', 'count').value },
  lavatory: { slot: 'lavatory', most: family.number('group-lavatories', 'count').value },
  bath: { slot: 'bath', most: 1 },
  shower: { slot: 'shower', most: 1 },
  bidet: { slot: 'bidet', most: 1 },
  'emergency-drain': { slot: 'emergency drain', most: 1 },
});

/** Up to three compartments over one trap are one sink; what drains through it adds nothing (Table 702.1). */
export const sharedTrap = countBowlsOnce({
  bowls: new Set<FixtureKind>(['sink', 'kitchen-sink', 'laundry-tray']),
  most: 3,
  through: new Set<FixtureKind>(['dishwasher', 'garbage-grinder', 'clothes-washer']),
});

/** Three clothes washers or more side by side count more on the drains they share (Table 702.1 note 5, R11). */
export const washerRow = ({ family }: Tools): RowLoadRule => ({
  clause: family.rule('UPC-R11').clause,
  kind: 'clothes-washer',
  least: family.number('washers-from', 'count').value,
  each: family.number('washers-load', 'load').value as Load,
});

/** Continuous flow by litres a second; one that comes and goes by its band (702.2, 702.3, R09, R10). */
export function flowLoad({ family }: Tools): NonNullable<PlumbingCode['steadyLoad']> {
  const steady = steadyLoadBy(family.number('continuous-flow', 'factor'));
  const bands = family.table('loads-by-flow');
  return (litresASecond, intermittent) => {
    // A rounding of the printed gallons is no larger flow.
    const band = rowsHolding(bands, 'flow', litresASecond - bandRounding)[0]?.amount('load');
    // Past the last band the authority decides: the flow counts as if it never stopped.
    return intermittent && typeof band?.value === 'number'
      ? { load: band.value as Load, cell: band }
      : steady(litresASecond, intermittent);
  };
}
const bandRounding = 1e-4;

/** Traps of six units or more count as closets do (Table 703.2, notes 3 and 4). */
export const sixUnitTraps = 'six-unit traps';
/** Sinks, urinals and dishwashers whose drain is 2 in after the trap arm (Table 702.1, Table 703.2 note 2). */
export const wideAfterArm = 'sinks, urinals and dishwashers';
/** Fixtures that make suds (711.1). */
export const sudsMakers = 'suds makers';

export function counts({ family }: Tools): FixtureCount[] {
  const table = family.table('fixtures');
  const six = family.number('six-unit-trap', 'load');
  const after = family.size('drain-after-arm');
  const suds = new Set<FixtureKind | null>(['kitchen-sink', 'laundry-tray', 'clothes-washer', 'dishwasher']);
  /** Rows of one kind for several traps: the one of this trap, else the first. */
  const rowOf = ({ row, trap }: CountedFixture) => {
    const rows = row.id.split(' / ').flatMap((id) => table.rows.find(({ name }) => name === id) ?? []);
    return rows.find((one) => one.size('trap').value === trap) ?? rows[0];
  };
  return [
    // By its row: a flow that is stated for a fixture makes no larger trap of it.
    { id: sixUnitTraps, takes: ({ row, trap }) => !row.closet && row.loadAt(trap).load >= six.value },
    { id: wideAfterArm, takes: (fixture) => rowOf(fixture)?.size('drain').value === after.value },
    { id: sudsMakers, takes: ({ kind }) => suds.has(kind) },
  ];
}
