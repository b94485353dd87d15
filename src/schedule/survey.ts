import type { Identity, Part } from '../model/identity.ts';
import type { Element, Model } from '../model/model.ts';
import { elementRows } from './element-rows.ts';
import type { Question } from './question.ts';
import { questionsOf } from './questions.ts';
import type { Result, ResultElement, ResultFinding, ResultModel } from './result.ts';
import type { TwinsResult } from './twins.ts';

/** `format: "drainwright-survey"`: what is in a model, and what of it could be used. Lists in the model's order. */
export interface Survey {
  readonly format: 'drainwright-survey';
  readonly version: 1;
  readonly program: Result['program'];
  readonly model: ResultModel;
  readonly models?: readonly ResultModel[];
  readonly code: Result['code'];
  readonly counts: Result['counts'];
  /** How many elements there are of each class: the most frequent first, then by name. */
  readonly classes: readonly { readonly class: string; readonly count: number }[];
  readonly storeys: readonly { readonly name: string | null; readonly elevation: number }[];
  readonly systems: readonly SurveySystem[];
  /** Connected pieces of drainage with their way to the sewer. */
  readonly drainage: Result['systems'];
  readonly ports: { readonly total: number; readonly connected: number; readonly withoutOwner: number };
  /** Of the pipes that are sized: how many say or show this. */
  readonly pipes: {
    readonly total: number;
    readonly withSize: number;
    readonly withSlope: number;
    readonly withShape: number;
  };
  readonly terminals: readonly SurveyTerminal[];
  readonly joints: Result['joints'];
  readonly openEnds: readonly { readonly about: readonly string[]; readonly sentence: string }[];
  /** What could not be placed, and other warnings on how the model was understood. */
  readonly unresolved: Result['unresolved'];
  readonly questions: readonly Question[];
  /** Parts of the building that should be alike and are not; absent where there are none. */
  readonly twins?: readonly TwinsResult[];
}

export interface SurveySystem {
  readonly globalId: string;
  readonly name: string | null;
  readonly predefinedType: string | null;
  readonly elements: number;
  /** By use: `{pipe: 12, "left-out": 3}`. */
  readonly uses: Readonly<Record<string, number>>;
}

export interface SurveyTerminal {
  readonly globalId: string;
  readonly stepId: number;
  readonly name: string | null;
  readonly class: string;
  readonly part: Part;
  /** Of fixtures; null when unidentified, or no fixture. */
  readonly kind: string | null;
  readonly use: ResultElement['use'];
  /** What decided: `PredefinedType SINK, name "Mop sink"`. */
  readonly evidence: string;
  /** The kind came from an abbreviation or one bare word, or its witnesses disagree: to be looked at. */
  readonly weak: boolean;
  /** A fixture that has a drain. */
  readonly joined: boolean;
}

/** `identities` are those of the model's elements, by element id. */
export function surveyOf(model: Model, identities: readonly Identity[], result: Result): Survey {
  const rows = new Map(result.elements.map((row) => [keyOf(row.file, row.stepId), row]));
  const rowOf = (element: Element): ResultElement | undefined =>
    rows.get(keyOf(model.files[element.file]?.name ?? '', element.stepId));
  return {
    format: 'drainwright-survey',
    version: 1,
    program: result.program,
    model: result.model,
    ...(result.models === undefined ? {} : { models: result.models }),
    code: result.code,
    counts: result.counts,
    classes: classes(result),
    storeys: model.storeys.map(({ name, elevation }) => ({ name, elevation: Number(elevation.toFixed(4)) })),
    systems: systems(model, rowOf),
    drainage: result.systems,
    ports: {
      total: model.ports.length,
      connected: model.ports.filter(({ connected }) => connected.length > 0).length,
      withoutOwner: model.ports.filter(({ owner }) => owner === null).length,
    },
    pipes: {
      total: result.pipes.length,
      withSize: result.pipes.filter(({ modelled }) => modelled !== null).length,
      withSlope: result.pipes.filter(({ slope, orientation }) => orientation === 'vertical' || slope?.value != null)
        .length,
      withShape: result.pipes.filter(({ length }) => length !== null).length,
    },
    terminals: terminals(model, identities, result, rowOf),
    joints: result.joints,
    openEnds: openEnds(result.findings),
    unresolved: result.unresolved,
    questions: questionsOf(result),
  };
}

const keyOf = (file: string, stepId: number): string => `${stepId} ${file}`;

function classes({ elements }: Result): Survey['classes'] {
  const counts = new Map<string, number>();
  for (const element of elements) counts.set(element.class, (counts.get(element.class) ?? 0) + 1);
  return [...counts]
    .map(([name, count]) => ({ class: name, count }))
    .sort((a, b) => b.count - a.count || (a.class < b.class ? -1 : 1));
}

function systems(model: Model, rowOf: (element: Element) => ResultElement | undefined): SurveySystem[] {
  const members = new Map<number, Map<string, number>>();
  for (const element of model.elements) {
    const use = rowOf(element)?.use ?? 'unresolved';
    for (const system of element.systems) {
      const uses = members.get(system) ?? new Map<string, number>();
      members.set(system, uses.set(use, (uses.get(use) ?? 0) + 1));
    }
  }
  return model.systems.map(({ id, globalId, name, longName, predefinedType }) => {
    const uses = members.get(id) ?? new Map<string, number>();
    return {
      globalId,
      name: name ?? longName,
      predefinedType,
      elements: [...uses.values()].reduce((sum, count) => sum + count, 0),
      uses: Object.fromEntries([...uses].sort(([a], [b]) => (a < b ? -1 : 1))),
    };
  });
}

/** Terminals by class, and whatever else turned out to be a fixture. */
function terminals(
  model: Model,
  identities: readonly Identity[],
  result: Result,
  rowOf: (element: Element) => ResultElement | undefined,
): SurveyTerminal[] {
  const rows = elementRows(result);
  const drained = new Map(result.fixtures.map(({ globalId }) => [rows.get(globalId), globalId]));
  return model.elements.flatMap((element): SurveyTerminal[] => {
    const row = rowOf(element);
    const identity = identities[element.id];
    if (row === undefined || identity === undefined) return [];
    if (element.kind !== 'terminal' && identity.part !== 'fixture') return [];
    const { part, kind, evidence, weak } = identity;
    const joined = drained.has(row);
    const { name } = element;
    return [
      {
        globalId: drained.get(row) ?? row.globalId,
        stepId: row.stepId,
        name,
        class: row.class,
        part,
        kind,
        use: row.use,
        evidence,
        weak,
        joined,
      },
    ];
  });
}

const openEnds = (findings: readonly ResultFinding[]): Survey['openEnds'] =>
  findings
    .filter(({ code }) => code === 'open-end' || code === 'dead-end' || code === 'no-open-air')
    .map(({ about, sentence }) => ({ about, sentence }));
