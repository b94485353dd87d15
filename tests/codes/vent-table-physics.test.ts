import { describe, expect, test } from 'vitest';
import { gallonPerMinute, inch, stackCapacity } from '../../src/hydraulics/stack-flow.ts';
import { patternLength } from '../../src/hydraulics/vent-air.ts';
import type { Row, Table } from '../../src/tables/table.ts';
import { unitsOf } from '../../src/units/quantity.ts';
import { openOwn } from '../support/table-files.ts';

// Air that a stack draws has to come down its vent: what friction allows rises with the fifth power of the bore. Every
// figure of the two vent tables is held against that, from the bores of schedule 40 pipe (ASTM D2665; 5 in ASME B36.10M)
// and from no figure of the tables themselves. The tables decide; this finds slips of typing and of memory.
const bores: Readonly<Record<string, number>> = {
  '1¼ in': 1.38,
  '1½ in': 1.61,
  '2 in': 2.067,
  '2½ in': 2.469,
  '3 in': 3.068,
  '4 in': 4.026,
  '5 in': 5.047,
  '6 in': 6.065,
  '8 in': 7.981,
  '10 in': 10.02,
  '12 in': 11.938,
};
const npc = openOwn('npc-2020');
const ipc = openOwn('ipc-2021');
const nominal = (size: string): number => npc.series.sizes.find(({ label }) => label === size)!.lengthsMm[0]! / 1000;
const figure = (row: Row, size: string): number | null => {
  const { value } = row.amount(size);
  return typeof value === 'number' ? value : null;
};
const percent = (share: number): number => Math.round(share * 1000) / 10;

/** How full the stack runs in the four load rows of each size of 3 in and more, the heaviest last: HY-F15. */
const shares = [3 / 20, 1 / 5, 1 / 4, 7 / 24];
const isSmall = (row: Row): boolean => nominal(row.size('stack').value!) < 2.9 * inch;

/** Every length of a table of stack vents for stacks of 3 in and more, against the length that friction allows. */
function againstFriction(table: Table) {
  const rows = table.rows
    .filter((row) => !isSmall(row))
    .map((row, at, all) => {
      const stack = row.size('stack').value!;
      const place = at - all.findIndex((one) => one.size('stack').value === stack);
      return { row, stack, share: shares[place]!, load: unitsOf(row.amount('load').value as never) };
    });
  const cells = rows.flatMap(({ row, stack, share, load }) =>
    table.columns.flatMap(({ size }) => {
      const length = size === null ? null : figure(row, size);
      if (size === null || length === null) return [];
      const byFriction = patternLength(bores[size]! * inch, nominal(stack), share);
      return [{ cell: `${stack} stack, up to ${load}, ${size} vent`, length, off: length / byFriction - 1 }];
    }),
  );
  const outliers = cells
    .filter(({ off }) => Math.abs(off) > 0.05)
    .map(({ cell, off }) => `${cell}: ${percent(Math.abs(off))} % ${off > 0 ? 'longer' : 'shorter'}`);
  const mean = percent(cells.reduce((sum, { off }) => sum + Math.abs(off), 0) / cells.length);
  return { rows, cells, outliers, mean };
}
const lengthsIn = (table: Table, rows: readonly Row[]): number =>
  rows.reduce(
    (sum, row) => sum + table.columns.filter(({ size }) => size !== null && figure(row, size) !== null).length,
    0,
  );

describe.each([
  {
    name: 'Table 2.5.8.4. of the National Plumbing Code',
    table: npc.table('stack-vent'),
    figures: 112,
    small: 9,
    // 6.6 m by friction, rounded up to a whole metre; 167.6 m, printed so or a slip of memory, on the safe side.
    outliers: [
      '6 in stack, up to 2000, 3 in vent: 6.3 % longer',
      '12 in stack, up to 26000, 12 in vent: 9.3 % shorter',
    ],
    mean: 1.5,
  },
  {
    name: 'Table 906.1 of the International Plumbing Code',
    table: ipc.table('stack-vent'),
    figures: 124,
    small: 14,
    // The same figure, 500 ft, in both tables.
    outliers: ['12 in stack, up to 26000, 12 in vent: 9.1 % shorter'],
    mean: 1.2,
  },
])('$name, stack vents and vent stacks', ({ table, figures, small, outliers, mean }) => {
  const against = againstFriction(table);

  test('every length it holds is seen', () => {
    const few = table.rows.filter(isSmall);
    expect([against.cells.length, lengthsIn(table, few)]).toEqual([figures, small]);
    expect(lengthsIn(table, table.rows)).toBe(figures + small);
  });

  test(`all for stacks of 3 in and larger within 5 % of friction but ${outliers.length}, named here and in the table`, () => {
    expect(against.outliers).toEqual(outliers);
    expect(against.mean).toBe(mean); // what rounding to feet and metres does
    const said = table.notes.find((note) => note.startsWith('Friction'));
    expect(said).toContain(`${figures - outliers.length} of its ${figures} lengths`);
    for (const outlier of outliers) expect(said).toContain(outlier);
  });

  test('the rows of 1¼ to 2½ in stacks are of another make: none follows the pattern, all are shorter', () => {
    const shorter = table.rows.filter(isSmall).flatMap((row) =>
      table.columns.flatMap(({ size }) => {
        const length = size === null ? null : figure(row, size);
        return size === null || length === null
          ? []
          : [patternLength(bores[size]! * inch, nominal(row.size('stack').value!), 7 / 24) / length];
      }),
    );
    expect(shorter.length).toBe(small);
    expect(Math.min(...shorter)).toBeGreaterThan(1.3);
  });
});

describe('the loads of both tables', () => {
  const { rows } = againstFriction(npc.table('stack-vent'));

  test('are the same', () => {
    const loads = (table: Table) => againstFriction(table).rows.map(({ stack, load }) => `${stack} ${load}`);
    expect(loads(ipc.table('stack-vent'))).toEqual(loads(npc.table('stack-vent')));
  });

  test('its loads, as the water that fills the stack so far, fall on one rising curve through all sizes', () => {
    const curve = rows
      .map(({ load, stack, share }) => ({ load, flow: stackCapacity(share, nominal(stack)) / gallonPerMinute }))
      .sort((a, b) => a.load - b.load || a.flow - b.flow);
    expect(curve.length).toBe(32);
    for (let at = 1; at < curve.length; at++) expect(curve[at]!.flow).toBeGreaterThan(curve[at - 1]!.flow);
    // Hunter's curve for flush valves, from memory: 500 units 143 gpm, 1000 208, 2000 325, 3000 433; within 3 %.
    for (const [load, gallons] of [
      [540, 143.8],
      [2000, 327.9],
      [2900, 423.9],
    ] as const)
      expect(curve.find((one) => one.load === load)!.flow).toBeCloseTo(gallons, 0);
  });
});

describe('Table 2.5.8.3., branch vents', () => {
  const table = npc.table('vent-length');
  /** Length over the fifth power of the bore: one number for a row, where its figures follow friction. */
  const strength = (row: Row): { size: string; value: number }[] =>
    table.columns.flatMap(({ size }) => {
      const length = size === null ? null : figure(row, size);
      return size === null || length === null ? [] : [{ size, value: length / bores[size]! ** 5 }];
    });
  const named = (load: number): Row => table.rows.find((row) => unitsOf(row.amount('load').value as never) === load)!;

  test('33 figures in rows of two and more: all within 30 % of the middle of their row but those named here', () => {
    const cells = table.rows.flatMap((row) => {
      const found = strength(row);
      const sorted = found.map(({ value }) => value).sort((a, b) => a - b);
      const middle = (sorted[Math.floor((sorted.length - 1) / 2)]! + sorted[Math.ceil((sorted.length - 1) / 2)]!) / 2;
      const load = unitsOf(row.amount('load').value as never);
      return found.length < 2
        ? []
        : found.map(({ size, value }) => ({ cell: `${load}, ${size}`, off: value / middle - 1 }));
    });
    expect(cells.length).toBe(33);
    // The rows of 2 and of 8 have one each: 35 lengths in all.
    expect(lengthsIn(table, table.rows)).toBe(35);
    expect(cells.filter(({ off }) => Math.abs(off) > 0.3).map(({ cell }) => cell)).toEqual([
      '2200, 6 in', // 106 m, 350 ft in the older American table from memory; 83 m would be in line
    ]);
    const said = table.notes.find((note) => note.startsWith('Friction'));
    expect(said).toContain('32 of its 33 lengths');
    expect(said).toContain('up to 2200, 6 in: 106 m, where about 83 m would be in line');
  });

  test('and that number falls with the load: a heavier row never allows a longer vent', () => {
    const strengths = table.rows.flatMap((row) => {
      const values = strength(row).map(({ value }) => value);
      return values.length === 0 ? [] : [Math.min(...values)];
    });
    // The row of 2 ends at 9 m of 1¼ in by rounding of an older table; from 8 on it falls.
    const falling = strengths.slice(1);
    expect(falling.length).toBe(12);
    for (let at = 1; at < falling.length; at++) expect(falling[at]!).toBeLessThan(falling[at - 1]!);
  });

  test.each([
    [8, '1¼ in', 14, '9 or 15 recalled'],
    [8, '2 in', 105, '61 or no limit recalled'],
    [20, '2 in', 54, '46 or no limit recalled'],
    [60, '1½ in', 5, 'perhaps not permitted'],
  ])('information on an unread figure: load %i, %s, about %i m by friction (%s)', (load, size, metres, recalled) => {
    const row = named(load);
    expect(row.amount(size).value).toBeNull();
    const values = strength(row).map(({ value }) => value);
    const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
    expect(Math.round(mean * bores[size]! ** 5)).toBe(metres);
    // The note of the cell says so beside what was recalled; the cell itself stays unread.
    expect(row.noteOf(size)).toBe(`${recalled}; about ${metres} m by friction, from the rest of the row`);
  });

  /** The row's one number; of a row without figures what the heavier and the lighter row beside it give, by their loads. */
  const between = (light: Row, heavy: Row, at: number): number => {
    const [a, b] = [light, heavy].map((row) => {
      const values = strength(row).map(({ value }) => value);
      return {
        load: unitsOf(row.amount('load').value as never),
        value: values.reduce((sum, value) => sum + value, 0) / values.length,
      };
    }) as [{ load: number; value: number }, { load: number; value: number }];
    return a.value * (b.value / a.value) ** (Math.log(at / a.load) / Math.log(b.load / a.load));
  };

  test.each([
    ['1¼ in', 6, '4.5 recalled'],
    ['1½ in', 14, '9 recalled'],
    ['2 in', 47, '30 recalled'],
  ])(
    'the row of 24 has no figure at all: %s about %i m between its neighbours, %s on the safe side',
    (size, metres, recalled) => {
      const row = named(24);
      expect(strength(row)).toEqual([]);
      expect(Math.round(between(named(20), named(42), 24) * bores[size]! ** 5)).toBe(metres);
      expect(row.amount(size).value).toBeNull();
      expect(row.noteOf(size)).toBe(`${recalled}; about ${metres} m by friction, between the rows beside it`);
    },
  );

  test('every unread figure of the table is spoken of: seven', () => {
    const unread = table.rows.flatMap((row) =>
      table.columns.flatMap(({ size }) => (size !== null && row.amount(size).value === null ? [row.noteOf(size)] : [])),
    );
    expect(unread).toHaveLength(7);
    for (const note of unread) expect(note).toMatch(/by friction/);
  });
});
