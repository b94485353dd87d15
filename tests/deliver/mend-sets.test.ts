import { describe, expect, test } from 'vitest';
import { mendSets } from '../../src/deliver/mend-sets.ts';
import { noAnswers } from '../../src/model/answers.ts';
import { run } from '../../src/pipeline.ts';
import { mendResult } from '../../src/schedule/mend-result.ts';
import { resultOf } from '../../src/schedule/result-of.ts';
import { mend } from '../../src/study/mend/mend.ts';
import { standardWeights } from '../../src/study/mend/weights.ts';
import { elementIdOf, modelOf } from '../support/model-of.ts';
import { codeOf, names } from '../support/run-sketch.ts';
import { sketch } from '../support/sketch.ts';
import { sampleText } from '../support/study-samples.ts';

function setsOf(text: string) {
  const drawing = sketch(text);
  const outcome = run(modelOf(drawing), codeOf('npc-2020'), noAnswers, names);
  const result = resultOf(outcome, '0.0.0');
  const plan = mendResult(mend(outcome, standardWeights), result);
  const sets = mendSets(plan, result, 'sketch.ifc');
  const of = (name: string) => {
    const { stepId } = outcome.model.elements[elementIdOf(drawing, name)]!;
    const found = sets.filter(({ on }) => on === stepId);
    expect(found.length).toBeLessThan(2);
    return new Map(found[0]?.properties.map(({ name: key, value }) => [key, value.value]));
  };
  return { sets, of, plan };
}

describe('proposals on the elements that a plan concerns', () => {
  test('larger pipe: the drawn and the proposed size, on that pipe and no other', () => {
    const { of, sets } = setsOf(sampleText('hall-wet-vented'));
    const properties = of('J3-J4');
    expect(properties.get('ModelledSize')).toBe('3 in');
    expect(properties.get('ProposedSize')).toBe('4 in');
    expect(properties.get('Step')).toBe('6 of 9');
    expect(properties.get('Because')).toContain('2.5.8.1.');
    // Nine pipes and the building; the rest of the model bears nothing.
    expect(sets).toHaveLength(10);
    expect(of('J7-K1').size).toBe(0);
  });
  test('a new vent: on the pipes where it starts and ends, in plain words', () => {
    const { of } = setsOf(sampleText('school'));
    for (const name of ['S4.J8-S4.RV', 'S4.RV-S4.D', 'S4.VJ-S4.VE'])
      expect(of(name).get('ProposedVent'), name).toMatch(/^relief vent of 1 1\/2 in, 9\d\d mm/);
    expect(of('S4.J8-S4.RV').get('Because')).toContain(
      'With the vent the row of 8 fixtures is circuit vented, not wet vented.',
    );
  });
  test('the building says what the plan does', () => {
    const { sets } = setsOf(sampleText('school'));
    const building = sets.find(({ on }) => on === 'building')!;
    const properties = new Map(building.properties.map(({ name, value }) => [name, value.value]));
    expect(properties.get('ErrorsBefore')).toBe(11);
    expect(properties.get('ErrorsAfter')).toBe(0);
    expect(properties.get('Changes')).toBe(1);
    expect(String(properties.get('Caution'))).toContain('licensed person');
  });
  test('every set bears one name, none of the standard’s, in plain characters', () => {
    for (const { name, properties } of setsOf(sampleText('school')).sets) {
      expect(name).toBe('Drainwright_Mend');
      for (const { value } of properties) expect(String(value.value)).toMatch(/^[\x20-\x7e–’]*$/u);
    }
  });
  test('a model without errors has its line on the building alone', () =>
    expect(setsOf(sampleText('dwelling')).sets.map(({ on }) => on)).toEqual(['building']));
});
