import type { BatteryFacts, Broken } from '../codes/battery.ts';
import type { Reading } from '../codes/reading.ts';
import type { PipeUse } from '../codes/use.ts';
import type { TrapWay } from '../codes/way.ts';
import type { JointId, PipeId } from '../network/network.ts';
import type { FixtureId, TrapAir } from '../paths/paths.ts';
import type { Stack } from './find-stacks.ts';
import type { Floors } from './floors.ts';
import type { TrapArm } from './trap-arms.ts';

export interface Roles {
  /** By pipe id. */
  readonly uses: readonly PipeUse[];
  readonly stacks: readonly Stack[];
  readonly batteries: readonly Battery[];
  /** By fixture id: the way of air as the rows have it. */
  readonly air: readonly TrapAir[];
  /** By fixture id. */
  readonly venting: readonly Venting[];
  /** By fixture id; null for unvented traps. */
  readonly arms: readonly (TrapArm | null)[];
  /** By fixture id: the way to what gives the trap's drain air; empty where the code does not ask. */
  readonly ways: readonly (TrapWay | null)[];
  /** Every dry foot with open air above it, in the order of joints. */
  readonly feet: readonly VentFoot[];
  readonly floors: Floors;
}

export interface Battery {
  readonly facts: BatteryFacts;
  readonly reading: Reading;
  readonly why: ReadingGround;
  readonly broken: readonly Broken[];
  readonly others: readonly { readonly reading: Reading; readonly broken: readonly Broken[] }[];
}

/** Why a battery is read as it is. */
export type ReadingGround =
  | 'answer'
  | 'designer-says'
  | 'only-known'
  | 'only-one-holds'
  | 'first-that-holds'
  | 'dry-relief-vent'
  | 'no-dry-relief-vent'
  | 'fewer-broken'
  | 'tie';

/** How a trap is vented: a role of the vent that serves it, or why none does. */
export interface Venting {
  readonly how: string;
  /** First dry pipe and what follows to the sky. */
  readonly vents: readonly PipeId[];
  readonly free: { readonly rule: string; readonly clause: string } | null;
  readonly battery: number | null;
}

export interface VentFoot {
  readonly joint: JointId;
  readonly piece: number;
  /** From the foot to the sky. */
  readonly path: readonly PipeId[];
  readonly traps: readonly FixtureId[];
}
