import { describe, expect, test } from 'vitest';
import { noAnswers } from '../../src/model/answers.ts';
import { run } from '../../src/pipeline.ts';
import { marginResult } from '../../src/schedule/margin.ts';
import { mendResult } from '../../src/schedule/mend-result.ts';
import { resultOf } from '../../src/schedule/result-of.ts';
import { twinsResult } from '../../src/schedule/twins.ts';
import { mend } from '../../src/study/mend/mend.ts';
import { standardWeights } from '../../src/study/mend/weights.ts';
import type { Outcome } from '../../src/verdicts/outcome.ts';
import { modelOf } from '../support/model-of.ts';
import { codeOf, names } from '../support/run-sketch.ts';
import { sketch } from '../support/sketch.ts';
import { sampleText } from '../support/study-samples.ts';

// Studies know no code: what they find under the other families, against figures read off their tables.

const known = new Map<string, Outcome>();
const outcomeOf = (name: string, code: string): Outcome => {
  const found = known.get(`${name} ${code}`) ?? run(modelOf(sketch(sampleText(name))), codeOf(code), noAnswers, names);
  known.set(`${name} ${code}`, found);
  return found;
};

describe('margin: the branch behind eight urinals of 2 units each, 3 in', () => {
  test.each([
    { code: 'ipc-2024', load: 20 - 16, source: 'IPC Table 710.1(2): a horizontal branch of 3 in holds 20' },
    { code: 'upc-2024', load: 35 - 16, source: 'UPC Table 703.2: a horizontal drain of 3 in holds 35' },
  ])('$code: $load units more ($source)', ({ code, load }) => {
    const outcome = outcomeOf('school', code);
    const { pipes } = resultOf(outcome, '0.0.0');
    const { globalId, load: carried } = pipes.find(({ name }) => name === 'S1.J8-S1.RV')!;
    expect(carried.most).toBe(16);
    const margin = marginResult(outcome).pipes.find((one) => one.globalId === globalId);
    expect(margin?.load).toBe(load);
    expect(margin?.next?.size?.label).toBe('4 in');
  });
});

describe('twins: the school, storey 4 without its relief vent, storey 1 with a mop sink more', () => {
  test.each(['ipc-2024', 'upc-2024', 'en12056-2000'])('%s', (code) => {
    const odd = twinsResult(outcomeOf('school', code)).flatMap((twins) => twins.odd);
    expect(odd.map(({ name }) => name)).toEqual(['Storey 1', 'Storey 4']);
    expect(odd[0]?.sentence).toContain('1 mop sink more');
    expect(odd[1]?.sentence).toContain('(S2.RV-S2.VJ)');
  });
});

describe('mend: the least change, and no error in the building on which it is made', () => {
  test.each([
    // Urinals belong to no bathroom group (IPC 912.1, UPC 908.2): the row is circuit vented instead (914, 911).
    { name: 'sports-hall', code: 'ipc-2024', says: 'circuit vent' },
    { name: 'sports-hall', code: 'upc-2024', says: 'circuit vent' },
    { name: 'hall-wet-vented', code: 'ipc-2024', says: 'circuit vent' },
    // EN 12056-2, 6.4.1: a closet drains through DN 90 at least where it is drawn DN 80.
    { name: 'hall-wet-vented', code: 'en12056-2000', says: 'DN 90' },
  ])('$name by $code: $says', ({ name, code, says }) => {
    const outcome = outcomeOf(name, code);
    const plan = mendResult(mend(outcome, standardWeights), resultOf(outcome, '0.0.0'));
    expect(plan.before.errors).toBeGreaterThan(0);
    expect(plan.after).toMatchObject({ errors: 0, findings: [], advice: [] });
    expect(plan.search.exact).toBe(true);
    expect(plan.changes.map(({ to }) => to).join('; ')).toContain(says);
    expect(plan.changes.reduce((sum, { cost }) => sum + cost, 0)).toBeCloseTo(plan.cost, 1);
  });
});
