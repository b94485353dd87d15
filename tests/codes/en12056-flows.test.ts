import { describe, expect, test } from 'vitest';
import { flowOf } from '../../src/codes/en12056/flow.ts';
import type { FixtureAnswer, Settings } from '../../src/model/answers.ts';
import { loadOf, noLoad } from '../../src/units/quantity.ts';
import { europeanTower } from '../support/european.ts';
import { codeOf, runSketch, type SketchRun } from '../support/run-sketch.ts';

// EN 12056-2:2000, flows: rules R01 to R07. Discharge units by Table 2, K by Table 3. W: worked checks of the rules.
const run = (text: string, settings: Settings = {}, fixtures: Record<string, FixtureAnswer> = {}): SketchRun =>
  runSketch(text, { code: 'en12056-2000', answers: { settings, fixtures: new Map(Object.entries(fixtures)) } });
const fact = (it: SketchRun, pipe: string, rule: string, name: string): number =>
  Number(it.pipe(pipe).trail.find((step) => step.rule === rule)?.facts[name]);

describe('R03, R07 sums before roots', () => {
  const flat = ['lavatory', 'bathtub', 'closet', 'kitchen-sink', 'dishwasher', 'clothes-washer']; // 5.7 in system I
  const domestic = { 'name:F*': { detail: { domestic: true } } };

  test('W03 ten flats: 57 in all, 3.775 l/s', () => {
    const it = run(europeanTower(Array.from({ length: 10 }, () => ({ west: flat }))), {}, domestic);
    expect(it.pipe('S1-SF').load.most).toBeCloseTo(57, 9);
    expect(fact(it, 'S1-SF', 'EN-R20', 'wastewaterLps')).toBeCloseTo(3.775, 3);
  });

  test('W11 57 and 20 join: 4.387 l/s, not 3.775 + 2.236', () => {
    const code = codeOf('en12056-2000');
    expect(0.5 * Math.sqrt(57) + 0.5 * Math.sqrt(20)).toBeCloseTo(6.011, 3);
    // Ten flats on one stack and ten closets on another, one drain below both.
    const second = Array.from(
      { length: 10 },
      (_, at) => `
node Q${at + 1} at 6 0 ${3 * at - 0.4}
on "Storey ${at + 1}"
closet C${at + 1} from Q${at + 1} east 0.5 rise 1:50
drain DN 100: C${at + 1} > Q${at + 1}`,
    ).join('');
    const line = Array.from({ length: 10 }, (_, at) => `Q${10 - at}`).join(' > ');
    const it = run(
      europeanTower(
        Array.from({ length: 10 }, () => ({ west: flat })),
        {
          more: `${second}\ndrain DN 100: ${line} > QF (to -1.66) > OUT\nvent DN 100: Q10 > QT (to 30.6)\nterminal QT
node TAIL from OUT east 5 fall 1:100\ndrain DN 100: OUT > TAIL`,
        },
      ).replace('sewer OUT', 'sewer TAIL'),
      {},
      domestic,
    );
    expect(it.pipe('OUT-TAIL').load.most).toBeCloseTo(77, 9);
    expect(fact(it, 'OUT-TAIL', 'EN-R30', 'flowLps')).toBeCloseTo(4.387, 3);
    expect(code.unit).toBe('l/s of discharge units');
  });

  // Annex B as computed with two decimals; the standard prints one.
  test.each([
    [10, 1.58, 2.21, 3.16, 3.79],
    [14, 1.87, 2.62, 3.74, 4.49],
    [50, 3.54, 4.95, 7.07, 8.49],
    [100, 5, 7, 10, 12],
    [1000, 15.81, 22.14, 31.62, 37.95],
  ])('Annex B: sum of %i', (sum, ...wanted) => {
    const load = loadOf(sum);
    const found = [0.5, 0.7, 1, 1.2].map((K) =>
      flowOf({ settings: { K, mixedK: 'add' } })({ load, largest: noLoad, steady: 0, statedUses: [] }),
    );
    expect(found.map(({ flow }) => Math.round(flow * 100) / 100)).toEqual(wanted);
  });
});

describe('R04 steady and pumped flow comes on top', () => {
  const flats = Array.from({ length: 10 }, () => ({
    west: ['lavatory', 'bathtub', 'closet', 'kitchen-sink', 'dishwasher', 'clothes-washer'],
  }));
  const pump = europeanTower(flats, { more: 'thing PUMP from SF west 1 rise 1:50\ndrain DN 50: PUMP > SF' });
  const domestic: Record<string, FixtureAnswer> = { 'name:F*': { detail: { domestic: true } } };
  const stated = { ...domestic, 'name:PUMP': { kind: 'other-fixture', detail: { flow: 2 } } };

  test('W06 57 and a pump of 2 l/s: 5.775 l/s; half full DN 150, 0.7 full DN 125', () => {
    const half = run(pump, {}, stated);
    expect(half.pipe('SF-OUT').load.most).toBeCloseTo(57, 9);
    expect(fact(half, 'SF-OUT', 'EN-R30', 'flowLps')).toBeCloseTo(5.775, 3);
    const asks = (it: SketchRun) => it.pipe('SF-OUT').trail.find(({ rule }) => rule === 'EN-R30');
    expect([asks(half)?.asks?.label, asks(half)?.facts.carriesLps]).toEqual(['DN 150', 7.66]);
    const full = run(pump, { filling: 0.7 }, stated);
    expect([asks(full)?.asks?.label, asks(full)?.facts.carriesLps]).toEqual(['DN 125', 6.48]);
  });

  test('W15 laboratory: K 1.2, 8 DU and 0.5 l/s of cooling water: 3.894 l/s', () => {
    const text = europeanTower([{ west: ['closet', 'closet'] }, { west: ['closet', 'closet'] }], {
      more: 'thing COOL from SF west 1 rise 1:50\ndrain DN 50: COOL > SF',
    });
    const it = run(text, { K: 1.2 }, { 'name:COOL': { kind: 'other-fixture', detail: { flow: 0.5 } } });
    expect(fact(it, 'SF-OUT', 'EN-R30', 'wastewaterLps')).toBeCloseTo(3.394, 3);
    expect(fact(it, 'SF-OUT', 'EN-R30', 'flowLps')).toBeCloseTo(3.894, 3);
  });
});

describe('R05 parts of different use', () => {
  // Office 40 and school 40 DU: 3.16 and 4.43 l/s; added 7.59, in quadrature 5.44.
  const half = Array.from({ length: 10 }, () => ({ west: ['closet', 'closet'], east: ['closet', 'closet'] }));
  const school = { 'name:F*.e*': { detail: { frequency: 0.7 } } };

  test('added unless the designer says otherwise', () => {
    const it = run(europeanTower(half), {}, school);
    expect(fact(it, 'S1-SF', 'EN-R20', 'flowLps')).toBeCloseTo(7.59, 2);
    const other = run(europeanTower(half), { mixedK: 'quadrature' }, school);
    expect(fact(other, 'S1-SF', 'EN-R20', 'flowLps')).toBeCloseTo(5.44, 2);
  });
});

describe('R02 appliances', () => {
  test.each([
    ['I', 2],
    ['II', 1.8],
    ['III', 1.7],
    ['IV', 2],
  ])('6 l closet in system %s: %f', (system, units) => {
    const it = run(europeanTower([{ west: ['closet'] }, { west: ['closet'] }]), { system });
    expect(it.fixture('F1.w1').load.most).toBeCloseTo(units, 9);
  });

  test('a 4 l closet may not be used in system I: said, and counted as 6 l; in II it has 1.8; in Germany 1.8', () => {
    const small = { 'name:F*': { detail: { flushLitres: 4 } } };
    const text = europeanTower([{ west: ['closet'] }, { west: ['closet'] }]);
    const one = run(text, {}, small);
    expect([one.fixture('F1.w1').load.most, one.findings('appliance-not-allowed').length]).toEqual([2, 2]);
    const two = run(text, { system: 'II' }, small);
    expect([two.fixture('F1.w1').load.most, two.findings('appliance-not-allowed').length]).toEqual([1.8, 0]);
    const german = run(text, { national: 'din' }, small);
    expect([german.fixture('F1.w1').load.most, german.findings('appliance-not-allowed').length]).toEqual([1.8, 0]);
  });

  test('a urinal with a flushing valve has no figure in system III: the largest of the others, 0.5', () => {
    const text = europeanTower([{ west: ['urinal, valve'] }, { west: ['lavatory'] }]);
    expect(run(text, { system: 'III' }).fixture('F1.w1').load).toEqual({ least: 0.5, most: 0.5 });
  });
});

describe('settings', () => {
  test.each([
    [{ K: 0.6 }, 'expected one of 0.5, 0.7, 1, 1.2'],
    [{ system: 'V' }, 'expected one of I, II, III, IV'],
    [{ filling: 0.6 }, 'expected one of 0.5, 0.7'],
    [{ entries: 'round' }, 'expected one of square, swept'],
    [{ use: 'private' }, 'is no setting of en12056-2000; expected one of '],
    [{ use: 'private' }, 'filling'],
    [{ omitSizes: ['2 in'] }, 'expected sizes of DN'],
  ])('%o is refused: %s', (settings, message) => {
    expect(() => codeOf('en12056-2000', settings as Settings)).toThrow(message);
  });
});
