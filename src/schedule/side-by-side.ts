import { columnsOf, padded, wrapped } from './shown-text.ts';
import { pageColumns, type TextLine, type Tone } from './text-line.ts';

/** A row of a comparison: what it is about, and what each column says of it. */
export interface ComparedRow {
  readonly label: string;
  readonly cells: readonly string[];
  readonly tone?: Tone;
}

const gap = 2;
const narrowest = 14;

/** Columns of equal width beside their labels, every cell broken to its column. */
export function sideBySide(rows: readonly ComparedRow[]): TextLine[] {
  const count = Math.max(1, ...rows.map(({ cells }) => cells.length));
  const labels = Math.max(...rows.map(({ label }) => columnsOf(label)));
  const room = pageColumns - 2 - labels - gap * count;
  const width = Math.max(narrowest, Math.floor(room / count));
  return rows.flatMap(({ label, cells, tone = 'plain' }) => {
    const broken = cells.map((cell) => wrapped(cell, width));
    const height = Math.max(1, ...broken.map(({ length }) => length));
    return Array.from({ length: height }, (_, line): TextLine => {
      const parts = broken.map((cell) => padded(cell[line] ?? '', width));
      const text = [padded(line === 0 ? label : '', labels), ...parts].join(' '.repeat(gap));
      return { text: `  ${text}`.trimEnd(), tone };
    });
  });
}
