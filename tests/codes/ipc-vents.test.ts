import { describe, expect, test } from 'vitest';
import { questionsOf } from '../../src/schedule/questions.ts';
import { bringing } from '../support/flows.ts';
import { hall, times } from '../support/rows.ts';
import { type RunOptions, runSketch } from '../support/run-sketch.ts';
import { at48 } from '../support/stack-rows.ts';
import { tower } from '../support/towers.ts';

// International Plumbing Code 904 to 908 and 918: rules IPC-R71 to R82, R85, R97 to R99. Lengths of Table 906.1 in feet.
const drain = 'floor-drain, trap 2 in';
const lavatory = 'lavatory, trap 1 1/4 in';
const closet = 'closet, tank';
const ft = 0.3048;
const run = (text: string, options: RunOptions['answers'] = {}, settings: Record<string, unknown> = {}) =>
  runSketch(at48(text), {
    code: 'ipc-2021',
    answers: { settings: { use: 'public', ...settings } as never, ...options },
  });
const clauses = (done: ReturnType<typeof run>, code: string) => done.findings(code).map(({ clause }) => clause);

describe('R71 the vent of a stack: by its size, load and length (Table 906.1)', () => {
  /** A stack of two storeys with so many units, its vent led `level` metres aside under the roof. */
  const stack = (load: number, level: number, size: string) => {
    const text = tower([[], [drain, drain], [drain, drain]], { stack: size }).replace(
      /vent 3 in: S3 > VH \(to [\d.]+\) > VT \(to [\d.]+\)/,
      `vent 3 in: S3 > VH (up 1) > VG (south ${level} rise 1:1000) > VT (to 9.8)`,
    );
    return run(text, bringing({ 'F2.1': load / 2 - 2, 'F3.1': load / 2 - 2 }));
  };
  // From S3 at 5.6 m: 1 m up, aside, and up to 9.8 m: 4.2 m and the level part, which rises a thousandth.
  const levelFor = (feet: number) => (feet * ft - 4.2) / 0.999;

  test.each([
    { stackSize: '2 in', load: 10, feet: 29, vent: '1¼ in', why: '2 in, row 12: 1¼ in reaches 30 ft' },
    { stackSize: '2 in', load: 10, feet: 31, vent: '1½ in', why: '… past 30 ft, 75' },
    { stackSize: '3 in', load: 21, feet: 31, vent: '1½ in', why: '3 in, 21: 1½ in 32 ft' },
    { stackSize: '3 in', load: 21, feet: 33, vent: '2 in', why: '… past it' },
    { stackSize: '3 in', load: 40, feet: 93, vent: '2 in', why: '3 in, row 53: 2 in 94 ft' },
    { stackSize: '3 in', load: 40, feet: 95, vent: '2½ in', why: '… past it' },
  ])('$why: $vent', ({ load, feet, vent, stackSize }) => {
    const done = stack(load, levelFor(feet), '4 in');
    const step = done.pipe('S3-VH').trail.find(({ rule }) => rule === 'IPC-R71');
    expect([step?.facts.stackSize, step?.asks?.label]).toEqual([stackSize, vent]);
    expect(done.pipe('S3-VH').developedLength! / ft).toBeCloseTo(feet, 0);
  });

  test('W09: stack 4 in of 66, 40 ft: 2½ in, or 3 in where that is left out', () => {
    const text = (level: number) =>
      tower(times(3, '').map(() => [...times(5, closet), lavatory, lavatory])).replace(
        /vent 3 in: S3 > VH \(to [\d.]+\) > VT \(to [\d.]+\)/,
        `vent 3 in: S3 > VH (up 1) > VG (south ${level} rise 1:1000) > VT (to 9.8)`,
      );
    const done = run(text(levelFor(40)));
    expect([done.pipe('S3-VH').ventLoad?.most, done.size('S3-VH')]).toEqual([66, '2½ in']);
    expect(run(text(levelFor(40)), {}, { omitSizes: ['2½ in'] }).size('S3-VH')).toBe('3 in');
  });

  test('half of the stack at least: 4 in asks 2 in however short', () => {
    const done = run(tower([[closet, closet], times(6, closet)]));
    expect([
      done.size('S1-SF'),
      done.pipe('S2-VH').trail.find(({ rule }) => rule === 'IPC-R71-half')?.asks?.label,
    ]).toEqual(['4 in', '2 in']);
  });
});

describe('R75, R76 vent stacks: from five branch intervals on, from the foot', () => {
  const storeys = (count: number) => times(count, '').map(() => [closet, closet, lavatory, lavatory]);

  test('W08: five storeys of 10: vent stack needed, 2 in for 80 ft or less (row 53: 94 ft)', () => {
    const done = run(tower(storeys(5), { ventStack: true }));
    expect([done.role('VF-VB'), done.size('VF-VB')]).toEqual(['vent-stack', '2 in']);
    expect(done.findings('vent-stack-missing')).toEqual([]);
  });

  test('without it: missing from the fifth interval on; four need none', () => {
    expect(clauses(run(tower(storeys(5))), 'vent-stack-missing')).toEqual(['904.2']);
    expect(run(tower(storeys(4))).findings('vent-stack-missing')).toEqual([]);
  });

  test('its foot at most ten stack sizes along the drain: 30 in of a 3 in stack', () => {
    const along = (distance: number) =>
      tower(storeys(5))
        .replace('> OUT (east 9 fall 1:50)', `> VF (east ${distance} fall 1:48) > OUT (east 8 fall 1:48)`)
        .replace('\nterminal VT\n', '\nterminal VT\nvent 3 in: VF > VB (to 15.15) > VH\n');
    expect(run(along(0.7)).findings('vent-stack-misplaced')).toEqual([]);
    expect(clauses(run(along(0.9)), 'vent-stack-misplaced')).toEqual(['904.4']);
  });
});

test('R81 beyond ten intervals a relief vent at every tenth from the top, as large as the vent stack (908)', () => {
  const storeys = times(12, '').map(() => [drain, drain]);
  expect(clauses(run(tower(storeys, { ventStack: true })), 'yoke-vent-missing')).toEqual(['908.1, 908.2']);
  const done = run(tower(storeys, { ventStack: true, yokes: [3] }));
  expect(done.findings('yoke-vent-missing')).toEqual([]);
  expect([done.role('Y3-W3'), done.size('Y3-W3')]).toEqual(['yoke-vent', done.size('VF-VB')]);
  expect(run(tower(storeys.slice(2), { ventStack: true })).findings('yoke-vent-missing')).toEqual([]);
});

describe('R72, R73 other vents: half of the required drain, one size up above 40 ft (906.2)', () => {
  const one = (fixture: string, level: number) =>
    run(
      hall(
        'One vent',
        `node J at 0 0 -0.4
drain 3 in: J > K (east 0.8 fall 1:48) > BF (to -1.2) > OUT (east 9 fall 1:48)
${fixture.startsWith('closet') ? 'node' : 'trap'} T from J south 0.4 rise 1:48
${fixture.split(', ')[0]} F from T to 0, ${fixture.split(', ').slice(1).join(', ')}
drain ${/trap (.*) in/.exec(fixture)?.[1] ?? '3'} in: F > T > J
vent 2 in: J > VA (to 2.6) > VB (east ${level} rise 1:1000) > VT (to 4.2)
terminal VT
sewer OUT`,
      ),
    );
  const upright = 4.6;
  test.each([
    { fixture: lavatory, short: '1¼ in', long: '1½ in', why: 'drain 1½ in: half is less than 1¼' },
    { fixture: drain, short: '1¼ in', long: '1½ in', why: 'trap 2 in' },
    { fixture: closet, short: '1½ in', long: '2 in', why: 'closet: 3 in' },
    { fixture: 'shower, heads 12, trap 4 in', short: '2 in', long: '2½ in', why: 'trap 4 in' },
  ])('$why: $short, past 40 ft $long', ({ fixture, short, long }) => {
    expect(one(fixture, 40 * ft - upright - 0.02).size('J-VA')).toBe(short);
    expect(one(fixture, 40 * ft - upright + 0.05).size('J-VA')).toBe(long);
  });

  test('PE-30: a vent of 50 ft on a 3 in drain is 2 in; the table by units that a page quotes does not exist', () => {
    expect(one(closet, 50 * ft - upright).size('J-VA')).toBe('2 in');
  });
});

describe('R78 one vent to open air, half of the building drain (904.1)', () => {
  test('a 4 in drain: the vent of its heaviest stack becomes 2 in', () => {
    const done = run(
      tower([
        [drain, drain],
        [drain, drain],
      ]),
      bringing({ 'F1.1': 17, 'F2.1': 17 }),
    );
    // 38: the drain is 3 in at 1/4, its vent 1½ in.
    expect([done.size('SF-OUT'), done.findings('main-vent-missing')]).toEqual(['3 in', []]);
    expect(done.size('VH-VT')).toBe('1½ in');
    const heavy = run(
      tower([[], times(5, closet), [lavatory, lavatory]])
        .replaceAll('east 9 fall 1:50', 'east 9 fall 1:96')
        .replace('vent 3 in: S3', 'vent 1 1/2 in: S3'),
      bringing({ 'F3.1': 19 }),
    );
    expect(heavy.size('SF-OUT')).toBe('4 in');
    expect(heavy.pipe('VH-VT').required?.most?.label).toBe('2 in');
  });

  test('none at all: missing', () => {
    const done = run(
      tower([[closet], [closet]], { stackVent: false })
        .replaceAll(/terminal VT\d\.\d/g, '')
        .replaceAll(/vent 1 1\/2 in: V\d\.\d > VT\d\.\d \(to [\d.]+\)/g, ''),
    );
    expect(clauses(done, 'main-vent-missing')).toEqual(['904.1']);
  });
});

describe('R77 W18 a header of two 4 in stacks of 60, 95 ft from the foot of the farther one: 3 in', () => {
  const pair = (level: number) => `model "Two stacks"
storey "One" at 0
storey "Two" at 3
${['A', 'B']
  .map(
    (name, at) => `on "Two"
node ${name}2 at ${at * 8} 0 2.6
node ${name}1 at ${at * 8} 0 -0.4
${[1, 2]
  .map(
    (storey) => `on "${storey === 1 ? 'One' : 'Two'}"
node ${name}J${storey} from ${name}${storey} south 1 rise 1:48
trap ${name}T${storey} from ${name}V${storey} south 0.4 rise 1:48
node ${name}V${storey} from ${name}J${storey} south 0.4 rise 1:48
floor-drain ${name}F${storey} from ${name}T${storey} to ${storey * 3 - 3}, untrapped, trap 2 in
drain 2 in: ${name}F${storey} > ${name}T${storey} > ${name}V${storey} > ${name}J${storey} > ${name}${storey}
vent 2 in: ${name}V${storey} > ${name}W${storey} (to 7.2)
terminal ${name}W${storey}`,
  )
  .join('\n')}
drain 4 in: ${name}2 > ${name}1 > ${name}F`,
  )
  .join('\n')}
node AF from A1 down 1.2
node BF from AF over B1 fall 1:48
drain 4 in: AF > BF > OUT (east 9 fall 1:48)
sewer OUT
vent 3 in: A2 > AH (to 5.5) > BH (over B2 rise 1:1000)
vent 3 in: B2 > BH > HG (north ${level} rise 1:1000) > HT (to 7.2)
terminal HT
roof "Roof" from -20 -40 to 40 40 top 6 thick 0.3
`;
  test('120, row 140 of a 4 in stack: 2½ in reaches 65 ft, 3 in 200', () => {
    const done = run(pair(20), bringing({ AF1: 30, AF2: 30, BF1: 30, BF2: 30 }), { omitSizes: [] });
    expect([done.role('BH-HG'), done.pipe('BH-HG').ventLoad?.most]).toEqual(['vent-header', 120]);
    const step = done.pipe('BH-HG').trail.find(({ rule }) => rule === 'IPC-R77');
    expect([step?.row, step?.asks?.label]).toEqual(['4 in, up to 140', '3 in']);
  });
});

describe('R97 to R99 air admittance valves (918)', () => {
  const valve = (height: number) =>
    hall(
      'A valve',
      `trap T at 0 0 0.5
lavatory L from T up 0.12, trap 1 1/4 in
drain 1 1/2 in: L > T > J (east 0.5 fall 1:48) > D (to -0.4) > K (east 1 fall 1:48) > BF (to -1.2) > OUT (east 4 fall 1:48)
vent 1 1/2 in: J > X (up ${height})
admittance-valve X
trap T2 from K south 0.4 rise 1:48
floor-drain F from T2 to 0, untrapped, trap 2 in
node V2 from K south 0.2 rise 1:48
drain 2 in: F > T2 > V2 > K
vent 2 in: V2 > VT (to 4.2)
terminal VT
sewer OUT`,
    );
  test('it vents, 4 in above the drain or more', () => {
    const done = run(valve(0.15));
    expect([done.fixture('L').ventedBy.how, done.size('J-X')]).toEqual(['individual-vent', '1¼ in']);
    expect(done.findings('valve-not-allowed')).toEqual([]);
    expect(clauses(run(valve(0.08)), 'valve-not-allowed')).toEqual(['918.4 to 918.7']);
  });
  test('one vent of the building must reach open air', () => {
    const only = valve(0.15).replace('terminal VT', 'admittance-valve VT');
    expect(clauses(run(only), 'valve-not-allowed')).toContain('918.4 to 918.7');
  });
  test('not on a stack of more than six intervals', () => {
    const storeys = (count: number) =>
      tower(
        times(count, '').map(() => [lavatory, lavatory]),
        { ventStack: true },
      ).replace('terminal VT\n', 'admittance-valve VT\n');
    expect(clauses(run(storeys(7)), 'valve-not-allowed')).toContain('918.3.2');
    expect(clauses(run(storeys(6)), 'valve-not-allowed')).not.toContain('918.3.2');
  });
});

describe('R94 island vents: sinks and lavatories only (916.1)', () => {
  const island = (fixture: string) =>
    hall(
      'An island',
      `trap T at 0 0 0.4
${fixture} F from T up 0.2, trap 1 1/2 in
drain 2 in: F > T > J (east 0.3 fall 1:48) > D (to -0.4) > K (east 2 fall 1:48) > OUT (east 6 fall 1:48)
vent 1 1/2 in: J > UP (up 0.5) > A (south 0.4) > DN (to -0.3) > W (south 3 rise 1:48) > VT (to 4.2)
terminal VT
sewer OUT`,
    );
  test('a kitchen sink may', () => {
    const done = run(island('kitchen-sink'));
    expect([done.role('J-UP'), done.size('J-UP'), done.findings('island-vent-not-allowed')]).toEqual([
      'island-vent',
      '1¼ in',
      [],
    ]);
  });
  test('a shower may not', () => {
    expect(clauses(run(island('shower')), 'island-vent-not-allowed')).toEqual(['916.1 to 916.3']);
  });
});

describe('R83 the vent of a sump: by what its pump puts out and the vent’s length (Table 906.5.1)', () => {
  const gpm = 3.785411784 / 60;
  /** A sump whose vent rises 4.6 m and runs level for the rest. */
  const sump = (feet: number, pump?: number) =>
    run(
      hall(
        'A sump',
        `node J at 0 0 -0.4
trap T from V south 0.4 rise 1:48
node V from J south 0.2 rise 1:48
floor-drain F from T to 0, untrapped, trap 2 in
drain 2 in: F > T > V > J
vent 2 in: V > VW (to 4.2)
terminal VW
sump S from J east 2 fall 1:48
drain 4 in: J > S > OUT (east 4 fall 1:48)
vent 2 in: S > SR (to 4) > SG (north ${feet * ft - 4.642} rise 1:1000) > ST (to 4.2)
terminal ST
sewer OUT`,
      ),
      {},
      pump === undefined ? {} : { sumpPumpFlow: pump * gpm },
    );
  test.each([
    { pump: 40, feet: 71, size: '1¼ in', why: '72 ft' },
    { pump: 40, feet: 73, size: '1½ in', why: '… past it, 160' },
    { pump: 40, feet: 100, size: '1½ in', why: 'example of RULES' },
    { pump: 41, feet: 30, size: '1¼ in', why: 'row 60: 31 ft' },
    { pump: 60, feet: 32, size: '1½ in', why: '… past it, 75' },
    { pump: 501, feet: 30, size: 'none', why: 'past the last row, 500' },
  ])('$pump gpm, $feet ft: $size ($why)', ({ pump, feet, size }) => {
    const done = sump(feet, pump);
    expect([done.role('S-SR'), done.size('S-SR'), done.size('SG-ST')]).toEqual(['tank-vent', size, size]);
  });
  test('nobody says what the pump puts out: no size, the reason, and a question', () => {
    const done = sump(100);
    expect(done.pipe('S-SR')).toMatchObject({
      required: null,
      verdict: 'unknown',
      reason: 'the discharge of the sump’s pump is not stated',
    });
    const asked = questionsOf(done.result).filter(({ answer }) => answer.key === 'sumpPumpFlow');
    expect(asked.map(({ about, weight }) => [about[0], weight])).toEqual([[done.pipe('S-SR').globalId, 3]]);
  });
});

test('R85 where frost may close a vent, one below 3 in through the roof is noted (setting)', () => {
  const text = tower([[closet], [closet]]).replaceAll('vent 3 in: S2', 'vent 2 in: S2');
  expect(run(text, {}, { frostEnlargement: true }).findings('frost-enlargement-missing').length).toBeGreaterThan(0);
  expect(run(text).findings('frost-enlargement-missing')).toEqual([]);
});
