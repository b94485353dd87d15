import { describe, expect, test } from 'vitest';
import type { FixtureAnswer, Settings } from '../../src/model/answers.ts';
import { explain } from '../../src/schedule/explain.ts';
import { findInResult } from '../../src/schedule/find-in-result.ts';
import { questionsOf } from '../../src/schedule/questions.ts';
import { sizeForLoad } from '../../src/tables/find-size.ts';
import { europeanTower, type Floor } from '../support/european.ts';
import { runSketch, type SketchRun } from '../support/run-sketch.ts';
import { openOwn } from '../support/table-files.ts';

// EN 12056-2:2000, stacks and their vents: rules R20 to R25, R42 to R44, Tables 10 to 12. W: worked checks of the rules.
const run = (text: string, settings: Settings = {}, fixtures: Record<string, FixtureAnswer> = {}): SketchRun =>
  runSketch(text, { code: 'en12056-2000', answers: { settings, fixtures: new Map(Object.entries(fixtures)) } });
const step = (it: SketchRun, pipe: string, rule: string) => it.pipe(pipe).trail.find((one) => one.rule === rule);
const family = openOwn('en12056-2000');
const floors = (count: number, floor: Floor): Floor[] => Array.from({ length: count }, () => floor);
const flat = ['lavatory', 'bathtub', 'closet', 'kitchen-sink', 'dishwasher', 'clothes-washer']; // 5.7 in system I
const domestic: Record<string, FixtureAnswer> = { 'name:F*': { detail: { domestic: true } } };

describe('Tables 11 and 12: each size at its limit, one step past it, and past the last', () => {
  test.each([
    ['stack-primary', 'square', [0.5, 1.5, 2, 2.7, 4, 5.8, 9.5, 16]],
    ['stack-primary', 'swept', [0.7, 2, 2.6, 3.5, 5.2, 7.6, 12.4, 21]],
    ['stack-secondary', 'square', [0.7, 2, 2.6, 3.5, 5.6, 7.6, 12.4, 21]],
    ['stack-secondary', 'swept', [0.9, 2.6, 3.4, 4.6, 7.3, 10, 18.3, 27.3]],
  ])('%s, %s', (table, column, flows) => {
    const sizes = ['DN 60', 'DN 70', 'DN 80', 'DN 90', 'DN 100', 'DN 125', 'DN 150', 'DN 200'];
    flows.forEach((flow, at) => {
      expect(sizeForLoad(family.table(table), column, flow).size).toBe(sizes[at]);
      expect(sizeForLoad(family.table(table), column, flow + 0.001).size).toBe(sizes[at + 1] ?? null);
    });
  });
});

describe('a stack by its flow and the way it is entered', () => {
  test('W03 ten flats, 3.775 l/s: DN 100 square or swept', () => {
    const it = run(europeanTower(floors(10, { west: flat })), {}, domestic);
    expect(it.size('S1-SF')).toBe('DN 100');
    expect(step(it, 'S1-SF', 'EN-R20')?.facts).toMatchObject({ entries: 'square', entriesKnown: false, limitLps: 4 });
  });

  test('W04 twelve flats, 4.135 l/s: DN 100 swept, DN 125 square; which, the model does not tell', () => {
    const it = run(europeanTower(floors(12, { west: flat })), {}, domestic);
    expect(it.size('S1-SF')).toBe('DN 100 to DN 125');
    expect(it.pipe('S1-SF').reason).toBe('depends on how the drains enter the stack, square or swept');
    expect(run(europeanTower(floors(12, { west: flat })), { entries: 'square' }, domestic).size('S1-SF')).toBe(
      'DN 125',
    );
    expect(run(europeanTower(floors(12, { west: flat })), { entries: 'swept' }, domestic).size('S1-SF')).toBe('DN 100');
  });

  test('W04 with a vent stack: DN 100 and DN 50 carry 5.6 square', () => {
    const it = run(europeanTower(floors(12, { west: flat }), { ventStack: true }), {}, domestic);
    expect([step(it, 'S1-VF', 'EN-R21')?.asks?.label, it.size('S1-VF')]).toEqual(['DN 100', 'DN 100']);
    // Table 12 alone asks, not Table 11 beside it.
    expect(step(it, 'S1-VF', 'EN-R20')).toBeUndefined();
    expect(step(it, 'S1-VF', 'EN-R21')?.clause).toBe(family.rule('EN-R21').clause);
    expect([it.role('VB-VU'), it.size('VB-VU'), step(it, 'VB-VU', 'EN-R42')?.asks?.label]).toEqual([
      'vent-stack',
      'DN 50',
      'DN 50',
    ]);
  });

  test('W05 hotel, twenty rooms, 5.512 l/s: DN 125 either way, DN 100 with a vent stack', () => {
    const room = ['lavatory', 'shower', 'closet']; // 3.1
    const hotel = floors(10, { west: room, east: room });
    const it = run(europeanTower(hotel), { K: 0.7 });
    expect([it.pipe('S1-SF').load.most, it.size('S1-SF')]).toEqual([62, 'DN 125']);
    expect(run(europeanTower(hotel, { ventStack: true }), { K: 0.7 }).size('S1-VF')).toBe('DN 100');
  });

  test('W12 grey stack of four sinks: 0.894 l/s, DN 70, though DN 60 takes 0.7 swept', () => {
    const it = run(europeanTower(floors(4, { west: ['kitchen-sink'] })));
    expect(it.size('S1-SF')).toBe('DN 70');
  });

  test('R24 branches that come down at 45 degrees are swept, and known to be', () => {
    const it = run(europeanTower(floors(12, { west: flat }), { flat: true }), {}, domestic);
    expect(step(it, 'S1-SF', 'EN-R20')?.facts).toMatchObject({ entries: 'swept', entriesKnown: true, limitLps: 5.2 });
    expect(it.size('S1-SF')).toBe('DN 100');
    expect(it.result.pipes.every(({ required }) => required?.least?.label === required?.most?.label)).toBe(true);
  });

  test('R24 the largest branches rule: a small drain at a right angle does not make the stack square', () => {
    const small = `thing X from S6 south 0.5 rise 1:50\ndrain DN 50: X > S6`;
    const it = run(
      europeanTower(floors(12, { west: flat }), { flat: true, more: small }),
      {},
      {
        ...domestic,
        'name:X': { kind: 'lavatory' },
      },
    );
    expect(step(it, 'S1-SF', 'EN-R20')?.facts).toMatchObject({ entries: 'swept' });
  });

  test('R24 one of the largest branches at a fitting that is called square makes the stack square, and known to be', () => {
    const named = europeanTower(floors(12, { west: flat }), { flat: false }).replace(/\bS6\b/g, 'S6square');
    const it = run(named, {}, domestic);
    expect(step(it, 'S1-SF', 'EN-R20')?.facts).toMatchObject({ entries: 'square', entriesKnown: true, limitLps: 5.8 });
    expect([it.size('S1-SF'), it.pipe('S1-SF').required?.least?.label]).toEqual(['DN 125', 'DN 125']);
  });

  test('R24 of swept largest branches one that nobody knows leaves the stack open', () => {
    const named = europeanTower(floors(12, { west: flat })).replace(/\bS(?!6\b)(\d+)\b/g, 'S$1swept');
    const it = run(named, {}, domestic);
    expect(step(it, 'S1swept-SF', 'EN-R20')?.facts).toMatchObject({ entriesKnown: false });
    expect(it.pipe('S1swept-SF').required).toMatchObject({ least: { label: 'DN 100' }, most: { label: 'DN 125' } });
  });

  test('R22 one size from foot to sky; R23 a closet wants DN 100, in system II DN 80', () => {
    const it = run(europeanTower(floors(3, { west: ['closet'] })));
    expect(it.size('S3-S2')).toBe('DN 100');
    expect([it.size('S1-SF'), it.size('S3-VT'), step(it, 'S1-SF', 'EN-R23')?.asks?.label]).toEqual([
      'DN 100',
      'DN 100',
      'DN 100',
    ]);
    expect(run(europeanTower(floors(3, { west: ['closet'] })), { system: 'II' }).size('S1-SF')).toBe('DN 80');
    expect(
      run(europeanTower(floors(3, { west: ['closet'] })), { national: 'din', entries: 'swept' }).size('S1-SF'),
    ).toBe('DN 80');
  });

  test('a stack that ends at its highest branch is said to have no vent', () => {
    expect(
      run(europeanTower(floors(3, { west: ['closet'] }), { stackVent: false })).findings('stack-vent-missing').length,
    ).toBe(1);
    expect(run(europeanTower(floors(3, { west: ['closet'] }))).findings('stack-vent-missing')).toEqual([]);
  });

  test('past the last row no size holds: 21 l/s swept in DN 200', () => {
    // 39 storeys of 12 closets: 936 DU, K 0.7: 21.4 l/s.
    const it = run(europeanTower(floors(39, { west: Array.from({ length: 12 }, () => 'closet') })), {
      K: 0.7,
      entries: 'swept',
    });
    expect([it.pipe('S1-SF').load.most, step(it, 'S1-SF', 'EN-R20')?.asks]).toEqual([936, null]);
    expect(it.pipe('S1-SF').reason).toBe('no size of the table holds the load');
  });
});

describe('Hotel Lindenhof: eight storeys of two bathrooms, K 0.7', () => {
  // Closet 2.0, basin 0.5, bath 0.8: 3.3; sixteen bathrooms 52.8; 0.7 sqrt 52.8 = 5.09 l/s.
  const bathroom = ['lavatory', 'bathtub', 'closet'];
  const hotel = floors(8, { west: bathroom, east: bathroom });

  test('5.09 l/s', () => {
    const it = run(europeanTower(hotel), { K: 0.7 });
    expect(it.pipe('S1-SF').load.most).toBeCloseTo(52.8, 9);
    expect(Number(step(it, 'S1-SF', 'EN-R20')?.facts.flowLps).toFixed(2)).toBe('5.09');
  });

  test('it flips at the entries: DN 100 swept (5.2), DN 125 square (4.0 is past)', () => {
    expect(run(europeanTower(hotel), { K: 0.7 }).size('S1-SF')).toBe('DN 100 to DN 125');
    expect(run(europeanTower(hotel), { K: 0.7, entries: 'swept' }).size('S1-SF')).toBe('DN 100');
    expect(run(europeanTower(hotel), { K: 0.7, entries: 'square' }).size('S1-SF')).toBe('DN 125');
    expect(run(europeanTower(hotel, { ventStack: true }), { K: 0.7, entries: 'square' }).size('S1-VF')).toBe('DN 100');
  });

  test('one question settles it, and outweighs the others', () => {
    const [first] = questionsOf(run(europeanTower(hotel), { K: 0.7 }).result);
    expect(first).toMatchObject({ choices: ['swept', 'square'], answer: { part: 'settings', key: 'entries' } });
    // Eight pipes of the stack and its vent; the drain takes DN 150 either way (5.09 l/s at 1:100, DN 125 carries 3.87).
    expect([first?.about.length, first?.weight]).toEqual([8, 9]);
    const told = questionsOf(run(europeanTower(hotel), { K: 0.7, entries: 'swept' }).result);
    expect(told.some(({ answer }) => answer.key === 'entries')).toBe(false);
  });

  test('explain says which size goes with which entry', () => {
    const { result } = run(europeanTower(hotel), { K: 0.7 });
    expect(explain(result, findInResult(result, 'S1-SF'), []).story.join(' ')).toContain(
      'Its size hangs on how the drains enter the stack: DN 100 swept',
    );
  });

  test('the branch of a bathroom: DN 90 without a vent, in reach', () => {
    const it = run(europeanTower(hotel), { K: 0.7 });
    expect([it.size('J3.w3-S3'), it.findings('branch-too-long').length]).toEqual(['DN 90', 0]);
  });
});

describe('W10 air admittance valves: told, since no model says what a valve is rated for', () => {
  test('on a stack eight times the flow: 3.775 l/s wants 30.2 l/s of air', () => {
    const it = run(europeanTower(floors(10, { west: flat }), { valve: true }), {}, domestic);
    expect(step(it, 'S10-VT', 'EN-R22')?.facts).toMatchObject({ valveAirLps: 30.2 });
  });

  test('on a branch as much as the flow, in systems II and III twice', () => {
    const branch = (system: string) =>
      run(
        `model "A valve"
storey "Ground floor" at 0
node A at 0 0 0.4
kitchen-sink X from A west 0.5 rise 1:50
drain DN 50: X > A > OUT (east 6 fall 1:50)
sewer OUT
vent DN 40: A > AT (up 1)
admittance-valve AT`,
        { system, K: 1 },
      );
    expect(step(branch('I'), 'A-AT', 'EN-R40')?.facts).toMatchObject({ flowLps: 0.894427, valveAirLps: 0.89 });
    // Qtot 0.8 of W10: sum 0.6 in system II, K 1: 0.775 l/s.
    expect(step(branch('II'), 'A-AT', 'EN-R40')?.facts).toMatchObject({ valveAirLps: 1.55 });
  });
});

describe('R43 vents joined into one', () => {
  /** Further stacks of two closets, each 4 m on, whose vents run to `VH` under the roof. */
  const others = (count: number): string =>
    Array.from(
      { length: count },
      (_, at) => `
node Q2.${at} at ${4 * (at + 1)} 0 2.6
node Q1.${at} at ${4 * (at + 1)} 0 -0.4
on "Storey 2"
closet C2.${at} from Q2.${at} east 0.5 rise 1:50
on "Storey 1"
closet C1.${at} from Q1.${at} east 0.5 rise 1:50
drain DN 100: C2.${at} > Q2.${at}
drain DN 100: C1.${at} > Q1.${at}
drain DN 100: Q2.${at} > Q1.${at} > QF.${at} (to -1.64) > OUT
vent DN 100: Q2.${at} > QH.${at} (to 5) > VH`,
    ).join('');
  const joined = (count: number): string =>
    europeanTower(floors(2, { west: ['closet'] }), { more: others(count - 1) }).replace(
      'S2 > VT (to 6.6)',
      'S2 > VH (to 5.1) > VT (to 6.6)',
    );

  test.each([
    // In Germany closets of 6 l stand on DN 80 stacks, bore 75 mm. Two: half of twice 75^2 is 75^2. Three: a bore of 91.9.
    [2, 'din', 'DN 80'],
    [3, 'din', 'DN 100'],
    [3, 'none', 'DN 100'],
  ])('%i stack vents, national rules %s: %s', (count, national, size) => {
    const it = run(joined(count), { national });
    expect([it.role('VH-VT'), it.size('VH-VT')]).toEqual(['vent-header', size]);
  });

  test('R44 without any stack the German drain has a vent of DN 70', () => {
    const bungalow = (vent: string) => `model "Bungalow"
storey "Ground floor" at 0
node A at 0 0 -0.3
node B at 2 2 -0.3
closet X from A south 0.4 rise 1:50
closet X2 from A west 0.7 rise 1:50
closet Y from B north 0.4 rise 1:50
closet Y2 from B west 0.7 rise 1:50
drain DN 100: X > A > M (east 2 fall 1:50) > OUT (east 8 fall 1:50)
drain DN 100: X2 > A
drain DN 100: Y > B > M
drain DN 100: Y2 > B
sewer OUT
${vent}
roof "Roof" from -5 -5 to 20 20 top 3 thick 0.3`;
    const said = (vent: string) => run(bungalow(vent), { national: 'din' }).findings('main-vent-missing').length;
    expect([
      said(''),
      said('vent DN 50: A > T (to 3.6)\nterminal T'),
      said('vent DN 70: A > T (to 3.6)\nterminal T'),
    ]).toEqual([1, 1, 0]);
  });
});

describe('kitchen stacks in Germany (DIN 1986-100): at most four sinks on DN 70', () => {
  const asked = (sinks: number, settings: Settings) =>
    run(europeanTower(floors(sinks, { west: ['kitchen-sink'] })), settings)
      .pipe('S1-SF')
      .trail.find(({ facts }) => facts.kitchenSinks !== undefined);
  test('four may be, five ask DN 80; elsewhere no such limit is known', () => {
    expect(asked(4, { national: 'din' })).toBeUndefined();
    expect(asked(5, { national: 'din' })).toMatchObject({
      asks: { label: 'DN 80' },
      facts: { kitchenSinks: 5, kitchenSinksMost: 4 },
    });
    expect(asked(5, {})).toBeUndefined();
    // System III tells appliances apart, and knows no such limit either.
    expect(asked(5, { system: 'III' })).toBeUndefined();
  });
});
