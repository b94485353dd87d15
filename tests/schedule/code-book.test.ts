import { describe, expect, test } from 'vitest';
import { codeList, codeTable, codeTables, tableNamed } from '../../src/schedule/code-book.ts';
import { codeText, trustText, verifyText } from '../../src/schedule/code-text.ts';
import { columnsOf } from '../../src/schedule/shown-text.ts';
import { pageColumns, plainText } from '../../src/schedule/text-line.ts';
import { verifyBook } from '../../src/schedule/verify-book.ts';
import { codesOf, openCode } from '../../src/tables/open-family.ts';
import { faults } from '../support/schemas.ts';
import { openOwn, ownTables, writtenTables } from '../support/table-files.ts';

const npc = openOwn('npc-2020');
const families = codesOf(ownTables).map(openOwn);

describe('the list of codes', () => {
  test('names every code once, one of them for when none is named', () => {
    const { format, codes } = codeList(families);
    expect(format).toBe('drainwright-codes');
    expect(codes?.map(({ id }) => id)).toEqual(codesOf(ownTables));
    expect(codes?.filter(({ standard }) => standard).map(({ id }) => id)).toEqual(['npc-2020']);
  });
});

describe('one code', () => {
  const book = codeTables(npc);
  test('its tables in the order of the book, then limits and rules', () => {
    const ids = book.tables?.map(({ id }) => id) ?? [];
    expect(ids.slice(0, 3)).toEqual(['cleanouts', 'cleanout-places', 'fixtures']);
    expect(ids.slice(-2)).toEqual(['limits', 'rules']);
    expect(ids).toHaveLength(14);
  });
  test('how far each is to be trusted: Table 2.5.7.1. was seen in print, 2.5.8.3. by nobody', () => {
    const of = (id: string) => book.tables?.find((table) => table.id === id)?.cells;
    expect(of('vent-by-trap')).toEqual({ published: 14, 'cross-checked': 0, memory: 0, unread: 0 });
    expect(of('vent-length')).toEqual({ published: 0, 'cross-checked': 0, memory: 119, unread: 7 });
    expect(of('drain')).toEqual({ published: 0, 'cross-checked': 56, memory: 0, unread: 0 });
  });
  test('what the answers file may set with it', () => {
    expect(book.settings?.map(({ id }) => id)).toEqual(
      expect.arrayContaining(['omitSizes', 'assumedSlope', 'maxGap', 'sewerFloor', 'leastWetPortion', 'wetVentArms']),
    );
  });
  test('what its rules ask that no model tells, with the clause', () => {
    expect(book.unchecked?.map(({ rule, clause }) => [rule, clause])).toEqual([
      ['NPC-R13', '2.4.10.4., 2.4.10.5., 2.4.10.9.'],
      ['NPC-R32', '2.4.7.1.'],
      ['NPC-R35', '2.4.7.1., 2.4.7.3., 2.4.7.4.'],
      ['NPC-R83', '2.5.6.5.(1)-(5)'],
      ['NPC-R84', '2.5.6.5.(6)'],
    ]);
    const printed = plainText(codeText(book)).replace(/\s+/g, ' ');
    expect(printed).toContain('drains that also take rain (2.4.10.4., 2.4.10.5., 2.4.10.9.)');
    expect(printed).toContain('least building sewer (4 in or 3 in; 4 in unless set); 2.4.9.4.');
  });
  test('local tables are named', () => {
    const cells = [{ row: '15 in', column: 'load', value: 7000, trust: 'published' }];
    const files = { 'npc/editions/2020.json': { edition: '2020', tables: { branch: { cells } } } };
    const family = openCode(ownTables, 'npc-2020', writtenTables(files));
    expect(codeTables(family).code?.localTables).toEqual(['npc/editions/2020.json']);
    expect(codeTable(family, 'branch').table?.id).toBe('branch (local)');
    expect(codeText(codeTables(family)).some(({ text }) => text.includes('Local tables: npc/editions/2020.json'))).toBe(
      true,
    );
  });
});

describe('one table', () => {
  test('every cell with value, trust and source, in printed units', () => {
    const { table } = codeTable(npc, 'branch');
    expect(table?.rows.find(({ name }) => name === '3 in')?.cells.load).toEqual({
      value: 27,
      trust: 'cross-checked',
      source: 'National Plumbing Code of Canada 2020, Table 2.4.10.6.-B',
    });
    expect(table?.rows.at(-1)?.cells.load).toMatchObject({ value: null, trust: 'memory', note: expect.any(String) });
    expect(codeTable(npc, 'trap-arm').table?.rows[0]?.cells.slope).toMatchObject({ value: '1:50' });
  });
  const names: readonly [asked: string, code: string, id: string][] = [
    ['branch', 'npc-2020', 'branch'],
    ['2.4.10.6.-B', 'npc-2020', 'branch'],
    ['Table 2.4.10.6.B', 'npc-2010', 'branch'],
    ['2.4.10.6-b', 'npc-2010', 'branch'],
    ['2.5.8.3', 'npc-2020', 'vent-length'],
    ['2.4.7.2.', 'npc-2020', 'cleanouts'],
    ['limits', 'npc-2020', 'limits'],
    ['rules', 'npc-2020', 'rules'],
  ];
  for (const [asked, code, id] of names)
    test(`${asked} of ${code} is ${id}`, () => expect(tableNamed(openOwn(code), asked).id).toBe(id));
  test('an unknown table is wrong usage and names those that exist', () => {
    expect(() => tableNamed(npc, '9.9.9')).toThrow(/has none of that name: .*branch \(Table 2\.4\.10\.6\.-B\)/);
    try {
      tableNamed(npc, '9.9.9');
    } catch (error) {
      expect(error).toMatchObject({ exit: 2 });
    }
  });
  test('every table of every code can be asked for by id and by each of its printed numbers', () => {
    let seen = 0;
    for (const family of families)
      for (const table of codeTables(family).tables ?? []) {
        seen += 1;
        expect(tableNamed(family, table.id).id).toBe(table.id);
      }
    expect(seen).toBeGreaterThanOrEqual(4 * 13);
  });
});

describe('what to look at first', () => {
  const { entries } = verifyBook(npc);
  test('the list of doubts in its order, the vent length table first', () => {
    expect(entries[0]).toMatchObject({ order: 1, table: 'vent-length', row: 'up to 2', column: '1¼ in', value: 9 });
    const orders = entries.flatMap(({ order }) => order ?? []);
    expect([...orders].sort((a, b) => a - b)).toEqual(orders);
    expect([...new Set(orders)]).toEqual([1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 12]); // 11 speaks of 2010 and 2015 only
  });
  test('urinals before the other fixtures', () => {
    const fixtures = entries.filter(({ table }) => table === 'fixtures').map(({ row }) => row);
    expect(fixtures[0]).toBe('urinal-pedestal');
    expect(new Set(fixtures).size).toBe(36);
  });
  test('each cell once; every unread and every remembered figure is in it', () => {
    const cells = entries.map(({ table, row, column }) => `${table}|${row}|${column}`);
    expect(new Set(cells).size).toBe(cells.length);
    let seen = 0;
    for (const table of npc.tables)
      for (const row of table.rows)
        for (const { id, dimension } of table.columns) {
          if (dimension === 'key' || dimension === 'text' || table.key.includes(id)) continue;
          const { value, trust } = row.cell(id);
          if (value !== null && trust !== 'memory') continue;
          seen += 1;
          expect(cells).toContain(`${table.id}|${row.name}|${id}`);
        }
    expect(seen).toBeGreaterThan(350);
  });
  test('of one table; editions have their own list', () => {
    expect(new Set(verifyBook(npc, '2.5.8.1.').entries.map(({ table }) => table))).toEqual(new Set(['wet-vent']));
    expect(verifyBook(npc, 'vent-by-trap').entries).toEqual([]);
    expect(verifyBook(openOwn('npc-2010')).entries.some(({ row }) => row === 'NPC-R45')).toBe(true);
    expect(verifyBook(openOwn('npc-2005'), 'stack-vent').entries.length).toBe(36 * 10);
  });
  test('of a table that was read in print there is nothing to say, and it says so', () => {
    const text = verifyText(verifyBook(npc, 'vent-by-trap')).map((line) => line.text);
    expect(text.join(' ')).toContain('Nothing: every figure was read in print or confirmed.');
  });
});

test('everything is valid against its schema', () => {
  expect(faults('codes', codeList(families))).toEqual([]);
  let seen = 0;
  for (const family of families) {
    const book = codeTables(family);
    expect(faults('codes', book), family.code).toEqual([]);
    expect(faults('codes', verifyBook(family)), family.code).toEqual([]);
    for (const { id } of book.tables ?? []) {
      seen += 1;
      expect(faults('codes', codeTable(family, id)), `${family.code} ${id}`).toEqual([]);
    }
  }
  expect(seen).toBeGreaterThanOrEqual(4 * 13);
});

describe('as text', () => {
  test('counts in words', () => {
    expect(trustText({ published: 2, 'cross-checked': 0, memory: 1, unread: 3 })).toBe(
      '2 published, 1 from memory, 3 unread',
    );
  });
  test('a row of the table, its figures marked by trust', () => {
    const lines = codeText(codeTable(npc, 'wet-vent')).map(({ text }) => text);
    expect(lines.some((line) => /^ {2}2 in +4~ +3~$/.test(line))).toBe(true);
    expect(lines.some((line) => /^ {2}5 in +\? +18\*$/.test(line))).toBe(true);
  });
  test('nothing is wider than the page, addresses apart', () => {
    let seen = 0;
    for (const family of families)
      for (const text of [
        codeText(codeTables(family)),
        verifyText(verifyBook(family)),
        ...(codeTables(family).tables ?? []).map(({ id }) => codeText(codeTable(family, id))),
      ])
        for (const line of text) {
          seen += 1;
          if (!line.text.includes('http')) expect(columnsOf(line.text), line.text).toBeLessThanOrEqual(pageColumns);
        }
    expect(seen).toBeGreaterThan(1000);
  });
});
