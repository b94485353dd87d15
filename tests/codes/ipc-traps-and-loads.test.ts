import { describe, expect, test } from 'vitest';
import { questionsOf } from '../../src/schedule/questions.ts';
import { hall, ventedRow } from '../support/rows.ts';
import { runSketch, type SketchRun } from '../support/run-sketch.ts';

// International Plumbing Code 709, 909, 1002: rules IPC-R07 to R14, R39 to R50.
const ft = 0.3048;

/** One fixture with a drawn trap and a level arm of `length` metres, falling `slope`, to the vent joint `J`. */
const arm = (fixture: string, length: number, slope = '1:48', more = ''): SketchRun => {
  const [word = '', ...details] = fixture.split(', ');
  const bore = /trap (.*) in/.exec(fixture)?.[1] ?? '3';
  const inside = word === 'closet';
  return runSketch(
    hall(
      'One trap arm',
      `${inside ? 'node' : 'trap'} T at 0 0 0.5
${word} F from T up 0.2${details.map((detail) => `, ${detail}`).join('')}
drain ${bore} in: F > T > J (east ${length} fall ${slope})
drain ${bore} in: J > D (down 0.9) > OUT (south 4 fall 1:48)
vent 3 in: J > VT (to 4.2)
terminal VT
sewer OUT
${more}`,
    ),
    { code: 'ipc-2021', answers: { settings: { use: 'private' } } },
  );
};
const faults = (run: SketchRun) =>
  run
    .findings()
    .filter(({ clause }) => clause?.startsWith('909'))
    .map(({ code, facts }) => (typeof facts.what === 'string' ? `${code}: ${facts.what}` : code));

describe('R40 length of a fixture drain to its vent: 5, 6, 8, 12, 16 ft (Table 909.1)', () => {
  test.each([
    ['lavatory, trap 1 1/4 in', 5],
    ['kitchen-sink, trap 1 1/2 in', 6],
    ['clothes-washer, trap 2 in', 8],
    ['floor-drain, trap 3 in, untrapped', 12],
    ['floor-drain, trap 4 in, untrapped', 16],
  ])('%s: %s ft holds, a hand more does not', (fixture, feet) => {
    const slope = feet > 8 ? '1:96' : '1:60';
    expect(faults(arm(fixture, feet * ft - 0.002, slope))).toEqual([]);
    expect(faults(arm(fixture, feet * ft + 0.02, slope))).toEqual(['trap-arm-too-long: length']);
  });

  test('W13: 2 in at 1/4 in per ft, 9 ft: too long, and it falls more than 2 in (909.2)', () => {
    expect(faults(arm('clothes-washer, trap 2 in', 9 * ft))).toEqual([
      'trap-arm-too-long: length',
      'trap-arm-too-steep',
    ]);
  });

  test('R41 a closet has no limit: 14 ft', () => {
    expect(faults(arm('closet, tank', 14 * ft))).toEqual([]);
  });

  test('R42 a fall of one diameter holds, more does not: 1½ in over 4 ft', () => {
    // 38.1 mm of fall: 1219 mm at 1:32 is the limit itself.
    expect(faults(arm('kitchen-sink, trap 1 1/2 in', 1.2192, '1:32'))).toEqual([]);
    expect(faults(arm('kitchen-sink, trap 1 1/2 in', 1.2192, '1:30'))).toEqual(['trap-arm-too-steep']);
  });

  test('R43 a vent nearer than two diameters to the weir', () => {
    expect(faults(arm('kitchen-sink, trap 1 1/2 in', 0.08))).toEqual([]);
    expect(faults(arm('kitchen-sink, trap 1 1/2 in', 0.07))).toEqual(['trap-arm-too-long: too short']);
  });
});

test('R47 tailpieces: 24 in of height, 30 in of level pipe (1002.1)', () => {
  const tail = (down: number) =>
    arm('lavatory, trap 1 1/4 in', 0.5).result.fixtures.length === 1
      ? runSketch(
          hall(
            'A tailpiece',
            `lavatory L at 0 0 1.4, trap 1 1/4 in
trap T from L down ${down}
drain 1 1/4 in: L > T > J (east 0.5 fall 1:48) > D (to -0.6) > OUT (east 4 fall 1:48)
vent 3 in: J > VT (to 4.2)
terminal VT
sewer OUT`,
          ),
          { code: 'ipc-2021' },
        ).findings('outlet-pipe-too-long').length
      : -1;
  expect([tail(0.6), tail(0.63)]).toEqual([0, 1]);
});

test('R39 emergency floor drains are not excused from a vent (901.2.1)', () => {
  const run = runSketch(
    hall(
      'A floor drain without a vent',
      `trap T at 0 0 -0.3
floor-drain F from T to 0, emergency, untrapped, trap 3 in
drain 3 in: F > T > OUT (east 4 fall 1:48)
sewer OUT`,
    ),
    { code: 'ipc-2021' },
  );
  expect(run.findings('unvented-trap').map(({ clause }) => clause)).toEqual(['901.2.1']);
});

describe('loads (Table 709.1)', () => {
  const loadOf = (fixture: string, use: string | undefined, detail = {}) => {
    const run = runSketch(ventedRow([fixture]), {
      code: 'ipc-2021',
      answers: { settings: use === undefined ? {} : { use }, fixtures: new Map([['name:F1', { detail }]]) },
    });
    const { least, most } = run.fixture('F1').load;
    return least === most ? most : `${least} to ${most}`;
  };
  test.each([
    ['lavatory, trap 1 1/4 in', 'public', {}, 1],
    ['kitchen-sink, trap 1 1/2 in', 'private', {}, 2],
    ['bathtub, trap 1 1/2 in', 'private', {}, 2],
    ['mop-sink, trap 1 1/2 in', 'public', {}, 2],
    ['drinking-fountain, trap 1 1/4 in', 'public', {}, 0.5],
    ['closet, tank', 'private', {}, 3],
    ['closet, tank', 'public', {}, 4],
    ['closet, tank', undefined, {}, '3 to 4'],
    ['closet, valve', 'public', { flushLitres: 13 }, 6],
    ['closet, tank', 'private', { flushLitres: 13 }, 4],
    ['urinal, washout, trap 2 in', 'public', {}, 2],
    ['urinal, washout, trap 2 in', 'public', { flushLitres: 5.7 }, 4],
    ['urinal, washout, trap 2 in', 'public', { style: 'waterless' }, 0.5],
    ['floor-drain, trap 2 in, untrapped', 'public', {}, 2],
    ['floor-drain, emergency, trap 2 in, untrapped', 'public', {}, 0],
    ['clothes-washer, trap 2 in', 'private', { domestic: true }, 2],
    ['clothes-washer, trap 2 in', 'public', { domestic: false }, 3],
    ['shower, heads 2, trap 2 in', 'public', {}, 2],
    ['shower, heads 4, trap 2 in', 'public', {}, 3],
    // Not in the table: by its trap (Table 709.2).
    ['clinical-sink, trap 3 in', 'public', {}, 5],
    ['clinical-sink, trap 2 in', 'public', {}, 3],
  ])('%s, %s %j: %s', (fixture, use, detail, load) => {
    expect(loadOf(fixture, use, detail)).toBe(load);
  });

  test('continuous flow: 2 for each gallon a minute (709.3): 5 gpm, 0.315 l/s, 10', () => {
    expect(loadOf('floor-drain, trap 2 in, untrapped', 'public', { flow: (5 * 3.785411784 * (1 - 1e-9)) / 60 })).toBe(
      10,
    );
  });

  test('three bowls over one trap are one sink of 2; a dishwasher through it adds nothing', () => {
    const run = runSketch(
      hall(
        'A sink of three bowls',
        `node N from T up 0.15
${[1, 2, 3].map((n) => `kitchen-sink S${n} from N west ${(n - 1) * 0.3} up 0.2, trap 1 1/2 in\ndrain 1 1/2 in: S${n} > N`).join('\n')}
dishwasher DW from N east 0.4 up 0.1, trap 1 1/2 in
drain 1 1/2 in: DW > N
trap T at 0 0 0.5, 1 1/2 in
drain 1 1/2 in: N > T > J (east 0.8 fall 1:48) > F (to -0.4) > OUT (east 4 fall 1:48)
vent 3 in: J > VT (to 4.2)
terminal VT
sewer OUT`,
      ),
      { code: 'ipc-2021' },
    );
    expect(run.pipe('T-J').load).toEqual({ least: 2, most: 2 });
  });
});

describe('R07 water closets count by private or public use: where nobody says which, that is asked once', () => {
  const done = (settings: object = {}, code = 'ipc-2021') =>
    runSketch(ventedRow(['closet, tank', 'closet, tank', 'lavatory, trap 1 1/4 in']), {
      code,
      answers: { settings } as never,
    });

  test('two closets: one finding, one question, loads of 3 to 4', () => {
    const open = done();
    expect(open.findings('fixture-unidentified')).toEqual([]);
    expect(open.findings('use-unknown').map(({ about, facts }) => [about.length, facts.uses])).toEqual([
      [2, 'private, public'],
    ]);
    expect(open.fixture('F1').load).toEqual({ least: 3, most: 4 });
    const asked = questionsOf(open.result).filter(({ answer }) => answer.part !== 'batteries');
    expect(asked.map(({ choices, answer }) => [choices, answer.key])).toEqual([[['private', 'public'], 'use']]);
  });
  test('the use said, nothing is open', () => {
    expect(done({ use: 'private' }).findings('use-unknown')).toEqual([]);
    expect(done({ use: 'private' }).fixture('F1').load).toEqual({ least: 3, most: 3 });
  });
  test('the Uniform Plumbing Code has a third use, assembly, which is never guessed', () => {
    const [found] = done({}, 'upc-2021').findings('use-unknown');
    expect(found?.facts.uses).toBe('private, public, assembly');
    expect(found?.sentence).toContain('of private and public use');
  });
});
