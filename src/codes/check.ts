import type { Finding } from '../findings/finding.ts';
import type { ElementId } from '../model/model.ts';
import type { PipeId } from '../network/network.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import type { Load } from '../units/quantity.ts';
import type { PipeUse } from './use.ts';
import type { TrapWay } from './way.ts';

/** A demand of a code that is no size: a vent that must be there, an arm that is too long. */
export interface Check {
  readonly id: string;
  readonly run: (facts: CheckFacts) => readonly Finding[];
}

/** What checks may look at: pipes with their sizes, stacks, traps. Numbers are metres, m/m and degrees. */
export interface CheckFacts {
  readonly pipes: readonly CheckedPipe[];
  readonly stacks: readonly CheckedStack[];
  readonly traps: readonly CheckedTrap[];
  /** Building drains, one for each that leaves the building. */
  readonly drains: readonly CheckedDrain[];
}

export interface CheckedPipe {
  readonly use: PipeUse;
  readonly element: ElementId | null;
  readonly required: NominalSize | null;
  readonly modelled: NominalSize | null;
  readonly slopeUncertainty: number;
  readonly slopeGround: 'geometry' | 'property' | 'answer' | 'unknown';
  readonly length: number;
}

export interface CheckedStack {
  readonly elements: readonly ElementId[];
  readonly footLoad: Load;
  readonly storeysServed: number;
  readonly height: number;
  readonly hasStackVent: boolean;
  /** Where its vent stack leaves it; null: it has none. Of several the soundest. */
  readonly ventStack: 'foot' | 'drain' | 'above a branch' | null;
  readonly isWetVent: boolean;
  /** Heights of plumbing storeys, counted from the top, at which a yoke vent joins. */
  readonly yokes: readonly number[];
  readonly topStorey: number;
  readonly offsets: readonly {
    readonly elements: readonly ElementId[];
    readonly length: number;
    readonly storeysAbove: number;
    readonly loadAbove: Load;
    readonly reliefVents: number;
  }[];
}

export interface CheckedTrap {
  readonly element: ElementId;
  readonly size: NominalSize;
  readonly siphonic: boolean;
  /** Its water reaches a sewer end: without one, nothing can be said of its air. */
  readonly drains: boolean;
  /** Role of the vent, or `unvented`, `free`. */
  readonly how: string;
  readonly arm: {
    readonly length: number;
    readonly fall: number | null;
    readonly plan: number | null;
    readonly height: number | null;
    readonly slope: number | null;
    readonly slopeUncertainty: number;
    readonly turn: number | null;
  } | null;
  /** Developed length between the fixture and its trap. */
  readonly outletLength: number;
  readonly kind: string | null;
  /** The code does not let the fixture be used. */
  readonly refused: boolean;
  /** Row of the fixture table. */
  readonly row: string;
  /** Its way to what gives its drain air; null where none was found or the code does not ask. */
  readonly way: TrapWay | null;
}

export interface CheckedDrain {
  readonly elements: readonly ElementId[];
  readonly pipes: readonly PipeId[];
  /** Some vent reaches the sky at this size or larger, drawn or sized: the largest such. */
  readonly widestVent: NominalSize | null;
}
