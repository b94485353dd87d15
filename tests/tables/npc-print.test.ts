import { describe, expect, test } from 'vitest';
import type { CellValue, Trust } from '../../src/tables/table.ts';
import { cellAt, openOwn, rowOf, valueAt } from '../support/table-files.ts';

// Typed by hand, so that the tables are held to something where no reference lies beside the checkout. Loads in fixture
// units, lengths in metres; "recalled" marks figures that no text could be found for.
const npc = openOwn('npc-2020');
const fu = (units: number): number => units * 60;

const rows: readonly [table: string, row: string, column: string, value: CellValue, trust: Trust, source: string][] = [
  ['stack', '3 in', 'total', fu(102), 'cross-checked', 'Table 2.4.10.6.-A; Ontario 2012, Table 7.4.10.6.'],
  ['stack', '3 in', 'oneStorey', fu(18), 'cross-checked', 'Table 2.4.10.6.-A; Ontario 2012, Table 7.4.10.6.'],
  ['stack', '4 in', 'total', fu(540), 'cross-checked', 'Table 2.4.10.6.-A; Ontario 2012, Table 7.4.10.6.'],
  ['stack', '2 in', 'total', fu(24), 'cross-checked', 'Ontario 2012 has the same total'],
  ['stack', '2 in', 'oneStorey', fu(6), 'memory', 'recalled; Ontario prints 10'],
  ['branch', '1½ in', 'load', fu(3), 'cross-checked', 'Table 2.4.10.6.-B; Ontario semi-continuous flow table'],
  ['branch', '2½ in', 'load', fu(12), 'memory', 'recalled'],
  ['branch', '3 in', 'load', fu(27), 'cross-checked', 'Table 2.4.10.6.-B; Ontario semi-continuous flow table'],
  ['branch', '4 in', 'load', fu(180), 'cross-checked', 'Table 2.4.10.6.-B; Ontario semi-continuous flow table'],
  ['branch', '15 in', 'load', null, 'memory', 'not recalled'],
  ['drain', '3 in', '1:100', 'NP', 'cross-checked', 'Table 2.4.10.6.-C; Ontario 2012, Table 7.4.10.8.'],
  ['drain', '4 in', '1:50', fu(240), 'cross-checked', 'question bank on Ontario 2024'],
  ['drain', '4 in', '1:100', fu(180), 'cross-checked', 'question bank on Ontario 2024'],
  ['drain', '15 in', '1:25', fu(22500), 'cross-checked', 'Table 2.4.10.6.-C; Ontario 2012, Table 7.4.10.8.'],
  ['wet-vent', '1¼ in', 'noCloset', null, 'memory', 'examination decks know no wet vent below 1½ in'],
  ['wet-vent', '1½ in', 'noCloset', fu(2), 'cross-checked', 'Table 2.5.8.1.; common practice'],
  ['wet-vent', '2 in', 'noCloset', fu(4), 'cross-checked', 'Table 2.5.8.1.; a British Columbia trade thread'],
  ['wet-vent', '2 in', 'withCloset', fu(3), 'cross-checked', 'Table 2.5.8.1.; Ontario inspectors'],
  ['wet-vent', '3 in', 'noCloset', fu(12), 'cross-checked', 'Table 2.5.8.1.; common practice: 14 takes 4 in'],
  ['wet-vent', '3 in', 'withCloset', fu(8), 'memory', 'recalled'],
  ['wet-vent', '4 in', 'noCloset', fu(36), 'cross-checked', 'Table 2.5.8.1.; common practice: 16 takes 4 in'],
  ['vent-by-trap', '2 in', 'vent', '1½ in' as CellValue, 'published', 'open textbook on the 2020 code, Table 2.5.7.1.'],
  ['vent-by-trap', '1½ in', 'vent', '1¼ in' as CellValue, 'published', 'open textbook on the 2020 code'],
  ['vent-by-trap', '5 in', 'vent', '2 in' as CellValue, 'published', 'open textbook on the 2020 code, Table 2.5.7.1.'],
  ['trap-arm', '2 in', 'longest', 2.4, 'cross-checked', 'question bank on the 2020 code: 2.4 m'],
  ['trap-arm', '3 in', 'longest', 3.6, 'cross-checked', 'trade answer: 12 ft'],
  ['trap-arm', '4 in', 'slope', 0.01, 'cross-checked', '1:100'],
  ['trap-arm', '3 in', 'slope', 0.02, 'cross-checked', '1:50'],
  ['vent-length', 'up to 2', '1¼ in', 9, 'memory', 'recalled'],
  ['vent-length', 'up to 8', '1¼ in', null, 'memory', '9 or 15: not settled'],
  ['vent-length', 'up to 20', '1½ in', 15, 'memory', 'recalled'],
  ['vent-length', 'up to 100', '4 in', 305, 'memory', '1000 ft in the United States table of the 1950s'],
  ['vent-length', 'up to 1100', '2 in', 'NP', 'memory', 'recalled'],
  ['stack-vent', '3 in, up to 53', '1½ in', 8, 'cross-checked', 'open textbook: 3 in stack, 35, 3 m takes 1½ in'],
  ['stack-vent', '2 in, up to 24', '2 in', 46, 'cross-checked', '150 ft in the North American table'],
  ['stack-vent', '2 in, up to 24', '3 in', 'NA', 'cross-checked', 'larger than the stack'],
  ['stack-vent', '4 in, up to 43', '1½ in', 'NP', 'cross-checked', 'below half the stack'],
  ['stack-vent', '8 in, up to 1800', '4 in', 9.5, 'memory', '31 ft; 10 was recalled'],
  ['loads-by-trap', '2 in', 'load', fu(3), 'memory', 'recalled'],
  ['cleanouts', '3 and 4 in', 'cleanout', '3 in' as CellValue, 'cross-checked', 'examination deck'],
  ['cleanouts', '3 and 4 in', 'twoWay', 30, 'cross-checked', 'examination deck: 4 in, 30 m both ways'],
  ['cleanouts', 'above 4 in', 'oneWay', 26, 'memory', 'recalled'],
  ['cleanouts', 'below 3 in', 'cleanout', 'NA', 'cross-checked', 'of the pipe’s own size: a trade guide'],
  ['fixtures', 'wc-tank', 'load', fu(4), 'memory', 'recalled'],
  ['fixtures', 'wc-tank', 'outlet', '3 in' as CellValue, 'memory', 'recalled'],
  ['fixtures', 'bathroom-group-tank', 'load', fu(6), 'cross-checked', 'open textbook on the 2020 code'],
  ['fixtures', 'autopsy-table', 'outlet', '1½ in' as CellValue, 'cross-checked', 'open textbook on the 2020 code'],
  ['fixtures', 'urinal-stall', 'load', fu(2), 'memory', 'two readers recall it alike'],
  ['fixtures', 'emergency-floor-drain', 'load', 0, 'cross-checked', 'provincial examination material'],
  ['fixtures', 'drinking-fountain', 'load', fu(0.5), 'memory', 'recalled'],
];

describe('rows of the National Plumbing Code, typed by hand', () => {
  for (const [table, row, column, value, trust, source] of rows)
    test(`${table}, ${row}, ${column}: ${value} (${source})`, () => {
      const cell = cellAt(npc.table(table), row, column);
      expect(cell.value).toBe(value);
      expect(cell.trust).toBe(trust);
      expect(cell.place.row).toBe(row);
    });

  test('a floor drain counts by its trap: 2 in 2, 3 in 3 (provincial examination material)', () => {
    const loads = rowOf(npc.table('fixtures'), 'floor-drain').byTrap('load');
    expect(loads.map(({ trap, load }) => [trap, load.value / 60])).toEqual([
      ['2 in', 2],
      ['3 in', 3],
    ]);
  });
});

describe('lone numbers, typed by hand', () => {
  const numbers: readonly [
    id: string,
    dimension: Parameters<typeof npc.number>[1],
    value: number,
    trust: Trust,
    clause: string,
  ][] = [
    ['continuous-flow', 'factor', 31.7, 'published', '2.4.10.3.(1)'],
    ['outlet-pipe-length', 'length', 1.2, 'published', '2.4.8.2.'],
    ['closet-vent-vertical', 'length', 1, 'published', '2.5.6.3.(3)'],
    ['closet-vent-horizontal', 'length', 3, 'published', '2.5.6.3.(3)'],
    ['closet-vent-turn', 'angle', 225, 'published', '2.5.6.3.(3)'],
    ['trap-arm-turn', 'angle', 135, 'published', '2.5.6.3.(2)'],
    ['floor-drain-free-length', 'length', 0.45, 'published', '2.5.1.1.(3)'],
    ['wet-vent-guests', 'load', 120, 'published', '2.5.2.1.(1)(f),(g)'],
    ['wet-vent-upper-storey', 'load', 240, 'published', '2.5.2.1.(1)(h)'],
    ['additional-fixtures', 'count', 8, 'published', '2.5.3.1.(6)'],
    ['additional-turn', 'angle', 45, 'published', '2.5.3.1.(6)'],
    ['relief-drain-load', 'load', 360, 'published', '2.5.3.1.(4); 2.5.7.3.(2)'],
    ['vent-fixture-load', 'load', 90, 'published', '2.5.4.5.'],
    ['vent-stack-storeys', 'count', 4, 'published', '2.5.4.2.(1),(2),(3)'],
    ['yoke-storeys', 'count', 11, 'cross-checked', '2.5.4.3.'],
    ['offset-relief-load', 'load', 6000, 'cross-checked', '2.5.4.4.'],
    ['foot-distance', 'length', 1.5, 'cross-checked', '2.4.2.1.'],
    ['slope-small', 'slope', 0.02, 'published', '2.4.8.1.; Table 2.4.10.6.-C'],
    ['slope-branch-large', 'slope', 0.01, 'memory', '2.4.8.1.; Table 2.4.10.6.-C'],
    ['stack-vent-share', 'share', 0.5, 'published', '2.5.8.4.(3)'],
  ];
  for (const [id, dimension, value, trust, clause] of numbers)
    test(`${id} is ${value} (${clause})`, () => {
      const cell = npc.number(id, dimension);
      expect(cell.value).toBeCloseTo(value, 12);
      expect(cell.trust).toBe(trust);
      expect(cell.place).toEqual({ table: 'limits', row: id, column: 'value', clause });
    });

  test('sizes among them', () => {
    expect(npc.size('relief-most').value).toBe('2 in');
    expect(npc.size('main-vent').value).toBe('3 in');
    expect(npc.size('closets-stack-size').value).toBe('4 in');
    expect(npc.size('macerator-discharge').value).toBe('¾ in');
  });

  test('a number read as something else is refused', () => {
    expect(() => npc.number('outlet-pipe-length', 'load')).toThrow('outlet-pipe-length is in mm, expected a load');
    expect(() => npc.number('no-such-number', 'load')).toThrow('no number no-such-number');
  });
});

describe('lengths that mean a size (nominal inches, DN, soft metric)', () => {
  const cases: readonly [string, readonly number[]][] = [
    ['1½ in', [38.1, 38, 40]],
    ['3 in', [76.2, 76, 75, 80]],
    ['4 in', [101.6, 102, 100]],
    ['15 in', [381, 375]],
  ];
  for (const [label, lengths] of cases)
    test(`${label}: ${lengths.join(', ')} mm`, () => {
      expect(npc.series.sizes.find((size) => size.label === label)?.lengthsMm).toEqual(lengths);
    });

  test('no length means two sizes within 0.2 mm', () => {
    const all = npc.series.sizes.flatMap(({ label, lengthsMm }) => lengthsMm.map((mm) => ({ label, mm })));
    const doubled = all.filter((a) => all.some((b) => b.label !== a.label && Math.abs(a.mm - b.mm) <= 0.4));
    expect(doubled).toEqual([]);
    expect(all.length).toBeGreaterThan(30);
  });

  test('the wet vent row is the one for its load', () => {
    expect(valueAt(npc.table('wet-vent'), '4 in', 'noCloset')).toBe(2160);
  });
});
