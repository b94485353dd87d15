import { describe, expect, test } from 'vitest';
import { bringing } from '../support/flows.ts';
import { armOf, hall, times } from '../support/rows.ts';
import { type RunOptions, runSketch, type SketchRun } from '../support/run-sketch.ts';
import { at48 } from '../support/stack-rows.ts';
import { tower } from '../support/towers.ts';

// Uniform Plumbing Code 703.2, 904 to 911 and 1002: rules UPC-R22, R26, R34 to R39, R57 to R73. Lengths in feet.
const ft = 0.3048;
const drain = 'floor-drain, trap 2 in';
const lavatory = 'lavatory, trap 1 1/4 in';
const closet = 'closet, tank';
const run = (
  text: string,
  options: RunOptions['answers'] = {},
  settings: Record<string, unknown> = {},
  code = 'upc-2021',
) => runSketch(at48(text), { code, answers: { settings: { use: 'private', ...settings } as never, ...options } });
const clauses = (done: SketchRun, code: string) => done.findings(code).map(({ clause }) => clause);

describe('R57 to R60 sizes and lengths of vents (Table 703.2)', () => {
  /** One floor drain and its vent: `level` metres under the roof, the rest upright. */
  const vent = (load: number, level: number, upright = 4.6, settings = {}) =>
    run(
      hall(
        'One vent',
        `node J at 0 0 -0.4
drain 3 in: J > K (east 0.8 fall 1:48) > BF (to -1.2) > OUT (east 9 fall 1:48)
trap T from J south 0.4 rise 1:48
floor-drain F from T to 0, untrapped, trap 2 in
drain 2 in: F > T > J
vent 3 in: J > VA (to ${upright - 2}) > VB (east ${level} rise 1:1000) > VT (to ${upright - 0.4})
terminal VT
sewer OUT`,
      ),
      bringing({ F: load }),
      settings,
    );
  test.each([
    [1, '1¼ in'],
    [2, '1½ in'],
    [8, '1½ in'],
    [9, '2 in'],
    [24, '2 in'],
    [25, '2½ in'],
    [48, '2½ in'],
    [49, '3 in'],
    [84, '3 in'],
    [85, '4 in'],
    [256, '4 in'],
    [257, '5 in'],
    [1380, '6 in'],
    [3600, '8 in'],
  ])('%s units: %s', (load, size) => {
    const step = vent(load, 0.5)
      .pipe('J-VA')
      .trail.find(({ rule }) => rule === 'UPC-R57');
    expect(step?.asks?.label).toBe(size);
  });

  test('past the last row, 3600, there is no size', () => {
    expect(vent(3601, 0.5).size('J-VA')).toBe('none');
  });

  test('R58 half of the drain that it joins: 20 on 3 in asks no more than 2 in; 300 on 5 in 2½ in', () => {
    const step = vent(300, 0.5)
      .pipe('J-VA')
      .trail.find(({ rule }) => rule === 'UPC-R58');
    expect([step?.facts.drain, step?.asks?.label]).toEqual(['5 in', '2½ in']);
  });

  test('W12: 20 units, 110 ft, 50 ft of it level: past a third of 120 ft; one size larger has no limit: 2½, or 3 in', () => {
    const long = (settings = {}) => vent(20, 50 * ft, 60 * ft, settings);
    expect(long().pipe('J-VA').developedLength! / ft).toBeCloseTo(110, 0);
    expect(long().size('J-VA')).toBe('2½ in');
    expect(long({ omitSizes: ['2½ in'] }).size('J-VA')).toBe('3 in');
    expect(
      long()
        .pipe('J-VA')
        .trail.find(({ rule }) => rule === 'UPC-R60')?.facts,
    ).toMatchObject({ leastSize: '2 in', oneSizeUp: true });
    // 39 ft of it level is within the third.
    expect(vent(20, 39 * ft, 71 * ft).size('J-VA')).toBe('2 in');
  });

  test('too long as a whole: 121 ft of 2 in', () => {
    expect([vent(20, 20 * ft, 99 * ft).size('J-VA'), vent(20, 20 * ft, 101.5 * ft).size('J-VA')]).toEqual([
      '2 in',
      '2½ in',
    ]);
  });

  test('R59 a closet’s vent is 2 in: 3 units would fit 1½ in', () => {
    const done = run(
      hall(
        'A closet',
        `node J1 at 0 0 -0.4\ndrain 3 in: J1 > K (east 1 fall 1:48) > BF (to -1.2) > OUT (east 9 fall 1:48)${armOf(1, closet, { vented: true })}\nsewer OUT`,
      ),
    );
    expect(done.size('V1-VT1')).toBe('2 in');
  });
});

describe('R61 W13 all vents together are as large as the sewer that the load requires (904.1)', () => {
  /** Three, or four, single vents of the sizes drawn over a branch that asks for 4 in. */
  const vents = (sizes: readonly string[]) =>
    run(
      hall(
        'Vents through the roof',
        `node J1 at 0 0 -0.4
drain 4 in: J1${sizes
          .slice(1)
          .map((_, n) => ` > J${n + 2} (east 0.7 fall 1:48)`)
          .join('')} > K (east 0.7 fall 1:48) > BF (to -1.2) > OUT (east 9 fall 1:48)
${sizes.map((size, n) => armOf(n + 1, lavatory, { vented: true }).replace('vent 1 1/2 in', `vent ${size} in`)).join('')}
sewer OUT`,
      ),
      bringing({ F1: 40 }),
    );
  test('3, 2 and 1½ in: 11.98 of 12.57 sq in; a second 1½ in makes 13.74', () => {
    const three = vents(['3', '2', '1 1/2']);
    expect(three.size('BF-OUT')).toBe('4 in');
    expect(clauses(three, 'vent-area-too-small')).toEqual(['904.1']);
    expect(three.findings('vent-area-too-small')[0]?.sentence).toContain('77.27 cm² together, less than the 81.07 cm²');
    expect(vents(['3', '2', '1 1/2', '1 1/2']).findings('vent-area-too-small')).toEqual([]);
  });
  test('the sewer that the load requires counts, not the one drawn', () => {
    const light = run(
      hall(
        'One vent',
        `node J1 at 0 0 -0.4\ndrain 4 in: J1 > K (east 1 fall 1:48) > BF (to -1.2) > OUT (east 9 fall 1:48)${armOf(1, lavatory, { vented: true })}\nsewer OUT`,
      ),
    );
    expect([light.size('BF-OUT'), light.findings('vent-area-too-small')]).toEqual(['1¼ in', []]);
  });
});

describe('R62, R63 W15 tall stacks (907)', () => {
  const storeys = (count: number) => times(count, '').map(() => [closet, lavatory]);
  test('ten storeys ask for a vent stack, nine do not', () => {
    expect(clauses(run(tower(storeys(10))), 'vent-stack-missing')).toEqual(['907.1']);
    expect(run(tower(storeys(9))).findings('vent-stack-missing')).toEqual([]);
  });
  test('twelve storeys: yoke vents at the fifth and the tenth from the top, as the smaller of stack and vent stack', () => {
    const done = run(tower(storeys(12), { ventStack: true, yokes: [8, 3] }), {}, { omitSizes: ['2½ in'] });
    expect([done.findings('vent-stack-missing'), done.findings('yoke-vent-missing')]).toEqual([[], []]);
    expect([done.size('S1-VF'), done.size('VF-VB'), done.role('Y8-W8')]).toEqual(['4 in', '3 in', 'yoke-vent']);
    expect(done.pipe('Y8-W8').trail.find(({ rule }) => rule === 'UPC-R63')?.asks?.label).toBe('3 in');
    const missing = run(tower(storeys(12), { ventStack: true }));
    expect(missing.findings('yoke-vent-missing').map(({ facts }) => facts.storey)).toEqual([2, 7]);
  });
});

describe('trap arms (1002.2, R35 to R38)', () => {
  const arm = (fixture: string, length: number, more = '') => {
    const [word = '', ...details] = fixture.split(', ');
    const bore = /trap (.*) in/.exec(fixture)?.[1] ?? '3';
    return runSketch(
      hall(
        'One trap arm',
        `${word === 'closet' ? 'node' : 'trap'} T at 0 0 0.5
${word} F from T up 0.1${details.map((detail) => `, ${detail}`).join('')}
drain ${bore} in: F > T > ${more}J (east ${length} fall 1:48)
drain ${bore} in: J > D (down 0.9) > OUT (south 4 fall 1:48)
vent 3 in: J > VT (to 4.2)
terminal VT
sewer OUT`,
      ),
      { code: 'upc-2021', answers: { settings: { use: 'public' } } },
    );
  };
  const faults = (run: SketchRun) =>
    run
      .findings()
      .filter(({ clause }) => clause?.startsWith('1002'))
      .map(({ code, facts }) => (code === 'trap-arm-too-long' ? String(facts.what) : code));
  test.each([
    ['lavatory, trap 1 1/4 in', 2.5],
    ['bathtub, trap 1 1/2 in', 3.5],
    ['urinal, washout, trap 2 in', 5],
    ['floor-drain, trap 3 in, untrapped', 6],
    ['floor-drain, trap 4 in, untrapped', 10],
  ])('%s: %s ft', (fixture, feet) => {
    expect(faults(arm(fixture, feet * ft - 0.002))).toEqual([]);
    expect(faults(arm(fixture, feet * ft + 0.02))).toEqual(['length']);
  });
  test('W11: 1½ in, 4 ft: too long here', () => {
    expect(faults(arm('bathtub, trap 1 1/2 in', 4 * ft))).toEqual(['length']);
  });
  test('two diameters at least', () => {
    expect(faults(arm('bathtub, trap 1 1/2 in', 0.07))).toEqual(['too short']);
  });
  test('R36 a closet within 6 ft, 1.83 m, of its ring: 0.1 m down and along', () => {
    expect([faults(arm('closet, tank', 1.7)), faults(arm('closet, tank', 1.76))]).toEqual([[], ['length']]);
  });
  test('R37 two quarter bends ask for a cleanout, one does not; 135 degrees from 3 in on', () => {
    const bends = '(east 0.3 fall 1:48) > (south 0.3 fall 1:48) > ';
    const turned = (fixture: string, path: string) =>
      arm(fixture, 0.3, path)
        .findings('cleanout-missing')
        .flatMap(({ clause, facts }) => (facts.what === 'trap arm' ? [clause] : []));
    expect(turned('urinal, washout, trap 2 in', '(south 0.3 fall 1:48) > ')).toEqual([]);
    expect(turned('urinal, washout, trap 2 in', bends)).toContain('1002.3');
  });
});

describe('R26 suds (711.1): no drain within 8 ft of the foot of a kitchen stack of three storeys', () => {
  const sink = 'kitchen-sink, trap 1 1/2 in';
  test('the lowest branch 1.2 m above the foot: warned of; two storeys, or no suds, are none', () => {
    expect(clauses(run(tower([[sink, sink], [sink], [sink]])), 'suds-zone')).toEqual(['711.1']);
    expect(run(tower([[sink, sink], [sink]])).findings('suds-zone')).toEqual([]);
    expect(run(tower([[lavatory, lavatory], [lavatory], [lavatory]])).findings('suds-zone')).toEqual([]);
    expect(run(tower([[], [sink, sink], [sink], [sink]])).findings('suds-zone')).toEqual([]);
  });
});

describe('R71, R73 island vents and valves', () => {
  const island = (fixture: string, end = 'terminal VT') =>
    hall(
      'An island',
      `trap T at 0 0 0.4
${fixture} F from T up 0.2, trap 1 1/2 in
drain 2 in: F > T > J (east 0.3 fall 1:48) > D (to -0.4) > K (east 2 fall 1:48) > OUT (east 6 fall 1:48)
vent 1 1/2 in: J > UP (up 0.5) > A (south 0.4) > DN (to -0.3) > W (south 3 rise 1:48) > VT (to 4.2)
${end}
sewer OUT`,
    );
  test('an island sink of 2 units: vent 1½ in (909.1); a shower may not', () => {
    const done = run(island('kitchen-sink'));
    expect([done.role('J-UP'), done.size('J-UP'), done.findings('island-vent-not-allowed')]).toEqual([
      'island-vent',
      '1½ in',
      [],
    ]);
    expect(clauses(run(island('shower')), 'island-vent-not-allowed')).toEqual(['909.1']);
  });
  test.each(['upc-2015', 'upc-2018', 'upc-2021', 'upc-2024'])('%s: a valve is for the authority to decide', (code) => {
    const done = run(island('kitchen-sink', 'admittance-valve VT'), {}, {}, code);
    expect(done.findings('valve-needs-approval').map(({ severity }) => severity)).toEqual(['warning']);
  });
});

describe('R72 combination waste and vent (910): by approval, two sizes up', () => {
  const floorDrains = hall(
    'A combination pipe',
    `node J1 at 0 0 -0.4
drain 4 in: J1 > J2 (east 0.7 fall 1:48) > J3 (east 0.7 fall 1:48) > V (east 0.7 fall 1:48) > K (east 0.7 fall 1:48) > BF (to -1.6) > OUT (east 9 fall 1:48)
${[1, 2, 3].map((n) => armOf(n, drain)).join('')}
vent 2 in: V > VT (to 4.2)
terminal VT
sewer OUT`,
  );
  test('not approved: its traps have no vent', () => {
    expect(run(floorDrains).findings('unvented-trap')).toHaveLength(3);
  });
  test('approved (setting): 6 units ask 2 in, two sizes up 3 in', () => {
    const done = run(floorDrains, {}, { combinationApproved: true });
    expect(done.findings('unvented-trap')).toEqual([]);
    expect([done.role('J3-V'), done.size('J3-V')]).toEqual(['combination-waste-and-vent', '3 in']);
  });
});

test('R22 one vent at the joint of two drains; three are one too many', () => {
  const joint = (count: number) =>
    run(
      hall(
        'Drains at one joint',
        `node J at 0 0 -0.4
drain 3 in: J > K (east 0.8 fall 1:48) > BF (to -1.2) > OUT (east 9 fall 1:48)
${['south', 'north', 'west']
  .slice(0, count)
  .map(
    (side, n) =>
      `trap T${n} from J ${side} 0.4 rise 1:48\nbathtub F${n} from T${n} to 0, trap 1 1/2 in\ndrain 1 1/2 in: F${n} > T${n} > J`,
  )
  .join('\n')}
vent 2 in: J > VT (to 4.2)
terminal VT
sewer OUT`,
      ),
    );
  expect([joint(2).role('J-VT'), joint(2).findings('common-vent-not-allowed')]).toEqual(['dual-vent', []]);
  expect(clauses(joint(3), 'common-vent-not-allowed')).toEqual(['704.2, 905.6']);
});

test('R70 where frost may close a vent, one below 2 in through the roof is noted (906.7, setting)', () => {
  const text = tower([[closet], [closet]]).replaceAll('vent 3 in: S2', 'vent 1 1/2 in: S2');
  const noted = (settings: Record<string, unknown>) => clauses(run(text, {}, settings), 'frost-enlargement-missing');
  expect(new Set(noted({ frostEnlargement: true }))).toEqual(new Set(['906.7']));
  expect(noted({})).toEqual([]);
});
