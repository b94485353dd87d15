import { elementNames } from './element-names.ts';
import { fixtureQuestions } from './fixture-questions.ts';
import type { Question } from './question.ts';
import { hangsOnEntries } from './ranges-text.ts';
import type { Result, ResultBattery } from './result.ts';
import { counted, listed, plainWords } from './trade-words.ts';

/** Most weighty first; equal weights by part, then by GlobalId. */
export function questionsOf(result: Result): Question[] {
  const questions = [
    ...sewerQuestions(result),
    ...fixtureQuestions(result),
    ...batteryQuestions(result),
    ...slopeQuestion(result),
    ...entryQuestion(result),
    ...pumpQuestion(result),
    ...gapQuestion(result),
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

/** Ends that stay open before something: one question, however many gaps. */
function gapQuestion({ findings, pipes, settings }: Result): Question[] {
  if (settings.maxGap !== undefined) return [];
  const gaps = findings.filter(({ code, facts }) => code === 'open-end' && typeof facts.gapM === 'number');
  const about = [...new Set(gaps.flatMap((gap) => gap.about))];
  const known = new Set(pipes.map(({ globalId }) => globalId));
  const widest = Math.max(...gaps.map(({ facts }) => Number(facts.gapM)));
  if (gaps.length === 0) return [];
  return [
    {
      about,
      ask: `Does the model leave gaps of up to ${Math.ceil(widest * 1000 - 0.01)} mm where piping is joined (${counted(gaps.length, 'open end')})? If so, say the widest, in metres and more than 0.05.`,
      weight: about.filter((id) => known.has(id)).length,
      choices: [],
      answer: { part: 'settings', key: 'maxGap', field: null },
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
