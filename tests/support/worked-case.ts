import { readdirSync, readFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import type { IfcSchema, IfcUnit } from './write-ifc.ts';

/**
 * The open set of worked vent pipings, sample-models/worked/: for each case `<name>.piping`, the `<name>.ifc` made of it, and
 * `<name>.json` with the question and its answers. The schema of the last is worked-case.schema.json beside this file.
 */
export interface WorkedCase {
  readonly format: 'drainwright-worked-case';
  readonly version: 1;
  readonly title: string;
  readonly kind: 'judgement' | 'published' | 'battery';
  /** How its IFC file is written. */
  readonly drawn: { readonly schema: IfcSchema; readonly lengthUnit: IfcUnit };
  readonly question: string;
  /** Of published examples: what the source says, and whether it is right. */
  readonly published?: PublishedExample;
  readonly answers: readonly WorkedAnswer[];
}

export interface PublishedExample {
  /** Number in the list of examples. */
  readonly example: string;
  readonly source: string;
  readonly says: string;
  readonly agrees: boolean;
  readonly remark?: string;
}

/** One code's answer. Only what is written is asked, except that `errors` are all there are. */
export interface WorkedAnswer {
  readonly code: string;
  /** What the designer says beside the model: the parts of an answers file. */
  readonly given?: Readonly<Record<string, unknown>>;
  readonly answer: string;
  readonly argument: readonly { readonly text: string; readonly clause: string }[];
  readonly pipes?: readonly WorkedPipe[];
  readonly fixtures?: readonly WorkedFixture[];
  readonly batteries?: readonly WorkedBattery[];
  /** All errors, each with an element that it is about; an empty list: the piping is sound. */
  readonly errors: readonly { readonly code: string; readonly about: string }[];
  /** Codes of warnings and notes that must be among the findings. */
  readonly remarks?: readonly string[];
  /** Codes that must not be among them. */
  readonly absent?: readonly string[];
}

export interface WorkedPipe {
  readonly pipe: string;
  readonly role?: string;
  readonly also?: readonly string[];
  readonly portion?: 'wet' | 'dry' | 'outlet';
  readonly orientation?: 'vertical' | 'horizontal';
  readonly load?: number;
  readonly ventLoad?: number;
  /** Metres, to a centimetre. */
  readonly developedLength?: number;
  /** Required size; `none` where no size holds, or none is asked. */
  readonly size?: string;
  /** l/s that the code reckons with, to a hundredth. */
  readonly flow?: number;
  /** l/s of wastewater by the code's root, before the largest appliance is held against it. */
  readonly wastewater?: number;
  /** Size that one demand asks, by its clause: `none` where no size holds. */
  readonly asks?: Readonly<Record<string, string>>;
}

export interface WorkedFixture {
  readonly fixture: string;
  /** A role of vents, `unvented`, or `free`. */
  readonly ventedBy?: string;
  readonly load?: number;
  /** Metres to a centimetre, whole degrees. */
  readonly trapArm?: { readonly length?: number; readonly limit?: number; readonly turn?: number };
}

export interface WorkedBattery {
  readonly fixtures: readonly string[];
  readonly reading: string;
  /** Clauses of the conditions that the reading breaks. */
  readonly broken: readonly string[];
  /** The other readings and the clauses that they break. */
  readonly others?: Readonly<Record<string, readonly string[]>>;
}

export const workedFolder = resolve(import.meta.dirname, '../../sample-models/worked');

/** Names of all cases, sorted. */
export const workedNames = (): readonly string[] =>
  readdirSync(workedFolder)
    .flatMap((file) => (file.endsWith('.json') ? [file.slice(0, -'.json'.length)] : []))
    .sort();

export const workedText = (name: string, ending: 'piping' | 'ifc'): string =>
  readFileSync(join(workedFolder, `${name}.${ending}`), 'utf8');

/** Held to its schema by the test of the cases. */
export const workedCase = (name: string): WorkedCase =>
  JSON.parse(readFileSync(join(workedFolder, `${name}.json`), 'utf8')) as WorkedCase;
