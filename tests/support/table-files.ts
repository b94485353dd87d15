import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { type Family, openCode } from '../../src/tables/open-family.ts';
import type { Cell, CellValue, Row, Table } from '../../src/tables/table.ts';
import type { TableSource } from '../../src/tables/table-source.ts';
import { type NominalSize, nominalSize } from '../../src/units/nominal-size.ts';

const root = resolve(import.meta.dirname, '../../tables');

/** The project's own tables, from disk. */
export const ownTables: TableSource = {
  read: (path) => JSON.parse(readFileSync(join(root, path), 'utf8')),
  list: () => readdirSync(root, { recursive: true, encoding: 'utf8' }).filter((name) => name.endsWith('.json')),
};

/** Tables from plain objects by path: what a test writes down. */
export const writtenTables = (files: Readonly<Record<string, unknown>>, name?: string): TableSource => ({
  read: (path) => structuredClone(files[path]),
  list: () => Object.keys(files),
  ...(name === undefined ? {} : { name }),
});

export const openOwn = (code: string): Family => openCode(ownTables, code);

/** A label typed on a plain keyboard: `1 1/2 in`. */
export const inches = (text: string): NominalSize =>
  nominalSize(`${text.replace(' 1/4', '¼').replace(' 1/2', '½').replace('3/4', '¾')} in`);

const shared = resolve(import.meta.dirname, '../../../shared/codes');
/** The reference figures are not part of the project; where they are not there, the tests that need them say so. */
export const referenceThere = existsSync(shared);
export const referenceNote = referenceThere ? '' : ' (reference folder not there: nothing compared)';

export type ReferenceRow = Readonly<Record<string, unknown>>;
export const reference = (path: string): { readonly rows: readonly ReferenceRow[] } & ReferenceRow =>
  JSON.parse(readFileSync(join(shared, path), 'utf8'));
export const referenceFiles = (folder: string): readonly string[] => readdirSync(join(shared, folder)).sort();

/** What a column of ours should print for a reference row. */
export type Expected = Readonly<Record<string, (row: ReferenceRow) => unknown>>;

/** Compares every cell of a table with its reference, row by row in printed order. */
export function compareRows(
  table: Table,
  rows: readonly ReferenceRow[],
  expected: Expected,
): { readonly seen: number; readonly wrong: readonly string[] } {
  const wrong: string[] = [];
  let seen = 0;
  if (rows.length !== table.rows.length) wrong.push(`${table.id}: ${table.rows.length} rows, expected ${rows.length}`);
  for (const [index, theirs] of rows.entries()) {
    const ours = table.rows[index];
    if (ours === undefined) continue;
    for (const [column, want] of Object.entries(expected)) {
      seen += 1;
      const [have, wanted] = [JSON.stringify(ours.printed(column)), JSON.stringify(want(theirs))];
      if (have !== wanted) wrong.push(`${table.id}, ${ours.name}, ${column}: ${have}, expected ${wanted}`);
    }
  }
  return { seen, wrong };
}

export const fractions: Readonly<Record<string, string>> = { 0.75: '¾', 1.25: '1¼', 1.5: '1½', 2.5: '2½', 3.5: '3½' };
/** A size as the reference types it, 1.25, as our tables print it, 1¼ in. */
export const asInches = (value: unknown): string => `${fractions[String(value)] ?? String(value)} in`;

export function rowOf(table: Table, name: string): Row {
  const row = table.rows.find((one) => one.name === name);
  if (row === undefined) throw new Error(`${table.id} has no row ${name}`);
  return row;
}

export const valueAt = (table: Table, row: string, column: string): CellValue => cellAt(table, row, column).value;
export const cellAt = (table: Table, row: string, column: string): Cell => rowOf(table, row).cell(column);
