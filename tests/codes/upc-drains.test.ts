import { describe, expect, test } from 'vitest';
import { bringing } from '../support/flows.ts';
import { hall, times, ventedRow } from '../support/rows.ts';
import { type RunOptions, runSketch } from '../support/run-sketch.ts';
import { at48 } from '../support/stack-rows.ts';
import { tower } from '../support/towers.ts';

// Uniform Plumbing Code 702, 703, 707, 708, 717: rules UPC-R07 to R27. Table 703.2, vertical and horizontal at 1/4 in per ft.
const drain = 'floor-drain, trap 2 in'; // 2
const lavatory = 'lavatory, trap 1 1/4 in'; // 1
const closet = 'closet, tank';
const run = (text: string, options: RunOptions['answers'] = {}, settings: Record<string, unknown> = {}) =>
  runSketch(at48(text), {
    code: 'upc-2021',
    answers: { settings: { use: 'private', ...settings } as never, ...options },
  });
const limits = (column: readonly (readonly [string, number])[]) =>
  column.flatMap(([size, limit], at) => [
    { load: limit, size },
    { load: limit + 1, size: column[at + 1]?.[0] ?? 'none' },
  ]);
const row = (load: number, slope = '1:48', settings = {}) =>
  run(ventedRow([drain, drain]).replaceAll('1:50', slope), bringing({ F1: load - 2 }), settings);

describe('R15 Table 703.2 at every limit', () => {
  test.each(
    limits([
      ['2 in', 8],
      ['2½ in', 14],
      ['3 in', 35],
      ['4 in', 216],
      ['5 in', 428],
      ['6 in', 720],
      ['8 in', 2640],
      ['10 in', 4680],
      ['12 in', 8200],
    ]),
  )('horizontal, $load: $size', ({ load, size }) => {
    expect(row(load).size('BF-OUT')).toBe(size);
  });

  test.each(
    limits([
      ['2 in', 16],
      ['2½ in', 32],
      ['3 in', 48],
      ['4 in', 256],
      ['5 in', 600],
      ['6 in', 1380],
      ['8 in', 3600],
      ['10 in', 5600],
      ['12 in', 8400],
    ]),
  )('vertical, $load: $size', ({ load, size }) => {
    const step = run(
      tower([[], [drain, drain], [drain, drain]]),
      bringing({ 'F2.1': load / 2 - 2, 'F3.1': load / 2 - 2 }),
    )
      .pipe('S2-SF')
      .trail.find(({ rule }) => rule === 'UPC-R15');
    expect(step?.asks?.label ?? 'none').toBe(size);
  });

  test('no difference between branch, stack and building drain: 14 horizontal is 2½ in on all', () => {
    expect(row(14).size('J2-K')).toBe('2½ in');
    expect(run(tower([[], [drain, drain]]), bringing({ 'F2.1': 12 })).size('J2.2-S2')).toBe('2½ in');
  });

  test('the arm itself is bounded by its trap, past its vent by the table: lavatory 1¼ in, a floor drain 2 in', () => {
    const done = run(ventedRow([lavatory, drain]));
    expect([done.size('T1-V1'), done.size('V1-J1'), done.size('T2-V2')]).toEqual(['1¼ in', '1¼ in', '2 in']);
  });
});

describe('R16, R24 slope: an eighth only where approved, from 4 in on, with 0.8 of the load', () => {
  test('W10: 300 at 1/4 and, approved, at 1/8: 5 in; 200: 4 in and 5 in', () => {
    const approved = { slopeEighth: true };
    expect([row(300).size('BF-OUT'), row(300, '1:96', approved).size('BF-OUT')]).toEqual(['5 in', '5 in']);
    expect([row(200).size('BF-OUT'), row(200, '1:96', approved).size('BF-OUT')]).toEqual(['4 in', '5 in']);
  });
  test('172 fits 4 in at 1/8 (172.8), 173 does not; 4 in at 1/4 is not cut down', () => {
    const approved = { slopeEighth: true };
    expect([172, 173].map((load) => row(load, '1:96', approved).size('BF-OUT'))).toEqual(['4 in', '5 in']);
    expect(row(216, '1:48', approved).size('BF-OUT')).toBe('4 in');
  });
  test('not approved: its slope is the fault, whatever its size', () => {
    const flat = row(200, '1:96');
    expect(flat.size('BF-OUT')).toBe('4 in');
    expect(flat.findings('slope-too-small').length).toBeGreaterThan(0);
    expect(flat.findings('slope-too-small')[0]?.clause).toBe('708.1');
  });
  test('approved, a branch at 1/8 takes 4 in, the least that may be laid so; the drain of one fixture stays', () => {
    const flat = row(20, '1:96', { slopeEighth: true });
    expect([flat.size('BF-OUT'), row(20, '1:48', { slopeEighth: true }).size('BF-OUT')]).toEqual(['4 in', '3 in']);
    expect(run(ventedRow([drain, drain]).replaceAll('1:50', '1:96'), {}, { slopeEighth: true }).size('V1-J1')).toBe(
      '2 in',
    );
  });
  test('2 % is 1/4 in per ft, 1 % is 1/8 (708.1 prints both)', () => {
    const flat = (slope: string, settings = {}) => {
      const text = ventedRow([drain, drain]).replaceAll('1:50', slope).replace('drain 3 in: J1', 'drain 4 in: J1');
      const done = runSketch(text, { code: 'upc-2021', answers: { settings } as never });
      return done.findings('slope-too-small').some(({ about }) => about[0] === done.pipe('BF-OUT').globalId);
    };
    expect([flat('1:50'), flat('1:52'), flat('1:100'), flat('1:100', { slopeEighth: true })]).toEqual([
      false,
      true,
      true,
      false,
    ]);
    expect(flat('1:104', { slopeEighth: true })).toBe(true);
  });
  test('approved, but 3 in stays at 1/4', () => {
    const found = row(20, '1:96', { slopeEighth: true }).findings('slope-too-small');
    expect(found.some(({ facts }) => facts.size === '3 in')).toBe(true);
  });
});

describe('R17, R18 sinks, urinals and dishwashers have 2 in after the arm (Table 702.1, note 2)', () => {
  /** A kitchen sink whose drain drops below its vent. */
  const sink = (fixture: string) =>
    run(
      hall(
        'A sink and its drop',
        `trap T at 0 0 0.5
${fixture.split(', ')[0]} F from T up 0.2, ${fixture.split(', ')[1]}
drain 1 1/2 in: F > T > J (east 0.5 fall 1:48) > D (to -0.4) > OUT (south 4 fall 1:48)
vent 3 in: J > VT (to 4.2)
terminal VT
sewer OUT`,
      ),
    );
  test('W14: a kitchen sink of 2 on a vertical drain: 2 in, though 1½ in has 2', () => {
    const done = sink('kitchen-sink, trap 1 1/2 in');
    expect([done.size('T-J'), done.size('J-D')]).toEqual(['1½ in', '2 in']);
    const trail = done.pipe('J-D').trail.map(({ rule, asks }) => `${rule} ${asks?.label}`);
    expect(trail).toEqual(expect.arrayContaining(['UPC-R15 1½ in', 'UPC-R18 2 in']));
    expect(done.pipe('D-OUT').trail.map(({ rule }) => rule)).toContain('UPC-R17');
  });
  test('a tub of 2 may drop in 1½ in', () => {
    expect(sink('bathtub, trap 1 1/2 in').size('J-D')).toBe('1½ in');
  });
});

describe('R19, R20 closets', () => {
  test('W08: five private closets on 3 in, six on 4 in; four by the older count', () => {
    const at = (count: number, settings = {}) => run(ventedRow(times(count, closet)), {}, settings).size(`J${count}-K`);
    expect([at(1), at(5), at(6)]).toEqual(['3 in', '3 in', '4 in']);
    const old = { closetsOn3in: 'four and three' };
    expect([at(3, old), at(4, old), at(5, old)]).toEqual(['3 in', '4 in', '4 in']);
  });
  test('W09: nine bathrooms of 6 on one stack: 54, 4 in upright (3 in 48) and level', () => {
    const storeys = times(9, '').map(() => [closet, lavatory, 'bathtub, trap 1 1/2 in']);
    const done = run(tower(storeys, { ventStack: true }));
    expect([done.pipe('S1-VF').load.most, done.size('S1-VF'), done.size('SF-OUT')]).toEqual([54, '4 in', '4 in']);
  });
});

test('R21 a 3 in stack of 212 ft at most: one of 220 ft is 4 in', () => {
  const text = (height: number) =>
    `model "A tall stack"
storey "Low" at 0
storey "High" at ${height - 3}
node S2 at 0 0 ${height - 3.4}
node S1 at 0 0 -0.4
drain 3 in: S2 > S1 > SF (to -1) > OUT (east 9 fall 1:48)
${[1, 2].map((n) => `on "${n === 1 ? 'Low' : 'High'}"\nnode J${n} from S${n} ${n === 1 ? 'west' : 'north'} 1 rise 1:48\ncloset F${n} from J${n} up 0.4, tank\ndrain 3 in: F${n} > J${n} > S${n}\nvent 2 in: J${n} > V${n} (to ${height + 0.8})\nterminal V${n}`).join('\n')}
sewer OUT
roof "Roof" from -20 -20 to 20 20 top ${height} thick 0.3`;
  const asks = (feet: number) =>
    run(text(feet * 0.3048 + 2.4))
      .pipe('S2-S1')
      .trail.find(({ rule }) => rule === 'UPC-R21')?.asks?.label;
  expect([asks(208), asks(214)]).toEqual(['2½ in', '4 in'].map((_, at) => (at === 0 ? '3 in' : '4 in')));
});

describe('R27 building sewers from 8 in on by Table 717.1', () => {
  const walls = `slab "Floor" from -2 -2 to 8 2 top 0 thick 0.2
wall "East" from 8 -2 to 8 2 height 3 layers "brick" 200 external loadbearing
wall "West" from -2 2 to -2 -2 height 3 layers "brick" 200 external loadbearing`;
  const sewer = (load: number, slope: string) =>
    run(`${ventedRow([drain, drain]).replaceAll('1:50', slope)}\n${walls}`, bringing({ F1: load - 2 }));
  const step = (load: number, slope: string) => {
    const pipes = sewer(load, slope).result.pipes.flatMap(({ trail, sections = [] }) => [
      ...trail,
      ...sections.flatMap((one) => one.trail),
    ]);
    return pipes.find(({ rule }) => rule === 'UPC-R27')?.asks?.label ?? 'none';
  };
  test('up to 720 by Table 703.2; 721 is 8 in', () => {
    expect([step(720, '1:48'), step(721, '1:48')]).toEqual(['none', '8 in']);
  });
  test('an 8 in sewer carries at least 275 at 1/4 and 625 at 1/8, a 10 in one 300', () => {
    const drawn = (load: number, slope: string, size: string) =>
      runSketch(
        `${ventedRow([drain, drain]).replaceAll('1:50', slope).replace('drain 3 in: J1', `drain ${size} in: J1`)}
${walls}`,
        { code: 'upc-2021', answers: { ...bringing({ F1: load - 2 }), settings: { use: 'private' } as never } },
      )
        .findings('sewer-too-large')
        .map(({ clause, facts, severity }) => [clause, facts.leastUnits, severity]);
    const short = (least: number) => [['717.1, Table 717.1', least, 'warning']];
    expect([drawn(274, '1:48', '8'), drawn(275, '1:48', '8')]).toEqual([short(275), []]);
    expect([drawn(624, '1:96', '8'), drawn(625, '1:96', '8')]).toEqual([short(625), []]);
    expect([drawn(299, '1:48', '10'), drawn(300, '1:48', '10')]).toEqual([short(300), []]);
    // Up to 6 in Table 703.2 says no least load.
    expect(drawn(10, '1:48', '6')).toEqual([]);
  });
  test('at 1/4 8 in takes 3900, 10 in 6800', () => {
    expect([3900, 3901, 6800, 6801].map((load) => step(load, '1:48'))).toEqual(['8 in', '10 in', '10 in', '12 in']);
  });
});

describe('loads (Table 702.1 by use, 702.2, 702.3)', () => {
  const loadOf = (fixture: string, use?: string, detail = {}) => {
    const done = runSketch(ventedRow([fixture]), {
      code: 'upc-2021',
      answers: { settings: use === undefined ? {} : { use }, fixtures: new Map([['name:F1', { detail }]]) },
    });
    const { least, most } = done.fixture('F1').load;
    return least === most ? most : `${least} to ${most}`;
  };
  test.each([
    [lavatory, 'private', {}, 1],
    [closet, 'private', {}, 3],
    [closet, 'public', {}, 4],
    [closet, 'assembly', {}, 6],
    [closet, undefined, {}, '3 to 4'],
    ['closet, valve', 'public', { flushLitres: 13 }, 6],
    ['closet, valve', 'assembly', { flushLitres: 13 }, 8],
    ['urinal, washout, trap 2 in', 'public', {}, 2],
    ['urinal, washout, trap 2 in', 'assembly', {}, 5],
    ['urinal, washout, trap 2 in', 'assembly', { flushLitres: 5.7 }, 6],
    ['kitchen-sink, trap 1 1/2 in', 'private', {}, 2],
    ['drinking-fountain, trap 1 1/4 in', 'assembly', {}, 1],
    ['mop-sink, trap 3 in', 'public', {}, 3],
    ['shower, heads 3, trap 2 in', 'public', {}, 4],
    ['floor-drain, trap 3 in', 'public', {}, 6],
    ['floor-drain, emergency, trap 2 in', 'private', {}, 0],
    // A dry urinal has no row: by its trap (702.2, R13).
    ['urinal, washout, trap 2 in', 'public', { style: 'waterless' }, 4],
  ])('%s, %s %j: %s', (fixture, use, detail, load) => {
    expect(loadOf(fixture, use, detail)).toBe(load);
  });

  test.each([
    [7.5, 1],
    [8, 2],
    [15, 2],
    [16, 4],
    [30, 4],
    [31, 6],
    [50, 6],
    // Past 50 gpm the authority decides: counted as if it never stopped.
    [51, 102],
  ])('%s gpm now and then: %s', (gpm, load) => {
    const flow = (gpm * 3.785411784 * (1 - 1e-9)) / 60;
    expect(loadOf('floor-drain, trap 2 in', 'public', { flow, intermittent: true })).toBe(load);
  });

  test('W17: a receptor of 20 gpm now and then, a pump of 10 gpm: 4 + 20 = 24, 3 in', () => {
    const flow = (gpm: number) => (gpm * 3.785411784 * (1 - 1e-9)) / 60;
    const done = run(ventedRow([drain, drain]), {
      fixtures: new Map([
        ['name:F1', { detail: { flow: flow(20), intermittent: true } }],
        ['name:F2', { detail: { flow: flow(10) } }],
      ]),
    });
    expect([done.pipe('BF-OUT').load.most, done.size('BF-OUT')]).toEqual([24, '3 in']);
  });

  test('W16: four clothes washers in a row: 24 on the drains they share, 3 on each one’s own; two are no row', () => {
    const washer = 'clothes-washer, trap 2 in';
    const done = run(ventedRow(times(4, washer)));
    expect([done.pipe('T1-V1').load.most, done.pipe('J1-J2').load.most, done.pipe('J4-K').load.most]).toEqual([
      3, 3, 24,
    ]);
    expect([done.size('J4-K'), done.pipe('J2-J3').load.most]).toEqual(['3 in', 12]);
    expect(run(ventedRow(times(2, washer))).pipe('J2-K').load.most).toBe(6);
  });
});

test('the editions size alike: no change of a number between them is known', () => {
  const text = at48(tower([times(6, closet), [lavatory, drain]]));
  const sizes = ['upc-2015', 'upc-2018', 'upc-2021', 'upc-2024'].map((code) =>
    runSketch(text, { code, answers: { settings: { use: 'public' } } }).result.pipes.map(
      ({ required }) => required?.most?.label,
    ),
  );
  for (const one of sizes) expect(one).toEqual(sizes[0]);
});

test('a rule seen for one edition is trusted more there: the closet’s vent in 2024', () => {
  const step = (code: string) =>
    runSketch(at48(ventedRow([closet])), { code })
      .pipe('V1-VT1')
      .trail.find(({ rule }) => rule === 'UPC-R59');
  expect([step('upc-2021')?.trust, step('upc-2024')?.trust]).toEqual(['cross-checked', 'published']);
});
