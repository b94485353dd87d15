import type { Weights } from '../study/mend/weights.ts';
import type { Result, ResultFinding, SizeLabel } from './result.ts';

/** The published plan, `format: "drainwright-mend"`: plain JSON, lengths in metres, falls in m/m, costs in points. */
export interface MendResult {
  readonly format: 'drainwright-mend';
  readonly version: 1;
  readonly program: Result['program'];
  readonly model: Result['model'];
  readonly models?: NonNullable<Result['models']>;
  readonly code: Result['code'];
  readonly settings: Result['settings'];
  readonly weights: Weights;
  /** In the order in which they are made: vents, readings, falls and traps, cleanouts, then sizes with the flow. */
  readonly changes: readonly MendChange[];
  /** Of all changes together. */
  readonly cost: number;
  readonly search: MendSearch;
  readonly before: { readonly errors: number };
  /** From the run of all stages on the changed building: the proof. */
  readonly after: {
    readonly errors: number;
    readonly findings: readonly ResultFinding[];
    /** What a person has to draw or say, by code of the errors that are left, each once in their order. */
    readonly advice: readonly { readonly code: string; readonly sentence: string }[];
  };
  readonly caution: string;
}

export interface MendSearch {
  /** No other combination of the changes that the program knows costs less. */
  readonly exact: boolean;
  /** No combination costs less than this. */
  readonly least: number;
  /** Runs of all stages. */
  readonly runs: number;
  /** Errors are left that no change known to the program settles, however long it searches. */
  readonly hopeless: boolean;
  readonly sentence: string;
}

export interface MendChange {
  readonly kind: 'size' | 'vent' | 'moved-vent' | 'extended-vent' | 'reading' | 'slope' | 'trap' | 'cleanout';
  /** GlobalIds of what the work concerns, where it starts first. */
  readonly about: readonly string[];
  readonly from: string | null;
  readonly to: string;
  /** Why, in one sentence. */
  readonly why: string;
  /** What asks for it; null: it follows from another change. */
  readonly finding: ResultFinding | null;
  readonly cost: number;
  readonly size?: { readonly from: SizeLabel; readonly to: SizeLabel };
  readonly vent?: MendVent;
  readonly slope?: { readonly from: number | null; readonly to: number; readonly lowered: number | null };
  /** Of the row that is read another way, by itself or with the vent. */
  readonly reading?: { readonly from: string; readonly to: string; readonly fixtures: number };
  /** Metres from the fixture along its outlet pipe. */
  readonly trap?: { readonly from: number; readonly to: number };
  /** `place`: `too small` of one that is drawn. */
  readonly cleanout?: { readonly size: SizeLabel | null; readonly place: string };
}

export interface MendVent {
  /** What it is in the changed building: `relief-vent`. */
  readonly role: string;
  readonly size: SizeLabel | null;
  readonly length: number;
  /** From its foot to where it ends, world metres. */
  readonly points: readonly (readonly [number, number, number])[];
  /** `as-before`: where the vent that was moved ended. */
  readonly ends: 'pipe' | 'new-vent' | 'open-air' | 'as-before';
  /** GlobalId of the pipe that it joins; null where it ends elsewhere. */
  readonly joins: string | null;
}
