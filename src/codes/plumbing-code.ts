import type { SpeedLaw } from '../hydraulics/friction.ts';
import type { FixtureDetail, FixtureKind } from '../model/identity.ts';
import type { PipeDimensions } from '../tables/pipe-dimensions.ts';
import type { Cell } from '../tables/table.ts';
import type { WallRules } from '../tables/wall-rules.ts';
import type { NominalSize, SizeSeries } from '../units/nominal-size.ts';
import type { Load } from '../units/quantity.ts';
import type { BatteryFacts, Broken, CircuitLine } from './battery.ts';
import type { Check } from './check.ts';
import type { CleanoutRules } from './cleanouts.ts';
import type { FixtureRow, FixtureRows } from './fixture-row.ts';
import type { Reading } from './reading.ts';
import type { Role } from './role.ts';
import type { SizingRule } from './sizing-rule.ts';
import type { PipeUse } from './use.ts';
import type { Carried, StackEntry, TrapWay } from './way.ts';

/** One edition of one code, ready to size with: tables bound to rules. */
export interface PlumbingCode {
  readonly id: string;
  readonly family: string;
  readonly title: string;
  readonly edition: string;
  /** Word for the load: `fixture units`, `l/s`. */
  readonly unit: string;
  readonly series: SizeSeries;
  /** Outside diameters by which a measured pipe is read. */
  readonly dimensions: PipeDimensions;
  /** Studs, holes in them, and what the layers of a wall are. */
  readonly walls: WallRules;
  /** null where the family has no table of their places. */
  readonly cleanouts: CleanoutRules | null;
  readonly fixtures: FixtureRows;
  readonly omitSizes: ReadonlySet<NominalSize>;
  /** What the user set, defaults filled in: shown on every deliverable. */
  readonly settings: Readonly<Record<string, string | number | boolean | readonly string[]>>;
  /** What its rules ask that no model tells, in the order of the rules. */
  readonly unchecked: readonly string[];
  /** Local table files laid over ours. */
  readonly localTables: readonly string[];
  readonly readings: readonly ReadingRule[];
  /** Which of two readings stands when neither holds and both break equally many conditions. */
  readonly whenNoneHolds: (facts: BatteryFacts) => Reading;
  readonly rules: readonly SizingRule[];
  /** What a rule is about, in words of the trade. */
  readonly ruleTitle: (id: string) => string;
  readonly checks: readonly Check[];
  /** Longest trap arm in metres; null where the row has a limit of another kind or the code prints none. */
  readonly armLimit: (trap: NominalSize, row: FixtureRow) => number | null;
  /** The rule that frees a fixture's trap of a vent, or null. */
  readonly freeOfVent: (trap: FreeTrapFacts) => { readonly rule: string; readonly clause: string } | null;
  /**
   * The rule by which a trap breathes through its own short branch, no vent standing on it, or null; absent where the
   * code knows no such branches. Where it is there, `PipeUse.reach` is measured.
   */
  readonly shortBranch?: (trap: ShortBranchFacts) => { readonly rule: string; readonly clause: string } | null;
  /** Bores and friction that the code itself reckons drains with; absent where its tables hold loads. */
  readonly friction?: Friction;
  /** How drains may come into a stack, where that decides its size; absent where it does not. */
  readonly entries?: EntryRule;
  /** Load of a steady or pumped flow, l/s, or of one that comes and goes; absent where the code keeps flows apart from loads. */
  readonly steadyLoad?: (litresASecond: number, intermittent: boolean) => { readonly load: Load; readonly cell: Cell };
  /** The building sewer begins this far outside the wall, metres. */
  readonly sewerBegins: number;
  /** Horizontal offsets of a stack shorter than this, metres, count as stack. */
  readonly stackOffset: number;
  readonly batteryLimits: BatteryLimits;
  /** From how many storeys of fixtures on a vent stack is due, and what may drain into its foot; null: no such foot. */
  readonly ventStack: { readonly storeys: number; readonly footLoad: Load } | null;
  /** How far a dry vent is measured; null where the code asks nothing of its length. Some count only where traps breathe through. */
  readonly ventLength: (role: Role, breathes: boolean) => VentLengthTo | null;
  /** Why a pipe that no rule sizes has no size, where something that the model does not say would give it one; absent: never. */
  readonly unsized?: (pipe: PipeUse) => string | null;
  /** Load that enters the wet vent table: what the whole wet vent takes, or what passes each section of it. */
  readonly wetVentLoad: 'whole' | 'section';
  /** A vent that turns down before it goes up is one the code knows, with conditions of its own. */
  readonly islandVents: boolean;
  /** Fixtures in one space that count less together than one by one; null where the code has no such rule. */
  readonly group: GroupRule | null;
  /** Fixtures in a row that count more together than one by one; null where the code has no such rule. */
  readonly row: RowLoadRule | null;
  /** What the code counts among the fixtures of a pipe besides water closets. */
  readonly counts: readonly FixtureCount[];
  /** Which of several fixtures on one trap put their load in; null where the code counts each by itself. */
  readonly sharedTrap: SharedTrapRule | null;
}

/** A family of codes as its module gives it: what does not come from its tables and settings alone. */
export type CodeRules = Omit<
  PlumbingCode,
  | 'id'
  | 'family'
  | 'title'
  | 'edition'
  | 'unit'
  | 'series'
  | 'dimensions'
  | 'omitSizes'
  | 'settings'
  | 'localTables'
  | 'unchecked'
  | 'ruleTitle'
  | 'walls'
  | 'cleanouts'
>;

/** What a code allows and asks of rows of fixtures. */
export interface BatteryLimits {
  /** Most load of a drain that stands in for a relief vent. */
  readonly reliefDrainLoad: Load;
  /** Whether a circuit-vented branch must have a relief vent. */
  readonly reliefDue: (branch: Pick<CircuitLine, 'closets' | 'soilAbove'>) => boolean;
  /** From how many fixtures and what turn on a branch needs a further circuit vent; infinite where the code knows none. */
  readonly additionalAfter: number;
  readonly turnDegrees: number;
}

/**
 * End of a vent's length, counted from its foot: where it meets another vent that carries more air; the first stack
 * vent, vent stack or header; open air.
 */
export type VentLengthTo = 'join' | 'stack' | 'sky';

/** One answer for each fixture: false where another one on the trap counts for it. */
export type SharedTrapRule = (
  fixtures: readonly {
    readonly kind: FixtureKind | null;
    readonly domestic: boolean | null;
    readonly row: FixtureRow;
    readonly load: Load;
  }[],
) => readonly boolean[];

export interface FreeTrapFacts {
  /** The largest stack, as drawn, whose water passes where the fixture drain joins; null: none, or of no known size. */
  readonly stackAbove: NominalSize | null;
  readonly kind: FixtureKind | null;
  readonly emergency: boolean | null;
  readonly trap: NominalSize;
  /** Of the fixture drain: developed length and fall in metres, null where unknown. */
  readonly length: number | null;
  readonly fall: number | null;
}

export interface ShortBranchFacts {
  readonly way: TrapWay;
  readonly row: FixtureRow;
  /** Of the last pipe of the way: what passes it, and the largest turn of a water closet's way through it, degrees. */
  readonly carried: Carried;
  readonly closetTurn: number;
}

export interface Friction {
  readonly law: SpeedLaw;
  /** As people name it: `Colebrook-White, roughness 1 mm`. */
  readonly name: string;
  /** Metres; null where the code lists no bore for the size. */
  readonly bore: (size: NominalSize) => number | null;
}

export interface EntryRule {
  /** To the stack's own direction, degrees: flatter entries are swept whatever their radius. */
  readonly sweptUpTo: number;
  /** What the user says of those that the model does not tell; null: nothing, and sizes are given for both. */
  readonly said: StackEntry['shape'] | null;
}

/** Fixtures of one kind side by side: from `least` of them on, each counts `each` on the drains they share. */
export interface RowLoadRule {
  readonly clause: string;
  readonly kind: FixtureKind;
  readonly least: number;
  readonly each: Load;
}

/** What a count may look at of one fixture. */
export interface CountedFixture {
  readonly kind: FixtureKind | null;
  readonly row: FixtureRow;
  readonly trap: NominalSize;
  readonly load: Load;
}

/** A name and what it counts: `PipeUse.counts` and `VentUse.counts` hold the number by this name. */
export interface FixtureCount {
  readonly id: string;
  readonly takes: (fixture: CountedFixture) => boolean;
}

export interface GroupRule {
  readonly clause: string;
  /** Part of a group that a row is, or null. An `extra` belongs to a whole group of its room and adds nothing to it. */
  readonly memberOf: (row: FixtureRow, detail: FixtureDetail) => 'closet' | 'lavatory' | 'bath' | 'extra' | null;
  readonly figure: (closet: FixtureRow) => { readonly load: Load; readonly cell: Cell };
}

/** One way to read a battery, and the conditions that the code sets on it. */
export interface ReadingRule {
  readonly reading: Reading;
  /** Whether the drawing is of the sort that this reading is about; absent: every row that breathes from upstream. */
  readonly applies?: (facts: BatteryFacts) => boolean;
  readonly broken: (facts: BatteryFacts) => readonly Broken[];
}
