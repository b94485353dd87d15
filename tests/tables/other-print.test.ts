import { describe, expect, test } from 'vitest';
import { sizeForLength } from '../../src/tables/find-length.ts';
import { rowAtSize, rowsHolding } from '../../src/tables/find-row.ts';
import { sizeForLoad } from '../../src/tables/find-size.ts';
import { sizeAtSlope } from '../../src/tables/find-slope.ts';
import { type FixtureFacts, fixtureRowsFor, loadAtTrap, trapRange } from '../../src/tables/fixture-rows.ts';
import type { CellValue, Trust } from '../../src/tables/table.ts';
import { loadOf } from '../../src/units/quantity.ts';
import { cellAt, inches, openOwn } from '../support/table-files.ts';

// Typed by hand: the other families are held to something where no reference lies beside the checkout. For each table
// the limit itself, one step past it and past the last row.
const ipc = openOwn('ipc-2021');
const upc = openOwn('upc-2021');
const en = openOwn('en12056-2000');
const step = 1 / 60;
const feet = (value: number): number => Number((value * 0.3048).toFixed(6));
const gpm = (flow: number): number => Number(((flow * 3.785411784) / 60).toFixed(9));

describe('International Plumbing Code', () => {
  const loads: readonly [table: string, column: string, dfu: number, size: string | null, why: string][] = [
    ['branch-and-stack', 'branch', 20, '3', 'Table 710.1(2): the limit itself; five public closets'],
    ['branch-and-stack', 'branch', 20 + step, '4', 'Table 710.1(2): past it'],
    ['branch-and-stack', 'branch', 7000, '15', 'Table 710.1(2): the last limit'],
    ['branch-and-stack', 'branch', 7001, null, 'Table 710.1(2): past the last row'],
    ['branch-and-stack', 'oneInterval', 20, '3', 'Table 710.1(2): the limit itself'],
    ['branch-and-stack', 'oneInterval', 1501, null, 'Table 710.1(2): 15 in prints a branch figure only'],
    ['branch-and-stack', 'stackUpTo3', 48, '3', 'Table 710.1(2): the limit itself'],
    ['branch-and-stack', 'stackUpTo3', 49, '4', 'Table 710.1(2): past it'],
    ['branch-and-stack', 'stackOver3', 72, '3', 'Table 710.1(2): 64 fits, 72 is the limit'],
    ['branch-and-stack', 'stackOver3', 90, '4', 'Table 710.1(2): a stack for 90'],
    ['wet-vent', 'load', 4, '2', 'Table 912.3: the limit itself'],
    ['wet-vent', 'load', 12, '3', 'Table 912.3: the last limit'],
    ['wet-vent', 'load', 13, null, 'Table 912.3: above 12 no size is known'],
    ['common-vent', 'upper', 1, '1 1/2', 'Table 911.3: a lavatory above'],
    ['common-vent', 'upper', 7, null, 'Table 911.3: past the last row'],
    ['waste-stack', 'total', 20, '3', 'Table 913.4: ten sinks of 2'],
    ['waste-stack', 'oneInterval', 3, '2 1/2', 'Table 913.4: no limit from 2½ in'],
    ['waste-stack', 'total', 101, null, 'Table 913.4: past the last row'],
    ['combination', 'toBranchOrStack', 8, '3', 'Table 915.2.2: four floor drains to a stack'],
    ['combination', 'toBuildingDrain', 576, null, 'Table 915.2.2: past the last row'],
    ['single-stack', 'under75', 120, '4', 'Table 917.2: 60 ft, 120'],
    ['single-stack', 'over160', 24, '5', 'Table 917.2: not permitted at 3 and 4 in'],
    ['single-stack', 'under75', 13601, null, 'Table 917.2: past the last row'],
  ];
  for (const [table, column, dfu, size, why] of loads)
    test(`${table}, ${column}: ${dfu.toFixed(2)} takes ${size ?? 'no size'} (${why})`, () => {
      expect(sizeForLoad(ipc.table(table), column, loadOf(dfu)).size).toBe(size === null ? null : inches(size));
    });

  const drains: readonly [dfu: number, inPerFoot: number, size: string | null, why: string][] = [
    [21, 1 / 4, '2', 'the limit itself'],
    [21 + step, 1 / 4, '2 1/2', 'past it'],
    [200, 1 / 4, '4', '216'],
    [200, 1 / 8, '5', '390; 4 in has 180'],
    [12000, 1 / 2, '15', 'the last limit'],
    [12001, 1 / 2, null, 'past the last row'],
  ];
  for (const [dfu, fall, size, why] of drains)
    test(`Table 710.1(1): ${dfu.toFixed(2)} at ${fall} in per ft takes ${size ?? 'no size'} (${why})`, () => {
      expect(sizeAtSlope(ipc.table('drain'), loadOf(dfu), fall / 12).size).toBe(size === null ? null : inches(size));
    });

  const vents: readonly [stack: string, dfu: number, ft: number, size: string | null | 'none', why: string][] = [
    ['4', 120, 60, '2 1/2', 'row 140: 65 ft'],
    ['4', 140, 65, '2 1/2', 'the limit itself'],
    ['4', 140, 65.1, '3', 'past it'],
    ['4', 540, 581, null, 'longer than the last figure'],
    ['4', 541, 1, 'none', 'an overloaded stack'],
  ];
  for (const [stack, dfu, ft, size, why] of vents)
    test(`Table 906.1: ${stack} in stack, ${dfu}, ${ft} ft takes ${size ?? 'no size'} (${why})`, () => {
      const group = { column: 'stack', size: inches(stack) };
      const found = sizeForLength(ipc.table('stack-vent'), 'load', loadOf(dfu), feet(ft), { group });
      if (size === 'none') expect(found).toBeNull();
      else expect(found?.size).toBe(size === null ? null : inches(size));
    });
  test('Table 906.5.1: 40 gpm over 100 ft takes 1½ in; the limit of 160 ft too; past 500 gpm there is no answer', () => {
    const at = (flow: number, ft: number) => sizeForLength(ipc.table('sump-vent'), 'flow', gpm(flow), feet(ft));
    expect([at(40, 100)?.size, at(40, 160)?.size, at(40, 161)?.size]).toEqual(['1½ in', '1½ in', '2 in']);
    expect(at(501, 1)).toBeNull();
  });
  test('Table 909.1: 8 ft for a 2 in trap, 2½ in too; Table 704.1: 1/8 in per ft for 3 to 6 in', () => {
    const arm = (trap: string) => rowAtSize(ipc.table('trap-arm'), 'trap', inches(trap), 'smaller', ipc.series);
    expect([arm('2'), arm('2 1/2')].map((row) => row?.amount('longest').value)).toEqual([feet(8), feet(8)]);
    const slope = rowAtSize(ipc.table('slope'), 'from', inches('5'), 'smaller', ipc.series);
    expect(slope?.amount('slope').value).toBeCloseTo(1 / 96, 12);
  });
});

describe('Uniform Plumbing Code', () => {
  const loads: readonly [column: string, dfu: number, size: string | null, why: string][] = [
    ['horizontal', 8, '2', 'the limit itself'],
    ['horizontal', 14, '2 1/2', 'the limit itself; 3 in where 2½ in is left out'],
    ['horizontal', 35, '3', 'the limit itself'],
    ['horizontal', 36, '4', 'past it'],
    ['horizontal', 8201, null, 'past the last row'],
    ['vertical', 14, '2', '16'],
    ['vertical', 16 + step, '2 1/2', 'past it'],
    ['vent', 24, '2', 'the limit itself'],
    ['vent', 3600, '8', 'the last limit'],
    ['vent', 3601, null, 'no vent of 10 and 12 in is printed'],
  ];
  for (const [column, dfu, size, why] of loads)
    test(`Table 703.2, ${column}: ${dfu.toFixed(2)} takes ${size ?? 'no size'} (${why})`, () => {
      const found = sizeForLoad(upc.table('drains-and-vents'), column, loadOf(dfu));
      expect(found.size).toBe(size === null ? null : inches(size));
    });
  test('Table 703.2: 70 ft fits the length of a 2 in vent, 120 ft is its limit', () => {
    const lengths = (ft: number) => sizeForLoad(upc.table('drains-and-vents'), 'ventLength', feet(ft)).size;
    expect([lengths(60), lengths(70), lengths(120), lengths(121), lengths(751)]).toEqual([
      '1½ in',
      '2 in',
      '2 in',
      '2½ in',
      null,
    ]);
  });
  test('Table 702.2(2): 20 gpm counts 4, 7.6 gpm the higher band, above 50 nobody says', () => {
    const load = (flow: number) => rowsHolding(upc.table('loads-by-flow'), 'flow', gpm(flow))[0]?.amount('load').value;
    expect([load(7.5), load(7.6), load(20), load(50), load(51)]).toEqual([60, 120, 240, 360, undefined]);
  });
  test('Table 1002.2: 3.5 ft for 1½ in, 12 ft above 4 in', () => {
    const arm = (size: string) => rowAtSize(upc.table('trap-arm'), 'from', inches(size), 'smaller', upc.series);
    expect([arm('1 1/2'), arm('2 1/2'), arm('6')].map((row) => row?.amount('longest').value)).toEqual([
      feet(3.5),
      feet(5),
      feet(12),
    ]);
  });
  test('Table 717.1: 3900 in 8 in at 1/4 in per ft, 10 in past it', () => {
    const size = (dfu: number) => sizeAtSlope(upc.table('sewer'), loadOf(dfu), 1 / 48).size;
    expect([size(3900), size(3901), size(11201)]).toEqual(['8 in', '10 in', null]);
  });
});

describe('EN 12056-2', () => {
  const stacks: readonly [table: string, column: string, flow: number, size: string | null, why: string][] = [
    ['stack-primary', 'square', 4, 'DN 100', 'Table 11: the limit itself'],
    ['stack-primary', 'square', 4.135, 'DN 125', 'Table 11: twelve flats'],
    ['stack-primary', 'swept', 4.135, 'DN 100', 'Table 11: 5.2'],
    ['stack-primary', 'swept', 21.1, null, 'Table 11: past the last row'],
    ['stack-secondary', 'square', 5.6, 'DN 100', 'Table 12: the limit itself'],
    ['stack-secondary', 'swept', 18.3, 'DN 150', 'Table 12: printed so'],
  ];
  for (const [table, column, flow, size, why] of stacks)
    test(`${table}, ${column}: ${flow} l/s takes ${size ?? 'no size'} (${why})`, () => {
      expect(sizeForLoad(en.table(table), column, flow).size).toBe(size);
    });
  test('Table 4: 2.0 l/s with a closet passes over DN 80 to DN 90; past 2.5 l/s there is no row', () => {
    const rows = rowsHolding(en.table('branch-unventilated'), 'flow', 2);
    expect(rows.map((row) => [row.size('I').value, row.amount('closetsI').value])).toEqual([
      ['DN 80', 0],
      ['DN 90', 2],
      ['DN 100', 'NL'],
    ]);
    expect(rowsHolding(en.table('branch-unventilated'), 'flow', 2.51)).toEqual([]);
  });
  test('Table 4, system II: no size at 0.8 l/s, so 0.6 l/s takes DN 50', () => {
    const sizes = rowsHolding(en.table('branch-unventilated'), 'flow', 0.6).map((row) => row.size('II').value);
    expect(sizes.slice(0, 2)).toEqual(['NP', 'DN 50']);
  });
  test('Table 7: 0.8 l/s in system I takes DN 60 with a vent of DN 40', () => {
    const [row] = rowsHolding(en.table('branch-ventilated'), 'flow', 0.8);
    expect([row?.size('I').value, row?.size('ventI').value]).toEqual(['DN 60', 'DN 40']);
  });
});

describe('cells and their trust', () => {
  const cells: readonly [code: string, table: string, row: string, column: string, value: CellValue, trust: Trust][] = [
    ['ipc-2015', 'stack-vent', '5 in, up to 1400', '3 in', feet(49), 'memory'],
    ['ipc-2015', 'stack-vent', '5 in, up to 1400', '4 in', feet(190), 'published'],
    ['ipc-2015', 'drain', '4 in', '1:96', 10800, 'memory'],
    ['ipc-2015', 'drain', '4 in', '1:24', 15000, 'cross-checked'],
    ['ipc-2015', 'branch-and-stack', '3 in', 'stackOver3', 4320, 'cross-checked'],
    ['ipc-2015', 'single-stack', '4 in', 'under75', 13500, 'cross-checked'],
    ['upc-2015', 'drains-and-vents', '4 in', 'horizontal', 12960, 'cross-checked'],
    ['upc-2015', 'drains-and-vents', '5 in', 'horizontal', 25680, 'memory'],
    ['upc-2015', 'fixtures', 'lavatory', 'private', 60, 'cross-checked'],
    ['upc-2015', 'fixtures', 'lavatory', 'public', 60, 'memory'],
    ['en12056-2000', 'discharge-units', 'wc-6', 'I', 120, 'published'],
    ['en12056-2000', 'discharge-units', 'wc-6', 'II', 108, 'memory'],
    ['en12056-2000', 'discharge-units', 'wc-4', 'I', 'NP', 'memory'],
    ['en12056-2000', 'din-branch-ventilated', 'DN 80', 'K1.0', 540, 'memory'],
  ];
  for (const [code, table, row, column, value, trust] of cells)
    test(`${code} ${table}, ${row}, ${column}`, () => {
      const cell = cellAt(openOwn(code).table(table), row, column);
      expect(cell.trust).toBe(trust);
      if (typeof value === 'number') expect(cell.value).toBeCloseTo(value, 9);
      else expect(cell.value).toBe(value);
    });
});

describe('fixtures', () => {
  const columns = { ipc: { load: 'load', outlet: 'trap' }, en: { load: 'I', outlet: 'outlet' } };
  const use = (name: string) => ({ load: name, outlet: 'trap' });
  const units = (load: { readonly value: number } | null): number | null => (load === null ? null : load.value / 60);

  const ipcCases: readonly [facts: FixtureFacts, rows: readonly [string, number][]][] = [
    [{ kind: 'water-closet', use: 'public' }, [['wc-public-1.6', 4]]],
    [
      { kind: 'water-closet', use: null },
      [
        ['wc-private-1.6', 3],
        ['wc-public-1.6', 4],
      ],
    ],
    [{ kind: 'water-closet', use: 'public', flushLitres: 13 }, [['wc-public-over-1.6', 6]]],
    [{ kind: 'urinal', style: 'wall' }, [['urinal-1.0', 2]]],
    [{ kind: 'urinal', style: 'waterless' }, [['urinal-dry', 0.5]]],
    [{ kind: 'shower', heads: 4 }, [['shower-12.3', 3]]],
    [{ kind: 'lavatory' }, [['lavatory', 1]]],
    [{ kind: 'clinical-sink' }, []],
  ];
  for (const [facts, rows] of ipcCases)
    test(`ipc: ${JSON.stringify(facts)}`, () => {
      const found = fixtureRowsFor(ipc.kinds, ipc.table('fixtures'), facts, columns.ipc);
      expect(found.map((row) => [row.key, units(loadAtTrap(row, null, ipc))])).toEqual(rows);
    });
  test('ipc: the trap of a closet is that of the fixture as made', () => {
    const [row] = fixtureRowsFor(
      ipc.kinds,
      ipc.table('fixtures'),
      { kind: 'water-closet', use: 'public' },
      columns.ipc,
    );
    expect(trapRange(row!, ipc)).toEqual({ least: '3 in', largest: '3 in' });
  });

  const upcCases: readonly [
    use: string,
    facts: FixtureFacts,
    trap: string | null,
    rows: readonly [string, number][],
  ][] = [
    ['private', { kind: 'water-closet', flush: 'tank' }, null, [['wc-1.6-tank', 3]]],
    ['assembly', { kind: 'water-closet', flush: 'tank' }, null, [['wc-1.6-tank', 6]]],
    ['public', { kind: 'urinal', style: 'stall' }, null, [['urinal-integral-1.0', 2]]],
    ['assembly', { kind: 'urinal', style: 'stall' }, null, [['urinal-integral-1.0', 5]]],
    ['private', { kind: 'shower', heads: 3 }, null, [['shower', 4]]],
    ['private', { kind: 'shower', heads: null }, null, [['shower', 2]]],
    ['public', { kind: 'mop-sink' }, '3', [['sink-service-2 / sink-service-3', 3]]],
    ['private', { kind: 'mop-sink' }, '3', []],
    ['public', { kind: 'floor-drain' }, '2', [['floor-drain', 2]]],
    ['public', { kind: 'floor-drain' }, '3', [['floor-drain', 6]]],
    ['public', { kind: 'wash-fountain' }, '2', [['washfountain-1.5 / washfountain-2', 3]]],
    ['private', { kind: 'dental-unit' }, null, []],
  ];
  for (const [column, facts, trap, rows] of upcCases)
    test(`upc, ${column}: ${JSON.stringify(facts)}, trap ${trap ?? 'unknown'}`, () => {
      const found = fixtureRowsFor(upc.kinds, upc.table('fixtures'), facts, use(column));
      const loads = found.map((row) => [row.key, units(loadAtTrap(row, trap === null ? null : inches(trap), upc))]);
      expect(loads).toEqual(rows);
    });

  const enCases: readonly [facts: FixtureFacts, rows: readonly [string, number][]][] = [
    [{ kind: 'water-closet' }, [['wc-6', 2]]],
    [{ kind: 'water-closet', flushLitres: 9 }, [['wc-9', 2.5]]],
    [
      { kind: 'urinal' },
      [
        ['urinal-cistern', 0.8],
        ['urinal-valve', 0.5],
      ],
    ],
    [{ kind: 'lavatory' }, [['wash-basin', 0.5]]],
    [{ kind: 'floor-drain' }, [['floor-gully-50 / floor-gully-70 / floor-gully-100', 0.8]]],
  ];
  for (const [facts, rows] of enCases)
    test(`en12056: ${JSON.stringify(facts)}`, () => {
      const found = fixtureRowsFor(en.kinds, en.table('discharge-units'), facts, columns.en);
      expect(found.map((row) => [row.key, units(loadAtTrap(row, null, en))])).toEqual(rows);
    });

  test('every printed row is reached by some kind, but for those named here', () => {
    const apart: Readonly<Record<string, readonly string[]>> = {
      ipc: ['bathroom-group-1.6', 'bathroom-group-over-1.6'],
      upc: ['shower-extra-head', 'mobile-home'],
      en12056: [],
    };
    for (const family of [ipc, upc, en]) {
      const reached = new Set(family.kinds.entries.flatMap(({ rows }) => rows));
      const missed = family
        .table(family.kinds.table)
        .rows.map(({ name }) => name)
        .filter((name) => !reached.has(name));
      expect(missed, family.id).toEqual(apart[family.id]);
    }
  });
});
