import type { Vec3 } from '../geometry/vector.ts';
import type { ElementId } from '../model/model.ts';
import type { Metres } from '../units/quantity.ts';

export type PipeId = number & { readonly __pipe: true };
export type JointId = number & { readonly __joint: true };

/**
 * Joints and pipes, without direction. A `Pipe` is a section of one element (cut at joints on its wall and where
 * vertical and horizontal meet) or a link between two fittings that touch (`element` null, never sized).
 * Dense ids in the order: file, STEP id of the element, position along it; links last.
 */
export interface Network {
  readonly joints: readonly Joint[];
  readonly pipes: readonly Pipe[];
  /** Sections of an element in order along its axis; empty for elements without any. */
  readonly pipesOf: ReadonlyMap<ElementId, readonly PipeId[]>;
  /** The joint an element stands at: fixtures (their outlet), fittings, terminals, chambers. */
  readonly jointsOf: ReadonlyMap<ElementId, readonly JointId[]>;
  /** One entry an element of the model, by element id: `fate` says where it went. */
  readonly fates: readonly Fate[];
  /** How joints were known, counted by connected pair: by ports, by geometry. */
  readonly joined: { readonly ports: number; readonly geometry: number };
}

export interface Fate {
  readonly use: 'pipe' | 'fitting' | 'fixture' | 'terminal' | 'left-out' | 'unresolved';
  /** For left-out and unresolved: a `LeftOutReason` or an `UnresolvedReason`; null for what takes part. */
  readonly reason: string | null;
}

export interface Pipe {
  readonly id: PipeId;
  /** null: a link inside or between fittings. */
  readonly element: ElementId | null;
  readonly ends: readonly [JointId, JointId];
  /** Own length along the axis, without the fittings at its ends. */
  readonly length: Metres;
  /**
   * From each end of the pipe to the centre of its joint: the half of the fitting that developed length adds here.
   * Negative where the end runs past the centre, as a spigot in its socket.
   */
  readonly reach: readonly [Metres, Metres];
  /** From end 0 to end 1 in world metres; null where the model has no geometry. */
  readonly points: readonly Vec3[] | null;
  /** Along the element's axis, metres from its first point. */
  readonly from: Metres;
  readonly to: Metres;
  /** Water flows from end 0 to end 1 (`forward`) by the ports' word; null where ports say nothing or contradict. */
  readonly portFlow: 'forward' | 'backward' | null;
  /** Of a changed network: laid anew to this fall from end 0 to end 1, m/m, whatever is drawn; absent: as drawn. */
  readonly laid?: number;
}

export interface Joint {
  readonly id: JointId;
  /** Where the axes meet; null where the model has no geometry. */
  readonly at: Vec3 | null;
  /** Fittings, terminals, chambers that make it; empty where pipe meets pipe. By element id. */
  readonly elements: readonly ElementId[];
  /** Pipe ends that meet here, by pipe id. */
  readonly pipes: readonly PipeId[];
  /** Set on every joint that geometry inferred: how, and the widest gap bridged. */
  readonly inferred: { readonly how: JointGround; readonly gap: Metres; readonly between: readonly ElementId[] } | null;
}

export type JointGround = 'end-to-end' | 'end-on-wall' | 'end-in-fitting' | 'outlet' | 'box-contact';
