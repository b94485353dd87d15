import { describe, expect, test } from 'vitest';
import { type Case, type CellOf, compareFamily, dn, plain, same } from '../support/compare-family.ts';
import {
  type Expected,
  openOwn,
  type ReferenceRow,
  reference,
  referenceNote,
  referenceThere,
} from '../support/table-files.ts';

// Every cell against the figures that it was typed from.
const systems = ['I', 'II', 'IV'];
const limitOf = (row: ReferenceRow, system: string): string | undefined =>
  (row.limits as Record<string, string> | undefined)?.[system];
/** noWC, max1WC, max2WCturn90 stand at one size and count for every smaller one. */
const closets =
  (rows: readonly ReferenceRow[], system: string): CellOf =>
  (row) => {
    const from = rows.slice(rows.indexOf(row));
    const next = from.map((one) => limitOf(one, system)).find((limit) => limit !== undefined);
    return next === undefined ? 'NL' : Number(/\d/.exec(limitOf(row, system) ?? 'noWC')?.[0] ?? 0);
  };
const branchLimits = (rows: readonly ReferenceRow[]): Expected => ({
  ...Object.fromEntries(systems.map((system) => [`closets${system}`, closets(rows, system)])),
  turnI: (row) => (limitOf(row, 'I') === 'max2WCturn90' ? 90 : 'NL'),
});
const branchRows = (file: string): readonly ReferenceRow[] =>
  referenceThere ? reference(`en12056/${file}.json`).rows : [];
/** Print has a row for each limit and a column for each system; ours has a row for each system. */
const turned = (rows: readonly ReferenceRow[]): readonly ReferenceRow[] =>
  systems.map((system) => ({
    system,
    ...Object.fromEntries(rows.map((row) => [row.limit, row[system]])),
  }));
const drop =
  (key: 'dn70OrLess' | 'dnAbove70'): CellOf =>
  ({ maxDrop }) =>
    typeof maxDrop === 'object' ? (maxDrop as Record<string, number>)[key] : maxDrop;
const reach: Expected = {
  system: plain('system'),
  longest: plain('maxLength'),
  bends: plain('maxBends90'),
  drop: drop('dn70OrLess'),
  dropAbove70: drop('dnAbove70'),
  slope: plain('minGradient'),
};
const discharge =
  (system: string, end: 'min' | 'max'): CellOf =>
  (row) => {
    const value = row[system];
    if (typeof value === 'object' && value !== null) return (value as Record<string, number>)[end];
    return end === 'min' ? 'NA' : (value ?? 'NA');
  };
const gradient =
  (at: 0 | 1): CellOf =>
  (row) =>
    (row.gradient as readonly (number | null)[])[at] ?? 'NL';
const appliance: Expected = {
  title: plain('appliance'),
  size: dn('dn'),
  seal: plain('seal'),
  longest: plain('maxLength'),
  slopeLeast: gradient(0),
  slopeMost: gradient(1),
  bends: plain('maxBends'),
  drop: plain('maxDrop'),
};
const annexSizes = [100, 125, 150, 200, 225, 250, 300];
const bySlope = (rows: readonly ReferenceRow[]): readonly ReferenceRow[] =>
  [...new Set(rows.map(({ slopeCmPerM }) => Number(slopeCmPerM)))].map((slope) => ({
    slope,
    ...Object.fromEntries(
      rows.filter((row) => row.slopeCmPerM === slope).map((row) => [`DN ${row.dn}`, row.recalled ?? null]),
    ),
  }));
const annex: Expected = { slope: plain('slope'), ...same(...annexSizes.map((size) => `DN ${size}`)) };
const table4 = branchRows('table-4-unventilated-branch-capacity');
const table7 = branchRows('table-7-ventilated-branch-capacity');
const half =
  (system: string, at: 0 | 1): CellOf =>
  (row) =>
    Array.isArray(row[system]) ? `DN ${(row[system] as readonly number[])[at]}` : row[system];

const en: readonly Case[] = [
  {
    table: 'systems',
    file: 'systems',
    cells: 8,
    expected: { system: plain('system'), filling: (row) => (typeof row.fill === 'number' ? row.fill : 'NA') },
  },
  { table: 'sizes', file: 'table-1-sizes', cells: 30, expected: { size: dn('dn'), bore: plain('diMin') } },
  {
    table: 'discharge-units',
    file: 'table-2-discharge-units',
    cells: 18 * 6,
    expected: {
      title: plain('appliance'),
      ...Object.fromEntries(['I', 'II', 'III', 'IV'].map((system) => [system, discharge(system, 'max')])),
      IIIleast: discharge('III', 'min'),
    },
  },
  { table: 'frequency', file: 'table-3-frequency-factor', cells: 8, expected: { use: plain('key'), K: plain('K') } },
  {
    table: 'branch-unventilated',
    file: 'table-4-unventilated-branch-capacity',
    cells: 64,
    rows: () => table4,
    expected: {
      flow: plain('qMax'),
      ...Object.fromEntries(systems.map((system) => [system, dn(system)])),
      ...branchLimits(table4),
    },
  },
  {
    table: 'branch-unventilated-reach',
    file: 'table-5-unventilated-branch-limits',
    cells: 18,
    rows: turned,
    expected: reach,
  },
  {
    table: 'appliance-unventilated',
    file: 'table-6-unventilated-limits-system-III',
    cells: 21 * 8,
    expected: appliance,
  },
  {
    table: 'branch-ventilated',
    file: 'table-7-ventilated-branch-capacity',
    cells: 77,
    rows: () => table7,
    expected: {
      flow: plain('qMax'),
      ...Object.fromEntries(systems.map((system) => [system, half(system, 0)])),
      ...Object.fromEntries(systems.map((system) => [`vent${system}`, half(system, 1)])),
      ...branchLimits(table7),
    },
  },
  {
    table: 'branch-ventilated-reach',
    file: 'table-8-ventilated-branch-limits',
    cells: 18,
    rows: turned,
    expected: reach,
  },
  { table: 'appliance-ventilated', file: 'table-9-ventilated-limits-system-III', cells: 18 * 8, expected: appliance },
  {
    table: 'air-admittance',
    file: 'table-10-air-admittance',
    cells: 10,
    expected: same('where', 'I', 'II', 'III', 'IV'),
  },
  {
    table: 'stack-primary',
    file: 'table-11-primary-stack',
    cells: 24,
    expected: { size: dn('dn'), ...same('square', 'swept') },
  },
  {
    table: 'stack-secondary',
    file: 'table-12-secondary-stack',
    cells: 32,
    expected: { size: dn('dn'), vent: dn('ventDn'), ...same('square', 'swept') },
  },
  { table: 'drain-half-full', file: 'annex-drains-50', cells: 80, rows: bySlope, expected: annex },
  { table: 'drain-70-full', file: 'annex-drains-70', cells: 80, rows: bySlope, expected: annex },
];

compareFamily('en12056', 'en12056-2000', en, 9, [
  'din-units',
  'din-reach',
  'din-branch-unventilated',
  'din-branch-ventilated',
]);

describe.skipIf(!referenceThere)(`German additions${referenceNote}`, () => {
  const code = openOwn('en12056-2000');
  const din = (id: string): readonly (readonly unknown[])[] =>
    reference('en12056/din-1986-100.json').rows.find((row) => row.id === id)?.table as readonly (readonly unknown[])[];
  const figures = (table: string, columns: readonly string[]): readonly unknown[][] =>
    code.table(table).rows.map((row) => columns.map((column) => row.printed(column)));
  const size = (value: unknown): string => (value === '56/60' ? 'DN 60' : `DN ${value}`);
  test('discharge units', () => {
    expect(figures('din-units', ['title', 'I'])).toEqual(din('DIN-02'));
  });
  test('reach', () => {
    const want = din('DIN-03').map(([dnOf, , ...rest]) => [size(dnOf), ...rest]);
    expect(figures('din-reach', ['size', 'longest', 'bends', 'drop', 'slope'])).toEqual(want);
  });
  for (const [table, id] of [
    ['din-branch-unventilated', 'DIN-04'],
    ['din-branch-ventilated', 'DIN-05'],
  ] as const)
    test(table, () => {
      const want = din(id).map(([dnOf, ...rest]) => [size(dnOf), ...rest]);
      expect(figures(table, ['size', 'K0.5', 'K0.7', 'K1.0'])).toEqual(want);
    });
});
