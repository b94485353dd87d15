import { describe, expect, test } from 'vitest';
import { rowAtSize } from '../../src/tables/find-row.ts';
import { sizeForLoad } from '../../src/tables/find-size.ts';
import { sizeAtSlope } from '../../src/tables/find-slope.ts';
import { loadOf } from '../../src/units/quantity.ts';
import { inches, openOwn } from '../support/table-files.ts';

// Every column of loads of the International and Uniform Plumbing Codes, as the tables named print them, typed by hand: each limit takes its size, a step past it the next, past the last row none.
const ipc = openOwn('ipc-2021');
const upc = openOwn('upc-2021');
const en = openOwn('en12056-2000');

/** `2 in` and the like, by the row; a number, `-` not permitted, `NL` no limit. */
type Printed = readonly (number | '-' | 'NL')[];

/** What each limit takes, what a step past it takes, and that nothing lies past the last. */
function expected(sizes: readonly string[], column: Printed): { amount: number; past: boolean; size: string | null }[] {
  const rows = sizes.flatMap((size, at) =>
    column[at] === '-' || column[at] === undefined ? [] : [{ size, limit: column[at]! }],
  );
  return rows.flatMap(({ limit }, at) => {
    if (limit === 'NL') return [];
    // Two rows with one limit: the smaller size takes it.
    const first = rows.find((one) => one.limit === 'NL' || one.limit >= limit)!;
    const next = rows.slice(at + 1).find((one) => one.limit === 'NL' || one.limit > limit);
    return [
      { amount: limit, past: false, size: first.size },
      { amount: limit, past: true, size: next?.size ?? null },
    ];
  });
}

const americanSizes = ['1 1/2', '2', '2 1/2', '3', '4', '5', '6', '8', '10', '12', '15'];
const loads: readonly [
  code: 'ipc' | 'upc',
  table: string,
  column: string,
  sizes: readonly string[],
  limits: Printed,
][] = [
  ['ipc', 'branch-and-stack', 'branch', americanSizes, [3, 6, 12, 20, 160, 360, 620, 1400, 2500, 3900, 7000]],
  ['ipc', 'branch-and-stack', 'oneInterval', americanSizes, [2, 6, 9, 20, 90, 200, 350, 600, 1000, 1500, '-']],
  ['ipc', 'branch-and-stack', 'stackUpTo3', americanSizes, [4, 10, 20, 48, 240, 540, 960, 2200, 3800, 6000, '-']],
  ['ipc', 'branch-and-stack', 'stackOver3', americanSizes, [8, 24, 42, 72, 500, 1100, 1900, 3600, 5600, 8400, '-']],
  ['ipc', 'common-vent', 'upper', ['1 1/2', '2', '2 1/2', '3'], [1, 4, 6, 6]],
  ['ipc', 'wet-vent', 'load', ['1 1/2', '2', '2 1/2', '3'], [1, 4, 6, 12]],
  [
    'ipc',
    'waste-stack',
    'oneInterval',
    ['1 1/2', '2', '2 1/2', '3', '4', '5', '6'],
    [1, 2, 'NL', 'NL', 'NL', 'NL', 'NL'],
  ],
  ['ipc', 'waste-stack', 'total', ['1 1/2', '2', '2 1/2', '3', '4', '5', '6'], [2, 4, 8, 24, 50, 75, 100]],
  ['ipc', 'combination', 'toBranchOrStack', ['2', '2 1/2', '3', '4', '5', '6'], [3, 6, 12, 20, 160, 360]],
  ['ipc', 'combination', 'toBuildingDrain', ['2', '2 1/2', '3', '4', '5', '6'], [4, 26, 31, 50, 250, 575]],
  [
    'upc',
    'drains-and-vents',
    'vertical',
    ['1 1/4', ...americanSizes.slice(0, -1)],
    [1, 2, 16, 32, 48, 256, 600, 1380, 3600, 5600, 8400],
  ],
  [
    'upc',
    'drains-and-vents',
    'horizontal',
    ['1 1/4', ...americanSizes.slice(0, -1)],
    [1, 1, 8, 14, 35, 216, 428, 720, 2640, 4680, 8200],
  ],
  [
    'upc',
    'drains-and-vents',
    'vent',
    ['1 1/4', ...americanSizes.slice(0, 8)],
    [1, 8, 24, 48, 84, 256, 600, 1380, 3600],
  ],
];

describe('columns of loads', () => {
  for (const [code, table, column, sizes, limits] of loads)
    test(`${code} ${table}, ${column}`, () => {
      const found = expected(sizes, limits).map(({ amount, past, size }) => {
        const load = loadOf(amount + (past ? 1 / 60 : 0));
        return [amount, past, sizeForLoad((code === 'ipc' ? ipc : upc).table(table), column, load).size, size];
      });
      for (const [amount, past, size, wanted] of found)
        expect([amount, past, size]).toEqual([amount, past, wanted === null ? null : inches(String(wanted))]);
      expect(found.length).toBeGreaterThanOrEqual(4);
    });

  test('Table 917.2 single stacks by height: 24, 225, 480, 1015, 2320, 4500, 8100, 13600 stepping down a size with each height', () => {
    const table = ipc.table('single-stack');
    const at = (column: string, dfu: number) => sizeForLoad(table, column, loadOf(dfu)).size;
    expect([at('under75', 24), at('under75', 25), at('under75', 225), at('under75', 226), at('under75', 480)]).toEqual([
      '3 in',
      '4 in',
      '4 in',
      '5 in',
      '5 in',
    ]);
    expect([at('under160', 24), at('under160', 25), at('under160', 225), at('under160', 480)]).toEqual([
      '4 in',
      '5 in',
      '5 in',
      '6 in',
    ]);
    expect([at('over160', 24), at('over160', 25), at('over160', 225), at('over160', 226)]).toEqual([
      '5 in',
      '6 in',
      '6 in',
      '8 in',
    ]);
  });
});

describe('columns of loads by slope', () => {
  const sizes = ['1 1/4', ...americanSizes];
  const drains: readonly [inPerFoot: number, limits: Printed][] = [
    [1 / 16, ['-', '-', '-', '-', '-', '-', '-', '-', 1400, 2500, 3900, 7000]],
    [1 / 8, ['-', '-', '-', '-', 36, 180, 390, 700, 1600, 2900, 4600, 8300]],
    [1 / 4, [1, 3, 21, 24, 42, 216, 480, 840, 1920, 3500, 5600, 10000]],
    [1 / 2, [1, 3, 26, 31, 50, 250, 575, 1000, 2300, 4200, 6700, 12000]],
  ];
  for (const [fall, limits] of drains)
    test(`Table 710.1(1) at ${fall} in per ft, sizes as they may be laid`, () => {
      for (const { amount, past, size } of expected(sizes, limits)) {
        const load = loadOf(amount + (past ? 1 / 60 : 0));
        const reading = { share: 0.96, asLaid: true };
        const found = sizeAtSlope(ipc.table('drain'), load, (fall / 12) * 0.96, undefined, reading).size;
        expect([amount, past, found]).toEqual([amount, past, size === null ? null : inches(size)]);
      }
    });

  test('Table 717.1, building sewers of 8 in and more', () => {
    const sewers: readonly [number, Printed][] = [
      [1 / 16, [1950, 3400, 5600]],
      [1 / 8, [2800, 4900, 8000]],
      [1 / 4, [3900, 6800, 11200]],
    ];
    for (const [fall, limits] of sewers)
      for (const { amount, past, size } of expected(['8', '10', '12'], limits)) {
        const found = sizeAtSlope(upc.table('sewer'), loadOf(amount + (past ? 1 / 60 : 0)), fall / 12).size;
        expect([amount, past, found]).toEqual([amount, past, size === null ? null : inches(size)]);
      }
  });
});

describe('rows by trap', () => {
  const feet = (value: number): number => Number((value * 0.3048).toFixed(6));
  test('Table 709.2 and 702.2(1): loads of traps that the fixture table does not list', () => {
    const at = (family: typeof ipc, trap: string) =>
      rowAtSize(family.table('loads-by-trap'), 'trap', inches(trap), 'larger', family.series)?.amount('load').value;
    expect(['1 1/4', '1 1/2', '2', '2 1/2', '3', '4'].map((trap) => at(ipc, trap))).toEqual(
      [1, 2, 3, 4, 5, 6].map((n) => n * 60),
    );
    expect(['1 1/4', '1 1/2', '2', '3', '4'].map((trap) => at(upc, trap))).toEqual([1, 3, 4, 6, 8].map((n) => n * 60));
    expect([at(ipc, '5'), at(upc, '5')]).toEqual([undefined, undefined]);
  });
  test('Table 909.1: 5, 6, 8, 12, 16 ft; Table 1002.2: 2.5, 3.5, 5, 6, 10, 12 ft', () => {
    const ipcArm = (trap: string) =>
      rowAtSize(ipc.table('trap-arm'), 'trap', inches(trap), 'smaller', ipc.series)?.amount('longest').value;
    const upcArm = (trap: string) =>
      rowAtSize(upc.table('trap-arm'), 'from', inches(trap), 'smaller', upc.series)?.amount('longest').value;
    expect(['1 1/4', '1 1/2', '2', '3', '4', '6'].map(ipcArm)).toEqual([5, 6, 8, 12, 16, 16].map(feet));
    expect(['1 1/4', '1 1/2', '2', '3', '4', '5', '6'].map(upcArm)).toEqual([2.5, 3.5, 5, 6, 10, 12, 12].map(feet));
  });
  test('Table 703.2, longest vertical drain and longest vent: the limit itself, past it, past the last', () => {
    const table = upc.table('drains-and-vents');
    const lengths = [45, 65, 85, 148, 212, 300, 390, 510, 750];
    const vents = [45, 60, 120, 180, 212, 300, 390, 510, 750];
    const sizes = ['1¼ in', '1½ in', '2 in', '2½ in', '3 in', '4 in', '5 in', '6 in', '8 in'];
    const at = (column: string, ft: number) => sizeForLoad(table, column, feet(ft)).size;
    expect(lengths.map((ft) => at('verticalLength', ft))).toEqual(sizes);
    expect(lengths.map((ft) => at('verticalLength', ft + 0.1))).toEqual([...sizes.slice(1), '10 in']);
    expect(vents.map((ft) => at('ventLength', ft))).toEqual(sizes);
    expect(vents.map((ft) => at('ventLength', ft + 0.1))).toEqual([...sizes.slice(1), null]);
  });
});

describe('EN 12056-2 (flows: tests/codes/en12056-branches and -stacks)', () => {
  const dn = ['DN 60', 'DN 70', 'DN 80', 'DN 90', 'DN 100', 'DN 125', 'DN 150', 'DN 200'];
  test('Table 12: the vent of the row', () => {
    const vents = en.table('stack-secondary').rows.map((row) => [row.size('size').value, row.size('vent').value]);
    expect(vents).toEqual(
      dn.map((size, at) => [size, ['DN 50', 'DN 50', 'DN 50', 'DN 50', 'DN 50', 'DN 70', 'DN 80', 'DN 100'][at]]),
    );
  });

  test('closets on branches: none up to DN 80, two at most 90 degrees on DN 90 in I; one on DN 80 in II and IV', () => {
    const limits = (table: string, system: string) =>
      en.table(table).rows.flatMap((row) => {
        const size = row.size(system).value;
        return size === 'NP' ? [] : [`${String(size)} ${String(row.amount(`closets${system}`).value)}`];
      });
    expect(limits('branch-unventilated', 'I').slice(-3)).toEqual(['DN 80 0', 'DN 90 2', 'DN 100 NL']);
    expect(limits('branch-unventilated', 'II').slice(-3)).toEqual(['DN 70 0', 'DN 80 1', 'DN 90 NL']);
    expect(limits('branch-unventilated', 'IV').slice(-3)).toEqual(['DN 70 0', 'DN 80 1', 'DN 100 NL']);
    expect(limits('branch-ventilated', 'I').slice(-3)).toEqual(['DN 80 0', 'DN 90 2', 'DN 100 NL']);
    expect(limits('branch-ventilated', 'II').slice(-3)).toEqual(['DN 70 0', 'DN 80 1', 'DN 90 NL']);
  });

  test('Table 1: nominal sizes and their least bores, millimetres', () => {
    const bores = en.table('sizes').rows.map((row) => Math.round(Number(row.amount('bore').value) * 1000));
    expect(bores).toEqual([26, 34, 44, 49, 56, 68, 75, 79, 96, 113, 146, 184, 207, 230, 290]);
  });
});
