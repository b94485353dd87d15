import { describe, expect, test } from 'vitest';
import {
  asInches,
  compareRows,
  type Expected,
  openOwn,
  type ReferenceRow,
  reference,
  referenceFiles,
  referenceNote,
  referenceThere,
} from './table-files.ts';

/** One printed table and what its reference says each cell should print. */
export interface Case {
  readonly table: string;
  readonly file: string;
  readonly cells: number;
  readonly expected: Expected;
  /** The rows to compare with, where print is turned or a row holds words. */
  readonly rows?: (rows: readonly ReferenceRow[]) => readonly ReferenceRow[];
}
export type CellOf = (row: ReferenceRow) => unknown;

export const plain =
  (key: string): CellOf =>
  (row) =>
    row[key];
export const sized =
  (key: string): CellOf =>
  (row) =>
    asInches(row[key]);
export const orNA =
  (key: string): CellOf =>
  (row) =>
    row[key] ?? 'NA';
export const sizedOrNA =
  (key: string): CellOf =>
  (row) =>
    typeof row[key] === 'number' ? asInches(row[key]) : 'NA';
export const dn =
  (key: string): CellOf =>
  (row) =>
    typeof row[key] === 'number' ? `DN ${row[key]}` : (row[key] ?? 'NA');
export const perColumn = (heads: readonly string[], ours: (head: string) => string): Expected =>
  Object.fromEntries(heads.map((head) => [ours(head), plain(head)]));
export const same = (...keys: readonly string[]): Expected => Object.fromEntries(keys.map((key) => [key, plain(key)]));

/** Every cell, rule and lone number of a family against its reference; `apart` are tables that another test compares. */
export function compareFamily(
  family: string,
  base: string,
  cases: readonly Case[],
  counted: number,
  apart: readonly string[] = [],
): void {
  describe.skipIf(!referenceThere)(`every cell of ${base} against its reference${referenceNote}`, () => {
    const code = openOwn(base);
    for (const { table, file, cells, expected, rows } of cases)
      test(`${table}: ${cells} cells of ${file}`, () => {
        const theirs = reference(`${family}/${file}.json`).rows;
        const { seen, wrong } = compareRows(code.table(table), rows === undefined ? theirs : rows(theirs), expected);
        expect(wrong).toEqual([]);
        expect(seen).toBe(cells);
      });

    test('every table of ours and every table of the reference has been compared', () => {
      expect([...cases.map(({ table }) => table), ...apart].sort()).toEqual(code.tables.map(({ id }) => id).sort());
      const files = referenceFiles(family).filter((name) => name.endsWith('.json') && !noTables.test(name));
      const sizes = family === 'en12056' ? [] : ['sizes.json'];
      expect([...cases.map(({ file }) => `${file}.json`), ...sizes].sort()).toEqual(files);
    });

    test('every rule with its clause', () => {
      const rules = referenceFiles(family)
        .filter((name) => name.startsWith('rules-'))
        .flatMap((name) => reference(`${family}/${name}`).rows);
      expect(rules.length).toBe(code.rules.size);
      for (const { id, clause } of rules)
        expect(code.rules.get(String(id))?.clause, String(id)).toBe(clause === '-' ? 'none' : clause);
    });

    test('every number of a rule stands among ours, in its unit', () => {
      let seen = 0;
      const rules = referenceFiles(family)
        .filter((name) => name.startsWith('rules-'))
        .flatMap((name) => reference(`${family}/${name}`).rows);
      const inches = 0.0254;
      for (const rule of rules) {
        const ours = code.numbers.all.filter((number) => number.rule === rule.id);
        for (const [name, value] of Object.entries(rule.parameters as object)) {
          if (typeof value !== 'number' || elsewhere.has(`${rule.id} ${name}`)) continue;
          seen += 1;
          const readings: readonly unknown[] = [
            value,
            asInches(value),
            `DN ${value}`,
            value * 60,
            value * inches,
            value * inches * 12,
            value / 12,
            value / 1000,
            (value * 60) / 3.785411784,
          ];
          const found = ours.some(({ cell }) =>
            readings.some((reading) =>
              typeof reading === 'number' && typeof cell.value === 'number'
                ? Math.abs(reading - cell.value) <= 5e-4 * Math.abs(reading)
                : reading === cell.value,
            ),
          );
          expect(found, `${rule.id} ${name} ${value}`).toBe(true);
        }
      }
      expect(seen).toBe(counted);
    });
  });
}

/** Computed figures, text, sources and rules: no printed table stands in them. */
const noTables = /^(index|sources|rules?-|worked|loads-by-role|edition-differences|annex-b-qww|din-1986-100)/;

/** Cells of tables of ours, or the same figure said twice. */
const elsewhere = new Set([
  'IPC-R12 group16',
  'IPC-R12 groupOver16',
  'IPC-R15 upTo2.5',
  'IPC-R15 3to6',
  'IPC-R15 from8',
  'IPC-R85 designF',
  'EN-R23 I',
  'EN-R23 II',
  'EN-R23 III',
  'EN-R23 IV',
]);
