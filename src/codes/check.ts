import type { Finding } from '../findings/finding.ts';
import type { FixtureKind } from '../model/identity.ts';
import type { ElementId } from '../model/model.ts';
import type { PipeId } from '../network/network.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import type { Load } from '../units/quantity.ts';
import type { Role } from './role.ts';
import type { StackJoin } from './stack-use.ts';
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
  /** Dry vents that serve a trap or a stack, one for each foot, in the order of their joints. */
  readonly vents: readonly CheckedVent[];
  readonly access: CheckedAccess;
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
  /** Metres of the drain between the stack's foot and that of its vent stack; 0 for one on the stack itself. */
  readonly ventStackBeyond: number;
  readonly isWetVent: boolean;
  /** Where drains come into it, highest first. */
  readonly joins: readonly StackJoin[];
  /** Height of its foot, metres; null without geometry. What the code counts of everything that it carries. */
  readonly footHeight: number | null;
  readonly footCounts: Readonly<Record<string, number>>;
  /** Of its last section, as the load requires it. */
  readonly footSize: NominalSize | null;
  /** The first level drain that joins downstream of its foot, and how far along, metres; null where none does soon. */
  readonly firstBelow: { readonly element: ElementId | null; readonly distance: number } | null;
  /** Heights of plumbing storeys, counted from the top, at which a yoke vent joins. */
  readonly yokes: readonly number[];
  /** Heights at which they leave the stack, metres, highest first. */
  readonly yokeHeights: readonly number[];
  /** The same vents where they meet the vent stack: how far above the floor below, metres; null without geometry. */
  readonly yokeTops: readonly { readonly elements: readonly ElementId[]; readonly overFloor: number | null }[];
  /** Vents that tie each storey it serves to its vent stack, lowest storey first; null: the storey has none. */
  readonly ties: readonly ({ readonly vent: NominalSize; readonly branch: NominalSize } | null)[];
  /** The highest and the lowest of the storeys it serves. */
  readonly topStorey: number;
  readonly lowestStorey: number;
  readonly offsets: readonly {
    readonly elements: readonly ElementId[];
    readonly length: number;
    readonly storeysAbove: number;
    /** Storeys of fixtures on the part above. */
    readonly servedAbove: number;
    readonly loadAbove: Load;
    readonly reliefVents: number;
    /** Storey of plumbing and height of its upper end; the height null without geometry. */
    readonly storey: number;
    readonly height: number | null;
    /** The first level drain that joins in it, and how far from its upper end, metres. */
    readonly firstJoin: { readonly element: ElementId | null; readonly distance: number } | null;
  }[];
  /** Where it steps aside inclined, but not level, from the top; heights in metres. */
  readonly inclined: readonly {
    readonly elements: readonly ElementId[];
    readonly top: number;
    readonly bottom: number;
  }[];
  /** Metres from its foot up to the nearest cleanout on the stack; 0 at the foot; null: there is none. */
  readonly cleanout: number | null;
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
  /** The model draws the trap as a thing of its own. */
  readonly isDrawn: boolean;
  readonly fixture: FixtureKind | null;
  /** Developed length between the fixture and its trap, and what of it is level. */
  readonly outletLength: number;
  readonly outletLevel: number;
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
  /** Of the last pipe that leaves, as the load requires it. */
  readonly required: NominalSize | null;
  /** Where its vents reach the air, each once. */
  readonly mouths: readonly CheckedMouth[];
  /** Some cleanout opens it inside the building. */
  readonly hasCleanout: boolean;
}

/** What opens a vent to the air: `highest` is an open end over the roof. */
export type MouthKind = 'terminal' | 'valve' | 'highest' | 'answer';

export interface CheckedMouth {
  readonly elements: readonly ElementId[];
  readonly how: MouthKind;
  readonly drawn: NominalSize | null;
  /** The larger of drawn and required. */
  readonly size: NominalSize | null;
  /** Metres over the roof that covers the place; null where no roof is modelled or nothing is drawn. */
  readonly overRoof: number | null;
}

/** A dry vent from its foot on the drainage to the air. */
export interface CheckedVent {
  /** Its pipes from the foot up. */
  readonly elements: readonly ElementId[];
  readonly role: Role;
  /** Traps that breathe through the foot. */
  readonly traps: readonly {
    readonly element: ElementId;
    readonly closet: boolean;
    readonly row: string;
    readonly storey: number;
  }[];
  /** Fixtures that it serves: those traps, or the row's where it stands by the row's vent. */
  readonly serves: readonly FloodFacts[];
  /** Height at which it meets a vent that carries other air as well, metres; null: it goes on alone, or nothing is drawn. */
  readonly meets: number | null;
  /** Height at which it first runs level while it carries its own air alone, metres; null: it does not, or nothing is drawn. */
  readonly runsLevelAt: number | null;
  /** Where it stands on a level drain: the angle to the level at which it leaves, degrees; else null. */
  readonly leavesAt: number | null;
  readonly mouth: MouthKind | null;
  /** Height of the mouth over the foot, metres. */
  readonly rise: number | null;
  /** How far it comes down again on its way, metres. */
  readonly descent: number;
  /** The stack that it stands on (`isOwn`) or that the drain it vents comes to: its connections and the height of this one. */
  readonly stack: {
    readonly joins: readonly StackJoin[];
    readonly height: number | null;
    readonly isOwn: boolean;
  } | null;
}

/** What tells how high a fixture fills before it overflows, in metres of the building; null: not drawn. */
export interface FloodFacts {
  readonly element: ElementId;
  readonly closet: boolean;
  readonly outlet: number | null;
  /** Top of its body. */
  readonly top: number | null;
  readonly floor: number;
}

/** How the drains can be rodded. */
export interface CheckedAccess {
  /** By element. `opens` is the drain it opens, drawn or else required. */
  readonly cleanouts: readonly {
    readonly element: ElementId;
    readonly size: NominalSize | null;
    readonly opens: NominalSize | null;
  }[];
  /** Level drains of more than one fixture: metres of level drain from the nearest cleanout to the far end; null: none. */
  readonly drains: readonly {
    readonly element: ElementId;
    readonly size: NominalSize;
    readonly distance: number | null;
    /** That place lies between two cleanouts; else beyond the last one. */
    readonly isBetween: boolean;
  }[];
  /** Level drains that turn in one fitting, no other water joining: the turn, degrees, and metres to the nearest cleanout. */
  readonly bends: readonly {
    readonly element: ElementId;
    readonly turn: number;
    readonly distance: number | null;
  }[];
  /**
   * Level drains of more than one fixture, each from its upper end to where it drops or leaves: where it drains to, its
   * length, metres from its upper end to the nearest cleanout, and the most that it turns with no cleanout between, degrees.
   */
  readonly runs: readonly {
    readonly element: ElementId;
    readonly endsAt: 'stack' | 'building-drain' | null;
    readonly length: number;
    readonly head: number | null;
    readonly turn: number;
  }[];
  /** Urinals, and whether a cleanout opens the drain of each. */
  readonly urinals: readonly { readonly element: ElementId; readonly hasCleanout: boolean }[];
  /** Fixture drains of kitchen sinks: their turns together, degrees, and whether a cleanout opens them. */
  readonly sinks: readonly {
    readonly element: ElementId;
    readonly turn: number;
    readonly hasCleanout: boolean;
  }[];
  /**
   * Traps on the building drain itself: whether a cleanout stands at or before them, and the dry vent nearest upstream.
   */
  readonly buildingTraps: readonly {
    readonly element: ElementId;
    readonly hasCleanout: boolean;
    readonly freshAir: { readonly distance: number; readonly size: NominalSize | null } | null;
  }[];
  /**
   * Building sewers outside: metres from the building, or from the manhole last passed, to the lower end of each, and
   * whether one has been passed.
   */
  readonly sewers: readonly {
    readonly element: ElementId;
    readonly size: NominalSize;
    readonly since: number;
    readonly pastManhole: boolean;
  }[];
  /** Interceptors with drains, and whether a cleanout follows before other water joins. */
  readonly interceptors: readonly { readonly element: ElementId; readonly hasCleanout: boolean }[];
}
