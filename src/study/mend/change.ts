import type { Reading } from '../../codes/reading.ts';
import type { Finding } from '../../findings/finding.ts';
import type { Vec3 } from '../../geometry/vector.ts';
import type { ElementId } from '../../model/model.ts';
import type { Piping } from '../../pipeline.ts';
import type { NominalSize } from '../../units/nominal-size.ts';

/** One thing that a plan does to the building besides larger pipe. Elements keep their ids; a change only adds some. */
export type Change = VentChange | ReadingChange | SlopeChange | TrapChange;

interface Common {
  /** Elements concerned, the one where work starts first. */
  readonly about: readonly ElementId[];
  /** To the piping that the change was found in. */
  readonly apply: (piping: Piping) => Piping;
}

export interface VentChange extends Common {
  readonly kind: 'vent' | 'moved-vent' | 'extended-vent';
  /** Straight legs from its foot to where it ends, metres. */
  readonly points: readonly Vec3[];
  readonly length: number;
  /** Elements that it adds to the model. */
  readonly added: readonly ElementId[];
  /** Pipe that it joins; null: it ends in open air. */
  readonly joins: ElementId | null;
}

export interface ReadingChange extends Common {
  readonly kind: 'reading';
  readonly from: Reading;
  readonly to: Reading;
}

export interface SlopeChange extends Common {
  readonly kind: 'slope';
  readonly from: number | null;
  readonly to: number;
  /** Metres that the lower ends come down when the upper ends stay; negative: up; null where the model has no geometry. */
  readonly lowered: number | null;
}

export interface TrapChange extends Common {
  readonly kind: 'trap';
  /** Metres from the fixture along its outlet pipe. */
  readonly from: number;
  readonly to: number;
}

/** One way to settle something. */
export interface Option {
  /** The same for the same change, whatever was changed before it. */
  readonly key: string;
  /** What it costs by itself, in points; without the sizes that follow. */
  readonly cost: number;
  /** null: sizes alone. */
  readonly change: Change | null;
  /** Pipes that must be at least so large with it. */
  readonly pins: readonly (readonly [ElementId, NominalSize])[];
  /** What asks for it. */
  readonly why: Finding;
}

/** Something wrong, and the ways to settle it. */
export interface Item {
  readonly key: string;
  readonly finding: Finding;
  /** One of them is in every plan, unless it may stay. Empty: no change that is known settles it. */
  readonly options: readonly Option[];
  /** Larger pipe settles it as well, so that it may be left to the sizes. */
  readonly mayStay: boolean;
  /** Open air first, then the tops of stacks, then the rest: what comes first may settle what comes after. */
  readonly tier: 1 | 2 | 3;
  /** One change may settle several items of one place; never items of two. */
  readonly place: string;
}
