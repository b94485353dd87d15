import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { openOwn } from '../support/table-files.ts';

// Every printed figure a second time, typed apart from our tables: a cell that is changed, doubled or moved by a step
// differs from it. A head names the table and its columns, a line below it is a row in printed order; `?` is a cell that
// nobody could read. Figures by trap stand in braces. Where cleanouts stand is told in words: no figure is in that table.
const readings: readonly { code: string; cells: number; without: readonly string[] }[] = [
  { code: 'npc-2020', cells: 856, without: ['cleanout-places'] },
  { code: 'ipc-2015', cells: 935, without: [] },
  { code: 'upc-2015', cells: 400, without: [] },
  { code: 'en12056-2000', cells: 975, without: [] },
];

/** Columns of words and of keys, which size nothing. */
const words = new Set(['title', 'fixture', 'row', 'remarks', 'pipe', 'arm']);

const shown = (value: unknown): string =>
  value === null ? '?' : typeof value === 'string' ? value : JSON.stringify(value);

for (const { code, cells, without } of readings)
  describe(`every printed figure of ${code} against a second reading`, () => {
    const family = openOwn(code);
    const sections = readFileSync(join(import.meta.dirname, 'second-reading', `${code}.txt`), 'utf8')
      .split('\n\n')
      .map((section) => {
        const [head = '', ...lines] = section.trimEnd().split('\n');
        const [, table = '', columns = ''] = /^(\S+): (.*)$/.exec(head) ?? [];
        return { table, columns: columns.split(' | '), rows: lines.map((line) => line.trim().split(' | ')) };
      });
    let seen = 0;

    test.each(sections)('$table', ({ table, columns, rows }) => {
      const ours = family.table(table);
      expect(ours.rows.map((row) => columns.map((column) => shown(row.printed(column))))).toEqual(rows);
      seen += rows.length * columns.length;
    });

    test('no table and no column is left out', () => {
      expect(seen).toBe(cells);
      const read = new Map(sections.map(({ table, columns }) => [table, columns]));
      const missing = family.tables.flatMap(({ id, columns }) =>
        read.has(id)
          ? columns.flatMap((column) =>
              words.has(column.id) || read.get(id)!.includes(column.id) ? [] : `${id} ${column.id}`,
            )
          : [id],
      );
      expect(missing).toEqual(without);
    });
  });
