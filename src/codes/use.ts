import type { JointId, PipeId } from '../network/network.ts';
import type { FixtureId } from '../paths/paths.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import type { Load } from '../units/quantity.ts';
import type { BatteryFacts } from './battery.ts';
import type { Reading } from './reading.ts';
import type { DrainRole, Portion, Role } from './role.ts';
import type { StackLeft, StackUse } from './stack-use.ts';
import type { BranchReach, StatedUses } from './way.ts';

/** Everything a sizing rule may know of one pipe, besides the sizes found so far. */
export interface PipeUse {
  readonly pipe: PipeId;
  readonly role: Role;
  readonly also: readonly Role[];
  readonly portion: Portion | null;
  /** Of everything whose water passes, group figures applied. */
  readonly load: Load;
  readonly closets: number;
  /** What else the code counts of them, by the names it gives. */
  readonly counts: Readonly<Record<string, number>>;
  /** Fixtures whose water passes. */
  readonly fixtures: number;
  /** Largest load of one of them. */
  readonly largest: Load;
  /** Steady and pumped flow that passes, l/s, where the code keeps it apart from loads; else 0. */
  readonly steady: number;
  /** Part of the load, where its use is stated apart from the building's. */
  readonly statedUses: StatedUses;
  readonly vertical: boolean;
  /** Fall downstream in m/m; null when vertical or unknown. */
  readonly slope: number | null;
  /** Largest trap among the fixtures of a fixture drain; null on other pipes. */
  readonly trap: NominalSize | null;
  /** That trap is drawn, or stated by the model or the user; not taken from the pipe, not assumed. */
  readonly trapStated: boolean;
  /** Least fixture outlet pipe that the fixture's own row prints; of portion `outlet` only. */
  readonly outlet: NominalSize | null;
  /** Part of the arm of one trap: between it and the pipe that vents it. */
  readonly inArm: boolean;
  /** Of a branch or fixture drain: what its way downstream comes to first; null on other pipes. */
  readonly endsAt: 'stack' | 'building-drain' | null;
  /** How the branch lies that the pipe is part of; null on other pipes, and where the code does not ask. */
  readonly reach: BranchReach | null;
  /** Wet pipes that flow in at the upstream joint. */
  readonly inflows: readonly PipeId[];
  /** Of a wet pipe: dry vents whose foot stands at its upstream joint. Of a dry one: vents that join at its lower joint. */
  readonly joining: readonly PipeId[];
  readonly stack: StackUse | null;
  /** Horizontal length in metres of the offset that the pipe is part of; null when it is part of none. */
  readonly offset: number | null;
  readonly battery: BatteryUse | null;
  readonly vent: VentUse | null;
  /** Set on a drain that stands in for a relief or additional circuit vent. */
  readonly standsIn: StandIn | null;
  /** Of the wet portion of a vent: everything that drains into the whole of it. */
  readonly wetPortion: { readonly load: Load; readonly closets: number } | null;
  /** What a wet pipe is as a drain, whatever it also vents; null for dry pipes. */
  readonly drain: DrainRole | null;
  /** Of a stack vent to the sky: what decides whether it must be the large vent of its building drain. */
  readonly mainVent: MainVentUse | null;
  /** As drawn, the one way to the sky that is as large as every building drain must have. */
  readonly isMainVent: boolean;
}

export interface MainVentUse {
  /** Way to the sky of this stack's own vent. */
  readonly own: readonly PipeId[];
  /** Ways to the sky of all vents of the building drain, this one among them: pipes from foot to mouth. */
  readonly ways: readonly (readonly PipeId[])[];
  /** Some vent of the building drain is drawn this large all the way, by nominal size: the widest such. */
  readonly drawn: NominalSize | null;
  /** Last pipe of the building drain or sewer; null where nothing leaves. */
  readonly drain: PipeId | null;
  /** Feet of stacks that come before this one as bearer of the large vent. */
  readonly before: readonly PipeId[];
}

export interface BatteryUse {
  readonly facts: BatteryFacts;
  readonly reading: Reading;
}

export interface VentUse {
  /** Load that enters a vent table, what the code leaves out left out. */
  readonly load: Load;
  /** Developed length in metres that enters a vent table; null where the code ignores it. */
  readonly length: number | null;
  /** What of that length is level, metres. */
  readonly level: number | null;
  /** Turns from its foot to the next vent that carries more, in bends of 90 degrees; null where several have met. */
  readonly bends: number | null;
  /** It breathes through an air admittance valve. */
  readonly valve: boolean;
  /** Of the fixtures whose traps breathe through it: the largest load of one, and what is stated of their use. */
  readonly largest: Load;
  readonly statedUses: StatedUses;
  readonly largestTrap: NominalSize | null;
  /** Water closets among the traps that breathe through it, and what else the code counts of them. */
  readonly closets: number;
  readonly counts: Readonly<Record<string, number>>;
  /** Stack whose foot selects the row, of stack vents and vent stacks. */
  readonly stack: StackUse | null;
  /** How that stack is read where it is its own vent; null where it is a stack like others. */
  readonly stackReading: Reading | null;
  /** Stacks whose vents have met in it, by id. */
  readonly stacks: readonly StackUse[];
  /** Vent whose size this one follows: the circuit vent of a relief vent, the stack vent of an offset relief vent. */
  readonly follows: PipeId | null;
  /** Stack and vent stack that a yoke vent joins. */
  readonly between: readonly [PipeId, PipeId] | null;
  readonly foot: JointId;
  /** The drain that it joins at its foot; null where several vents have met. */
  readonly drain: PipeId | null;
  /** Storeys of the wet vent that a stack vent serves, 0 when it serves none. */
  readonly wetVentStoreys: number;
  /** Stack that the vent serves, by id: its stack vent, vent stack, yoke vents and offset relief vents. */
  readonly serves: number | null;
  /** Sump, interceptor or manhole at the vent's foot, and the drains that empty into it; null: none stands there. */
  readonly tank: { readonly kind: TankKind; readonly inlets: readonly PipeId[] } | null;
  /** Of an offset relief vent: which of the stack's offsets it stands beside, from the top. */
  readonly offset: number | null;
  /** Of a vent stack: where it leaves the stack. */
  readonly leaves: StackLeft;
}

export type TankKind = 'sump' | 'interceptor' | 'manhole';

/** A drain that stands in for a relief or additional circuit vent. */
export interface StandIn {
  readonly as: 'relief-vent' | 'additional-circuit-vent';
  readonly load: Load;
  readonly largestTrap: NominalSize;
  readonly fixtures: readonly FixtureId[];
}
