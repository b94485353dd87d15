import type { PipeId } from '../network/network.ts';
import type { Load } from '../units/quantity.ts';

/** How a run of drain lies. Metres and m/m. */
export interface Way {
  readonly length: number;
  /** Turns at fittings that no other drain joins, together, in bends of 90 degrees; the bend beside the appliance is none. */
  readonly bends: number;
  /** Height over which it falls at 45 degrees or steeper. */
  readonly drop: number;
  /** Slopes of its flattest and its steepest level pipe; null where none is known. */
  readonly flattest: number | null;
  readonly steepest: number | null;
}

/** The way of one trap's water to what gives its drain air: the stack, the building drain, or a pipe that a vent stands on. */
export interface TrapWay extends Way {
  readonly pipes: readonly PipeId[];
  /** On to the stack or the building drain: those, then what is ventilated. */
  readonly line: readonly PipeId[];
  readonly end: 'stack' | 'building-drain' | 'ventilated';
  /** How all of the line lies. */
  readonly whole: Way;
}

/** A branch, seen from one of its pipes. */
export interface BranchReach {
  /** A dry vent stands on it, here or upstream. */
  readonly ventilated: boolean;
  /** Of the ways of all traps that pass: the worst of each measure. Whole ways where it is ventilated. */
  readonly way: Way;
  /** Largest sum of bends on the way of a water closet that passes, degrees. */
  readonly closetTurn: number;
}

/** Loads of fixtures whose frequency of use is stated apart from the building's, by factor, least first. */
export type StatedUses = readonly { readonly frequency: number; readonly load: Load }[];

/** What passes a pipe, as far as a flow is reckoned from it. */
export interface Carried {
  readonly load: Load;
  /** Largest load of one fixture. */
  readonly largest: Load;
  /** Steady and pumped flow, l/s, where the code keeps it apart from loads. */
  readonly steady: number;
  readonly statedUses: StatedUses;
  readonly closets: number;
  readonly counts: Readonly<Record<string, number>>;
  readonly fixtures: number;
}

/** How a drain comes into a stack: swept at a flat angle or with a radius, square, or as the model does not tell. */
export interface StackEntry {
  readonly pipe: PipeId;
  readonly shape: 'square' | 'swept';
  /** The model or the user says so; else the shape is that of the reading in hand. */
  readonly known: boolean;
}
