import { visible } from '../schedule/shown-text.ts';

/** Markup of our own making. Only `html`, `tag` and `drawing` make it, so that no word of a model is ever markup. */
export interface Html {
  readonly markup: string;
}

type Child = Html | string | number | null | false;

/** An element; texts are escaped, characters that could steer a line are written out, null and false fall away. */
export function html(name: string, attributes: Readonly<Record<string, string>>, ...children: readonly Child[]): Html {
  const named = Object.entries(attributes).map(([key, value]) => ` ${key}="${escaped(value)}"`);
  const inside = children.map((child) =>
    child === null || child === false ? '' : typeof child === 'object' ? child.markup : escaped(String(child)),
  );
  return { markup: `<${name}${named.join('')}>${inside.join('')}</${name}>` };
}

/** The same without attributes. */
export const tag = (name: string, ...children: readonly Child[]): Html => html(name, {}, ...children);

/** A drawing that `svgText` has written: its words are escaped already. */
export const drawing = (svg: string): Html => ({ markup: svg });

export interface Column<Row> {
  readonly head: string;
  readonly cell: (row: Row) => Child;
  /** Numbers stand to the right; words of our own are never broken; the rest may be a name of any length. */
  readonly as?: 'number' | 'word';
}

/** A table with its title and a head that is printed on every sheet; the first column names the row. */
export function table<Row>(caption: string, columns: readonly Column<Row>[], rows: readonly Row[]): Html {
  const kind = ({ as }: Column<Row>): Readonly<Record<string, string>> => (as === undefined ? {} : { class: as });
  return tag(
    'table',
    tag('caption', caption),
    tag('thead', tag('tr', ...columns.map((column) => html('th', { scope: 'col', ...kind(column) }, column.head)))),
    tag(
      'tbody',
      ...rows.map((row) =>
        tag(
          'tr',
          ...columns.map((column, at) =>
            at === 0
              ? html('th', { scope: 'row', ...kind(column) }, column.cell(row))
              : html('td', kind(column), column.cell(row)),
          ),
        ),
      ),
    ),
  );
}

/** Also characters that HTML forbids: `visible` writes them out. */
const escaped = (text: string): string =>
  visible(text).replace(/[&<>"']/g, (character) => `&#${character.charCodeAt(0)};`);
