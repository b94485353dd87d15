import { describe, expect, test } from 'vitest';
import type { FixtureAnswer, Settings } from '../../src/model/answers.ts';
import { europeanTower } from '../support/european.ts';
import { runSketch, type SketchRun } from '../support/run-sketch.ts';

// DIN 1986-100 beside EN 12056-2 (setting `national`): further discharge units, and collecting branches by their sum in
// the column of K. Figures from a German course sheet of 2008 and a maker's handbook. Basin 0.5, kitchen sink 0.8,
// dishwasher 0.8 (Table 2, system I).
const run = (text: string, settings: Settings = {}, fixtures: Record<string, FixtureAnswer> = {}): SketchRun =>
  runSketch(text, {
    code: 'en12056-2000',
    answers: { settings: { national: 'din', ...settings }, fixtures: new Map(Object.entries(fixtures)) },
  });
const basins = (count: number): string[] => Array.from({ length: count }, () => 'lavatory');

describe('discharge units', () => {
  test('a urinal without water: 0.1; by the standard itself any of its rows', () => {
    const text = europeanTower([{ west: ['urinal'] }]);
    const waterless: Record<string, FixtureAnswer> = { 'name:F*': { detail: { style: 'waterless' } } };
    expect(run(text, {}, waterless).fixture('F1.w1').load).toEqual({ least: 0.1, most: 0.1 });
    expect(run(text, { national: 'none' }, waterless).fixture('F1.w1').load.most).not.toBe(0.1);
  });

  test('a kitchen sink with its dishwasher on one trap: 0.8 for both; elsewhere each by itself, 1.6', () => {
    const text = europeanTower([{ west: [] }, { west: ['lavatory'] }]).replace(
      'roof "Roof"',
      `node Q from S1 west 1 rise 1:50
trap TQ from Q up 0.3, DN 50
node N from TQ up 0.1
kitchen-sink KS from N up 0.2
dishwasher DW from N west 0.5 up 0.1
drain DN 50: KS > N > TQ > Q > S1
drain DN 50: DW > N
roof "Roof"`,
    );
    expect(run(text).pipe('Q-S1').load.most).toBe(0.8);
    expect(run(text, { national: 'none' }).pipe('Q-S1').load.most).toBe(1.6);
  });
});

describe('collecting branches by the sum of discharge units', () => {
  const asks = (count: number, settings: Settings = {}) =>
    run(europeanTower([{ east: ['lavatory'] }, { west: basins(count) }]), settings)
      .pipe(`J2.w${count}-S2`)
      .trail.find(({ rule }) => rule === 'EN-R10');
  test.each([
    [2, 0.5, 'DN 50', 1, '1.0, the limit of DN 50'],
    [3, 0.5, 'DN 60', 2, '1.5 past it; DN 60 takes 2.0'],
    [4, 0.5, 'DN 60', 2, '2.0, the limit'],
    [5, 0.5, 'DN 70', 9, '2.5 past it'],
    [2, 1, 'DN 60', 1, 'K 1.0: DN 50 takes 0.8'],
    [3, 1, 'DN 70', 2.2, 'K 1.0: 1.5 past 1.0'],
  ])('%i basins, K %f: %s', (count, K, size, limit) => {
    expect(asks(count, { K })).toMatchObject({
      clause: 'DIN 1986-100',
      asks: { label: size },
      facts: { loadUnits: count / 2, limitUnits: limit, ventilated: false },
    });
  });

  test('why not one size smaller: what that one takes', () => {
    expect(asks(3)?.smaller).toMatchObject({ limit: 1 });
    expect(asks(2)?.smaller ?? null).toBeNull();
  });

  test('one basin, and K 1.2, which has no column: by the flow, as in the standard', () => {
    expect(asks(1)?.clause).not.toBe('DIN 1986-100');
    expect(asks(3, { K: 1.2 })?.clause).not.toBe('DIN 1986-100');
  });
});

test('a stack that ends at its highest branch has no way for air (EN-R22)', () => {
  const floors = [{ west: ['lavatory'] }, { west: ['lavatory'] }];
  expect(run(europeanTower(floors, { stackVent: false })).findings('stack-vent-missing')).toHaveLength(1);
  expect(run(europeanTower(floors)).findings('stack-vent-missing')).toEqual([]);
});

test('a stack keeps the size of its foot to the top (EN-R22): every section but the foot follows it', () => {
  const it = run(europeanTower([{ west: basins(2) }, { west: basins(2) }, { west: basins(2) }]));
  const follows = (pipe: string) => it.pipe(pipe).trail.some(({ rule }) => rule === 'EN-R22');
  expect([follows('S3-S2'), follows('S2-S1'), follows('S1-SF')]).toEqual([true, true, false]);
});
