import { expect, test } from 'vitest';
import { readAnswers } from '../../src/model/read-answers.ts';

const read = (over: object): ReturnType<typeof readAnswers> =>
  readAnswers(JSON.stringify({ format: 'drainwright-answers', version: 1, ...over }), 'answers.json');

test('a full answers file', () => {
  const answers = read({
    settings: { omitSizes: ['2½ in'], assumedSlope: 0.02, frostEnlargement: false, sewerFloor: '3 in' },
    sewerEnds: ['1Dr4inExample000002201'],
    fixtures: { 'name:WC*': { kind: 'water-closet', detail: { flush: 'valve' }, trapSize: '3 in', space: 'Washroom' } },
    pipes: { 'name:Stack 1': { size: '4 in', slope: 0.02, material: 'cast iron' } },
    batteries: { B1: { reading: 'circuit-vent' } },
    leaveOut: ['Rainwater'],
    cleanouts: ['name:CO*'],
  });
  expect(answers.settings).toEqual({
    omitSizes: ['2½ in'],
    assumedSlope: 0.02,
    frostEnlargement: false,
    sewerFloor: '3 in',
  });
  expect(answers.fixtures.get('name:WC*')).toEqual({
    kind: 'water-closet',
    detail: { flush: 'valve' },
    trapSize: '3 in',
    space: 'Washroom',
  });
  expect(answers.pipes.get('name:Stack 1')).toEqual({ size: '4 in', slope: 0.02, material: 'cast iron' });
  expect(answers.batteries.get('B1')).toEqual({ reading: 'circuit-vent' });
  expect(answers.sewerEnds).toEqual(['1Dr4inExample000002201']);
  expect(answers.leaveOut).toEqual(['Rainwater']);
  expect(answers.cleanouts).toEqual(['name:CO*']);
});

test('a file with nothing but its format leaves everything open', () => {
  expect(read({}).fixtures.size).toBe(0);
  expect(read({}).sewerEnds).toEqual([]);
});

test('what is still null is not answered, and the questions are for people', () => {
  const answers = read({
    questions: [{ ask: 'What is Basin 1?' }],
    settings: { assumedSlope: null },
    fixtures: { a: { kind: null }, b: { kind: 'sink', detail: { flush: null } } },
    batteries: { B1: { reading: null } },
  });
  expect(answers.settings).toEqual({});
  expect([...answers.fixtures]).toEqual([['b', { kind: 'sink' }]]);
  expect(answers.batteries.size).toBe(0);
});

const wrong = [
  { file: { format: 'other' }, says: 'answers.json: format: is "other", expected "drainwright-answers"' },
  { file: { version: 2 }, says: 'answers.json: version: is 2, expected 1' },
  { file: { fixture: {} }, says: 'answers.json: fixture: unknown key' },
  {
    file: { fixtures: { x: { kind: 'toilet' } } },
    says: 'answers.json: fixtures.x.kind: is "toilet", expected water-closet',
  },
  { file: { fixtures: { x: { colour: 'white' } } }, says: 'answers.json: fixtures.x.colour: unknown key' },
  { file: { pipes: { x: { slope: 2 } } }, says: 'answers.json: pipes.x.slope: is 2, expected metres of fall' },
  { file: { pipes: { x: { slope: '2 %' } } }, says: 'answers.json: pipes.x.slope: is "2 %", expected a number' },
  { file: { batteries: { B1: { reading: 'loop' } } }, says: 'answers.json: batteries.B1.reading: is "loop"' },
  { file: { sewerEnds: 'x' }, says: 'answers.json: sewerEnds: is a string, expected a list' },
  { file: { settings: { K: {} } }, says: 'answers.json: settings.K: is {}, expected a number' },
];
for (const { file, says } of wrong) test(`refused: ${says}`, () => expect(() => read(file)).toThrow(says));

test('text that is no JSON is refused with the parser’s reason', () => {
  expect(() => readAnswers('{ "format": ', 'answers.json')).toThrow('answers.json: is not JSON');
  expect(() => readAnswers('[]', 'answers.json')).toThrow('answers.json: is a list, expected an object');
});

test('a key such as __proto__ is data and touches nothing else', () => {
  const text = '{"format":"drainwright-answers","version":1,"settings":{"__proto__":"x"},"fixtures":{"__proto__":{}}}';
  expect([...readAnswers(text, 'answers.json').fixtures.keys()]).toEqual(['__proto__']);
  expect(Object.hasOwn({}, 'x')).toBe(false);
  expect(Object.getPrototypeOf({})).toBe(Object.prototype);
});
