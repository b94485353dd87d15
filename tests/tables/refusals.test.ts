import { describe, expect, test } from 'vitest';
import { InputError } from '../../src/findings/input-error.ts';
import { readTable } from '../../src/tables/read-table.ts';
import { nominalSize, sizeSeries } from '../../src/units/nominal-size.ts';

// An invented table of an invented code: one fault at a time, and where the reader says it is.
const series = sizeSeries([40, 50, 80, 100].map((dn) => ({ label: nominalSize(`DN ${dn}`), dn, lengthsMm: [dn] })));
const sound = {
  source: { document: 'Demonstration Drainage Code', edition: '2024', at: 'Table 3' },
  trust: 'published',
  title: 'Largest load on a branch',
  columns: { size: 'size', load: 'fu', longest: 'm' },
  key: 'size',
  rising: ['size', 'load'],
  falling: ['longest'],
  rows: [
    { size: 'DN 50', load: 5, longest: 'NL' },
    { size: 'DN 80', load: 18, longest: 12, note: 'two closets at most' },
    { size: 'DN 100', load: { value: 120, trust: 'memory' }, longest: null },
  ],
};
const read = (table: unknown) => readTable(table, 'branch', 'tables/demo/branch.json', series);
const withRow = (row: object): object => ({ ...sound, rows: [...sound.rows.slice(0, 2), row] });
const without = (key: string, object: object): object =>
  Object.fromEntries(Object.entries(object).filter(([name]) => name !== key));

test('the sound table is read: loads in sixtieths, own trust of a cell, words kept', () => {
  const table = read(sound);
  expect(table.rows.map(({ name }) => name)).toEqual(['DN 50', 'DN 80', 'DN 100']);
  expect(table.rows.map((row) => row.amount('load').value)).toEqual([300, 1080, 7200]);
  expect(table.rows.map((row) => row.amount('load').trust)).toEqual(['published', 'published', 'memory']);
  expect(table.rows.map((row) => row.amount('longest').value)).toEqual(['NL', 12, null]);
  expect(table.rows[1]?.note).toBe('two closets at most');
  expect(table.sizes).toEqual(['DN 50', 'DN 80', 'DN 100']);
});

describe('what the reader refuses, and where it says the fault is', () => {
  const cases: readonly [what: string, table: unknown, where: string, problem: string][] = [
    ['no object', [1, 2], '', 'expected an object'],
    ['an unknown key of the file', { ...sound, colour: 'red' }, ': colour', 'unknown key'],
    ['no source', without('source', sound), ': source', 'missing'],
    ['a source without its place', { ...sound, source: { document: 'D', edition: '1' } }, ': source.at', 'missing'],
    ['no trust', without('trust', sound), ': trust', 'missing'],
    ['an unknown trust', { ...sound, trust: 'certain' }, ': trust', 'expected published, cross-checked, memory'],
    ['an unknown unit', { ...sound, columns: { ...sound.columns, load: 'pounds' } }, ': columns.load', 'pounds'],
    ['a missing value', withRow({ size: 'DN 100', load: 120 }), ': rows[2].longest', 'missing'],
    ['an unknown column', withRow({ ...sound.rows[2], weight: 3 }), ': rows[2].weight', 'unknown key'],
    [
      'a size of no series',
      withRow({ ...sound.rows[2], size: 'DN 90' }),
      ': rows[2].size',
      "size of the code's series",
    ],
    ['text for a load', withRow({ ...sound.rows[2], load: '120' }), ': rows[2].load', 'expected a number in fu'],
    ['a negative load', withRow({ ...sound.rows[2], load: -1 }), ': rows[2].load', 'expected a number in fu'],
    ['an unknown word', withRow({ ...sound.rows[2], load: 'none' }), ': rows[2].load', 'expected a number in fu'],
    ['a falling load', withRow({ ...sound.rows[2], load: 17 }), ': rows[2].load', 'breaks the rising order'],
    ['a rising length', withRow({ ...sound.rows[2], longest: 13 }), ': rows[2].longest', 'breaks the falling order'],
    ['sizes out of order', withRow({ ...sound.rows[2], size: 'DN 40' }), ': rows[2].size', 'breaks the rising order'],
    ['one row twice', withRow({ ...sound.rows[2], size: 'DN 80' }), ': rows', 'two rows for "DN 80"'],
    [
      'a trust of no meaning in a row',
      withRow({ ...sound.rows[2], trust: 'so-so' }),
      ': rows[2].trust',
      'expected published',
    ],
    [
      'a trust of no meaning in a cell',
      withRow({ ...sound.rows[2], load: { value: 120, trust: 1 } }),
      ': rows[2].load.trust',
      'expected published',
    ],
    [
      'a cell with more than value, trust, note',
      withRow({ ...sound.rows[2], load: { value: 120, unit: 'm' } }),
      ': rows[2].load.unit',
      'unknown key',
    ],
    ['an order of no column', { ...sound, rising: ['weight'] }, ': rising', 'no column of this table'],
    ['a key of no column', { ...sound, key: 'weight' }, ': key', 'no column of this table'],
    ['no rows', { ...sound, rows: [] }, ': rows', 'at least one row'],
    ['rows that are no list', { ...sound, rows: {} }, ': rows', 'expected a list'],
    ['a row without its name', withRow({ ...sound.rows[2], size: null }), ': rows[2].size', 'the row is named by it'],
    ['not a number at all', withRow({ ...sound.rows[2], load: Number.NaN }), ': rows[2].load', 'expected a number'],
  ];
  for (const [what, table, where, problem] of cases)
    test(what, () => {
      let thrown: unknown;
      try {
        read(table);
      } catch (error) {
        thrown = error;
      }
      expect(thrown).toBeInstanceOf(InputError);
      const error = thrown as InputError;
      expect(error.where).toBe(`tables/demo/branch.json${where}`);
      expect(error.message).toContain(problem);
      expect(error.exit).toBe(3);
    });
});

describe('heads that are sizes or slopes', () => {
  const lengths = {
    ...sound,
    columns: { load: 'fu', 'DN 40': 'm', 'DN 50': 'm' },
    key: 'load',
    rising: ['load'],
    falling: ['DN 40', 'DN 50'],
    across: 'rising',
    rows: [
      { load: 2, 'DN 40': 9, 'DN 50': 'NL' },
      { load: 8, 'DN 40': 'NP', 'DN 50': 30 },
    ],
  };
  test('are read as sizes, and the table steps along them', () => {
    expect(read(lengths).sizes).toEqual(['DN 40', 'DN 50']);
    expect(read(lengths).rows.map(({ name }) => name)).toEqual(['up to 2', 'up to 8']);
  });
  test('must rise from left to right', () => {
    const columns = { load: 'fu', 'DN 50': 'm', 'DN 40': 'm' };
    expect(() => read({ ...lengths, columns })).toThrow('branch.json: columns: sizes or slopes at the head');
  });
  test('a shorter length under the larger size is a slip', () => {
    const rows = [lengths.rows[0], { load: 8, 'DN 40': 31, 'DN 50': 30 }];
    expect(() => read({ ...lengths, falling: [], rows })).toThrow('rows[1].DN 50: is below the cell to its left');
  });
  test('a slope reads as a slope', () => {
    const columns = { size: 'size', '1:100': 'fu', '1:50': 'fu' };
    const rows = [{ size: 'DN 80', '1:100': 'NP', '1:50': 27 }];
    const table = read({ ...sound, columns, rising: [], falling: [], rows });
    expect(table.columns.map(({ slope }) => slope)).toEqual([null, 0.01, 0.02]);
  });
});

describe('units are turned into the core’s once', () => {
  const cases: readonly [unit: string, printed: unknown, inside: number][] = [
    ['ft', 50, 15.24],
    ['in', 2.5, 0.0635],
    ['mm', 450, 0.45],
    ['in/ft', 0.25, 1 / 48],
    ['%', 1.5, 0.015],
    ['1:n', '1:133', 1 / 133],
    ['l/s', 0.8, 0.8],
    ['gpm', 7.5, 0.473176473],
    ['du', 0.5, 30],
    ['deg', 135, 135],
    ['count', 8, 8],
    ['in2', 1, 0.00064516],
  ];
  for (const [unit, printed, inside] of cases)
    test(`${JSON.stringify(printed)} ${unit}`, () => {
      const table = read({
        ...sound,
        columns: { name: 'key', value: unit },
        key: 'name',
        rising: [],
        falling: [],
        rows: [{ name: 'a', value: printed }],
      });
      expect(table.rows[0]?.amount('value').value).toBeCloseTo(inside, 9);
      expect(table.rows[0]?.printed('value')).toBe(printed);
    });
  test('half a fixture is no count', () => {
    const table = {
      ...sound,
      columns: { name: 'key', value: 'count' },
      key: 'name',
      rising: [],
      falling: [],
      rows: [{ name: 'a', value: 1.5 }],
    };
    expect(() => read(table)).toThrow('rows[0].value: is 1.5, expected a whole number');
  });
});

test('a size typed on a plain keyboard is the size of the series', () => {
  const inch = sizeSeries([{ label: nominalSize('1½ in'), dn: 40, lengthsMm: [38.1] }]);
  const table = { ...sound, rows: [{ size: '1 1/2 in', load: 3, longest: 'NL' }] };
  expect(readTable(table, 'branch', 'x.json', inch).rows[0]?.size('size').value).toBe('1½ in');
});

test('a column that the table has not is our own fault, not the user’s', () => {
  const row = read(sound).rows[0];
  expect(() => row?.cell('weight')).toThrow('table branch has no column weight');
  expect(() => row?.text('weight')).toThrow('no text column weight');
});
