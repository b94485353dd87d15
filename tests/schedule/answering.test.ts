import { describe, expect, test } from 'vitest';
import type { Answers } from '../../src/model/answers.ts';
import { readAnswers } from '../../src/model/read-answers.ts';
import { answersFormText } from '../../src/schedule/answers-form.ts';
import type { Question } from '../../src/schedule/question.ts';
import { questionsOf } from '../../src/schedule/questions.ts';
import type { Result, SizeLabel } from '../../src/schedule/result.ts';
import { runSketch } from '../support/run-sketch.ts';

/** A form as `survey --questions` writes it, filled in and read as `--answers` does; what is undefined stays open. */
function filled(questions: readonly Question[], answer: (question: Question, at: number) => unknown): Answers {
  const form = JSON.parse(answersFormText(questions));
  for (const [at, question] of questions.entries()) {
    const value = answer(question, at);
    const { part, key, field } = question.answer;
    if (key === null || value === undefined) continue;
    if (field === null) form[part][key] = value;
    else {
      const fields = field.split('.');
      const entry = fields.slice(0, -1).reduce((entry, name) => entry[name], form[part][key]);
      entry[fields.at(-1)!] = value;
    }
  }
  return readAnswers(JSON.stringify(form), 'answers.json');
}

/** Assembly use is never guessed: who says it may leave the range. */
const within = ({ choices }: Question): readonly string[] => choices.filter((choice) => choice !== 'assembly');
const typed = (choice: string | undefined): unknown => (choice === 'true' ? true : choice === 'false' ? false : choice);

/** Answers that came before, with what is answered now. */
const joined = (before: Partial<Answers>, now: Answers): Answers => ({
  ...now,
  settings: { ...before.settings, ...now.settings },
  fixtures: new Map([
    ...(before.fixtures ?? []),
    ...[...now.fixtures].map(([key, { detail, ...rest }]) => {
      const known = before.fixtures?.get(key);
      return [key, { ...known, ...rest, detail: { ...known?.detail, ...detail } }] as const;
    }),
  ]),
  pipes: new Map([...(before.pipes ?? []), ...now.pipes]),
});

const closets = `
closet U from TU to 0
thing X from TX to 0, trap 2 in`;
const sinks = `
sink U from TU up 0.6, trap 1 1/2 in
thing X from TX to 0, trap 2 in`;
const drawn = (fixtures: string): string => `
model "Open questions"
storey "Ground floor" at 0
node A at 0 0 -0.3
node B from A east 2
node C from B east 2
node D from C east 2
node TX from A north 0.4 rise 1:50
node TU from B north 0.4 rise 1:50
node TL from C north 0.4 rise 1:50
lavatory L from TL to 0.6, trap 1 1/4 in
trap TX
trap TL
drain 2 in: X > TX > A
drain 3 in: U > TU > B
drain 1 1/4 in: L > TL > C
drain 3 in: A > B > C > D
sewer D
vent 2 in: A > TOP (to 4)
terminal TOP
${fixtures}
`;

const rank = (size: SizeLabel | null | undefined): number => size?.dn ?? Number.POSITIVE_INFINITY;
const ways = ['water-closet', 'lavatory', 'bathtub', 'bidet', 'floor-drain', 'drinking-fountain', 'clothes-washer'];

describe.each([
  { name: 'a thing and a closet', code: 'npc-2020', text: drawn(closets) },
  { name: 'a thing and a sink', code: 'npc-2020', text: drawn(sinks) },
  { name: 'a thing and a closet', code: 'ipc-2024', text: drawn(closets) },
  { name: 'a thing and a sink', code: 'upc-2024', text: drawn(sinks) },
])('$name, level drains, $code', ({ text, code }) => {
  const before = runSketch(text, { code }).result;
  const questions = questionsOf(before);

  test('the most weighty questions stand first', () => {
    const weights = questions.map(({ weight }) => weight);
    expect(weights).toEqual(weights.toSorted((a, b) => b - a));
    expect(questions.map(({ answer }) => answer.field)).toEqual(expect.arrayContaining(['kind', 'slope']));
  });

  test.each(ways.map((kind, at) => [kind, at] as const))('answered to the end, the thing being a %s', (kind, at) => {
    const choose = (question: Question): unknown => {
      const { answer } = question;
      const choices = within(question);
      return answer.field === 'kind'
        ? kind
        : answer.field === 'slope'
          ? 0.02
          : answer.field === 'size'
            ? '3 in'
            : choices.length === 0
              ? undefined
              : typed(choices[at % choices.length]);
    };
    let answers: Partial<Answers> = {};
    let result = before;
    // An answer may open a question of its own, as the flush of a closet.
    for (let round = 0; round < 3 && openIn(result).length > 0; round++) {
      answers = joined(answers, filled(questionsOf(result), choose));
      result = runSketch(text, { code, answers }).result;
    }
    expect(openIn(result)).toEqual([]);
    for (const pipe of result.pipes) {
      const earlier = before.pipes.find(({ globalId }) => globalId === pipe.globalId)!;
      expect(pipe.load.most, `load of ${pipe.name}`).toBeLessThanOrEqual(earlier.load.most);
      expect(pipe.load.least, `load of ${pipe.name}`).toBeGreaterThanOrEqual(earlier.load.least);
      expect(rank(pipe.required?.most), `size of ${pipe.name}`).toBeLessThanOrEqual(rank(earlier.required?.most));
      expect(rank(pipe.required?.least), `size of ${pipe.name}`).toBeGreaterThanOrEqual(rank(earlier.required?.least));
      if (earlier.verdict === 'undersized') expect(pipe.verdict, `${pipe.name}`).toBe('undersized');
      if (earlier.verdict === 'oversized') expect(pipe.verdict, `${pipe.name}`).toBe('oversized');
      if (earlier.verdict === 'agrees') expect(['agrees', 'oversized'], `${pipe.name}`).toContain(pipe.verdict);
    }
  });
});

/** What is still open: fixtures that may be read more than one way, slopes that nobody gives. */
const openIn = ({ fixtures, findings }: Result): string[] => [
  ...fixtures.filter(({ open }) => open !== undefined).map(({ name }) => `${name}`),
  ...findings.filter(({ code }) => code === 'slope-unknown').map(({ code }) => code),
];

// Every kind of fixture that may be read more than one way, under every code.
const words = ['closet', 'urinal', 'lavatory', 'sink', 'kitchen-sink', 'clothes-washer', 'dishwasher', 'floor-drain'];
const one = (word: string): string => `
storey "Ground floor" at 0
node A at 0 0 -0.3
node T from A north 0.4 rise 1:50
${word} X from T to 0
trap T
drain 3 in: X > T > A > B (east 2 fall 1:50)
sewer B
vent 2 in: A > V (to 4)
terminal V
`;

describe.each(['npc-2020', 'ipc-2024', 'upc-2024', 'en12056-2000'])('every question leads somewhere: %s', (code) => {
  const runs = words.map((word) => ({ word, run: runSketch(one(word), { code }) }));
  const asked = runs.flatMap(({ word, run }) => questionsOf(run.result).map((question) => ({ word, run, question })));

  test('something is asked', () => expect(asked.length).toBeGreaterThanOrEqual(2));
  test('what is open is asked, what is settled is not', () => {
    for (const { word, run } of runs)
      expect(questionsOf(run.result).length > 0, word).toBe(run.fixture('X').open !== undefined);
  });
  test('every answer offered narrows what the fixture may count, or settles it', () => {
    for (const { word, run, question } of asked) {
      const { load } = run.fixture('X');
      expect(question.choices.length, question.ask).toBeGreaterThan(0);
      for (const choice of within(question)) {
        const answers = filled([question], () => typed(choice));
        const after = runSketch(one(word), { code, answers }).fixture('X');
        expect(after.load.least, `${word}: ${choice}`).toBeGreaterThanOrEqual(load.least);
        expect(after.load.most, `${word}: ${choice}`).toBeLessThanOrEqual(load.most);
        expect(after, `${word}: ${choice}`).not.toEqual(run.fixture('X'));
      }
    }
  });
});

describe('what else may be answered', () => {
  test('that the thing drains nothing', () => {
    const before = runSketch(drawn(closets));
    const kind = questionsOf(before.result).find(({ answer }) => answer.field === 'kind')!;
    expect(kind.choices).toContain('not-drainage');
    const after = runSketch(drawn(closets), { answers: filled([kind], () => 'not-drainage') });
    expect(after.result.fixtures.map(({ name }) => name)).toEqual(['L', 'U']);
    expect(after.findings('fixture-unidentified').flatMap(({ about }) => about)).toEqual([after.fixture('U').globalId]);
  });

  // Showers of several heads: Table 2.4.9.3. counts 1.5 for one, 3 for two and three, 6 for four to six.
  test('how many heads a shower for several has', () => {
    const gang = one('shower').replace('shower X from T to 0', 'shower X from T to 0, named "Gang shower"');
    const { load, open } = runSketch(gang).fixture('X');
    expect([load.least, load.most, open?.[0]?.field]).toEqual([1.5, 6, 'detail.heads']);
    const [heads] = questionsOf(runSketch(gang).result);
    expect(runSketch(gang, { answers: filled([heads!], () => 3) }).fixture('X').load).toEqual({ least: 3, most: 3 });
  });

  // 80 mm lie between B1 and B2.
  test('that a gap is how the model is drawn', () => {
    const gap =
      one('lavatory').replace('A > B (east 2 fall 1:50)', 'A > B1 (east 1 fall 1:50)\ndrain 3 in: B2 > B') +
      `
node B2 from B1 east 0.08
node B from B2 east 1 fall 1:50`;
    const before = runSketch(gap);
    const question = questionsOf(before.result).find(({ answer }) => answer.key === 'maxGap')!;
    expect(question.ask).toContain('80 mm');
    const after = runSketch(gap, { answers: filled([question], () => 0.1) });
    expect(after.findings('open-end')).toEqual([]);
    expect(after.result.systems).toHaveLength(1);
    expect(questionsOf(after.result).filter(({ answer }) => answer.key === 'maxGap')).toEqual([]);
  });

  // A bathroom group counts 6, one by one 4 + 1 + 1.5 = 6.5 (Table 2.4.9.3.).
  test('which fixtures stand in one bathroom', () => {
    const bathroom = `
storey "Ground floor" at 0
node A at 0 0 -0.3
node B from A east 1 fall 1:50
node C from B east 1 fall 1:50
node TA from A north 0.4 rise 1:50
node TB from B north 0.4 rise 1:50
node TC from C north 0.4 rise 1:50
lavatory L from TA to 0.6, trap 1 1/4 in
bathtub T from TB to 0, trap 1 1/2 in
closet W from TC to 0, tank
drain 2 in: L > TA > A
drain 2 in: T > TB > B
drain 3 in: W > TC > C
drain 2 in: A > B > C
drain 3 in: C > D (east 2 fall 1:50)
sewer D
vent 2 in: A > V (to 4)
terminal V
`;
    const before = runSketch(bathroom);
    expect(before.pipe('C-D').load.most).toBe(6.5);
    const question = questionsOf(before.result).find(({ answer }) => answer.field === 'space')!;
    const form = JSON.parse(answersFormText([question]));
    for (const key of question.about) form.fixtures[key].space = 'Bathroom';
    const answers = readAnswers(JSON.stringify(form), 'answers.json');
    expect(runSketch(bathroom, { answers }).pipe('C-D').load.most).toBe(6);
  });
});
