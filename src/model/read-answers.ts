import { InputError } from '../findings/input-error.ts';
import { show } from '../tables/printed-value.ts';
import { at, fieldsOf, jsonOf, numberAt, objectAt, oneOf, textAt, textsAt } from '../tables/read-json.ts';
import type { Answers, FixtureAnswer, PipeAnswer, Settings } from './answers.ts';
import type { FixtureKind } from './identity.ts';

export const answersFormat = 'drainwright-answers';
const readings = [
  'wet-vent',
  'circuit-vent',
  'individual-vent',
  'common-vent',
  'waste-stack-vent',
  'combination-waste-and-vent',
  'single-stack',
  'ventilated-branch',
] as const;
/** `questions` tells people what to fill in and is not read. */
const parts = ['questions', 'settings', 'sewerEnds', 'fixtures', 'pipes', 'batteries', 'leaveOut', 'cleanouts'];

/** Answers from the text of an answers file. `where` is its path; whatever is wrong is named at its place. */
export function readAnswers(text: string, where: string): Answers {
  const file = fieldsOf(answered(jsonOf(text, where)), where, ['format', 'version'], parts);
  if (file.format !== answersFormat)
    throw new InputError(at(where, 'format'), `is ${show(file.format)}, expected "${answersFormat}"`);
  if (file.version !== 1) throw new InputError(at(where, 'version'), `is ${show(file.version)}, expected 1`);
  const texts = (key: string): readonly string[] => (file[key] === undefined ? [] : textsAt(file[key], at(where, key)));
  const entries = <T>(key: string, read: (value: unknown, place: string) => T): ReadonlyMap<string, T> => {
    const part = file[key] === undefined ? {} : objectAt(file[key], at(where, key));
    return new Map(Object.entries(part).map(([name, value]) => [name, read(value, at(at(where, key), name))]));
  };
  return {
    settings: Object.fromEntries(entries('settings', settingAt)),
    sewerEnds: texts('sewerEnds'),
    fixtures: entries('fixtures', fixtureAt),
    pipes: entries('pipes', pipeAt),
    batteries: entries('batteries', (value, place) => {
      const { reading } = fieldsOf(value, place, ['reading']);
      return { reading: oneOf(reading, at(place, 'reading'), readings) };
    }),
    leaveOut: texts('leaveOut'),
    cleanouts: texts('cleanouts'),
  };
}

/** Without what is still null: a question that nobody answered is as if it were not there. */
function answered(value: unknown): unknown {
  if (typeof value !== 'object' || value === null || Array.isArray(value)) return value;
  const kept = Object.entries(value).flatMap(([key, part]): [string, unknown][] => {
    const rest = answered(part);
    const isEmptied =
      isRecord(part) && isRecord(rest) && Object.keys(part).length > 0 && Object.keys(rest).length === 0;
    return rest === null || isEmptied ? [] : [[key, rest]];
  });
  return Object.fromEntries(kept);
}

const isRecord = (value: unknown): value is object =>
  typeof value === 'object' && value !== null && !Array.isArray(value);

/** A code names the settings that it knows and what they may be; here only the shape is checked. */
function settingAt(value: unknown, place: string): Settings[string] {
  if (typeof value === 'boolean' || typeof value === 'string') return value;
  return Array.isArray(value) ? textsAt(value, place) : numberAt(value, place);
}

function fixtureAt(value: unknown, place: string): FixtureAnswer {
  const fields = fieldsOf(value, place, [], ['kind', 'detail', 'trapSize', 'space']);
  const detail = fields.detail === undefined ? undefined : objectAt(fields.detail, at(place, 'detail'));
  return {
    ...(fields.kind === undefined ? {} : { kind: oneOf(fields.kind, at(place, 'kind'), fixtureKinds) }),
    ...(detail === undefined
      ? {}
      : {
          detail: Object.fromEntries(
            Object.entries(detail).map(([key, fact]) => [key, factAt(fact, at(at(place, 'detail'), key))]),
          ),
        }),
    ...optionalText(fields, 'trapSize', place),
    ...optionalText(fields, 'space', place),
  };
}

/** Written as a record so that a kind that is added cannot be forgotten here. */
const kinds: Readonly<Record<FixtureKind, true>> = {
  'water-closet': true,
  urinal: true,
  lavatory: true,
  sink: true,
  'kitchen-sink': true,
  'mop-sink': true,
  'laundry-tray': true,
  shower: true,
  bathtub: true,
  bidet: true,
  'floor-drain': true,
  'clothes-washer': true,
  dishwasher: true,
  'drinking-fountain': true,
  'garbage-grinder': true,
  'wash-fountain': true,
  'macerating-toilet': true,
  'clinical-sink': true,
  'dental-unit': true,
  'other-fixture': true,
};
/** Every kind that an answer may give a fixture. */
export const fixtureKinds: readonly string[] = Object.keys(kinds);

function factAt(value: unknown, place: string): string | number | boolean {
  if (typeof value === 'boolean' || typeof value === 'string') return value;
  return numberAt(value, place);
}

function pipeAt(value: unknown, place: string): PipeAnswer {
  const fields = fieldsOf(value, place, [], ['size', 'slope', 'material']);
  const slope = fields.slope === undefined ? undefined : numberAt(fields.slope, at(place, 'slope'));
  if (slope !== undefined && (slope < 0 || slope > steepest))
    throw new InputError(at(place, 'slope'), `is ${slope}, expected metres of fall a metre, such as 0.02 for 2 %`);
  return {
    ...optionalText(fields, 'size', place),
    ...(slope === undefined ? {} : { slope }),
    ...optionalText(fields, 'material', place),
  };
}
/** Forty-five degrees: steeper is no slope but a drop, and a percentage typed as a number is caught. */
const steepest = 1;

const optionalText = <K extends string>(
  fields: Readonly<Record<string, unknown>>,
  key: K,
  place: string,
): { readonly [key in K]?: string } =>
  fields[key] === undefined ? {} : ({ [key]: textAt(fields[key], at(place, key)) } as { [key in K]: string });
