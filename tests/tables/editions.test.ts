import { describe, expect, test } from 'vitest';
import { InputError } from '../../src/findings/input-error.ts';
import { codesOf, openCode } from '../../src/tables/open-family.ts';
import { cellAt, openOwn, ownTables, valueAt, writtenTables } from '../support/table-files.ts';

const branch2020 = ownTables.read('npc/branch.json') as Record<string, unknown>;
const local = (files: Readonly<Record<string, unknown>>) => writtenTables(files, 'my-tables');
const openWith = (files: Readonly<Record<string, unknown>>, code = 'npc-2020') =>
  openCode(ownTables, code, local(files));
const overlay = (tables: object, edition = '2020') => ({ [`npc/editions/${edition}.json`]: { edition, tables } });

describe('editions of the National Plumbing Code', () => {
  test('all four open and say who they are', () => {
    expect(codesOf(ownTables).filter((code) => code.startsWith('npc'))).toEqual([
      'npc-2005',
      'npc-2010',
      'npc-2015',
      'npc-2020',
    ]);
    for (const edition of ['2005', '2010', '2015', '2020']) {
      const family = openOwn(`npc-${edition}`);
      expect([family.code, family.edition, family.table('branch').origin.edition]).toEqual([
        `npc-${edition}`,
        edition,
        edition,
      ]);
    }
  });

  test('load tables are named without the hyphen up to 2010', () => {
    const names = ['2005', '2010', '2015', '2020'].map((edition) => openOwn(`npc-${edition}`).table('stack').clause);
    expect(names).toEqual(['Table 2.4.10.6.A', 'Table 2.4.10.6.A', 'Table 2.4.10.6.-A', 'Table 2.4.10.6.-A']);
    expect(cellAt(openOwn('npc-2010').table('stack'), '3 in', 'total').place.clause).toBe('Table 2.4.10.6.A');
  });

  test('2005: the stack vent table stands with less trust, its figures unchanged', () => {
    const [old, now] = [openOwn('npc-2005').table('stack-vent'), openOwn('npc-2020').table('stack-vent')];
    expect(valueAt(old, '3 in, up to 53', '1½ in')).toBe(8);
    expect(cellAt(old, '3 in, up to 53', '1½ in').trust).toBe('memory');
    expect(cellAt(now, '3 in, up to 53', '1½ in').trust).toBe('cross-checked');
    expect(new Set(old.rows.flatMap((row) => old.columns.map(({ id }) => row.cell(id).trust)))).toEqual(
      new Set(['memory']),
    );
    expect(old.notes.join()).toContain('unverified for 2005');
  });

  test('2018 of the International Plumbing Code: Table 906.1 was read in 2015 only; what was memory stays memory', () => {
    const [old, now] = ['ipc-2015', 'ipc-2018'].map((code) => openOwn(code).table('stack-vent'));
    expect(cellAt(old!, '4 in, up to 140', '3 in').trust).toBe('published');
    expect(cellAt(now!, '4 in, up to 140', '3 in').trust).toBe('cross-checked');
    for (const table of [old!, now!]) expect(cellAt(table, '10 in, up to 4000', '10 in').trust).toBe('memory');
  });

  test('2010 and 2015: the 2 in arms of a wet vent are trusted less than in 2020', () => {
    const trusts = ['2005', '2010', '2015', '2020'].map((edition) => openOwn(`npc-${edition}`).rule('NPC-R45').trust);
    expect(trusts).toEqual(['published', 'cross-checked', 'cross-checked', 'published']);
  });

  test('words: soil-or-waste pipe before 2020', () => {
    expect(openOwn('npc-2015').words.drain).toBe('soil-or-waste pipe');
    expect(openOwn('npc-2020').words.drain).toBe('sanitary drainage pipe');
  });

  test('no edition changes a number that nobody has evidence for', () => {
    const [now, ...older] = ['2020', '2015', '2010', '2005'].map((edition) => openOwn(`npc-${edition}`));
    let seen = 0;
    for (const table of now?.tables ?? [])
      for (const [index, row] of table.rows.entries())
        for (const { id } of table.columns)
          for (const family of older) {
            seen += 1;
            expect(family.table(table.id).rows[index]?.printed(id)).toEqual(row.printed(id));
          }
    expect(seen).toBeGreaterThan(2000);
  });

  test('an unknown code is wrong usage and names those that exist', () => {
    for (const code of ['npc-1999', 'xyz-2020', 'npc', ''])
      try {
        openOwn(code);
        expect.unreachable();
      } catch (error) {
        expect(error).toBeInstanceOf(InputError);
        expect((error as InputError).exit).toBe(2);
        expect((error as InputError).message).toContain('npc-2020');
      }
  });
});

describe('tables of the user’s own, laid over ours', () => {
  test('one cell: its value, trust and note, and the trail says local', () => {
    const cells = [{ row: '15 in', column: 'load', value: 7000, trust: 'published', note: 'read in print' }];
    const family = openWith(overlay({ branch: { cells } }));
    const cell = cellAt(family.table('branch'), '15 in', 'load');
    expect(cell).toMatchObject({ value: 420000, trust: 'published', place: { table: 'branch (local)' } });
    expect(valueAt(family.table('branch'), '4 in', 'load')).toBe(10800);
    expect(family.localTables).toEqual(['npc/editions/2020.json']);
    expect(family.table('stack').id).toBe('stack');
  });

  test('a corrected figure that says no more counts as read in print', () => {
    const family = openWith(overlay({ branch: { cells: [{ row: '15 in', column: 'load', value: 7000 }] } }));
    expect(cellAt(family.table('branch'), '15 in', 'load').trust).toBe('published');
  });

  test('a whole table: of any edition, with a source of its own', () => {
    const source = { document: 'A town’s plumbing by-law', edition: '2023', at: 'Schedule B' };
    const rows = [{ size: '4 in', load: 150 }];
    const family = openWith({ 'npc/branch.json': { ...branch2020, source, rows, trust: 'published' } }, 'npc-2015');
    expect(family.table('branch')).toMatchObject({ id: 'branch (local)', clause: 'Schedule B' });
    expect(cellAt(family.table('branch'), '4 in', 'load').place).toEqual({
      table: 'branch (local)',
      row: '4 in',
      column: 'load',
      clause: 'Schedule B',
    });
    expect(family.localTables).toEqual(['npc/branch.json']);
  });

  test('lone numbers and rules', () => {
    const numbers = { 'outlet-pipe-length': { value: 900, trust: 'published' } };
    const family = openWith({ 'npc/editions/2020.json': { edition: '2020', numbers } });
    expect(family.number('outlet-pipe-length', 'length')).toMatchObject({ value: 0.9, trust: 'published' });
  });

  test('an overlay of another edition stays out of this one', () => {
    const cells = [{ row: '15 in', column: 'load', value: 7000 }];
    const family = openWith(overlay({ branch: { cells } }, '2010'));
    expect(valueAt(family.table('branch'), '15 in', 'load')).toBeNull();
    expect(family.localTables).toEqual([]);
  });

  const refused: readonly [what: string, files: Readonly<Record<string, unknown>>, where: string, problem: string][] = [
    [
      'a file that no table reads',
      { 'npc/branches.json': branch2020 },
      'my-tables/npc/branches.json',
      'no table of npc',
    ],
    [
      'a table that the family has not',
      overlay({ ramp: {} }),
      'my-tables/npc/editions/2020.json: tables.ramp',
      'no table of npc',
    ],
    [
      'a row that the table has not',
      overlay({ branch: { cells: [{ row: '7 in', column: 'load', value: 1 }] } }),
      'my-tables/npc/editions/2020.json: tables.branch.cells[0].row',
      '"7 in" is no row of branch',
    ],
    [
      'a column that the table has not',
      overlay({ branch: { cells: [{ row: '4 in', column: 'loads', value: 1 }] } }),
      'my-tables/npc/editions/2020.json: tables.branch.cells[0].column',
      '"loads" is no column of branch',
    ],
    [
      'a change without a value',
      overlay({ branch: { cells: [{ row: '4 in', column: 'load' }] } }),
      'my-tables/npc/editions/2020.json: tables.branch.cells[0].value',
      'missing',
    ],
    [
      'a figure that breaks the order',
      overlay({ branch: { cells: [{ row: '4 in', column: 'load', value: 20 }] } }),
      'my-tables/npc/editions/2020.json over tables/npc/branch.json: rows[5].load',
      'breaks the rising order',
    ],
    [
      'an edition under another’s name',
      { 'npc/editions/2020.json': { edition: '2015' } },
      'my-tables/npc/editions/2020.json: edition',
      'expected "2020"',
    ],
    [
      'a number that does not exist',
      { 'npc/editions/2020.json': { edition: '2020', numbers: { 'pipe-colour': { value: 3 } } } },
      'my-tables/npc/editions/2020.json: numbers.pipe-colour',
      'is not in tables/npc/limits.json',
    ],
    [
      'a table whose column has another meaning',
      { 'npc/branch.json': { ...branch2020, columns: { size: 'size', load: 'm' } } },
      'my-tables/npc/branch.json: columns.load',
      'expected a load',
    ],
    [
      'a table without a column of ours',
      { 'npc/branch.json': { ...branch2020, columns: { size: 'size' }, rising: ['size'], rows: [{ size: '4 in' }] } },
      'my-tables/npc/branch.json: columns.load',
      'expected a load',
    ],
  ];
  for (const [what, files, where, problem] of refused)
    test(`refused: ${what}`, () => {
      try {
        openWith(files);
        expect.unreachable();
      } catch (error) {
        expect(error).toBeInstanceOf(InputError);
        expect((error as InputError).where).toBe(where);
        expect((error as InputError).message).toContain(problem);
      }
    });
});
