import { describe, expect, test } from 'vitest';
import {
  asInches,
  compareRows,
  type Expected,
  openOwn,
  type ReferenceRow,
  reference,
  referenceFiles,
  referenceNote,
  referenceThere,
} from '../support/table-files.ts';

// Every cell of the other three families against the figures that they were typed from.
interface Case {
  readonly table: string;
  readonly file: string;
  readonly cells: number;
  readonly expected: Expected;
  /** The rows to compare with, where print is turned or a row holds words. */
  readonly rows?: (rows: readonly ReferenceRow[]) => readonly ReferenceRow[];
}
type Cell = (row: ReferenceRow) => unknown;

const plain =
  (key: string): Cell =>
  (row) =>
    row[key];
const sized =
  (key: string): Cell =>
  (row) =>
    asInches(row[key]);
const orNA =
  (key: string): Cell =>
  (row) =>
    row[key] ?? 'NA';
const sizedOrNA =
  (key: string): Cell =>
  (row) =>
    typeof row[key] === 'number' ? asInches(row[key]) : 'NA';
const dn =
  (key: string): Cell =>
  (row) =>
    typeof row[key] === 'number' ? `DN ${row[key]}` : (row[key] ?? 'NA');
const perColumn = (heads: readonly string[], ours: (head: string) => string): Expected =>
  Object.fromEntries(heads.map((head) => [ours(head), plain(head)]));
const same = (...keys: readonly string[]): Expected => Object.fromEntries(keys.map((key) => [key, plain(key)]));

const ipcVents = ['1.25', '1.5', '2', '2.5', '3', '4'];
const ipc: readonly Case[] = [
  { table: 'slope', file: 'table-704.1', cells: 3, expected: { slope: plain('inPerFt') } },
  {
    table: 'cleanouts',
    file: 'table-708.1',
    cells: 12,
    expected: { cleanout: sizedOrNA('cleanoutSize'), spacing: plain('spacingFt'), clearance: orNA('clearanceIn') },
  },
  {
    table: 'fixtures',
    file: 'table-709.1',
    cells: 99,
    expected: { fixture: plain('key'), trap: sizedOrNA('trapSize'), load: orNA('load') },
  },
  { table: 'loads-by-trap', file: 'table-709.2', cells: 12, expected: { trap: sized('trap'), load: plain('load') } },
  {
    table: 'drain',
    file: 'table-710.1-1',
    cells: 60,
    expected: { size: sized('size'), ...same('1:192', '1:96', '1:48', '1:24') },
  },
  {
    table: 'branch-and-stack',
    file: 'table-710.1-2',
    cells: 55,
    expected: {
      size: sized('size'),
      branch: plain('branch'),
      oneInterval: orNA('oneInterval'),
      stackUpTo3: orNA('stackUpTo3'),
      stackOver3: orNA('stackOver3'),
    },
  },
  {
    table: 'stack-vent',
    file: 'table-906.1',
    cells: 38 * 13,
    expected: {
      stack: sized('stack'),
      load: plain('load'),
      ...perColumn([...ipcVents, '5', '6', '8', '10', '12'], asInches),
    },
  },
  {
    table: 'sump-vent',
    file: 'table-906.5.1',
    cells: 84,
    expected: { flow: plain('gpm'), ...perColumn(ipcVents, asInches) },
  },
  {
    table: 'trap-arm',
    file: 'table-909.1',
    cells: 15,
    expected: { trap: sized('trap'), slope: plain('slope'), longest: plain('maxFt') },
  },
  { table: 'common-vent', file: 'table-911.3', cells: 8, expected: { size: sized('size'), upper: plain('upperMax') } },
  { table: 'wet-vent', file: 'table-912.3', cells: 8, expected: { size: sized('size'), load: plain('load') } },
  {
    table: 'waste-stack',
    file: 'table-913.4',
    cells: 21,
    expected: { size: sized('size'), ...same('oneInterval', 'total') },
  },
  {
    table: 'combination',
    file: 'table-915',
    cells: 18,
    expected: { size: sized('size'), ...same('toBranchOrStack', 'toBuildingDrain') },
  },
  {
    table: 'single-stack',
    file: 'table-917.2',
    cells: 32,
    expected: { size: sized('size'), ...same('under75', 'under160', 'over160') },
  },
];

const loadFor =
  (use: string): Cell =>
  (row) =>
    row.key === 'floor-drain' ? { '2 in': row[use] } : (row[use] ?? 'NA');
const pair =
  (slope: string, at: 0 | 1): Cell =>
  (row) =>
    (row[slope] as readonly number[])[at];
const upc: readonly Case[] = [
  {
    table: 'fixtures',
    file: 'table-702.1',
    cells: 42 * 6,
    expected: {
      fixture: plain('key'),
      trap: sizedOrNA('trapSize'),
      private: loadFor('private'),
      public: loadFor('public'),
      assembly: loadFor('assembly'),
      drain: sizedOrNA('minDrain'),
    },
  },
  { table: 'loads-by-trap', file: 'table-702.2-1', cells: 10, expected: { trap: sized('trap'), load: plain('load') } },
  {
    table: 'loads-by-flow',
    file: 'table-702.2-2',
    cells: 12,
    rows: (rows) => rows.filter(({ toGpm }) => toGpm !== null),
    expected: { flow: plain('toGpm'), from: plain('fromGpm'), load: plain('load') },
  },
  {
    table: 'drains-and-vents',
    file: 'table-703.2',
    cells: 77,
    expected: {
      size: sized('size'),
      ...same('vertical', 'horizontal'),
      verticalLength: plain('verticalLengthFt'),
      horizontalLength: plain('horizontalLengthFt'),
      vent: orNA('ventUnits'),
      ventLength: orNA('ventLengthFt'),
    },
  },
  {
    table: 'cleanouts',
    file: 'table-707.1',
    cells: 10,
    expected: { pipe: sized('pipe'), cleanout: plain('cleanout') },
  },
  {
    table: 'sewer',
    file: 'table-717.1',
    cells: 21,
    rows: (rows) => rows.filter(({ size }) => typeof size === 'number'),
    expected: {
      size: sized('size'),
      ...Object.fromEntries(['1:192', '1:96', '1:48'].map((slope) => [slope, pair(slope, 0)])),
      ...Object.fromEntries(['1:192', '1:96', '1:48'].map((slope) => [`least ${slope}`, pair(slope, 1)])),
    },
  },
  {
    table: 'trap-arm',
    file: 'table-1002.2',
    cells: 12,
    expected: { shortest: (row) => (typeof row.minIn === 'number' ? row.minIn : 'NA'), longest: plain('maxFt') },
  },
];

const systems = ['I', 'II', 'IV'];
const limitOf = (row: ReferenceRow, system: string): string | undefined =>
  (row.limits as Record<string, string> | undefined)?.[system];
/** noWC, max1WC, max2WCturn90 stand at one size and count for every smaller one. */
const closets =
  (rows: readonly ReferenceRow[], system: string): Cell =>
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
  (key: 'dn70OrLess' | 'dnAbove70'): Cell =>
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
  (system: string, end: 'min' | 'max'): Cell =>
  (row) => {
    const value = row[system];
    if (typeof value === 'object' && value !== null) return (value as Record<string, number>)[end];
    return end === 'min' ? 'NA' : (value ?? 'NA');
  };
const gradient =
  (at: 0 | 1): Cell =>
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
  (system: string, at: 0 | 1): Cell =>
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

/** Computed figures, text, sources and rules: no printed table stands in them. */
const noTables = /^(index|sources|rules?-|worked|loads-by-role|edition-differences|annex-b-qww|din-1986-100)/;

const families: readonly [family: string, base: string, cases: readonly Case[], apart: readonly string[]][] = [
  ['ipc', 'ipc-2015', ipc, []],
  ['upc', 'upc-2015', upc, []],
  ['en12056', 'en12056-2000', en, ['din-units', 'din-reach', 'din-branch-unventilated', 'din-branch-ventilated']],
];

for (const [family, base, cases, apart] of families)
  describe.skipIf(!referenceThere)(`every cell of ${base} against its reference${referenceNote}`, () => {
    const code = openOwn(base);
    for (const { table, file, cells, expected, rows } of cases)
      test(`${table}: ${cells} cells of ${file}`, () => {
        const theirs = reference(`${family}/${file}.json`).rows;
        const { seen, wrong } = compareRows(code.table(table), rows === undefined ? theirs : rows(theirs), expected);
        expect(wrong).toEqual([]);
        expect(seen).toBe(cells);
      });

    test('every table of ours and every table of the reference has been compared', () => {
      expect([...cases.map(({ table }) => table), ...apart].sort()).toEqual(code.tables.map(({ id }) => id).sort());
      const files = referenceFiles(family).filter((name) => name.endsWith('.json') && !noTables.test(name));
      const sizes = family === 'en12056' ? [] : ['sizes.json'];
      expect([...cases.map(({ file }) => `${file}.json`), ...sizes].sort()).toEqual(files);
    });

    test('every rule with its clause', () => {
      const rules = referenceFiles(family)
        .filter((name) => name.startsWith('rules-'))
        .flatMap((name) => reference(`${family}/${name}`).rows);
      expect(rules.length).toBe(code.rules.size);
      for (const { id, clause } of rules)
        expect(code.rules.get(String(id))?.clause, String(id)).toBe(clause === '-' ? 'none' : clause);
    });

    test('every number of a rule stands among ours, in its unit', () => {
      let seen = 0;
      const rules = referenceFiles(family)
        .filter((name) => name.startsWith('rules-'))
        .flatMap((name) => reference(`${family}/${name}`).rows);
      const inches = 0.0254;
      for (const rule of rules) {
        const ours = code.numbers.all.filter((number) => number.rule === rule.id);
        for (const [name, value] of Object.entries(rule.parameters as object)) {
          if (typeof value !== 'number' || elsewhere.has(`${rule.id} ${name}`)) continue;
          seen += 1;
          const readings: readonly unknown[] = [
            value,
            asInches(value),
            `DN ${value}`,
            value * 60,
            value * inches,
            value * inches * 12,
            value / 12,
            value / 1000,
            (value * 60) / 3.785411784,
          ];
          const found = ours.some(({ cell }) =>
            readings.some((reading) =>
              typeof reading === 'number' && typeof cell.value === 'number'
                ? Math.abs(reading - cell.value) <= 5e-4 * Math.abs(reading)
                : reading === cell.value,
            ),
          );
          expect(found, `${rule.id} ${name} ${value}`).toBe(true);
        }
      }
      expect(seen).toBe({ ipc: 66, upc: 66, en12056: 9 }[family]);
    });
  });

/** Cells of tables of ours, or the same figure said twice. */
const elsewhere = new Set([
  'IPC-R12 group16',
  'IPC-R12 groupOver16',
  'IPC-R15 upTo2.5',
  'IPC-R15 3to6',
  'IPC-R15 from8',
  'IPC-R85 designF',
  'EN-R23 I',
  'EN-R23 II',
  'EN-R23 III',
  'EN-R23 IV',
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
