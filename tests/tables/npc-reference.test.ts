import { describe, expect, test } from 'vitest';
import type { Trust } from '../../src/tables/table.ts';
import {
  asInches,
  compareRows,
  type Expected,
  openOwn,
  type ReferenceRow,
  reference,
  referenceNote,
  referenceThere,
} from '../support/table-files.ts';

// A second pair of eyes: every cell of our tables against the figures that they were typed from, column by column.
const npc = openOwn('npc-2020');
const plain =
  (key: string) =>
  (row: ReferenceRow): unknown =>
    row[key];
const sized =
  (key: string) =>
  (row: ReferenceRow): unknown =>
    asInches(row[key]);
const perColumn = (heads: readonly string[], ours: (head: string) => string): Expected =>
  Object.fromEntries(heads.map((head) => [ours(head), plain(head)]));
const vents = ['1.25', '1.5', '2', '3', '4', '5', '6', '8'];
const slopes = ['1:400', '1:200', '1:133', '1:100', '1:50', '1:25'];

const trapLoads = (row: ReferenceRow): unknown =>
  row.loadByTrap === null
    ? (row.load ?? 'NA')
    : Object.fromEntries(
        Object.entries(row.loadByTrap as object)
          .sort(([a], [b]) => Number(a) - Number(b))
          .map(([trap, load]) => [asInches(trap), load]),
      );

const cases: readonly { file: string; table: string; cells: number; expected: Expected }[] = [
  {
    file: '2.4.9.3',
    table: 'fixtures',
    cells: 36 * 3,
    expected: {
      fixture: plain('key'),
      outlet: (row) => (row.outletSize === null ? 'NA' : asInches(row.outletSize)),
      load: trapLoads,
    },
  },
  { file: '2.4.10.2', table: 'loads-by-trap', cells: 12, expected: { trap: sized('trap'), load: plain('load') } },
  {
    file: '2.4.10.6-A',
    table: 'stack',
    cells: 33,
    expected: { size: sized('size'), total: plain('total'), oneStorey: plain('oneStorey') },
  },
  { file: '2.4.10.6-B', table: 'branch', cells: 24, expected: { size: sized('size'), load: plain('load') } },
  {
    file: '2.4.10.6-C',
    table: 'drain',
    cells: 56,
    expected: { size: sized('size'), ...perColumn(slopes, (head) => head) },
  },
  {
    file: '2.4.7.2',
    table: 'cleanouts',
    cells: 9,
    expected: {
      cleanout: (row) => (row.cleanoutSize === null ? 'NA' : asInches(row.cleanoutSize)),
      oneWay: plain('oneWay'),
      twoWay: plain('twoWay'),
    },
  },
  {
    file: '2.5.6.3',
    table: 'trap-arm',
    cells: 15,
    expected: { trap: sized('trap'), longest: plain('maxLength'), slope: plain('minSlopeText') },
  },
  { file: '2.5.7.1', table: 'vent-by-trap', cells: 14, expected: { trap: sized('trap'), vent: sized('vent') } },
  {
    file: '2.5.8.1',
    table: 'wet-vent',
    cells: 21,
    expected: { size: sized('size'), noCloset: plain('noWC'), withCloset: plain('withWC') },
  },
  {
    file: '2.5.8.3',
    table: 'vent-length',
    cells: 14 * 9,
    expected: { load: plain('load'), ...perColumn(vents, asInches) },
  },
  {
    file: '2.5.8.4',
    table: 'stack-vent',
    cells: 36 * 12,
    expected: { stack: sized('stack'), load: plain('load'), ...perColumn([...vents, '10', '12'], asInches) },
  },
];

describe.skipIf(!referenceThere)(
  `every cell of the National Plumbing Code against its reference${referenceNote}`,
  () => {
    for (const { file, table, cells, expected } of cases)
      test(`${table}: ${cells} cells of Table ${file}`, () => {
        const { seen, wrong } = compareRows(npc.table(table), reference(`npc/table-${file}.json`).rows, expected);
        expect(wrong).toEqual([]);
        expect(seen).toBe(cells);
      });

    test('every table of the code has been compared', () => {
      // Where cleanouts stand is told in clauses, not in a printed table.
      const printed = npc.tables.filter(({ id }) => id !== 'cleanout-places');
      expect(cases.map(({ table }) => table).sort()).toEqual(printed.map(({ id }) => id).sort());
    });

    test('trap arm slopes are the reference’s decimals', () => {
      const rows = reference('npc/table-2.5.6.3.json').rows;
      expect(npc.table('trap-arm').rows.map((row) => row.amount('slope').value)).toEqual(
        rows.map(({ minSlope }) => minSlope),
      );
    });

    test('sizes: label, DN and soft metric of every one', () => {
      const theirs = reference('npc/sizes.json').rows;
      expect(npc.series.sizes.map(({ label, dn }) => ({ label, dn }))).toEqual(
        theirs.map(({ nominal, dn }) => ({ label: asInches(nominal), dn })),
      );
      for (const [index, { lengthsMm }] of npc.series.sizes.entries()) {
        const { nominal, dn, soft } = theirs[index] ?? {};
        for (const length of [Number(nominal) * 25.4, dn, soft])
          expect(lengthsMm.some((mm) => Math.abs(mm - Number(length)) < 1e-9)).toBe(true);
      }
    });

    test('no cell is trusted more than its reference allows', () => {
      // Said in words, not flags, by the reference: totals of small stacks agree with the Ontario print.
      const saidInWords = new Set(['stack|1¼ in|total', 'stack|1½ in|total', 'stack|2 in|total']);
      const rank: Record<Trust, number> = { memory: 0, 'cross-checked': 1, published: 2 };
      const wrong: string[] = [];
      let seen = 0;
      for (const { file, table } of cases) {
        const theirs = reference(`npc/table-${file}.json`);
        const provenance = theirs.provenance as ReferenceRow;
        for (const [index, row] of npc.table(table).rows.entries()) {
          const flags = { ...provenance, ...theirs.rows[index] };
          const most: Trust =
            provenance.kind === 'published' ? 'published' : flags.crossChecked ? 'cross-checked' : 'memory';
          for (const { id, dimension } of npc.table(table).columns) {
            if (dimension === 'key' || dimension === 'text' || npc.table(table).key.includes(id)) continue;
            seen += 1;
            if (rank[row.cell(id).trust] > rank[most] && !saidInWords.has(`${table}|${row.name}|${id}`))
              wrong.push(`${table}, ${row.name}, ${id}: ${row.cell(id).trust}, at most ${most}`);
          }
        }
      }
      expect(wrong).toEqual([]);
      expect(seen).toBeGreaterThan(640);
    });
  },
);

const ruleFiles = [
  'terms',
  'loads',
  'drains',
  'cleanouts',
  'traps',
  'wet-vent',
  'circuit-vent',
  'stacks',
  'vent-size',
  'terminals',
];

describe.skipIf(!referenceThere)(`rules and lone numbers against their reference${referenceNote}`, () => {
  const rules = referenceThere ? ruleFiles.flatMap((name) => reference(`npc/rules-${name}.json`).rows) : [];

  test('87 rules with the clause of each edition', () => {
    expect(rules).toHaveLength(87);
    for (const edition of ['2005', '2010', '2015', '2020']) {
      const ours = openOwn(`npc-${edition}`).rules;
      expect([...ours.keys()]).toEqual(rules.map(({ id }) => id).sort());
      for (const { id, clauseByEdition } of rules)
        expect(ours.get(String(id))?.clause, `${id} ${edition}`).toBe((clauseByEdition as ReferenceRow)[edition]);
    }
  });

  // Which of our numbers a parameter of the reference is. Sizes in inches, lengths in metres, loads in fixture units.
  const numbers: Record<string, Record<string, string>> = {
    'NPC-R01': { verticalMaxAngleFromVerticalDeg: 'vertical-angle' },
    'NPC-R04': { sewerStartsOutsideWallM: 'sewer-start' },
    'NPC-R10': { fuPerLps: 'continuous-flow' },
    'NPC-R15': { maxM: 'outlet-pipe-length' },
    'NPC-R18': { minOffsetM: 'stack-offset-length' },
    'NPC-R21': { minIn: 'closet-drain' },
    'NPC-R22': { closets: 'closets-branch-count', minIn: 'closets-branch-size' },
    'NPC-R23': { maxClosetsOn3in: 'closets-stack-most', minIn: 'closets-stack-size' },
    'NPC-R24': { minIn: 'macerator-discharge' },
    'NPC-R25': { drainMinIn: 'building-drain-least', sewerMinIn: 'building-sewer-least' },
    'NPC-R26': { upTo3in: 'slope-small', from4in: 'slope-branch-large' },
    'NPC-R27': { minM: 'foot-distance', fu: 'foot-load' },
    'NPC-R29': { minM: 'standpipe-least' },
    'NPC-R34': { maxAboveM: 'stack-cleanout-within' },
    'NPC-R37': { minTrapIn: 'floor-drain-free-trap', minLengthM: 'floor-drain-free-length' },
    'NPC-R39': { maxTurnsDeg: 'trap-arm-turn' },
    'NPC-R40': {
      maxVerticalM: 'closet-vent-vertical',
      maxHorizontalM: 'closet-vent-horizontal',
      maxTurnsDeg: 'closet-vent-turn',
    },
    'NPC-R44': { maxWC: 'wet-vent-closets' },
    'NPC-R45': { maxIn: 'wet-vent-arm' },
    'NPC-R46': { maxFU: 'wet-vent-guests' },
    'NPC-R47': { maxFUPerUpperStorey: 'wet-vent-upper-storey' },
    'NPC-R48': { maxCount: 'wet-vent-offsets', upTo2inM: 'wet-vent-offset-small', largerM: 'wet-vent-offset-large' },
    'NPC-R56': { minOutletIn: 'circuit-small-outlet' },
    'NPC-R58': { maxFU: 'relief-drain-load' },
    'NPC-R59': { maxBranches: 'relief-shared-branches', maxFixtures: 'relief-shared-fixtures' },
    'NPC-R60': { maxTurnDeg: 'additional-turn', maxFixtures: 'additional-fixtures' },
    'NPC-R61': { minIn: 'additional-drain' },
    'NPC-R63': { trapsBelow2in: 'circuit-branch-small', trapsFrom2in: 'circuit-branch-large' },
    'NPC-R68': { maxStoreysWithout: 'vent-stack-storeys' },
    'NPC-R69': { maxFUEach: 'vent-fixture-load', maxFixtures: 'vent-fixtures' },
    'NPC-R70': { maxFU: 'vent-stack-foot-load' },
    'NPC-R71': { maxStoreysWithout: 'yoke-storeys', section: 'yoke-section' },
    'NPC-R72': { minOffsetM: 'offset-relief-length', storeys: 'offset-relief-storeys', fu: 'offset-relief-load' },
    'NPC-R73': { capIn: 'relief-most' },
    'NPC-R78': { minIn: 'main-vent' },
    'NPC-R82': { sumpMinIn: 'tank-vent-least', sumpMaxIn: 'tank-vent-most', maceratorIn: 'macerator-vent' },
    'NPC-R84': { minIn: 'frost-least' },
  };
  /** Kept as rows of the fixture table, and as words that hold three numbers. */
  const elsewhere = ['NPC-R07', 'NPC-R28'];

  test('every parameter of a rule stands among our lone numbers', () => {
    let seen = 0;
    for (const rule of rules) {
      const id = String(rule.id);
      if (elsewhere.includes(id)) continue;
      for (const [name, value] of Object.entries(rule.parameters as object)) {
        seen += 1;
        const ours = npc.numbers.all.find((number) => number.id === numbers[id]?.[name]);
        expect(ours, `${id} ${name}`).toBeDefined();
        expect(ours?.rule).toBe(id);
        const { value: inside } = ours?.cell ?? {};
        if (ours?.unit === 'size') expect(inside, `${id} ${name}`).toBe(asInches(value));
        else if (ours?.unit === 'fu') expect(Number(inside) / 60, `${id} ${name}`).toBe(value);
        else expect(Number(inside), `${id} ${name}`).toBeCloseTo(Number(value), 12);
      }
    }
    expect(seen).toBe(56);
  });

  test('flow conversions', () => {
    const rows = reference('npc/rule-2.4.10.3-continuous-flow.json').rows;
    const value = (id: string): unknown => npc.numbers.all.find((number) => number.id === id)?.printed;
    expect(rows.map(({ factor, fixed }) => factor ?? fixed)).toEqual(
      ['continuous-flow', 'combined-continuous', 'combined-small', 'combined-per-unit'].map(value),
    );
  });
});
