import type { CodeBook, CodeEntry, TrustCount } from './code-book.ts';
import type { ShownCell, ShownColumn, ShownTable } from './code-table.ts';
import { columnsOf, padded } from './shown-text.ts';
import { blank, heading, pageColumns, paragraph, type TextLine } from './text-line.ts';
import { counted } from './trade-words.ts';
import type { VerifyBook, VerifyLine } from './verify-book.ts';

/** The codes, a code's tables or one table, for a person. */
export function codeText(book: CodeBook): TextLine[] {
  if (book.table !== undefined) return tableText(book.table, book.code);
  if (book.code !== undefined) return oneCode(book, book.code);
  return [
    ...heading('Plumbing codes'),
    ...(book.codes ?? []).flatMap((code) =>
      paragraph(
        `${code.title}, ${code.edition}${code.standard ? ' (used when none is named)' : ''}`,
        `  ${padded(code.id, 14)}`,
      ),
    ),
    blank,
    ...paragraph('A code with its tables: codes ID. One table: codes ID TABLE.', '  ', 'quiet'),
  ];
}

function oneCode({ tables = [], settings = [], unchecked = [] }: CodeBook, code: CodeEntry): TextLine[] {
  const widest = Math.max(...tables.map(({ id }) => columnsOf(id))) + 2;
  const local =
    code.localTables.length === 0 ? [] : paragraph(`Local tables: ${code.localTables.join(', ')}`, '  ', 'warning');
  return [
    ...heading(`${code.id}: ${code.title}, ${code.edition}; loads in ${code.unit}`),
    ...paragraph(`${counted(code.tables, 'table')}; figures: ${trustText(code.cells)}`),
    ...local,
    blank,
    ...heading('Tables'),
    ...tables.flatMap(({ id, title, clause, cells }) =>
      paragraph(`${clause}: ${title} (${trustText(cells)})`, `  ${padded(id, widest)}`),
    ),
    blank,
    ...heading('Settings of the answers file'),
    ...settings.flatMap(({ id, what, values, standard, kind, clause, note }) => {
      const choice = values.length === 0 ? kind : values.join(' or ');
      const given = standard === null || (Array.isArray(standard) && standard.length === 0) ? 'none' : String(standard);
      const said = note === null ? '' : `; ${note}`;
      return paragraph(`${what} (${choice}; ${given} unless set); ${clause}${said}`, `  ${padded(id, 22)}`);
    }),
    ...(unchecked.length === 0
      ? []
      : [
          blank,
          ...heading('Not checked, since a model does not tell it'),
          ...unchecked.flatMap(({ clause, what }) => paragraph(`${what} (${clause})`, '  - ')),
        ]),
  ];
}

/** `180 published, 56 cross-checked, 12 from memory, 3 unread`; what there is none of is left out. */
export function trustText(count: TrustCount): string {
  const words: readonly [number, string][] = [
    [count.published, 'published'],
    [count['cross-checked'], 'cross-checked'],
    [count.memory, 'from memory'],
    [count.unread, 'unread'],
  ];
  return words.flatMap(([many, word]) => (many === 0 ? [] : `${many} ${word}`)).join(', ') || 'no figures';
}

const marks = { published: '', 'cross-checked': '~', memory: '*' } as const;
const unread = '?';
const legend = `No mark: published. ${marks['cross-checked']} cross-checked. ${marks.memory} from memory. ${unread} nobody could read it yet. NP not permitted, NL no limit, NA does not apply.`;

function tableText(table: ShownTable, code: CodeEntry | undefined): TextLine[] {
  const { source } = table;
  const columns = table.columns.filter(({ is }) => is !== 'names');
  const heads = columns.map(({ title, unit, is }) => {
    const bare =
      is === 'head' || unit === title || ['text', 'size', '1:n', 'value', 'clause', 'count', 'factor'].includes(unit);
    return bare ? title : `${title}, ${unit.replace(' by trap', '')}`;
  });
  const lines = table.rows.map((row) => [row.name, ...columns.map((column) => cellText(row.cells[column.id], column))]);
  const unit = columns.find(({ is }) => is === 'head')?.unit;
  const noted = table.rows.flatMap(({ name, note, cells }) => [
    ...(note === null ? [] : [`${name}: ${note}`]),
    ...Object.entries(cells).flatMap(([column, { note: said }]) =>
      said === undefined ? [] : [`${name}, ${column}: ${said}`],
    ),
  ]);
  return [
    ...heading(`${table.clause}: ${table.title}`),
    ...paragraph([`${source.document} ${source.edition}`, ...(code === undefined ? [] : [code.id])].join('; ')),
    ...(source.seen === undefined ? [] : paragraph(`How it is known: ${source.seen}`)),
    ...(source.url === undefined ? [] : [{ text: `  ${source.url}`, tone: 'quiet' } as const]),
    blank,
    ...tabular([['', ...heads], ...lines]),
    blank,
    ...paragraph(
      unit === undefined ? legend : `Figures under the sizes or slopes in ${unit}. ${legend}`,
      '  ',
      'quiet',
    ),
    ...[...noted, ...table.notes].flatMap((note) => paragraph(note, '  - ')),
  ];
}

function cellText(cell: ShownCell | undefined, column: ShownColumn): string {
  if (cell === undefined) return '';
  if (column.unit === 'text') return cell.value === null ? '' : String(cell.value);
  return cell.value === null ? unread : valueText(cell.value) + marks[cell.trust];
}

const valueText = (value: unknown): string =>
  value === null
    ? unread
    : typeof value === 'object'
      ? Object.entries(value)
          .map(([trap, load]) => `${trap} ${load}`)
          .join(', ')
      : String(value);

/**
 * Columns as wide as they need; where the page is too narrow the widest give way and break between words. A table that
 * no breaking fits to the page is told row by row.
 */
function tabular(rows: readonly (readonly string[])[]): TextLine[] {
  const count = rows[0]?.length ?? 0;
  const widest = (part: (text: string) => number): number[] =>
    Array.from({ length: count }, (_, column) => Math.max(...rows.map((row) => part(row[column] ?? ''))));
  const widths = widest(columnsOf);
  // The name of a row is what the eye runs down: it stays on one line.
  const least = widest((text) => Math.max(...text.split(' ').map(columnsOf)));
  least[0] = widths[0] ?? 0;
  const room = pageColumns - 2 * count;
  for (let over = total(widths) - room; over > 0; over = total(widths) - room) {
    const spare = widths.map((width, column) => width - (least[column] ?? 0));
    const most = Math.max(...spare);
    if (most === 0) return told(rows);
    const column = spare.indexOf(most);
    widths[column] = (widths[column] ?? 0) - Math.min(over, Math.ceil(most / 2));
  }
  return rows.flatMap((row, line) => {
    const broken = row.map((text, column) => brokenText(text, widths[column] ?? 0));
    const height = Math.max(...broken.map(({ length }) => length));
    return Array.from({ length: height }, (_, part): TextLine => {
      const text = broken.map((parts, column) => padded(parts[part] ?? '', widths[column] ?? 0)).join('  ');
      return { text: `  ${text}`.trimEnd(), tone: line === 0 ? 'heading' : 'plain' };
    });
  });
}

/** `3 in: load 27, length 12`: what is empty is left out. */
function told([heads = [], ...rows]: readonly (readonly string[])[]): TextLine[] {
  return rows.flatMap(([name, ...cells]) => {
    const parts = cells.flatMap((cell, column) => (cell === '' ? [] : `${heads[column + 1]} ${cell}`));
    return paragraph(`${name}: ${parts.join('; ')}`);
  });
}

const total = (widths: readonly number[]): number => widths.reduce((sum, width) => sum + width, 0);

const brokenText = (text: string, width: number): string[] =>
  columnsOf(text) <= width ? [text] : paragraph(text, '').flatMap((line) => linesOf(line.text, width));

function linesOf(text: string, width: number): string[] {
  const lines: string[] = [''];
  for (const word of text.split(' ')) {
    const last = lines.at(-1) ?? '';
    const longer = last === '' ? word : `${last} ${word}`;
    if (last === '' || columnsOf(longer) <= width) lines[lines.length - 1] = longer;
    else lines.push(word);
  }
  return lines;
}

/** What to look at first with the printed code in hand: cells by row, a whole table in one line. */
export function verifyText({ code, table, entries }: VerifyBook): TextLine[] {
  const title = `Look at these first, with the printed code in hand: ${code}${table === null ? '' : `, ${table}`}`;
  if (entries.length === 0)
    return [...heading(title), ...paragraph('Nothing: every figure was read in print or confirmed.')];
  const groups = new Map<string, VerifyLine[]>();
  for (const entry of entries) {
    const head = `${entry.order === null ? '' : `${entry.order}. `}${entry.clause} (${entry.table}): ${entry.why}`;
    const group = groups.get(head) ?? [];
    groups.set(head, group);
    group.push(entry);
  }
  return [...heading(title), ...[...groups].flatMap(([head, lines]) => [...paragraph(head), ...cellsText(lines)])];
}

function cellsText(lines: readonly VerifyLine[]): TextLine[] {
  if (lines[0]?.whole === true) return paragraph(`cell by cell, ${lines.length} of them`, '      ', 'quiet');
  const rows = new Map<string, string[]>();
  for (const { row, column, value, table } of lines) {
    const alone = table === 'rules' || table === 'limits';
    const cells = rows.get(row) ?? [];
    rows.set(row, cells);
    cells.push(alone ? valueText(value) : `${column} ${valueText(value)}`);
  }
  return paragraph([...rows].map(([row, cells]) => `${row}: ${cells.join(', ')}`).join('; '), '      ', 'quiet');
}
