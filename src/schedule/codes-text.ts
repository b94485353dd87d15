import type { CodeContents, CodeHead, TableCell, TableContents } from './codes-list.ts';
import { columnsOf, padded, shownText, wrapped } from './shown-text.ts';
import { blank, heading, pageColumns, paragraph, type TextLine, type Tone } from './text-line.ts';
import { counted } from './trade-words.ts';

export const codesText = (codes: readonly CodeHead[]): TextLine[] => [
  ...heading(`${counted(codes.length, 'plumbing code')} to size by (--code ID)`),
  ...codes.flatMap(({ id, title, edition, unit }) => paragraph(`${title} ${edition}, ${unit}`, `  ${padded(id, 14)} `)),
  blank,
  ...paragraph(
    'drainwright codes ID shows the tables of one, drainwright codes ID TABLE every cell of a table.',
    '',
    'quiet',
  ),
];

export function codeText(code: CodeContents): TextLine[] {
  const wide = Math.max(...code.tables.map(({ id }) => columnsOf(id)));
  return [
    ...heading(`${code.id}: ${code.title} ${code.edition}, ${code.unit}`),
    ...paragraph(`Sizes: ${code.sizes.map(({ label, dn }) => `${label} (DN ${dn})`).join(', ')}`),
    ...(code.localTables.length === 0
      ? []
      : paragraph(`Local tables: ${code.localTables.map(shownText).join(', ')}`, '  ', 'warning')),
    blank,
    ...heading('Tables'),
    ...code.tables.flatMap(({ id, title, clause, rows, trust }) =>
      paragraph(
        `${shownText(title)} (${clause}); ${counted(rows, 'row')}, ${trustText(trust)}`,
        `  ${padded(id, wide)}  `,
      ),
    ),
    ...titled(
      'Settings of an answers file',
      code.settings.map(({ id, what, standard, values }) => {
        const from = values.length === 0 ? '' : `; one of ${values.join(', ')}`;
        return `${id}: ${what} (standard: ${standardText(standard)}${from})`;
      }),
      'plain',
    ),
    ...titled(
      'To look at first with the printed code',
      code.verify.map(({ where, why }) => `${where}: ${why}`),
      'warning',
    ),
  ];
}

function titled(title: string, texts: readonly string[], tone: Tone): TextLine[] {
  if (texts.length === 0) return [];
  return [blank, ...heading(title), ...texts.flatMap((text) => paragraph(shownText(text), '  - ', tone))];
}

const standardText = (standard: unknown): string =>
  standard === null || (Array.isArray(standard) && standard.length === 0) ? 'none' : String(standard);

const trustText = (trust: Readonly<Record<string, number>>): string =>
  Object.entries(trust)
    .map(([word, count]) => `${count} ${word}`)
    .join(', ');

/**
 * A table as it is printed where it fits the page, one column a figure; else one line a cell. A figure from memory
 * bears `?`, one seen in part `~`; a dash is not permitted, an empty place was never read.
 */
export function tableText(table: TableContents): TextLine[] {
  const rows = [...new Set(table.cells.map(({ row }) => row))];
  const at = new Map(table.cells.map((cell) => [JSON.stringify([cell.row, cell.column]), cell]));
  const columns = [...new Set(table.cells.map(({ column }) => column))].map((id) => {
    const { title, unit } = table.columns.find((column) => column.id === id) ?? { title: id, unit: '' };
    const values = rows.map((row) => cellText(at.get(JSON.stringify([row, id]))));
    return { head: title, unit, values, wide: Math.max(3, ...values.map(columnsOf)) };
  });
  const first = Math.max(...rows.map(columnsOf));
  const heads = columns.map(({ head, wide }) => wrapped(head, Math.max(wide, narrowest)));
  const widths = columns.map(({ wide }, place) => Math.max(wide, ...(heads[place] ?? []).map(columnsOf)));
  const total = first + 2 + widths.reduce((sum, width) => sum + width + 2, 0);
  const isGrid = total <= pageColumns && table.id !== 'limits' && table.id !== 'rules';
  const grid = isGrid ? gridText(rows, columns, heads, widths, first) : longText(table);
  const noted = table.cells.filter(({ note }) => note !== undefined);
  return [
    ...heading(`${table.code} ${table.id}: ${shownText(table.title)}`),
    ...paragraph(`Source: ${shownText(table.source)}.`, '', 'quiet'),
    ...paragraph(
      `Trust: ${trustText(table.trust)}. Unmarked published, ~ seen in part, ? from memory, blank unread.`,
      '',
      'quiet',
    ),
    blank,
    ...grid,
    ...(!isGrid
      ? []
      : titled(
          'Notes',
          noted.map(({ row, column, note }) => `${row}, ${column}: ${note}`),
          'quiet',
        )),
    ...(table.notes.length === 0
      ? []
      : [blank, ...table.notes.flatMap((note) => paragraph(shownText(note), '', 'quiet'))]),
  ];
}

const narrowest = 10;
const marks: Readonly<Record<string, string>> = { memory: '?', 'cross-checked': '~' };

function cellText(cell: TableCell | undefined): string {
  if (cell === undefined || cell.value === null) return '';
  const { value, trust } = cell;
  const text = value === 'NP' ? '-' : valueText(value);
  return `${shownText(text)}${marks[trust] ?? ''}`;
}

/** Loads by trap come as a record: `2 in 3, 3 in 6`. */
const valueText = (value: unknown): string =>
  typeof value === 'object' && value !== null
    ? Object.entries(value)
        .map(([trap, load]) => `${trap} ${String(load)}`)
        .join(', ')
    : String(value);

interface GridColumn {
  readonly unit: string;
  readonly values: readonly string[];
}

function gridText(
  rows: readonly string[],
  columns: readonly GridColumn[],
  heads: readonly (readonly string[])[],
  widths: readonly number[],
  first: number,
): TextLine[] {
  const deep = Math.max(...heads.map((head) => head.length));
  const line = (name: string, texts: readonly string[], tone: Tone): TextLine => ({
    text: `${padded(name, first)}${texts.map((text, place) => `  ${' '.repeat(Math.max(0, (widths[place] ?? 0) - columnsOf(text)))}${text}`).join('')}`,
    tone,
  });
  const titles = Array.from({ length: deep }, (_, place) =>
    line(
      '',
      heads.map((head) => head[place] ?? ''),
      'heading',
    ),
  );
  const units = columns.map(({ unit }) => (unit === 'size' ? '' : unit));
  return [
    ...titles,
    ...(units.every((unit) => unit === '') ? [] : [line('', units, 'quiet')]),
    ...rows.map((row, place) =>
      line(
        row,
        columns.map(({ values }) => values[place] ?? ''),
        'plain',
      ),
    ),
  ];
}

const longText = ({ cells }: TableContents): TextLine[] =>
  cells.flatMap((cell) => {
    const text = [cellText(cell) || 'unread', ...(cell.note === undefined ? [] : [shownText(cell.note)])].join('; ');
    const name = cell.column === 'value' || cell.column === 'rule' ? cell.row : `${cell.row}, ${cell.column}`;
    return paragraph(`${shownText(name)}: ${text} (${cell.source.replace(/^.*?\d{4}, /, '')})`, '  ');
  });
