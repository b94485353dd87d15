import { expect, test } from 'vitest';
import type { Identity } from '../../src/model/identity.ts';
import { noDetail } from '../../src/model/identity.ts';
import type { Result } from '../../src/schedule/result.ts';
import { surveyOf } from '../../src/schedule/survey.ts';
import { terminalsText } from '../../src/schedule/terminals-text.ts';
import { exampleResult } from '../support/example-result.ts';
import { plainModel } from '../support/plain-model.ts';

const terminal = { ifcClass: 'IfcFlowTerminal', kind: 'terminal' } as const;
const model = plainModel([
  { ...terminal, name: 'WC 1' },
  { ...terminal, name: 'Basin 4' },
  { ...terminal, name: 'Basin 5' },
  { ...terminal, name: 'Grab bar' },
  { ifcClass: 'IfcPipeSegment', kind: 'segment', name: 'P1' },
]);
const fixture = (kind: Identity['kind'], evidence: string, weak: boolean): Identity => ({
  part: 'fixture',
  kind,
  detail: noDetail,
  medium: 'sanitary',
  evidence,
  weak,
  outletMm: null,
  reading: null,
});
const identities: readonly Identity[] = [
  fixture('water-closet', 'name "WC 1"', false),
  fixture('lavatory', 'name "Basin 4"', true),
  fixture('lavatory', 'name "Basin 5"', true),
  { ...fixture(null, 'name "Grab bar"', false), part: 'not-drainage', medium: 'other' },
  { ...fixture(null, 'IfcPipeSegment', false), part: 'pipe' },
];
const uses = ['fixture', 'fixture', 'fixture', 'left-out', 'pipe'] as const;
const [drained] = exampleResult.fixtures;
const result: Result = {
  ...exampleResult,
  elements: model.elements.map(({ globalId, stepId, ifcClass }, index) => ({
    globalId,
    stepId,
    file: 'plain.ifc',
    class: ifcClass,
    use: uses[index]!,
    ...(uses[index] === 'left-out' ? { reason: 'accessory' } : {}),
  })),
  fixtures: [{ ...drained!, globalId: 'e0' }],
};
const survey = surveyOf(model, identities, result);

test('every terminal stands in the survey, with what decided and whether a drain reaches it', () => {
  expect(
    survey.terminals.map(({ name, part, kind, evidence, weak, joined }) => [name, part, kind, evidence, weak, joined]),
  ).toEqual([
    ['WC 1', 'fixture', 'water-closet', 'name "WC 1"', false, true],
    ['Basin 4', 'fixture', 'lavatory', 'name "Basin 4"', true, false],
    ['Basin 5', 'fixture', 'lavatory', 'name "Basin 5"', true, false],
    ['Grab bar', 'not-drainage', null, 'name "Grab bar"', false, false],
  ]);
});

test('the text names fixtures without a drain and kinds that deserve a look', () => {
  const text = terminalsText(survey)
    .map(({ text: line }) => line)
    .join('\n');
  expect(text).toContain('2 fixtures without a drain pipe: 2 lavatories');
  expect(text).toContain('#101 is read as lavatory by name "Basin 4"; #102 is read as lavatory by name "Basin 5"');
});

test('a survey with nothing to look at says nothing of it', () => {
  const joined = survey.terminals.map((one) => ({ ...one, weak: false, joined: true }));
  expect(terminalsText({ ...survey, terminals: joined })).toEqual([]);
});
