import { describe, expect, test } from 'vitest';
import { cellAt, openOwn } from '../support/table-files.ts';

// What differs between the editions of 2015 to 2024 of the International and Uniform Plumbing Codes, each difference once
// (RULES of either code, section 5): no number is known to, so it is what is known of a clause and how far to trust it.
const ipc = ['ipc-2015', 'ipc-2018', 'ipc-2021', 'ipc-2024'];
const upc = ['upc-2015', 'upc-2018', 'upc-2021', 'upc-2024'];
const trusts = (codes: readonly string[], rule: string) => codes.map((code) => openOwn(code).rule(rule).trust);
const notes = (codes: readonly string[], rule: string) => codes.map((code) => openOwn(code).rule(rule).note ?? '');

describe('International Plumbing Code', () => {
  test('906.1: read in an adoption of 2015; the later editions are assumed to print the same', () => {
    const of = (code: string) => cellAt(openOwn(code).table('stack-vent'), '4 in, up to 140', '3 in').trust;
    expect(ipc.map(of)).toEqual(['published', 'cross-checked', 'cross-checked', 'cross-checked']);
  });
  test('406.2: the 3 in branch of a washer was read for 2012; whether 2021 and 2024 keep it is not known', () => {
    expect(trusts(ipc, 'IPC-R30')).toEqual(['cross-checked', 'cross-checked', 'memory', 'memory']);
    expect(notes(ipc, 'IPC-R30').map((note) => note.includes('not known'))).toEqual([false, false, true, true]);
  });
  test('912.3: whether 2024 adds a 4 in row is not known', () => {
    const tables = ipc.map((code) => openOwn(code).table('wet-vent'));
    expect(tables.map(({ notes: all }) => all.join().includes('4 in row is not known'))).toEqual([
      false,
      false,
      false,
      true,
    ]);
    // No edition offers 4 in: past 12 there is no size.
    expect(tables.map(({ sizes }) => sizes.at(-1))).toEqual(['3 in', '3 in', '3 in', '3 in']);
  });
  test('912.1: 2024 was not seen', () => {
    expect(trusts(ipc, 'IPC-R51')).toEqual(['cross-checked', 'cross-checked', 'cross-checked', 'memory']);
  });
  test('915.1: from 2018 on standpipes and receptors may be named', () => {
    expect(notes(ipc, 'IPC-R89').map((note) => note.includes('may be named in this edition'))).toEqual([
      false,
      true,
      true,
      true,
    ]);
  });
  test('918.3: read for 2015', () => {
    expect(trusts(ipc, 'IPC-R97')).toEqual(['published', 'cross-checked', 'cross-checked', 'cross-checked']);
  });
  test('1002.1: the change of 2021 was read', () => {
    expect(trusts(ipc, 'IPC-R47')).toEqual(['cross-checked', 'cross-checked', 'published', 'cross-checked']);
  });
});

describe('Uniform Plumbing Code', () => {
  test('707.4: cleanouts were read for 2015 and 2024, between them the same is assumed', () => {
    for (const rule of ['UPC-R28', 'UPC-R29', 'UPC-R30', 'UPC-R31'])
      expect([rule, ...trusts(upc, rule)]).toEqual([rule, 'published', 'cross-checked', 'cross-checked', 'published']);
  });
  test('707.4: from 2024 kitchen sinks are not excused on the upper floors', () => {
    expect(notes(upc, 'UPC-R31').map((note) => note.includes('kitchen sinks'))).toEqual([false, false, false, true]);
  });
  test('910: half sizes count in 2024, which was read', () => {
    expect(notes(upc, 'UPC-R72').map((note) => note.includes('half sizes'))).toEqual([false, false, false, true]);
    expect(trusts(upc, 'UPC-R72')).toEqual(['cross-checked', 'cross-checked', 'cross-checked', 'published']);
  });
  test.each(['UPC-R06', 'UPC-R22', 'UPC-R43', 'UPC-R44', 'UPC-R45', 'UPC-R46'])('%s was read for 2024', (rule) => {
    expect(trusts(upc, rule).map((trust) => trust === 'published')).toEqual([false, false, false, true]);
  });
  test('908.2.1: an amendment went in about 2021', () => {
    expect(notes(upc, 'UPC-R46').map((note) => note.includes('amendment'))).toEqual([false, false, true, false]);
  });
  test('note 4 of Table 703.2: five in every edition; four and three are a setting of Washington', () => {
    expect(upc.map((code) => openOwn(code).number('closets-on-3in', 'count').value)).toEqual([5, 5, 5, 5]);
  });
});

test.each([
  ['ipc', ipc],
  ['upc', upc],
])('no edition of the %s changes a number that nobody has evidence for', (_, codes) => {
  const [first, ...later] = codes.map((code) => openOwn(code));
  let seen = 0;
  for (const table of first!.tables)
    for (const [index, row] of table.rows.entries())
      for (const { id } of table.columns)
        for (const family of later) {
          seen += 1;
          expect(family.table(table.id).rows[index]?.printed(id)).toEqual(row.printed(id));
        }
  expect(seen).toBeGreaterThan(700);
});
