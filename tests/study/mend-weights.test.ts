import { describe, expect, test } from 'vitest';
import { InputError } from '../../src/findings/input-error.ts';
import { noAnswers } from '../../src/model/answers.ts';
import { run } from '../../src/pipeline.ts';
import { mend } from '../../src/study/mend/mend.ts';
import { readWeights, standardWeights, type Weights } from '../../src/study/mend/weights.ts';
import { modelOf } from '../support/model-of.ts';
import { codeOf, names } from '../support/run-sketch.ts';
import { sketch } from '../support/sketch.ts';
import { sampleText } from '../support/study-samples.ts';

const outcomeOf = (text: string) => run(modelOf(sketch(text)), codeOf('npc-2020'), noAnswers, names);
const kinds = (text: string, weights: Partial<Weights>, runs?: number) => {
  const plan = mend(outcomeOf(text), { ...standardWeights, ...weights }, runs);
  return {
    kinds: [...new Set(plan.steps.map((step) => (step.kind === 'change' ? step.change.kind : step.kind)))],
    plan,
  };
};

describe('the weights decide between plans', () => {
  // The school's storey 4 lacks a relief vent: one vent of 0.96 m, or eleven pipes one size larger.
  const school = sampleText('school');
  test('as they stand a relief vent is the least', () => expect(kinds(school, {}).kinds).toEqual(['vent']));
  test('where every new fitting is dear the pipes are enlarged', () => {
    const { kinds: made, plan } = kinds(school, { ventJoint: 100 });
    expect(made).toEqual(['size']);
    expect(plan.steps).toHaveLength(11);
    expect(plan.left).toEqual([]);
  });
});

describe('a search that is cut short', () => {
  // A bathroom without its vent, and no time: what is not proved is said not to be.
  const group = sampleText('bathroom-group').replace(
    'vent 1 1/2 in: LJ > LT (to 4.1) > SV (over ST rise 1:100)\n',
    'node SV from ST to 4.11\n',
  );
  test('says so, and still does not claim a proof', () => {
    const { plan } = kinds(group, {}, 0);
    expect(plan.exact).toBe(false);
    expect(plan.left.length).toBeGreaterThan(0);
    expect(plan.least).toBeLessThanOrEqual(plan.cost);
  });
  test('with its usual time it finds and proves the plan', () => {
    const { plan } = kinds(group, {});
    expect({ exact: plan.exact, left: plan.left.length }).toEqual({ exact: true, left: 0 });
  });
});

test('the same building gives the same plan', () => {
  const plans = [1, 2].map(() => kinds(sampleText('hall-wet-vented'), {}).plan);
  const told = plans.map(({ steps, cost }) =>
    JSON.stringify([cost, steps.map(({ kind, cost: points }) => [kind, points])]),
  );
  expect(told[0]).toBe(told[1]);
});

describe('a weights file', () => {
  const head = '"format": "drainwright-weights", "version": 1';
  test('sets what it names and leaves the rest', () =>
    expect(readWeights(`{${head}, "newVent": 3, "reading": 0}`, 'w.json')).toEqual({
      ...standardWeights,
      newVent: 3,
      reading: 0,
    }));
  test.each([
    ['no JSON', '{', 'w.json'],
    ['a list', '[]', 'w.json'],
    ['another format', '{"format": "other", "version": 1}', 'format'],
    ['another version', '{"format": "drainwright-weights", "version": 2}', 'version'],
    ['an unknown name', `{${head}, "newvent": 3}`, 'newvent'],
    ['a word for a number', `{${head}, "newVent": "dear"}`, 'newVent'],
    ['less than nothing', `{${head}, "newVent": -1}`, 'newVent'],
  ])('with %s is refused, and where it is wrong is said', (_, text, place) => {
    expect(() => readWeights(text, 'w.json')).toThrow(InputError);
    expect(() => readWeights(text, 'w.json')).toThrow(place);
  });
});
