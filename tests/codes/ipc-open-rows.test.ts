import { describe, expect, test } from 'vitest';
import { bringing } from '../support/flows.ts';
import { armOf, hall, times } from '../support/rows.ts';
import { type RunOptions, runSketch } from '../support/run-sketch.ts';
import { at48 } from '../support/stack-rows.ts';

// International Plumbing Code 913, 915 and 917: waste stacks, combination waste and vent, single stacks. Tables 913.4
// (interval, total): 1½ in 1, 2; 2 in 2, 4; 2½ in -, 8; 3 in -, 24; 4 in -, 50. Table 915.2.2 (to branch or stack, to
// building drain): 2 in 3, 4; 2½ in 6, 26; 3 in 12, 31; 4 in 20, 50. Table 917.2 below 75 ft: 3 in 24, 4 in 225, 5 in 480.
const sink = 'kitchen-sink, trap 1 1/2 in';
const lavatory = 'lavatory, trap 1 1/4 in';
const run = (text: string, options: RunOptions['answers'] = {}, settings: Record<string, unknown> = {}) =>
  runSketch(at48(text), {
    code: 'ipc-2021',
    answers: { settings: { use: 'private', ...settings } as never, ...options },
  });

/** One fixture a storey on a stack, each by its own level drain, none with a vent; the stack goes on to the roof. */
const plainStack = (fixtures: readonly string[], reach = 0.6, height = 3) => {
  const top = fixtures.length;
  const storeys = fixtures.map((_, at) => at + 1);
  return `model "A stack without vents"
${storeys.map((n) => `storey "Storey ${n}" at ${(n - 1) * height}`).join('\n')}
${storeys.map((n) => `node S${n} at 0 0 ${(n - 1) * height - 0.3}`).join('\n')}
drain 4 in: ${[...storeys]
    .reverse()
    .map((n) => `S${n}`)
    .join(' > ')} > SF (to -1.6) > OUT (east 9 fall 1:48)
sewer OUT
${storeys
  .map((n) => {
    const [word = '', ...details] = fixtures[n - 1]!.split(', ');
    const inside = word === 'closet';
    const bore = /trap (.*) in/.exec(fixtures[n - 1]!)?.[1] ?? '3';
    return `on "Storey ${n}"
${inside ? 'node' : 'trap'} T${n} from S${n} south ${reach} rise 1:48
${word} F${n} from T${n} up 0.3${details.map((detail) => `, ${detail}`).join('')}
drain ${bore} in: F${n} > T${n} > S${n}`;
  })
  .join('\n')}
vent 4 in: S${top} > VT (to ${top * height + 0.8})
terminal VT
roof "Roof" from -20 -20 to 20 20 top ${top * height} thick 0.3
`;
};

describe('waste stack vents (913, R59 to R61)', () => {
  test('W15: eight floors of one kitchen sink, 16: 3 in from foot to roof', () => {
    const done = run(plainStack(times(8, sink)));
    expect(done.result.batteries.map(({ reading, broken }) => [reading, broken])).toEqual([['waste-stack-vent', []]]);
    for (const pipe of ['S8-S7', 'S2-S1', 'S1-SF'])
      expect([done.role(pipe), done.size(pipe)]).toEqual(['waste-stack-vent', '3 in']);
    expect([done.role('S8-VT'), done.size('S8-VT')]).toEqual(['stack-vent', '3 in']);
    expect(done.findings('unvented-trap')).toEqual([]);
    // Eight intervals would ask other stacks for a vent stack.
    expect(done.findings('vent-stack-missing')).toEqual([]);
    expect(done.fixture('F1').ventedBy.how).toBe('waste-stack-vent');
  });

  test.each([
    { fixtures: times(2, lavatory), size: '1½ in', why: '1 an interval and 2 in all: both limits' },
    { fixtures: times(3, lavatory), size: '2 in', why: '3 in all past 2' },
    { fixtures: times(2, sink), size: '2 in', why: '2 an interval and 4 in all: both limits' },
    { fixtures: times(3, sink), size: '2½ in', why: '6 in all past 4' },
    { fixtures: times(4, sink), size: '2½ in', why: '8, the limit' },
    { fixtures: times(5, sink), size: '3 in', why: '10 past 8' },
    { fixtures: times(12, sink), size: '3 in', why: '24, the limit' },
    { fixtures: times(13, sink), size: '4 in', why: '26 past 24' },
  ])('$why: $size', ({ fixtures, size }) => {
    expect(run(plainStack(fixtures)).size('S1-SF')).toBe(size);
  });

  test('past its last row it is none: 100 on 6 in', () => {
    const done = run(plainStack(times(3, sink)), bringing({ F1: 97 }));
    expect(done.result.batteries.some(({ reading }) => reading === 'waste-stack-vent')).toBe(false);
    expect(run(plainStack(times(3, sink)), bringing({ F1: 96 })).size('S1-SF')).toBe('6 in');
  });

  test('a urinal or a closet bars it: the stack is then read as a single stack', () => {
    const done = run(plainStack([sink, 'urinal, washout, trap 2 in', sink]));
    const [row] = done.result.batteries;
    expect(row?.reading).toBe('single-stack');
    expect(row?.others.find(({ reading }) => reading === 'waste-stack-vent')?.broken.map(({ rule }) => rule)).toEqual([
      'IPC-R59',
    ]);
  });

  test('nor may one with a vent of its own drain into it (913.2)', () => {
    const vented = plainStack(times(3, sink)).replace(
      'vent 4 in: S3',
      `node Q from S2 north 0.8 rise 1:48
trap TU from Q north 0.4 rise 1:48
urinal U from TU up 0.3, washout, trap 2 in
drain 2 in: U > TU > Q > S2
vent 1 1/2 in: Q > QV (to 12)
terminal QV
vent 4 in: S3`,
    );
    const [row] = run(vented).result.batteries;
    const asWaste = [{ reading: row!.reading, broken: row!.broken }, ...row!.others].find(
      ({ reading }) => reading === 'waste-stack-vent',
    );
    expect(asWaste?.broken.map(({ rule }) => rule)).toEqual(['IPC-R59']);
  });
});

describe('single stacks (917, R95, R96)', () => {
  const closets = (count: number) => times(count, 'closet, tank');

  test('PE-like case of R95: 60 ft and 120: 4 in (225); the stack vent as large', () => {
    const done = run(plainStack(closets(6), 0.4), bringing({}), { use: 'public' });
    expect(done.result.batteries[0]).toMatchObject({ reading: 'single-stack', broken: [] });
    // 24 fits 3 in, six closets do not (two at most): 4 in.
    expect([done.pipe('S1-SF').load.most, done.size('S1-SF'), done.size('S6-VT')]).toEqual([24, '4 in', '4 in']);
    expect(done.role('S3-S2')).toBe('single-stack');
  });

  test('two closets on 3 in; within 18 in of the stack their drain is 3 in, farther 4 in', () => {
    expect(run(plainStack(closets(2), 0.4)).size('S1-SF')).toBe('3 in');
    expect([run(plainStack(closets(2), 0.4)).size('T1-S1'), run(plainStack(closets(2), 1)).size('T1-S1')]).toEqual([
      '3 in',
      '4 in',
    ]);
  });

  test('closets at most 8 ft, others at most 12 ft from it', () => {
    const vented = (fixture: string, reach: number) =>
      run(plainStack([fixture, fixture, 'closet, tank'].reverse(), reach)).findings('unvented-trap').length;
    expect(vented('lavatory, trap 1 1/4 in', 2.4)).toBe(0);
    expect(vented('closet, tank', 2.5)).toBeGreaterThan(0);
  });
});

test('a floor drain that joins the building drain past the foot stands on no stack: its trap has no vent (901.2.1)', () => {
  const text = plainStack(times(3, sink)).replace(
    '> OUT (east 9 fall 1:48)\nsewer OUT',
    `> B (east 3 fall 1:48) > OUT (east 6 fall 1:48)
sewer OUT
on "Storey 1"
trap TD from B north 0.6 rise 1:48, 2 in
floor-drain FD from TD up 0.3, untrapped, trap 2 in
drain 2 in: FD > TD > B`,
  );
  const done = run(text);
  expect(done.fixture('FD').ventedBy.how).toBe('unvented');
  expect(done.findings('unvented-trap').map(({ clause }) => clause)).toEqual(['901.2.1']);
  expect(done.result.batteries.map(({ reading }) => reading)).toEqual(['waste-stack-vent']);
});

describe('combination waste and vent (915, R89 to R93)', () => {
  /** Floor drains on a level pipe whose dry vent stands past the last, which then drops to the building drain. */
  const floorDrains = (count: number, what = 'floor-drain, trap 2 in', slope = '1:48') =>
    hall(
      'A combination pipe',
      `node J1 at 0 0 -0.4
drain 3 in: J1${Array.from({ length: count - 1 }, (_, n) => ` > J${n + 2} (east 0.7 fall ${slope})`).join('')} > V (east 0.7 fall ${slope}) > K (east 0.7 fall ${slope}) > BF (to -1.6) > OUT (east 9 fall 1:48)
${times(count, what)
  .map((one, n) => armOf(n + 1, one))
  .join('')}
vent 2 in: V > VT (to 4.2)
terminal VT
sewer OUT`,
    );

  test('W16: five floor drains, 10, to the building drain: 3 in (2½ in where used); vent 1½ in', () => {
    const done = run(floorDrains(5), {}, { omitSizes: ['2½ in'] });
    expect(done.result.batteries.map(({ reading, broken }) => [reading, broken])).toEqual([
      ['combination-waste-and-vent', []],
    ]);
    expect([done.role('J4-J5'), done.size('J5-V'), done.role('V-VT'), done.size('V-VT')]).toEqual([
      'combination-waste-and-vent',
      '3 in',
      'continuous-vent',
      '1½ in',
    ]);
    expect(done.findings('unvented-trap')).toEqual([]);
    expect(run(floorDrains(5)).size('J5-V')).toBe('2½ in');
  });

  const at = (load: number) => run(floorDrains(3), bringing({ F1: load - 4 }));
  const tableAsks = (load: number) =>
    at(load)
      .pipe('J3-V')
      .trail.find(({ rule }) => rule === 'IPC-R91')?.asks?.label;

  test.each([
    [4, '2 in'],
    [5, '2½ in'],
    [26, '2½ in'],
    [27, '3 in'],
    [31, '3 in'],
    [32, '4 in'],
    [50, '4 in'],
    [51, '5 in'],
    [575, '6 in'],
  ])('%s to the building drain: %s by Table 915.2.2', (load, size) => {
    expect(tableAsks(load)).toBe(size);
  });

  test('past the last row it is none: its traps have no vent', () => {
    expect(at(576).findings('unvented-trap').length).toBeGreaterThan(0);
  });

  test('it is a drain as well: 26 at 1/4 in per ft is 3 in by Table 710.1(1), where 2½ in has 24', () => {
    expect(at(26).size('J3-V')).toBe('3 in');
  });

  test('a urinal may not be in it; nor may it fall more than 1/2 in per ft', () => {
    expect(run(floorDrains(3, 'urinal, washout, trap 2 in')).findings('unvented-trap')).toHaveLength(3);
  });
});
