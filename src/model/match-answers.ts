import { InputError } from '../findings/input-error.ts';
import { plainLabel, sizeIn } from '../tables/printed-value.ts';
import { at } from '../tables/read-json.ts';
import type { NominalSize, SizeSeries } from '../units/nominal-size.ts';
import { fullId, keyMatches, wildcardMatches } from './answer-keys.ts';
import type { Answers } from './answers.ts';
import type { Element, Model } from './model.ts';
import { nearest } from './nearest-words.ts';

/**
 * Answers held against the model and the code's sizes. Every key must meet something, every size must be one the code
 * knows; the first that does not is an InputError at its place, with the nearest that would do. What comes back names
 * sewer ends, cleanouts and systems by GlobalId (in full where the model doubles it) and sizes by the code's labels.
 */
export function matchAnswers(answers: Answers, model: Model, series: SizeSeries, where: string): Answers {
  const meet = (key: string, place: string, wanted: Wanted): readonly Element[] =>
    elementsFor(key, place, model, wanted);
  const sizes = <T extends object>(answer: T, field: keyof T & string, place: string): T => {
    const said = answer[field];
    return typeof said === 'string' ? { ...answer, [field]: sizeOf(said, at(place, field), series) } : answer;
  };
  const ids = (list: readonly string[], part: string, wanted: Wanted): string[] =>
    list.flatMap((key, index) =>
      meet(key, `${at(where, part)}[${index}]`, wanted).map((element) =>
        timesOf(element.globalId) > 1 ? fullId(element) : element.globalId,
      ),
    );
  const times = new Map<string, number>();
  for (const { globalId } of model.elements) times.set(globalId, (times.get(globalId) ?? 0) + 1);
  const timesOf = (globalId: string): number => times.get(globalId) ?? 0;
  const fixtures = [...answers.fixtures].map(([key, answer]) => {
    const place = at(at(where, 'fixtures'), key);
    meet(key, place, notPipes);
    return [key, sizes(answer, 'trapSize', place)] as const;
  });
  const pipes = [...answers.pipes].map(([key, answer]) => {
    const place = at(at(where, 'pipes'), key);
    meet(key, place, pipesOnly);
    return [key, sizes(answer, 'size', place)] as const;
  });
  // A battery's own name, such as B1, is known only after the run.
  for (const key of answers.batteries.keys())
    if (isPattern(key) || isGlobalId(key)) meet(key, at(at(where, 'batteries'), key), anything);
  return {
    ...answers,
    fixtures: new Map(fixtures),
    pipes: new Map(pipes),
    sewerEnds: ids(answers.sewerEnds, 'sewerEnds', anything),
    cleanouts: ids(answers.cleanouts, 'cleanouts', notPipes),
    leaveOut: answers.leaveOut.flatMap((key, index) => systemsFor(key, `${at(where, 'leaveOut')}[${index}]`, model)),
  };
}

interface Wanted {
  readonly fits: (element: Element) => boolean;
  readonly called: string;
}

const anything: Wanted = { fits: () => true, called: 'an element' };
const pipesOnly: Wanted = { fits: ({ kind }) => kind === 'segment', called: 'a pipe' };
const notPipes: Wanted = { fits: ({ kind }) => kind !== 'segment', called: 'an element other than a pipe' };

const isPattern = (key: string): boolean => key.startsWith('name:');
/** A compressed GUID: 22 signs of its own alphabet. */
const isGlobalId = (key: string): boolean => /^[0-9A-Za-z_$]{22}$/.test(key);

function elementsFor(key: string, place: string, model: Model, { fits, called }: Wanted): readonly Element[] {
  const met = model.elements.filter((element) => keyMatches(key, element));
  const found = met.filter(fits);
  if (found.length > 0) return found;
  const [first] = met;
  if (first !== undefined) throw new InputError(place, `meets ${first.ifcClass} ${first.globalId}, expected ${called}`);
  const known = isPattern(key)
    ? model.elements.filter(fits).flatMap(({ name }) => (name === null ? [] : [name]))
    : model.elements.filter(fits).map(({ globalId }) => globalId);
  const lack = isPattern(key) ? 'the model has nothing of this name' : 'the model has no such GlobalId';
  throw new InputError(place, `${lack}, expected ${called}${near(key, known)}`);
}

function near(key: string, known: readonly string[]): string {
  const close = nearest(key.replace(/^name:/, '').replaceAll('*', ''), known);
  if (close.length === 0) return '; a key is a GlobalId, or name: and a name with * for any letters';
  return `; nearest: ${close.join(', ')}`;
}

function systemsFor(key: string, place: string, model: Model): readonly string[] {
  const pattern = isPattern(key) ? key.slice('name:'.length) : key;
  const found = model.systems.filter(
    ({ globalId, name, longName }) =>
      globalId === key || [name, longName].some((said) => said !== null && wildcardMatches(pattern, said)),
  );
  if (found.length > 0) return found.map(({ globalId }) => globalId);
  const names = model.systems.flatMap(({ name }) => (name === null ? [] : [name]));
  const hint = names.length === 0 ? ': the model names none' : `; it has ${names.slice(0, mostNamed).join(', ')}`;
  throw new InputError(place, `is ${JSON.stringify(key)}, but no system of the model is called so${hint}`);
}

const mostNamed = 12;

function sizeOf(said: string, place: string, series: SizeSeries): NominalSize {
  const size = sizeIn(series, said.trim());
  if (size !== undefined) return size;
  const labels = series.sizes.map(({ label }) => plainLabel(label)).join(', ');
  throw new InputError(place, `is ${JSON.stringify(said)}, expected a size of the code: ${labels}`);
}
