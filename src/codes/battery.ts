import type { FixtureKind } from '../model/identity.ts';
import type { JointId, PipeId } from '../network/network.ts';
import type { FixtureId } from '../paths/paths.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import type { Load } from '../units/quantity.ts';
import type { FixtureRow } from './fixture-row.ts';
import type { Reading } from './reading.ts';
import type { StackUse } from './stack-use.ts';

/** Two or more traps on one wet line that breathe through one foot. Facts only: a code's readings judge them. */
export interface BatteryFacts {
  readonly id: number;
  readonly foot: JointId;
  /** Further feet of dry vents on the line that serve the row as well. */
  readonly feet: readonly JointId[];
  /** Wet pipes from the foot to the joint of the last trap, in flow order. */
  readonly line: readonly PipeId[];
  /** From upstream to downstream, by their joint on the line. */
  readonly traps: readonly BatteryTrap[];
  readonly guests: readonly Guest[];
  /** What the line looks like when the battery is wet vented. */
  readonly wet: WetLine;
  /** What it looks like when it is circuit vented. */
  readonly circuit: CircuitLine;
  /** Set where no vent stands upstream and the air comes from where the row's drain ends. */
  readonly open: OpenLine | null;
  /** Stack that the line runs through, or that an open row ends at. */
  readonly stack: StackUse | null;
  /** The designer's own word, from names, systems and properties. */
  readonly word: Reading | null;
}

export interface BatteryTrap {
  readonly fixture: FixtureId;
  readonly kind: FixtureKind | null;
  readonly row: FixtureRow;
  readonly size: NominalSize;
  readonly load: Load;
  readonly closet: boolean;
  readonly emergency: boolean;
  /** Needs no vent by a rule of its own. */
  readonly free: boolean;
  /** A dry vent stands on its own drain. */
  readonly ownVent: boolean;
  /** Vertical pipes of its own drain between the trap and the line, and their height in metres. */
  readonly drops: { readonly pipes: number; readonly height: number };
  /** The last pipe of its own drain runs level into the line. */
  readonly joinsLevel: boolean;
  /** Length of the level pipes of its own drain up to the line, metres. */
  readonly reach: number;
  /** Joint on the line where its arm ends, and its place: 0 is the foot. */
  readonly joins: JointId;
  readonly place: number;
  /** Storey of plumbing, 0 lowest. */
  readonly storey: number;
}

/** A fixture with a vent of its own whose drain joins the line. */
export interface Guest {
  readonly fixture: FixtureId;
  readonly kind: FixtureKind | null;
  readonly row: FixtureRow;
  readonly load: Load;
  readonly storey: number;
  readonly joins: JointId;
}

export interface WetLine {
  /** Everything that drains into the wet vent, one by one; the most downstream trap or pair left out; closets apart. */
  readonly load: Load;
  readonly leftOut: readonly FixtureId[];
  /** Closets among its traps. */
  readonly closets: number;
  readonly storeys: number;
  /** Load of each storey above the lowest. */
  readonly upperStoreys: readonly { readonly storey: number; readonly load: Load }[];
  /** Level pieces between vertical ones. */
  readonly offsets: readonly { readonly length: number; readonly joined: boolean }[];
  /** The line runs through a stack; and how many of its pipes lie past or beside one. */
  readonly stack: boolean;
  readonly offStack: number;
  /** Pipes of the line that are vertical and level, and the length of the whole in metres. */
  readonly vertical: number;
  readonly level: number;
  readonly length: number;
  /** Everything that drains through its last pipe; 0 where it has none. */
  readonly passes: Load;
}

/** A row of traps none of which has a vent on its drain or upstream. */
export interface OpenLine {
  /** What its drain comes to first that has air: a dry vent on it, a stack, a level drain of vented fixtures of its storey. */
  readonly end: 'vent' | 'stack' | 'vented-drain';
  readonly joint: JointId;
  /** Level length from each trap to that joint, metres, in the order of the traps. */
  readonly reaches: readonly number[];
  /** What the way comes to past it, as for any branch. */
  readonly endsAt: 'stack' | 'building-drain';
}

export interface CircuitLine {
  /** Where the circuit vent, wet portion included, meets the branch. */
  readonly start: JointId;
  /** Vertical wet pipes between the foot and the branch; empty when the circuit vent is dry to the branch. */
  readonly wetPortion: readonly PipeId[];
  /** Fixtures that drain into the circuit vent: listed, not circuit vented. */
  readonly onVent: readonly { readonly fixture: FixtureId; readonly load: Load; readonly joins: JointId }[];
  readonly traps: readonly BatteryTrap[];
  /** Pipes from the start to the end of the circuit-vented branch, in flow order. */
  readonly branch: readonly PipeId[];
  /** Part of the branch from the start to the joint of the last circuit-vented trap. */
  readonly toLastTrap: readonly PipeId[];
  readonly vertical: number;
  readonly stackUpstream: boolean;
  /** Everything that drains through the last pipe of the branch, additional fixtures too, and the closets among it. */
  readonly load: Load;
  readonly closets: number;
  readonly counts: Readonly<Record<string, number>>;
  /** The branch ends at a stack that carries water from above. */
  readonly soilAbove: boolean;
  /** Steepest drawn or stated slope between the vent and the last trap, m/m; null where none is known. */
  readonly steepest: number | null;
  /** Traps whose arms reach the start before any other trap joins. */
  readonly trapsAtStart: number;
  readonly relief: Relief | null;
  readonly additional: readonly { readonly joint: JointId; readonly by: PipeId; readonly dry: boolean }[];
  /** Between two vent joints that follow one another. */
  readonly stretches: readonly {
    readonly traps: number;
    readonly turnDegrees: number;
    readonly from: JointId;
    readonly to: JointId;
  }[];
}

export interface Relief {
  readonly joint: JointId;
  readonly by: PipeId;
  readonly kind: 'dry' | 'drain' | 'shared';
  /** Of a drain: what drains through it; else 0. */
  readonly load: Load;
  readonly fixtures: readonly FixtureId[];
}

/** One condition of a reading that the battery breaks. */
export interface Broken {
  readonly rule: string;
  readonly clause: string;
  readonly facts: Readonly<Record<string, string | number | boolean | null>>;
  /** What the finding is called when this reading is chosen. */
  readonly finding:
    | 'wet-vent-not-allowed'
    | 'wet-vent-overloaded'
    | 'circuit-vent-not-allowed'
    | 'relief-vent-missing'
    | 'additional-circuit-vent-missing'
    | 'common-vent-not-allowed'
    | 'waste-stack-vent-not-allowed'
    | 'combination-not-allowed'
    | 'single-stack-not-allowed'
    | 'unvented-trap';
}
