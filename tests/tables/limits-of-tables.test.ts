import { describe, expect, test } from 'vitest';
import { sizeForLength } from '../../src/tables/find-length.ts';
import { rowAtSize } from '../../src/tables/find-row.ts';
import { sizeForLoad } from '../../src/tables/find-size.ts';
import { sizeAtSlope } from '../../src/tables/find-slope.ts';
import { loadOf } from '../../src/units/quantity.ts';
import { inches, openOwn } from '../support/table-files.ts';

// For every table of the National Plumbing Code: the limit itself, one step past it, past the last row. Figures from
// the tables named, by hand.
const npc = openOwn('npc-2020');
const step = 1 / 60;

describe('tables of loads', () => {
  const cases: readonly [table: string, column: string, fu: number, size: string | null, why: string][] = [
    ['branch', 'load', 0, '1 1/4', 'nothing still takes the first row'],
    ['branch', 'load', 3, '1 1/2', 'the limit itself'],
    ['branch', 'load', 3 + step, '2', 'a sixtieth past it'],
    ['branch', 'load', 6, '2', 'the limit itself'],
    ['branch', 'load', 10, '2 1/2', '12 holds 10'],
    ['branch', 'load', 27, '3', 'the limit itself'],
    ['branch', 'load', 27.5, '4', 'half a unit past it'],
    ['branch', 'load', 3900, '12', 'the last limit that could be read'],
    ['branch', 'load', 3901, null, 'the 15 in cell is unread: no size'],
    ['stack', 'total', 102, '3', 'the limit itself'],
    ['stack', 'total', 102 + step, '4', 'past it'],
    ['stack', 'total', 50000, '15', 'the last limit'],
    ['stack', 'total', 50001, null, 'past the last row'],
    ['stack', 'oneStorey', 18, '3', 'the limit itself'],
    ['stack', 'oneStorey', 20, '4', 'RULES example: 20 from one storey takes 4 in'],
    ['stack', 'oneStorey', 9001, null, 'past the last row'],
    ['wet-vent', 'noCloset', 4, '2', 'the limit itself'],
    ['wet-vent', 'noCloset', 12, '3', 'six urinals: the limit itself'],
    ['wet-vent', 'noCloset', 12.5, '4', 'half a unit past it'],
    ['wet-vent', 'noCloset', 14, '4', 'seven stall urinals and two lavatories, the last urinal left out'],
    ['wet-vent', 'noCloset', 36, '4', 'the last limit that could be read'],
    ['wet-vent', 'noCloset', 37, null, '5 and 6 in are unread: no size'],
    ['wet-vent', 'withCloset', 3, '2', 'the limit itself'],
    ['wet-vent', 'withCloset', 3 + step, '3', 'past it'],
    ['wet-vent', 'withCloset', 23, '6', 'the last limit'],
    ['wet-vent', 'withCloset', 24, null, 'past the last row'],
  ];
  for (const [table, column, fu, size, why] of cases)
    test(`${table}, ${column}: ${fu.toFixed(3)} takes ${size ?? 'no size'} (${why})`, () => {
      const found = sizeForLoad(npc.table(table), column, loadOf(fu));
      expect(found.size).toBe(size === null ? null : inches(size));
    });

  test('provisional where an unread cell might have been enough, and only there', () => {
    const at = (fu: number) => sizeForLoad(npc.table('wet-vent'), 'noCloset', loadOf(fu));
    expect(at(1)).toMatchObject({ size: '1½ in', provisional: true }); // 1¼ in is unread
    expect(at(1).unread.map(({ place }) => place.row)).toEqual(['1¼ in']);
    expect(at(3)).toMatchObject({ size: '2 in', provisional: false }); // 1½ in is read and holds 2 only
    expect(at(37)).toMatchObject({ size: null, provisional: true }); // 5 in and 6 in are unread
    expect(sizeForLoad(npc.table('wet-vent'), 'withCloset', loadOf(1))).toMatchObject({ provisional: false }); // NP is read
    expect(sizeForLoad(npc.table('stack'), 'total', loadOf(50001))).toMatchObject({ size: null, provisional: false });
  });

  test('the answer says why not one size smaller, and where its figure stands', () => {
    const found = sizeForLoad(npc.table('branch'), 'load', loadOf(16));
    expect(found.cell).toEqual({
      value: 27 * 60,
      trust: 'cross-checked',
      place: { table: 'branch', row: '3 in', column: 'load', clause: 'Table 2.4.10.6.-B' },
    });
    expect(found.smaller).toMatchObject({ size: '2½ in', cell: { value: 12 * 60, trust: 'memory' } });
    const omitted = sizeForLoad(npc.table('branch'), 'load', loadOf(10), new Set([inches('2 1/2')]));
    expect(omitted).toMatchObject({ size: '3 in', smaller: { size: '2 in' } });
  });
});

describe('table of loads by slope', () => {
  const cases: readonly [fu: number, slope: number | null, size: string | null, tooFlat: boolean, why: string][] = [
    [200, 1 / 50, '4', false, 'RULES example: 4 in at 1:50 (240)'],
    [200, 1 / 100, '5', false, 'RULES example: 5 in at 1:100 (390)'],
    [27, 1 / 50, '3', false, 'the limit itself'],
    [27 + step, 1 / 50, '4', false, 'past it'],
    [36, 1 / 25, '3', false, 'the limit itself at 1:25'],
    [36, 1 / 30, '4', false, 'between columns the flatter counts: 27 at 1:50'],
    [20, 1 / 100, '3', true, '3 in is read at its own least slope 1:50; the slope is the fault'],
    [20, null, '3', false, 'no slope drawn: own least slope'],
    [100, null, '4', false, 'no slope drawn: 4 in at 1:100'],
    [380, 0.0075, '5', false, '0.0075 is 1:133 within half a percent: the limit itself'],
    [381, 0.0075, '6', false, 'past it'],
    [22500, 1 / 10, '15', false, 'steeper than 1:25 is read at 1:25: the last limit'],
    [22501, 1 / 10, null, false, 'past the last row'],
    [2240, 1 / 400, '10', true, '10 in holds 2500 at its own least slope 1:200'],
  ];
  for (const [fu, slope, size, tooFlat, why] of cases)
    test(`${fu.toFixed(2)} at ${slope === null ? 'no slope' : slope.toFixed(4)}: ${size ?? 'no size'} (${why})`, () => {
      const found = sizeAtSlope(npc.table('drain'), loadOf(fu), slope);
      expect(found.size).toBe(size === null ? null : inches(size));
      expect(found.tooFlat).toBe(tooFlat);
    });
});

describe('tables of lengths', () => {
  const vents = npc.table('vent-length');
  const cases: readonly [fu: number, metres: number, size: string | null, provisional: boolean, why: string][] = [
    [2, 9, '1 1/4', false, 'the limit itself'],
    [2, 9.01, '1 1/2', false, 'past it: no limit'],
    [20, 15, '1 1/2', false, 'the limit itself'],
    [12, 12, '1 1/2', false, 'row up to 20: 15 m'],
    [8, 7.5, '1 1/4', true, 'unread, the next heavier row has 7.5'],
    [8, 16, '1 1/2', true, 'open textbook: 8 at 16 m takes 1½ in; 1¼ in is unread'],
    [20, 16, '2', true, 'unread here and in the row up to 24; the row up to 42 has 30'],
    [42, 30, '2', false, 'the limit itself'],
    [42, 31, '3', false, 'past it'],
    [60, 15, '2', true, '1½ in is unread, and not permitted from 100'],
    [60, 16, '3', false, '2 in is read and too short, so 1½ in cannot hold'],
    [5600, 76, '8', false, 'the last limit'],
    [5600, 77, null, false, 'past the last column'],
  ];
  for (const [fu, metres, size, provisional, why] of cases)
    test(`vent of ${fu} at ${metres} m: ${size ?? 'no size'} (${why})`, () => {
      const found = sizeForLength(vents, 'load', loadOf(fu), metres);
      expect(found?.size).toBe(size === null ? null : inches(size));
      expect(found?.provisional).toBe(provisional);
    });

  test('past the last row there is no answer', () => {
    expect(sizeForLength(vents, 'load', loadOf(5601), 1)).toBeNull();
  });

  const stacks = npc.table('stack-vent');
  const stackCases: readonly [stack: string, fu: number, metres: number, size: string | null | 'none', why: string][] =
    [
      ['3', 35, 3, '1 1/2', 'open textbook: 3 in stack, 35, 3 m'],
      ['3', 53, 8, '1 1/2', 'the limit itself'],
      ['3', 53, 8.01, '2', 'past the length'],
      ['3', 53 + step, 8, '2', 'past the load: 7.5 m in the next row'],
      ['3', 102, 189, '3', 'the last limit'],
      ['3', 102, 190, null, 'longer than the last figure: NA, the table offers no size'],
      ['3', 103, 1, 'none', 'past the group’s last row: the stack is overloaded'],
      ['4', 540, 1, '2', 'nothing below half the stack'],
      ['15', 50000, 7, '8', 'the limit itself'],
      ['2 1/2', 1, 1, 'none', 'no such stack in the table'],
    ];
  for (const [stack, fu, metres, size, why] of stackCases)
    test(`vent of a ${stack} in stack, ${fu.toFixed(2)} at ${metres} m: ${size ?? 'no size'} (${why})`, () => {
      const found = sizeForLength(stacks, 'load', loadOf(fu), metres, {
        group: { column: 'stack', size: inches(stack) },
      });
      if (size === 'none') expect(found).toBeNull();
      else expect(found?.size).toBe(size === null ? null : inches(size));
    });
});

describe('tables by trap', () => {
  const cases: readonly [
    table: string,
    trap: string,
    between: 'smaller' | 'larger',
    row: string | null,
    why: string,
  ][] = [
    ['vent-by-trap', '2', 'larger', '2 in', 'printed'],
    ['vent-by-trap', '2 1/2', 'larger', '3 in', 'between rows a vent takes the next larger'],
    ['vent-by-trap', '6', 'larger', '6 in', 'the last row'],
    ['vent-by-trap', '8', 'larger', null, 'past the last row'],
    ['trap-arm', '2 1/2', 'smaller', '2 in', 'between rows a length takes the next smaller'],
    ['trap-arm', '4', 'smaller', '4 in', 'the last row'],
    ['trap-arm', '6', 'smaller', '4 in', 'larger than every row: the last is the safe side'],
    ['loads-by-trap', '2 1/2', 'larger', '2½ in', 'printed'],
    ['loads-by-trap', '3/4', 'larger', '1¼ in', 'below the first row'],
    ['loads-by-trap', '5', 'larger', null, 'past the last row'],
  ];
  for (const [table, trap, between, row, why] of cases)
    test(`${table}, ${trap} in: ${row ?? 'no row'} (${why})`, () => {
      const column = npc.table(table).key[0] ?? '';
      expect(rowAtSize(npc.table(table), column, inches(trap), between, npc.series)?.name ?? null).toBe(row);
    });
});
