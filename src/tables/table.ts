import type { NominalSize } from '../units/nominal-size.ts';
import type { ColumnUnit, Dimension } from './column-unit.ts';

export type Trust = 'published' | 'cross-checked' | 'memory';

/** Where a figure stands: the file, its row and column, and the clause that a person would open the book at. */
export interface Place {
  readonly table: string;
  readonly row: string;
  readonly column: string;
  readonly clause: string;
}

/**
 * `NP` not permitted, `NL` no limit, `NA` larger than the pipe it serves and never needed by this table (elsewhere: the
 * column does not apply to the row); null: unread.
 */
export type Word = 'NP' | 'NL' | 'NA';
export type Amount = number | Word | null;
export type CellValue = number | NominalSize | Word | null;

/** A figure as no rule can lose it: value, trust, place. Loads in sixtieths, lengths in metres, slopes in m/m. */
export interface Cell<V extends CellValue = CellValue> {
  readonly value: V;
  readonly trust: Trust;
  readonly place: Place;
}

export interface TableOrigin {
  readonly document: string;
  readonly edition: string;
  /** Where in the book: `Table 2.4.10.6.-B`. Becomes the clause of every cell. */
  readonly at: string;
  readonly page?: number;
  /** How the figures are known, in plain words. */
  readonly seen?: string;
  readonly url?: string;
}

export interface Column {
  readonly id: string;
  readonly unit: ColumnUnit;
  readonly dimension: Dimension;
  readonly title: string;
  /** Set when the column's head is itself a size (vent lengths) or a slope (drain loads). */
  readonly size: NominalSize | null;
  readonly slope: number | null;
}

export interface Row {
  /** As a person finds it in print: `3 in`, `3 in, up to 21`. */
  readonly name: string;
  readonly note: string | null;
  /** A figure or a size. A column that the table has not is our own fault and throws. */
  cell(column: string): Cell;
  amount(column: string): Cell<Amount>;
  size(column: string): Cell<NominalSize | Word | null>;
  /** Of text and key columns; null where the row prints none. */
  text(column: string): string | null;
  /** Loads that depend on the trap, smallest trap first; empty where the column has one load for all. */
  byTrap(column: string): readonly LoadAtTrap[];
  /** What the file says, in printed units, for lists that show the table. */
  printed(column: string): unknown;
  noteOf(column: string): string | null;
}

export interface LoadAtTrap {
  readonly trap: NominalSize;
  readonly load: Cell<number>;
}

export interface Table {
  /** Name of the file without its ending; local tables carry `(local)` behind it. */
  readonly id: string;
  readonly title: string;
  readonly clause: string;
  readonly trust: Trust;
  readonly origin: TableOrigin;
  readonly columns: readonly Column[];
  /** In printed order. */
  readonly rows: readonly Row[];
  /** Sizes the table steps along, smallest first: its heads that are sizes, else its first column of sizes. */
  readonly sizes: readonly NominalSize[];
  readonly key: readonly string[];
  readonly notes: readonly string[];
}
