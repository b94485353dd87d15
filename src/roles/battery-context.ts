import type { PlumbingCode } from '../codes/plumbing-code.ts';
import type { Reading } from '../codes/reading.ts';
import type { StackUse } from '../codes/stack-use.ts';
import type { TankKind } from '../codes/use.ts';
import type { FixtureKind } from '../model/identity.ts';
import type { JointId, PipeId } from '../network/network.ts';
import type { FixtureId, TrapAir } from '../paths/paths.ts';
import type { FreeTrap } from './feet.ts';
import type { Stack, StackContext } from './find-stacks.ts';

export interface BatteryContext extends StackContext {
  readonly code: PlumbingCode;
  readonly stacks: readonly Stack[];
  /** Pipe belongs to a stack, offsets included. By pipe id. */
  readonly inStack: readonly (Stack | null)[];
  /** That stack as it is seen from the pipe. By pipe id. */
  readonly stackUses: readonly (StackUse | null)[];
  /** A stack's foot lies upstream of the pipe. By pipe id. */
  readonly stackAbove: readonly boolean[];
  readonly free: readonly (FreeTrap | null)[];
  /** Tank or manhole that stands at a joint. */
  readonly tankAt: (joint: JointId) => TankKind | null;
  readonly kindOf: (fixture: FixtureId) => FixtureKind | null;
  /** Frequency factor of its use, where the user states one apart from the building's. */
  readonly frequencyOf: (fixture: FixtureId) => number | null;
  /** Joint with a live dry vent standing on it. By joint id. */
  readonly live: (joint: JointId) => PipeId | null;
  readonly wordOf: (fixtures: readonly FixtureId[], pipes: readonly PipeId[]) => Reading | null;
}

/** A battery as it is about to be judged: its foot, its traps, and feet further down its line that may belong to it. */
export interface Draft {
  readonly foot: JointId;
  readonly traps: readonly TrapAir[];
  /** Further feet on the line, in flow order: those of additional circuit vents, where it is circuit vented. */
  readonly additional: readonly JointId[];
}
