import type { PipeId } from '../network/network.ts';
import type { Load } from '../units/quantity.ts';
import type { Carried, StackEntry } from './way.ts';

/** A stack, seen from one of its sections. */
export interface StackUse {
  readonly id: number;
  /** The most that any one storey puts in above the foot of this section. */
  readonly heaviestStorey: { readonly storey: number; readonly load: Load };
  /** Last section before the drain: its size and load stand for the stack. */
  readonly foot: PipeId;
  readonly footLoad: Load;
  /** Of everything that the whole stack carries. */
  readonly footClosets: number;
  readonly carries: Carried;
  readonly footCounts: Readonly<Record<string, number>>;
  /** Where drains join at or above the head of this section, highest first: height in metres, null without geometry. */
  readonly joins: readonly StackJoin[];
  /** The same of the whole stack. */
  readonly allJoins: readonly StackJoin[];
  /** Length of its vertical parts together, metres. */
  readonly rise: number;
  /** How the drains come in, from the top; absent where the code does not ask, and on vents. */
  readonly entries?: readonly StackEntry[];
  /** Where its vent stack leaves it, null: it has none; absent as above. */
  readonly ventStack?: StackLeft;
}

/** One height at which drains come into a stack, and what they bring. */
export interface StackJoin {
  readonly height: number | null;
  readonly load: Load;
}

/** Where a vent stack leaves its stack; null: it has none. */
export type StackLeft = 'foot' | 'drain' | 'above a branch' | null;
