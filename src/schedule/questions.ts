import { fixtureKinds } from '../model/read-answers.ts';
import { elementNames } from './element-names.ts';
import { openByUse } from './open-by-use.ts';
import { hangsOnEntries } from './ranges-text.ts';
import type { Result, ResultBattery, ResultFixture } from './result.ts';
import { counted, listed, plainWords } from './trade-words.ts';

/** Something the model does not say and a person can: what to ask, and where the answer goes in an answers file. */
export interface Question {
  /** GlobalIds, the thing in question first. */
  readonly about: readonly string[];
  readonly ask: string;
  /** How many pipes may get another size or verdict by the answer. */
  readonly weight: number;
  /** What may be answered; empty where any size, slope or name may. */
  readonly choices: readonly string[];
  readonly answer: AnswerPlace;
}

export interface AnswerPlace {
  readonly part: 'settings' | 'sewerEnds' | 'fixtures' | 'pipes' | 'batteries';
  readonly key: string | null;
  /** `kind`; a dot leads further in: `detail.flush`. */
  readonly field: string | null;
}

/** Most weighty first; equal weights by part, then by GlobalId. */
export function questionsOf(result: Result): Question[] {
  const questions = [
    ...sewerQuestions(result),
    ...fixtureQuestions(result),
    ...useQuestion(result),
    ...batteryQuestions(result),
    ...slopeQuestion(result),
    ...entryQuestion(result),
    ...pumpQuestion(result),
    ...sizeQuestions(result),
  ];
  return questions.sort(
    (a, b) => b.weight - a.weight || order(a.answer.part, b.answer.part) || order(a.about[0] ?? '', b.about[0] ?? ''),
  );
}

const order = (a: string, b: string): number => (a < b ? -1 : a > b ? 1 : 0);

function sewerQuestions(result: Result): Question[] {
  const names = elementNames(result);
  return result.findings
    .filter(({ code }) => code === 'sewer-end-assumed')
    .flatMap(({ about }) => {
      const [end] = about;
      if (end === undefined) return [];
      const system = result.systems.find(({ sewerEnd }) => sewerEnd.pipe === end);
      return [
        {
          about,
          ask: `Does the water leave at ${names.of(end)}? If not, name the pipe that goes to the sewer.`,
          weight: system?.pipes ?? result.pipes.length,
          choices: [],
          answer: { part: 'sewerEnds', key: null, field: null },
        } as const,
      ];
    });
}

function fixtureQuestions(result: Result): Question[] {
  const names = elementNames(result);
  const byUse = openByUse(result);
  const open = result.fixtures.filter(
    ({ kind, load, globalId }) => (kind === null || load.least !== load.most) && !byUse.has(globalId),
  );
  return open.map((fixture) => {
    const name = names.of(fixture.globalId);
    const weight = openPipes(result, fixture);
    const key = fixture.globalId;
    const about = [fixture.globalId];
    if (fixture.kind === null) {
      const ask = `What is ${name}? Nothing in the model tells its kind.`;
      return { about, ask, weight, choices: fixtureKinds, answer: { part: 'fixtures', key, field: 'kind' } } as const;
    }
    const { field, choices } = openDetail(fixture);
    const ask = `Which ${plainWords(fixture.kind)} is ${name}? The code counts them from ${fixture.load.least} to ${fixture.load.most} ${result.code.unit}.`;
    return { about, ask, weight, choices, answer: { part: 'fixtures', key, field: `detail.${field}` } } as const;
  });
}

/** One question for all of them: the use of the building. */
function useQuestion(result: Result): Question[] {
  const { findings, fixtures, pipes } = result;
  const open = openByUse(result);
  if (open.size === 0) return [];
  const said = findings.find(({ code }) => code === 'use-unknown')?.facts.uses;
  const uses = typeof said === 'string' ? said.split(', ') : [];
  const hang = new Set(
    fixtures.filter(({ globalId }) => open.has(globalId)).flatMap((one) => openPipesOf(pipes, one.globalId)),
  );
  return [
    {
      about: [...open],
      ask: `What is the use of the building: ${uses.join(', ')}? ${counted(open.size, 'fixture')} ${open.size === 1 ? 'counts' : 'count'} by it.`,
      weight: hang.size,
      choices: uses,
      answer: { part: 'settings', key: 'use', field: null },
    },
  ];
}

/** The detail that tells the rows of a kind apart. */
function openDetail({ kind, detail }: ResultFixture): { readonly field: string; readonly choices: readonly string[] } {
  if (kind === 'water-closet' && detail.flush === null) return { field: 'flush', choices: ['tank', 'valve'] };
  if (kind === 'urinal' && detail.style === null)
    return { field: 'style', choices: ['stall', 'wall-washout', 'wall-other', 'pedestal'] };
  if (kind === 'urinal' && detail.flush === null) return { field: 'flush', choices: ['tank', 'valve'] };
  if (kind === 'shower' && detail.heads === null) return { field: 'heads', choices: [] };
  return { field: 'style', choices: [] };
}

/** Pipes downstream of a fixture, and those that carry its air, whose size is open. */
const openPipes = ({ pipes }: Result, { globalId }: ResultFixture): number => openPipesOf(pipes, globalId).length;

function openPipesOf(pipes: Result['pipes'], globalId: string): Result['pipes'] {
  return pipes.filter(
    ({ required, verdict, servesWater, servesAir }) =>
      (verdict === 'unknown' || required?.least?.label !== required?.most?.label) &&
      (servesWater?.includes(globalId) === true || servesAir?.includes(globalId) === true),
  );
}

function batteryQuestions({ batteries }: Result): Question[] {
  return batteries.flatMap((battery): Question[] => {
    const holding = battery.others.filter(({ holds }) => holds).map(({ reading }) => reading);
    if (holding.length === 0) return [];
    return [
      {
        about: battery.fixtures,
        ask: `How is ${battery.id} (${counted(battery.fixtures.length, 'fixture')}) meant? It is read as ${plainWords(battery.reading)}; ${listed(holding.map(plainWords))} would hold as well.`,
        weight: battery.pipes.length,
        choices: [battery.reading, ...holding],
        answer: { part: 'batteries', key: batteryKey(battery), field: 'reading' },
      },
    ];
  });
}

/** An answer names a battery by its first fixture, which stays the same when others come and go. */
const batteryKey = ({ fixtures, id }: ResultBattery): string => fixtures[0] ?? id;

/** One question for all of them, however many: an answer for `name:*` reaches every pipe that has no slope of its own. */
function slopeQuestion({ pipes, findings, settings }: Result): Question[] {
  if (settings.assumedSlope !== undefined) return [];
  const about = findings.filter(({ code }) => code === 'slope-unknown').flatMap((finding) => finding.about);
  const open = new Set(about);
  const weight = pipes.filter(({ globalId }) => open.has(globalId)).length;
  if (weight === 0) return [];
  return [
    {
      about: [...open],
      ask: `At what slope are level-drawn drains laid (${counted(weight, 'pipe')})? Metres a metre, such as 0.02.`,
      weight,
      choices: [],
      answer: { part: 'pipes', key: 'name:*', field: 'slope' },
    },
  ];
}

/** Stacks whose size hangs on fittings that the model does not tell. */
function entryQuestion({ pipes }: Result): Question[] {
  const open = pipes.filter(hangsOnEntries);
  const stacks = open.filter(({ trail }) => trail.some(({ facts }) => facts.entriesKnown === false));
  if (stacks.length === 0) return [];
  return [
    {
      about: stacks.map(({ globalId }) => globalId),
      ask: `How do the branches enter the stacks (${counted(stacks.length, 'pipe')} of stacks hang on it): swept, at 45 degrees or less or with a radius of at least their bore, or square?`,
      weight: open.length,
      choices: ['swept', 'square'],
      answer: { part: 'settings', key: 'entries', field: null },
    },
  ];
}

/** The vent of a sump is sized by what its pump puts out. */
function pumpQuestion({ pipes }: Result): Question[] {
  const vents = pipes.filter(({ reason }) => reason === 'the discharge of the sump’s pump is not stated');
  if (vents.length === 0) return [];
  return [
    {
      about: vents.map(({ globalId }) => globalId),
      ask: 'What does the pump of the sump put out, in litres a second? Its vent is sized by that.',
      weight: vents.length,
      choices: [],
      answer: { part: 'settings', key: 'sumpPumpFlow', field: null },
    },
  ];
}

function sizeQuestions(result: Result): Question[] {
  const names = elementNames(result);
  return result.pipes
    .filter(({ modelled, required }) => modelled === null && required !== null)
    .map(({ globalId }) => ({
      about: [globalId],
      ask: `What size is ${names.of(globalId)}?`,
      weight: 1,
      choices: [],
      answer: { part: 'pipes', key: globalId, field: 'size' },
    }));
}
