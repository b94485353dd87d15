import { InputError } from '../findings/input-error.ts';
import { show } from '../tables/printed-value.ts';
import { at, fieldsOf, jsonOf, numberAt, objectAt, oneOf, textAt, textsAt } from '../tables/read-json.ts';
import type { Answers, FixtureAnswer, PipeAnswer, Settings } from './answers.ts';
import { answerableParts, fixtureKinds } from './identity-words.ts';

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
  const { detail } = fields;
  return {
    ...(fields.kind === undefined
      ? {}
      : { kind: oneOf(fields.kind, at(place, 'kind'), [...fixtureKinds, ...answerableParts]) }),
    ...(detail === undefined ? {} : { detail: detailAt(detail, at(place, 'detail')) }),
    ...optionalText(fields, 'trapSize', place),
    ...optionalText(fields, 'space', place),
  };
}

/** Details that an answer may give, each with what it must be. */
const details: Readonly<Record<string, (value: unknown, place: string) => string | number | boolean>> = {
  flush: (value, place) => oneOf(value, place, ['tank', 'valve', 'flushometer-tank']),
  style: textAt,
  heads: (value, place) => numberFrom(value, place, 1),
  emergency: yesNoAt,
  domestic: yesNoAt,
  flushLitres: (value, place) => numberFrom(value, place, 0),
  flow: (value, place) => numberFrom(value, place, 0),
  intermittent: yesNoAt,
  frequency: (value, place) => numberFrom(value, place, 0),
};

function detailAt(value: unknown, place: string): NonNullable<FixtureAnswer['detail']> {
  const fields = fieldsOf(value, place, [], Object.keys(details));
  return Object.fromEntries(
    Object.entries(fields).flatMap(([key, fact]) =>
      fact === undefined ? [] : [[key, details[key]!(fact, at(place, key))]],
    ),
  );
}

function yesNoAt(value: unknown, place: string): boolean {
  if (typeof value === 'boolean') return value;
  throw new InputError(place, `is ${show(value)}, expected true or false`);
}

function numberFrom(value: unknown, place: string, least: number): number {
  const number = numberAt(value, place);
  if (number >= least) return number;
  throw new InputError(place, `is ${number}, expected ${least} or more`);
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
