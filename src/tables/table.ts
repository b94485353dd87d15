import type { NominalSize } from '../units/nominal-size.ts';

export type Trust = 'published' | 'cross-checked' | 'memory';

/** Where a figure stands: the file, its row and column, and the clause that a person would open the book at. */
export interface Place {
  readonly table: string;
  readonly row: string;
  readonly column: string;
  readonly clause: string;
}

/** `NP` not permitted, `NL` no limit, `NA` larger than the pipe it serves and never needed by this table; null: unread. */
export type CellValue = number | NominalSize | 'NP' | 'NL' | 'NA' | null;

/** A figure as no rule can lose it: value, trust, place. */
export interface Cell<V extends CellValue = CellValue> {
  readonly value: V;
  readonly trust: Trust;
  readonly place: Place;
}
