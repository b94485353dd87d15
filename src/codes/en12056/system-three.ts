import { reachesSlope } from '../../tables/find-slope.ts';
import type { Amount, Cell, Row, Table } from '../../tables/table.ts';
import type { NominalSize } from '../../units/nominal-size.ts';
import type { CountedFixture, FixtureCount } from '../plumbing-code.ts';
import type { SizingRule } from '../sizing-rule.ts';
import type { Tools } from '../tools.ts';
import type { PipeUse } from '../use.ts';
import type { Carried, Way } from '../way.ts';
import type { Breach } from './breach.ts';
import { cellStep } from './steps.ts';
import { isLine, systemOf } from './system.ts';

/** Appliance of Tables 6 and 9 that a row of Table 2 is, by the fixture's trap where that tells two apart. */
function applianceOf({ kind, row, trap }: CountedFixture, rank: (size: NominalSize) => number, limit: number): string {
  if (kind === 'garbage-grinder') return 'food-waste';
  if (row.closet) return rank(trap) <= limit ? 'wc-to-80' : 'wc-above-80';
  const known: Readonly<Record<string, string>> = {
    'wash-basin': 'wash-basin',
    'shower-no-plug': 'shower-bath',
    'shower-plug': 'shower-bath',
    bath: 'shower-bath',
    'urinal-cistern': 'urinal-bowl',
    'urinal-valve': 'urinal-bowl',
    'urinal-slab': 'urinal-slab',
    'kitchen-sink': 'kitchen-sink',
    dishwasher: 'washer',
    'washing-machine-6': 'washer',
    'washing-machine-12': 'washer',
  };
  return known[row.id] ?? floorDrain(trap);
}

const floorDrain = (trap: NominalSize): string =>
  trap === 'DN 50' ? 'floor-drain-50' : trap === 'DN 70' ? 'floor-drain-70' : 'floor-drain-100';

const appliances = [
  'wash-basin',
  'shower-bath',
  'urinal-bowl',
  'urinal-slab',
  'kitchen-sink',
  'washer',
  'wc-to-80',
  'wc-above-80',
  'food-waste',
  'floor-drain-50',
  'floor-drain-70',
  'floor-drain-100',
] as const;

/** How many of each appliance a pipe carries, which is what Tables 6 and 9 are read by. */
export function applianceCounts({ family }: Pick<Tools, 'family'>): FixtureCount[] {
  const { rank } = family.series;
  const limit = rank('DN 80' as NominalSize);
  return appliances.map((id) => ({ id, takes: (fixture) => applianceOf(fixture, rank, limit) === id }));
}

/** Rows that several appliances alike on one branch take, and how many at most. */
const groups: Readonly<
  Record<'without' | 'with', readonly { readonly of: RegExp; readonly row: string; readonly most: number }[]>
> = {
  without: [
    { of: /^wash-basin$/, row: 'basins-4', most: 4 },
    { of: /^urinal-bowl$/, row: 'urinals-bowl', most: Number.POSITIVE_INFINITY },
    { of: /^wc-/, row: 'wc-8', most: 8 },
  ],
  with: [
    { of: /^wash-basin$/, row: 'basins-5', most: 5 },
    { of: /^wash-basin$/, row: 'basins-10', most: 10 },
    { of: /^urinal-bowl$/, row: 'urinals-bowl', most: Number.POSITIVE_INFINITY },
    { of: /^wc-/, row: 'wc-many', most: Number.POSITIVE_INFINITY },
  ],
};

/** What Table 6 or 9 says of a pipe: its size, the row, and what of its way the row does not allow. */
export interface ApplianceDemand {
  readonly cell: Cell;
  readonly size: NominalSize;
  readonly row: Row;
  readonly breaches: readonly Breach[];
}

export type ApplianceTables = (
  carried: Pick<Carried, 'counts' | 'fixtures'>,
  way: Way | null,
  ventilated: boolean,
) => ApplianceDemand | null;

/** System III: each appliance has its own row, several on one branch only as the tables list them (R12, R14). */
export function applianceTables(tools: Tools): ApplianceTables {
  const { family, omit } = tools;
  const { rank } = family.series;
  const tables = { without: family.table('appliance-unventilated'), with: family.table('appliance-ventilated') };
  const rowsOf = (table: Table, appliance: string): readonly Row[] =>
    table.rows.filter(
      (row) =>
        row.text('fixture') === appliance || (/^floor-drain/.test(appliance) && row.text('fixture') === 'floor-drain'),
    );

  const sizeIn = (row: Row, appliance: string): { cell: Cell; size: NominalSize } | null => {
    const cell = row.size('size');
    // The table leaves a floor drain its own size.
    const label = cell.value === 'NA' ? `DN ${/\d+$/.exec(appliance)?.[0] ?? ''}` : cell.value;
    return label !== null && family.series.has(label) && !omit.has(label as NominalSize)
      ? { cell, size: label as NominalSize }
      : null;
  };
  const demand = (rows: readonly Row[], appliance: string, way: Way | null): ApplianceDemand | null => {
    const bySize = new Map<NominalSize, { cell: Cell; rows: Row[] }>();
    for (const row of rows) {
      const found = sizeIn(row, appliance);
      if (found === null) continue;
      const known = bySize.get(found.size);
      if (known === undefined) bySize.set(found.size, { cell: found.cell, rows: [row] });
      else known.rows.push(row);
    }
    const offers = [...bySize]
      .sort(([a], [b]) => rank(a) - rank(b))
      .map(([size, { cell, rows: own }]) => ({
        cell,
        size,
        row: own[0]!,
        breaches: way === null ? [] : breachesOf(own, way),
      }));
    return offers.find(({ breaches }) => breaches.length === 0) ?? offers.at(-1) ?? null;
  };

  return ({ counts, fixtures }, way, ventilated) => {
    const side = ventilated ? 'with' : 'without';
    const table = tables[side];
    const present = appliances.filter((id) => (counts[id] ?? 0) > 0);
    const [first, ...others] = present;
    if (first === undefined) return null;
    if (fixtures === 1) return demand(rowsOf(table, first), first, way);
    const alike = present.every((id) => sortOf(id) === sortOf(first));
    const group = alike ? groups[side].find(({ of, most }) => of.test(first) && fixtures <= most) : undefined;
    if (group !== undefined) {
      const found = demand(rowsOf(table, group.row), first, way);
      if (found !== null) return found;
    }
    // No row lists them together: the largest of their own, and the branch breaks the table.
    const own = [first, ...others].flatMap((id) => demand(rowsOf(table, id), id, null) ?? []);
    const largest = own.reduce<ApplianceDemand | null>(
      (a, b) => (a === null || rank(b.size) > rank(a.size) ? b : a),
      null,
    );
    return largest === null
      ? null
      : { ...largest, breaches: [{ what: 'group', value: fixtures, limit: group?.most ?? 1 }] };
  };
}

const sortOf = (id: string): string => id.replace(/^(wc|floor-drain)-.*$/, '$1');

/** Sizes of branches in system III. */
export function systemThreeRules(tools: Tools, ask: ApplianceTables): SizingRule[] {
  if (systemOf(tools) !== 'III') return [];
  const { rule } = tools.family;
  const byAppliance = (pipe: PipeUse, ventilated: boolean, id: string) => {
    if (!isLine(pipe.drain) || (pipe.reach?.ventilated ?? false) !== ventilated) return undefined;
    const found = ask(pipe, pipe.reach?.way ?? null, ventilated);
    return found === null
      ? undefined
      : cellStep(rule(id), found.cell, found.size, { fixtures: pipe.fixtures, row: found.row.text('title') });
  };
  return [
    { id: 'EN-R12', reads: 'use', ask: (pipe) => byAppliance(pipe, false, 'EN-R12') },
    { id: 'EN-R14', reads: 'use', ask: (pipe) => byAppliance(pipe, true, 'EN-R14') },
  ];
}

/** What of a way the rows of one size do not allow. Several rows of one size are points of a curve: shorter may be steeper. */
function breachesOf(rows: readonly Row[], way: Way): Breach[] {
  const first = rows[0]!;
  const breaches: Breach[] = [];
  const over = (what: Breach['what'], value: number, limit: Amount, room: number): void => {
    if (typeof limit === 'number' && value > limit + room) breaches.push({ what, value, limit });
  };
  over('length', way.length, longestOf(rows), coordinate);
  over('bends', way.bends, first.amount('bends').value, turn);
  over('drop', way.drop, first.amount('drop').value, coordinate);
  const least = Math.min(...rows.map((row) => row.amount('slopeLeast').value as number));
  const most = steepestAt(rows, way.length);
  if (way.flattest !== null && !reachesSlope(way.flattest, least))
    breaches.push({ what: 'slope', value: way.flattest, limit: least });
  if (way.steepest !== null && most !== null && way.steepest > most * (1 + slopeAgreement))
    breaches.push({ what: 'steep', value: way.steepest, limit: most });
  return breaches;
}

function longestOf(rows: readonly Row[]): Amount {
  const lengths = rows.map((row) => row.amount('longest').value);
  return lengths.includes('NL') ? 'NL' : Math.max(...(lengths as number[]));
}

/** Steepest fall that a length may have: between two printed points a straight line. null: no upper figure. */
export function steepestAt(rows: readonly Row[], length: number): number | null {
  const points = rows
    .flatMap((row) => {
      const [longest, most] = [row.amount('longest').value, row.amount('slopeMost').value];
      return typeof most === 'number'
        ? [{ length: typeof longest === 'number' ? longest : Number.POSITIVE_INFINITY, most }]
        : [];
    })
    .sort((a, b) => a.length - b.length);
  const shortest = points[0];
  if (shortest === undefined) return null;
  const after = points.findIndex((point) => point.length >= length);
  if (after === 0) return shortest.most;
  if (after < 0) return points.at(-1)!.most;
  const [a, b] = [points[after - 1]!, points[after]!];
  return Number.isFinite(b.length)
    ? b.most + ((b.length - length) / (b.length - a.length)) * (a.most - b.most)
    : b.most;
}

/** Lengths carry a millimetre, turns a hundredth of a bend; a decimal slope is the printed one within half a percent. */
const coordinate = 0.001;
const turn = 0.01;
const slopeAgreement = 0.005;
