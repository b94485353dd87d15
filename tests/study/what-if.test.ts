import { describe, expect, test } from 'vitest';
import { InputError } from '../../src/findings/input-error.ts';
import { noAnswers } from '../../src/model/answers.ts';
import { run } from '../../src/pipeline.ts';
import { explain } from '../../src/schedule/explain.ts';
import { findInResult } from '../../src/schedule/find-in-result.ts';
import { resultOf } from '../../src/schedule/result-of.ts';
import { plainText } from '../../src/schedule/text-line.ts';
import { whatIfResult, whatIfText } from '../../src/schedule/what-if.ts';
import { readWhatIf } from '../../src/schedule/what-if-words.ts';
import { whatIf } from '../../src/study/what-if.ts';
import { modelOf } from '../support/model-of.ts';
import { codeOf, names } from '../support/run-sketch.ts';
import { faults } from '../support/schemas.ts';
import { sketch } from '../support/sketch.ts';
import { hall, row, sampleText } from '../support/study-samples.ts';

function asked(text: string, what: string, words: string) {
  const outcome = run(modelOf(sketch(text)), codeOf('npc-2020'), noAnswers, names);
  const result = resultOf(outcome, '0.0.0');
  const found = findInResult(result, what);
  const edits = readWhatIf(words, found, outcome);
  const answer = whatIfResult(
    outcome,
    whatIf(
      outcome,
      edits.map(({ edit }) => edit),
      (id) => codeOf(id),
    ),
    edits.map((one) => one.words),
  );
  const nameOf = new Map(result.pipes.map(({ globalId, name }) => [globalId, name]));
  const change = (name: string) => answer.changes.find(({ globalId }) => nameOf.get(globalId) === name);
  return { outcome, result, found, answer, change, explanation: { ...explain(result, found, []), whatIf: answer } };
}

// Six wall urinals of 1.5 units, wet vented in 3 in: 7.5 of 12 count (Table 2.5.8.1.).
const urinals = hall(row(6, 'urinal, washout, trap 1 1/2 in'));

describe('what if', () => {
  test('a pipe is drawn smaller: it is undersized, and the drawn reduction is a fault', () => {
    const { change, answer } = asked(urinals, 'J2-J3', 'size 2 in');
    expect(change('J2-J3')).toMatchObject({ from: { verdict: 'agrees' }, to: { verdict: 'undersized' } });
    expect(answer.changes).toHaveLength(1);
    expect(answer.come.map(({ code }) => code).sort()).toEqual(['smaller-downstream', 'undersized']);
  });
  test('four more urinals ask for 4 in along the row, three do not', () => {
    const four = asked(urinals, 'J2-J3', 'add 4 urinal washout');
    expect(four.change('J1-J2')).toMatchObject({
      from: { required: { label: '3 in' } },
      to: { required: { label: '4 in' } },
    });
    const three = asked(urinals, 'J2-J3', 'add 3 urinal washout');
    expect(three.answer.changes.filter(({ from, to }) => from.required?.label !== to.required?.label)).toEqual([]);
  });
  test('a row of urinals on 2 in traps as circuit vented has no relief vent', () => {
    const { answer } = asked(hall(row(5, 'urinal, stall, trap 2 in')), 'F2', 'reading circuit-vent');
    expect(answer.come.map(({ code }) => code)).toContain('relief-vent-missing');
    expect(answer.asked).toEqual(['its battery is read as circuit vent']);
  });
  test('a fixture of another kind brings another load: a stall urinal 2, not 1.5', () => {
    const { change } = asked(urinals, 'F3', 'kind urinal stall');
    expect(change('J3-J4')).toMatchObject({ from: { load: { most: 4.5 } }, to: { load: { most: 5 } } });
  });
  test('a drain laid flatter is told so: 3 in needs 1:50', () => {
    const { answer } = asked(urinals, 'J2-J3', 'slope 1:100');
    expect(answer.come.map(({ code }) => code)).toEqual(['slope-too-small']);
  });
  test('a steeper building drain holds more: the school at 1:50 takes 240 of its 259 units, at 1:25 300', () => {
    const { change } = asked(sampleText('school'), 'MJ-CB', 'slope 1:50');
    expect(change('MJ-CB')).toMatchObject({ to: { verdict: 'undersized', required: { label: '5 in' } } });
  });
  test('another edition of the code, with another edit', () => {
    const { answer } = asked(urinals, 'J2-J3', 'code npc-2015; size 4 in');
    expect(answer.asked).toEqual(['the code is npc-2015', 'it is 4 in']);
    expect(answer.come.map(({ code }) => code)).toContain('smaller-downstream');
  });
  test('the published form is valid, and a person can read it', () => {
    const { explanation, answer, result } = asked(urinals, 'J2-J3', 'size 2 in');
    expect(faults('explain', explanation)).toEqual([]);
    const text = plainText(whatIfText(answer, result));
    expect(text).toContain('If it is 2 in:');
    expect(text).toContain('now undersized, it was as required');
  });
  test('nothing of the first building changes', () => {
    const { outcome } = asked(urinals, 'J2-J3', 'add 4 urinal washout; size 2 in');
    expect(outcome.network.pipes).toHaveLength(asked(urinals, 'J2-J3', 'size 3 in').outcome.network.pipes.length);
  });
});

test.each([
  ['size 7 in', 'J2-J3', 'names no size'],
  ['size 3 in', 'F2', 'said of a pipe'],
  ['slope steep', 'J2-J3', 'names no fall'],
  ['reading dry', 'J2-J3', 'names no reading'],
  ['reading circuit-vent', 'D1-D2', 'belongs to none'],
  ['kind lavatory', 'J2-J3', 'said of a fixture'],
  ['kind throne', 'F2', 'names no fixture'],
  ['kind urinal golden', 'F2', 'not known'],
  ['add 0 urinal', 'J2-J3', 'adds nothing'],
  ['code', 'J2-J3', 'names no code'],
  ['paint it', 'J2-J3', 'not understood'],
  ['size 3 in;', 'J2-J3', 'says nothing'],
])('--if "%s" of %s is refused: %s', (words, what, why) => {
  const outcome = run(modelOf(sketch(urinals)), codeOf('npc-2020'), noAnswers, names);
  const found = findInResult(resultOf(outcome, '0.0.0'), what);
  const error = (() => {
    try {
      readWhatIf(words, found, outcome);
    } catch (thrown) {
      return thrown;
    }
    return null;
  })();
  expect(error).toBeInstanceOf(InputError);
  expect((error as InputError).message).toContain(why);
});
