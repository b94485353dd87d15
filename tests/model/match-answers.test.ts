import { describe, expect, test } from 'vitest';
import { InputError } from '../../src/findings/input-error.ts';
import { type Answers, noAnswers } from '../../src/model/answers.ts';
import { matchAnswers } from '../../src/model/match-answers.ts';
import { editSteps, nearest } from '../../src/model/nearest-words.ts';
import { nominalSize, sizeSeries } from '../../src/units/nominal-size.ts';
import { plainModel } from '../support/plain-model.ts';

const series = sizeSeries(
  [
    ['1½ in', 40],
    ['2 in', 50],
    ['3 in', 80],
  ].map(([label, dn]) => ({ label: nominalSize(String(label)), dn: Number(dn), lengthsMm: [] })),
);
const model = plainModel(
  [
    { ifcClass: 'IfcSanitaryTerminal', kind: 'terminal', globalId: '1Dr4inExample000002201', name: 'WC 1' },
    { ifcClass: 'IfcSanitaryTerminal', kind: 'terminal', globalId: '1Dr4inExample000002202', name: 'WC 2' },
    { ifcClass: 'IfcPipeSegment', kind: 'segment', globalId: '1Dr4inExample000003301', name: 'Stack 1' },
    { ifcClass: 'IfcPipeFitting', kind: 'fitting', globalId: '1Dr4inExample000004401', name: 'Cap 1' },
  ],
  [{ name: 'Rainwater 1' }, { name: 'Rainwater 2' }, { name: 'Sanitary' }],
);
const match = (answers: Partial<Answers>): Answers =>
  matchAnswers({ ...noAnswers, ...answers }, model, series, 'answers.json');

test('names become GlobalIds, and sizes the labels of the code', () => {
  const matched = match({
    fixtures: new Map([['name:WC*', { kind: 'water-closet', trapSize: '3 in' }]]),
    pipes: new Map([['1Dr4inExample000003301', { size: '1 1/2 in', slope: 0.02 }]]),
    sewerEnds: ['name:Stack*'],
    cleanouts: ['1Dr4inExample000004401'],
    leaveOut: ['name:Rainwater*'],
    batteries: new Map([['B1', { reading: 'wet-vent' }]]),
  });
  expect(matched.fixtures.get('name:WC*')?.trapSize).toBe('3 in');
  expect(matched.pipes.get('1Dr4inExample000003301')).toEqual({ size: '1½ in', slope: 0.02 });
  expect(matched.sewerEnds).toEqual(['1Dr4inExample000003301']);
  expect(matched.cleanouts).toEqual(['1Dr4inExample000004401']);
  expect(matched.leaveOut).toEqual(['s0', 's1']);
});

test('an id with file and STEP id, as results write it where a GlobalId is doubled', () => {
  const fixtures = new Map([['1Dr4inExample000002202#0.101', { kind: 'sink' }]]);
  expect(match({ fixtures }).fixtures).toEqual(fixtures);
  expect(() => match({ fixtures: new Map([['1Dr4inExample000002202#0.999', { kind: 'sink' }]]) })).toThrow(InputError);
});

describe('what meets nothing, or cannot be', () => {
  const wrong: readonly { answers: Partial<Answers>; says: string }[] = [
    {
      answers: { fixtures: new Map([['1Dr4inExample000002203', { kind: 'sink' }]]) },
      says: 'answers.json: fixtures.1Dr4inExample000002203: the model has no such GlobalId, expected an element other than a pipe; nearest: 1Dr4inExample000002201, 1Dr4inExample000002202, 1Dr4inExample000004401',
    },
    {
      answers: { fixtures: new Map([['name:WD*', { kind: 'sink' }]]) },
      says: 'answers.json: fixtures.name:WD*: the model has nothing of this name, expected an element other than a pipe; a key is',
    },
    {
      answers: { sewerEnds: ['name:Stak 1'] },
      says: 'answers.json: sewerEnds[0]: the model has nothing of this name, expected an element; nearest: Stack 1',
    },
    {
      answers: { fixtures: new Map([['1Dr4inExample000003301', { kind: 'sink' }]]) },
      says: 'meets IfcPipeSegment 1Dr4inExample000003301, expected an element other than a pipe',
    },
    { answers: { pipes: new Map([['name:WC 1', { slope: 0.01 }]]) }, says: 'meets IfcSanitaryTerminal' },
    {
      answers: { pipes: new Map([['name:Stack 1', { size: '9 in' }]]) },
      says: 'answers.json: pipes.name:Stack 1.size: is "9 in", expected a size of the code: 1 1/2 in, 2 in, 3 in',
    },
    {
      answers: { fixtures: new Map([['name:WC 1', { trapSize: 'big' }]]) },
      says: 'answers.json: fixtures.name:WC 1.trapSize: is "big"',
    },
    {
      answers: { leaveOut: ['Heating'] },
      says: 'answers.json: leaveOut[0]: is "Heating", but no system of the model is called so; it has Rainwater 1, Rainwater 2, Sanitary',
    },
    {
      answers: { batteries: new Map([['1Dr4inExample000009999', { reading: 'wet-vent' }]]) },
      says: 'answers.json: batteries.1Dr4inExample000009999: the model has no such GlobalId',
    },
  ];
  test.each(wrong)('$says', ({ answers, says }) => {
    expect(() => match(answers)).toThrow(InputError);
    expect(() => match(answers)).toThrow(says);
  });
});

test.each([
  ['kitten', 'sitting', 3],
  ['', 'abc', 3],
  ['same', 'same', 0],
])('from %s to %s in %d steps (worked by hand)', (a, b, steps) => {
  expect(editSteps(a, b)).toBe(steps);
});

test('the nearest words, nearest first, and none that has nothing to do with it', () => {
  expect(nearest('Basin 12', ['Basin 1', 'Basin 21', 'Water closet', 'Basin 12a'])).toEqual([
    'Basin 1',
    'Basin 12a',
    'Basin 21',
  ]);
  expect(nearest('xyz', ['Water closet'])).toEqual([]);
});
