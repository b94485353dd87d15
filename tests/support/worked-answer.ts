import type { Answers } from '../../src/model/answers.ts';
import { answersFormat, readAnswers } from '../../src/model/read-answers.ts';
import type { BrokenCondition, ResultBattery } from '../../src/schedule/result.ts';
import type { SketchRun } from './run-sketch.ts';
import type { WorkedAnswer, WorkedBattery, WorkedFixture, WorkedPipe } from './worked-case.ts';

/** What the designer says, read as an answers file is. */
export const givenAnswers = ({ given = {} }: WorkedAnswer, where: string): Answers =>
  readAnswers(JSON.stringify({ format: answersFormat, version: 1, ...given }), where);

/** What an answer asks and what the program says, one under the other in the same form: equal when they agree. */
export interface BothAnswers {
  readonly argued: readonly string[];
  readonly found: readonly string[];
}

export function bothAnswers(answer: WorkedAnswer, run: SketchRun): BothAnswers {
  const { pipes = [], fixtures = [], batteries, remarks = [], absent = [], errors } = answer;
  const codes = run.findings().map(({ code }) => code);
  const nameOf = new Map(
    [...run.result.pipes, ...run.result.fixtures].map(({ globalId, name }) => [globalId, name ?? globalId]),
  );
  const found = run
    .findings()
    .filter(({ severity }) => severity === 'error')
    .map(({ code, about }) => {
      const names = about.map((id) => nameOf.get(id) ?? 'a joint');
      const meant = errors.find((error) => error.code === code && names.includes(error.about));
      return { code, about: meant?.about ?? names.join(' ') };
    });
  return {
    argued: [
      ...pipes.map((pipe) => `${pipe.pipe}: ${JSON.stringify(pipe)}`),
      ...fixtures.map((fixture) => `${fixture.fixture}: ${JSON.stringify(fixture)}`),
      ...(batteries === undefined ? [] : batteries.map(arguedBattery).sort()),
      ...sortedErrors(errors),
      ...remarks.map((code) => `${code}: said`),
      ...absent.map((code) => `${code}: not said`),
    ],
    found: [
      ...pipes.map((pipe) => `${pipe.pipe}: ${JSON.stringify(foundPipe(pipe, run))}`),
      ...fixtures.map((fixture) => `${fixture.fixture}: ${JSON.stringify(foundFixture(fixture, run))}`),
      ...(batteries === undefined
        ? []
        : run.result.batteries
            .map((battery) => foundBattery(battery, nameOf, othersAsked(batteries, battery, nameOf)))
            .sort()),
      ...sortedErrors(found),
      ...remarks.map((code) => `${code}: ${codes.includes(code as never) ? 'said' : 'not said'}`),
      ...absent.map((code) => `${code}: ${codes.includes(code as never) ? 'said' : 'not said'}`),
    ],
  };
}

const sortedErrors = (errors: WorkedAnswer['errors']): string[] =>
  errors.map(({ code, about }) => `error ${code}, ${about}`).sort();

const hundredth = (value: number): number => Math.round(value * 100) / 100;

/** Each fact that the answer names, in its order. */
function foundPipe(asked: WorkedPipe, run: SketchRun): WorkedPipe {
  const pipe = run.pipe(asked.pipe);
  const litres = (name: string): number | undefined => {
    const told = pipe.trail.find(({ facts }) => typeof facts[name] === 'number')?.facts[name];
    return typeof told === 'number' ? hundredth(told) : undefined;
  };
  const facts: { readonly [key in keyof WorkedPipe]-?: () => unknown } = {
    pipe: () => pipe.name,
    role: () => pipe.role,
    also: () => pipe.also,
    portion: () => pipe.portion,
    orientation: () => pipe.orientation,
    load: () => rangeOf(pipe.load),
    ventLoad: () => pipe.ventLoad && rangeOf(pipe.ventLoad),
    developedLength: () => pipe.developedLength && hundredth(pipe.developedLength),
    size: () => run.size(asked.pipe),
    flow: () => litres('flowLps'),
    wastewater: () => litres('wastewaterLps'),
    asks: () =>
      Object.fromEntries(
        Object.keys(asked.asks ?? {}).map((clause) => {
          const step = pipe.trail.find((one) => one.clause === clause);
          return [clause, step === undefined ? 'asks nothing' : (step.asks?.label ?? 'none')];
        }),
      ),
  };
  return Object.fromEntries(Object.keys(asked).map((key) => [key, facts[key as keyof WorkedPipe]()])) as never;
}

function foundFixture(asked: WorkedFixture, run: SketchRun): WorkedFixture {
  const fixture = run.fixture(asked.fixture);
  const arm = fixture.trapArm;
  const facts: { readonly [key in keyof WorkedFixture]-?: () => unknown } = {
    fixture: () => fixture.name,
    ventedBy: () => fixture.ventedBy.how,
    load: () => rangeOf(fixture.load),
    trapArm: () =>
      Object.fromEntries(
        Object.keys(asked.trapArm ?? {}).map((key) => {
          const value = arm?.[key as 'length' | 'limit' | 'turn'] ?? null;
          return [key, value === null ? null : key === 'turn' ? Math.round(value) : hundredth(value)];
        }),
      ),
  };
  return Object.fromEntries(Object.keys(asked).map((key) => [key, facts[key as keyof WorkedFixture]()])) as never;
}

const rangeOf = ({ least, most }: { readonly least: number; readonly most: number }): number | string =>
  least === most ? most : `${least} to ${most}`;

const clausesOf = (broken: readonly BrokenCondition[]): string[] => broken.map(({ clause }) => clause).sort();

const batteryText = ({ fixtures, reading, broken, others = {} }: WorkedBattery): string => {
  const rest = Object.keys(others)
    .sort()
    .map((one) => `; as ${one} breaks ${[...(others[one] ?? [])].sort().join(', ') || 'nothing'}`);
  return `battery of ${[...fixtures].sort().join(' ')}: ${reading}, breaks ${[...broken].sort().join(', ') || 'nothing'}${rest.join('')}`;
};

const arguedBattery = (battery: WorkedBattery): string => batteryText(battery);

function foundBattery(
  { fixtures, reading, broken, others }: ResultBattery,
  nameOf: ReadonlyMap<string, string>,
  readings: readonly string[],
): string {
  const asked = others.filter((one) => readings.includes(one.reading));
  return batteryText({
    fixtures: fixtures.map((id) => nameOf.get(id) ?? id),
    reading,
    broken: clausesOf(broken),
    others: Object.fromEntries(asked.map((one) => [one.reading, clausesOf(one.broken)])),
  });
}

/** The other readings that the answer speaks of for the battery of the same fixtures. */
function othersAsked(
  argued: readonly WorkedBattery[],
  { fixtures }: ResultBattery,
  nameOf: ReadonlyMap<string, string>,
): readonly string[] {
  const names = fixtures
    .map((id) => nameOf.get(id) ?? id)
    .sort()
    .join(' ');
  const same = argued.find((one) => [...one.fixtures].sort().join(' ') === names);
  return Object.keys(same?.others ?? {});
}
