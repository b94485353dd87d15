import type { ElementId } from '../model/model.ts';
import type { JointId, PipeId } from '../network/network.ts';
import type { Metres } from '../units/quantity.ts';
import type { Stream } from './stream.ts';

export type FixtureId = number & { readonly __fixture: true };
export type TrapId = FixtureId;

export interface Paths {
  readonly systems: readonly DrainSystem[];
  /** One for each fixture that has an outlet joint, by element id. */
  readonly fixtures: readonly FixturePath[];
  /** Pipe downstream of each pipe; null for dry pipes and the last one before the sewer. By pipe id. */
  readonly next: readonly (PipeId | null)[];
  /** Joint at the downstream end of a wet pipe; for a dry one the end toward the sky. null: neither. By pipe id. */
  readonly toward: readonly (JointId | null)[];
  readonly wet: readonly boolean[];
  readonly stream: Stream;
  /** Wet pipes, every pipe after those that flow into it. */
  readonly inFlowOrder: readonly PipeId[];
  /** Fixtures whose water enters at the upstream joint of the pipe, not through another pipe. By pipe id. */
  readonly entering: readonly (readonly FixtureId[])[];
  readonly traps: readonly TrapAir[];
  readonly pieces: readonly DryPiece[];
  /** Piece of a dry pipe; null for wet pipes. By pipe id. */
  readonly pieceOf: readonly (number | null)[];
  /** Pipe to take from a dry joint, or from a foot of the piece, toward open air; null at mouths and where there is none. */
  readonly wayUp: (joint: JointId, piece: number) => PipeId | null;
  readonly vertical: readonly (boolean | null)[];
  readonly slopes: readonly PipeSlope[];
}

/** One connected piece of piping with fixtures, and the way its water leaves. */
export interface DrainSystem {
  readonly sewerEnd: JointId;
  readonly how: 'answer' | 'named' | 'ports' | 'lowest' | 'largest' | 'first';
  /** It ends inside the building, and of other piping somebody said where: rather broken off than led out. */
  readonly isCutOff: boolean;
  readonly pipes: readonly PipeId[];
}

export interface FixturePath {
  readonly id: FixtureId;
  readonly element: ElementId;
  readonly outlet: JointId;
  /** From the fixture to the sewer end; empty when it reaches none. */
  readonly water: readonly PipeId[];
}

export interface TrapAir {
  readonly fixture: FixtureId;
  /** Where the trap sits: index into the fixture's water path of the first pipe after the trap; 0 when built in. */
  readonly after: number;
  readonly at: JointId;
  readonly how: 'drawn' | 'built-in' | 'outlet' | 'foot-of-drop';
  /** Joint at which the trap arm ends: where the pipe that vents it meets. null: unvented. */
  readonly armEnd: JointId | null;
  /** Pipes of the trap arm, in flow order. */
  readonly arm: readonly PipeId[];
  /** Wet pipes that carry its air, from the arm's end upstream to the foot. */
  readonly through: readonly PipeId[];
  /** Joint where the dry vent starts. */
  readonly foot: JointId | null;
  readonly piece: number | null;
  /** Dry pipes from the foot to open air. */
  readonly dry: readonly PipeId[];
}

/** A connected piece of dry piping. */
export interface DryPiece {
  readonly id: number;
  readonly pipes: readonly PipeId[];
  /** Joints on wet pipes. */
  readonly feet: readonly JointId[];
  readonly mouths: readonly { readonly joint: JointId; readonly how: 'terminal' | 'valve' | 'highest' | 'answer' }[];
}

export interface PipeSlope {
  /** Fall downstream, m/m; null when vertical or unknown. */
  readonly slope: number | null;
  readonly uncertainty: number;
  readonly ground: 'geometry' | 'property' | 'answer' | 'unknown';
  /** Rise along the water's way, metres; more than the uncertainty of coordinates is a backfall. */
  readonly climb: Metres;
}
