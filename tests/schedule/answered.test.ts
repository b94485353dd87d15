import { describe, expect, test } from 'vitest';
import { propertySets } from '../../src/deliver/property-sets.ts';
import { answersForm } from '../../src/schedule/answers-form.ts';
import { checkText } from '../../src/schedule/check-text.ts';
import { questionsOf } from '../../src/schedule/questions.ts';
import { plainText } from '../../src/schedule/text-line.ts';
import { runSketch } from '../support/run-sketch.ts';
import { faults } from '../support/schemas.ts';

// Three pipes drawn level, the last one, below the drop, a building drain, which is sized by its slope (NPC 2020, Table
// 2.4.10.6.-C).
const flat = (rise: string): string => `
model "Level"
storey "Ground floor" at 0
node A at 0 0 -0.3
node B from A east 2 ${rise}
node C from B east 2 ${rise}
node F from C down 0.5
node D from F east 2 ${rise}
closet W1 from A to 0, tank
closet W2 from B to 0, tank
drain 3 in: W1 > A
drain 3 in: W2 > B
drain 3 in: A > B > C > F > D
sewer D
vent 2 in: A > TOP (to 4)
terminal TOP
`;

describe('a model drawn level', () => {
  const { result, findings, pipe } = runSketch(flat(''));
  const slopes = questionsOf(result).filter(({ answer }) => answer.field === 'slope');

  test('has one warning and one question, not one for each pipe', () => {
    expect(findings('slope-unknown')).toHaveLength(1);
    expect(findings('slope-unknown')[0]?.about).toHaveLength(3);
    expect(slopes.map(({ weight, answer }) => [weight, answer.part, answer.key])).toEqual([[3, 'pipes', 'name:*']]);
    expect(findings('backfall')).toEqual([]);
    expect(pipe('B-C').slope).toEqual({ value: null, ground: 'unknown' });
  });

  test('one answer settles all; the sizes carry that the slope was answered', () => {
    const answered = runSketch(flat(''), { answers: { pipes: new Map([['name:*', { slope: 0.02 }]]) } });
    expect(answered.findings('slope-unknown')).toEqual([]);
    expect(questionsOf(answered.result).filter(({ answer }) => answer.field === 'slope')).toEqual([]);
    const { slope, trail } = answered.pipe('F-D');
    expect(slope).toEqual({ value: 0.02, ground: 'answer' });
    const bySlope = trail.filter(({ facts }) => facts.slope !== undefined);
    expect(bySlope.length).toBeGreaterThan(0);
    for (const { facts } of bySlope)
      expect(facts).toMatchObject({ slope: 0.02, slopeAnswered: true, slopeAssumed: false });
  });

  // Coordinates tell a millimetre: a climb of less is how it was drawn.
  test.each([
    { title: '0.5 mm a pipe', rise: 'up 0.0005', climbs: 0 },
    { title: '0.9 mm a pipe', rise: 'up 0.0009', climbs: 0 },
    { title: '5 mm a pipe', rise: 'up 0.005', climbs: 3 },
  ])('a climb of $title is a backfall on $climbs pipes', ({ rise, climbs }) => {
    expect(runSketch(flat(rise)).findings('backfall')).toHaveLength(climbs);
  });
});

describe('slopes in a property alone', () => {
  const stated = runSketch(flat('').replace('drain 3 in: A >', 'drain 3 in states 1:50: A >'));
  test('are used and marked, and nothing is asked', () => {
    expect(stated.pipe('B-C').slope).toEqual({ value: 0.02, ground: 'property' });
    expect(stated.findings('slope-unknown')).toEqual([]);
  });
});

describe('what was answered stands on everything that is handed on', () => {
  const { result } = runSketch(flat(''), {
    answers: {
      settings: { maxGap: 0.02 },
      pipes: new Map([['name:*', { slope: 0.02 }]]),
      fixtures: new Map([['name:W1', { detail: { flush: 'valve' } }]]),
    },
    code: 'npc-2020',
  });
  const words = ['* (7 pipes) at 2 % (1:50)', 'W1 (1 fixture): flush valve'];

  test('in the result, by its schema', () => {
    expect(faults('result', result)).toEqual([]);
    expect(result.answers).toEqual([
      { part: 'fixtures', key: 'name:W1', field: 'detail.flush', value: 'valve', meets: 1 },
      { part: 'pipes', key: 'name:*', field: 'slope', value: 0.02, meets: result.pipes.length },
    ]);
  });
  test('in the text of check', () => {
    const text = plainText(checkText(result)).replace(/\s+/g, ' ');
    for (const one of words) expect(text).toContain(one.replace('7', String(result.pipes.length)));
  });
  test('in the set of the building', () => {
    const sets = propertySets(result, { file: result.model.file, metresPerUnit: 1 });
    const answers = sets.find(({ on }) => on === 'building')?.properties.find(({ name }) => name === 'Answers');
    for (const one of words) expect(answers?.value.value).toContain(one.replace('7', String(result.pipes.length)));
  });
  test('the form to fill in holds one entry for all level pipes, and is read as it stands', () => {
    const form = answersForm(questionsOf(runSketch(flat('')).result));
    expect(faults('answers', form)).toEqual([]);
    expect(form.pipes).toEqual({ 'name:*': { slope: null } });
  });
});
