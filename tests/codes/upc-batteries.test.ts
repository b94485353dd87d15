import { describe, expect, test } from 'vitest';
import { armOf, circuitVentedRow, hall, times, ventedRow, wetVentedRow } from '../support/rows.ts';
import { runSketch, type SketchRun } from '../support/run-sketch.ts';
import { at48, circuitRowToStack } from '../support/stack-rows.ts';

// Uniform Plumbing Code, the battery of six wall urinals and two lavatories, rows of closets, wet vents. Loads by Table
// 702.1 in the column of the use; sizes by Table 703.2, as worked by hand in the checks UPC-W01 to W07.
const urinal = 'urinal, washout, trap 2 in';
const lavatory = 'lavatory, trap 1 1/4 in';
const closet = 'closet, tank';
const battery = [...times(6, urinal), ...times(2, lavatory)];
const withoutHalf = ['2½ in'];

const run = (text: string, use = 'public', settings: Record<string, unknown> = {}, code = 'upc-2021') =>
  runSketch(at48(text), { code, answers: { settings: { use, omitSizes: withoutHalf, ...settings } as never } });
const only = (done: SketchRun) => {
  expect(done.result.batteries).toHaveLength(1);
  return done.result.batteries[0]!;
};
const broken = (done: SketchRun) => only(done).broken.map(({ rule, facts }) => [rule, Object.keys(facts)[0]]);

describe('W01 wet vented: not allowed in any edition (908.1, 908.2)', () => {
  test.each(['upc-2015', 'upc-2018', 'upc-2021', 'upc-2024'])('%s', (code) => {
    const done = run(wetVentedRow(times(6, urinal)), 'public', {}, code);
    expect([only(done).reading, broken(done)]).toEqual(['wet-vent', [['UPC-R45', 'outsideGroup']]]);
    expect(done.pipe('J6-K').load).toEqual({ least: 14, most: 14 });
    expect(done.findings('wet-vent-not-allowed')[0]?.sentence).toContain('6 of its fixtures (urinal)');
  });
});

describe('W02, W03, W04 circuit vented (911)', () => {
  test('public, 14: branch 3 in (2 in has 8), circuit vent 2 in (24), no relief vent', () => {
    const done = run(circuitRowToStack(battery));
    expect([only(done).reading, broken(done)]).toEqual(['circuit-vent', []]);
    expect(['CV-J2', 'J4-J5', 'CV-VR'].map((pipe) => done.size(pipe))).toEqual(['3 in', '3 in', '2 in']);
    expect(done.findings('relief-vent-missing')).toEqual([]);
    expect(done.findings().filter(({ severity }) => severity === 'error')).toEqual([]);
  });

  test('with 2½ in on offer the branch is 2½ in: 14 is its limit itself', () => {
    expect(run(circuitRowToStack(battery), 'public', { omitSizes: [] }).size('CV-J2')).toBe('2½ in');
  });

  test('the circuit vent is never below 2 in (911.2): two lavatories and a fountain would need less', () => {
    const done = run(circuitRowToStack(times(3, lavatory)));
    expect(done.pipe('CV-VR').trail.find(({ rule }) => rule === 'UPC-R57')?.asks?.label).toBe('1½ in');
    expect(done.size('CV-VR')).toBe('2 in');
  });

  test('assembly, 32: branch 3 in (35), circuit vent 3 in (2 in has 24; 2½ in where used)', () => {
    const done = run(circuitRowToStack(battery), 'assembly');
    expect(done.pipe('RV-S2').load.most).toBe(32);
    expect([done.size('CV-J2'), done.size('CV-VR')]).toEqual(['3 in', '3 in']);
    expect(run(circuitRowToStack(battery), 'assembly', { omitSizes: [] }).size('CV-VR')).toBe('2½ in');
  });

  test('assembly, above 1 gal, 38: branch 4 in (3 in has 35, and six six-unit traps are over five), vent 3 in', () => {
    const done = runSketch(circuitRowToStack(battery), {
      code: 'upc-2021',
      answers: {
        settings: { use: 'assembly', omitSizes: withoutHalf },
        fixtures: new Map([1, 2, 3, 4, 5, 6].map((n) => [`name:F${n}`, { detail: { flushLitres: 5.7 } }])),
      },
    });
    expect(done.pipe('RV-S2').load.most).toBe(38);
    expect([done.size('CV-J2'), done.size('CV-VR')]).toEqual(['4 in', '3 in']);
    expect(done.pipe('RV-S2').trail.find(({ rule }) => rule === 'UPC-R20')?.facts).toMatchObject({
      closets: 6,
      closetsMost: 5,
    });
  });

  test('nine fixtures are too many; a row whose drains drop is none', () => {
    expect(broken(run(circuitRowToStack([...battery, urinal])))).toEqual([['UPC-R52', 'circuitTraps']]);
  });

  test('four closets below others ask for a relief vent of 2 in at least', () => {
    const above = [closet];
    expect(
      run(circuitRowToStack(times(4, closet), { above }))
        .findings('relief-vent-missing')
        .map(({ clause }) => clause),
    ).toEqual(['911.4']);
    const done = run(circuitRowToStack(times(4, closet), { above, relief: true }));
    expect([done.role('RV-RT'), done.size('RV-RT'), done.findings('relief-vent-missing')]).toEqual([
      'relief-vent',
      '2 in',
      [],
    ]);
  });

  test('use not said: private to public, never assembly: closets 3 to 4, urinals 2', () => {
    const done = runSketch(circuitRowToStack(times(4, closet)), { code: 'upc-2021' });
    expect(done.pipe('RV-S2').load).toEqual({ least: 12, most: 16 });
    expect(runSketch(circuitRowToStack(battery), { code: 'upc-2021' }).pipe('RV-S2').load).toEqual({
      least: 14,
      most: 14,
    });
  });
});

test('W05 each with its own vent: urinal 1½ in (8), lavatory 1¼ in (1), branch vent of all 2 in (24)', () => {
  const joined = battery.map((_, n) => (n === 0 ? '' : `vent 2 in: H${n} > H${n + 1}`)).join('\n');
  const text = ventedRow(battery)
    .replaceAll(/> VT(\d) \(to [\d.]+\)\nterminal VT\d/g, '> H$1 (to 1.5)')
    .replace('sewer OUT', `sewer OUT\n${joined}\nvent 2 in: H8 > VT (to 4.2)\nterminal VT`);
  const done = run(text);
  expect([done.size('V1-H1'), done.size('V8-H8'), done.role('H8-VT'), done.size('H8-VT')]).toEqual([
    '1½ in',
    '1¼ in',
    'branch-vent',
    '2 in',
  ]);
  expect(done.pipe('H8-VT').ventLoad).toEqual({ least: 14, most: 14 });
});

const bathroom = (fixtures: readonly string[], head = lavatory) =>
  hall(
    'A bathroom',
    `node LJ at 0 0 0.5
trap TL from LJ south 0.4 rise 1:48
${head.split(', ')[0]} L from TL up 0.12, ${head.split(', ').slice(1).join(', ')}
drain 1 1/2 in: L > TL > LJ
drain 3 in: LJ > LF (to -0.4)${fixtures.map((_, n) => ` > J${n + 1} (east 0.7 fall 1:48)`).join('')} > K (east 0.7 fall 1:48) > BF (to -1.2) > OUT (east 9 fall 1:48)
${fixtures.map((what, n) => armOf(n + 1, what)).join('')}
vent 2 in: LJ > VT (to 4.2)
terminal VT
sewer OUT`,
  );
const tub = 'bathtub, trap 1 1/2 in';

describe('W06 one private bathroom, horizontal wet vent: lavatory 1, tub 2, closet 3 (908.2)', () => {
  const done = run(bathroom([tub, closet]), 'private');

  test('2 in to 4 units, then 3 in; its dry vent 2 in, for the closet', () => {
    expect([only(done).reading, broken(done)]).toEqual(['wet-vent', []]);
    expect(['LF-J1', 'J1-J2', 'J2-K', 'LJ-VT'].map((pipe) => done.size(pipe))).toEqual([
      '2 in',
      '2 in',
      '3 in',
      '2 in',
    ]);
    expect(done.pipe('J1-J2').ventLoad).toEqual({ least: 3, most: 3 });
    // 6 units would fit 1½ in (8): note 3 of Table 703.2 bars the closet from it.
    expect(done.pipe('LJ-VT').trail.map(({ rule, asks }) => `${rule} ${asks?.label}`)).toEqual(
      expect.arrayContaining(['UPC-R57 1½ in', 'UPC-R59 2 in']),
    );
  });

  test.each([
    { before: [tub, lavatory], load: 4, size: '2 in' },
    { before: [tub, 'shower, trap 2 in'], load: 5, size: '3 in' },
  ])('$load units before the closet: $size', ({ before, load, size }) => {
    const wet = run(bathroom([...before, closet]), 'private');
    expect([wet.pipe('J2-J3').load.most, wet.size('J2-J3')]).toEqual([load, size]);
  });

  test('the closet joins last (908.2.4)', () => {
    expect(broken(run(bathroom([closet, tub]), 'private'))).toEqual([['UPC-R49', 'closetUpstream']]);
  });

  test('one group, two where a place allows it (setting wetVentGroups)', () => {
    const two = bathroom([tub, tub, closet]);
    expect(broken(run(two, 'private'))).toEqual([['UPC-R45', 'bathroomGroups']]);
    expect(broken(run(two, 'private', { wetVentGroups: 2 }))).toEqual([]);
    // Two lavatories and a shower beside the tub are still one group here.
    expect(broken(run(bathroom([lavatory, tub, 'shower, trap 2 in', closet]), 'private'))).toEqual([]);
  });

  test('its dry vent stands on a lavatory, bath, shower or bidet, not on a floor drain', () => {
    expect(broken(run(bathroom([lavatory, closet], tub), 'private'))).toEqual([]);
    const drain = bathroom([lavatory, closet], 'floor-drain, emergency, untrapped, trap 2 in');
    expect(broken(run(drain, 'private'))).toEqual([['UPC-R46', 'dryVentOf']]);
  });
});

describe('vertical wet vents (908.1)', () => {
  const column = (fixtures: readonly string[], step = 0.4) =>
    hall(
      'A vertical wet vent',
      `drain 3 in: C1 > ${fixtures
        .slice(1)
        .map((_, n) => `C${n + 2}`)
        .join(' > ')} > BF (to -3.2) > OUT (east 9 fall 1:48)
${fixtures
  .map(
    (what, n) => `node C${n + 1} at 0 0 ${0.8 - n * step}
trap X${n} from C${n + 1} ${['south', 'north', 'east', 'west'][n % 4]} ${n < 4 ? 0.5 : 1.2} rise 1:48
${what.split(', ')[0]} F${n + 1} from X${n} up 0.2, ${what.split(', ').slice(1).join(', ')}
drain ${/trap (.*) in/.exec(what)?.[1]} in: F${n + 1} > X${n} > C${n + 1}`,
  )
  .join('\n')}
vent 2 in: C1 > VT (to 4.2)
terminal VT
sewer OUT`,
    );

  test('W07 lavatory over tub, 4 ft apart: one above 1¼ in is 1½ in, at least 2 in; vent 1½ in for 3 units', () => {
    const done = run(column([lavatory, tub], 1.2192), 'private');
    expect([only(done).reading, broken(done)]).toEqual(['wet-vent', []]);
    expect([done.role('C1-C2'), done.size('C1-C2'), done.size('C1-VT')]).toEqual(['wet-vent', '2 in', '1½ in']);
  });

  test('one size above the upper fixture’s 2 in: 2½ in, or 3 in without it (908.1.1)', () => {
    const text = column([urinal, lavatory]);
    expect(run(text, 'public', { omitSizes: [] }).size('C1-C2')).toBe('2½ in');
    expect(run(text).size('C1-C2')).toBe('3 in');
  });

  test('four fixtures may be, five may not; 6 ft may be, more may not', () => {
    expect(broken(run(column(times(4, lavatory))))).toEqual([]);
    expect(broken(run(column(times(5, lavatory), 0.3)))).toEqual([['UPC-R42', 'wetFixtures']]);
    expect(broken(run(column([lavatory, tub], 1.8288), 'private'))).toEqual([]);
    expect(broken(run(column([lavatory, tub], 1.85), 'private'))).toEqual([['UPC-R42', 'wetLengthM']]);
  });

  test('only fixtures of one and two units drain into it; the lowest may be heavier', () => {
    expect(broken(run(column(['clothes-washer, trap 2 in', lavatory])))).toEqual([['UPC-R42', 'wetUnits']]);
    expect(broken(run(column([lavatory, 'clothes-washer, trap 2 in'])))).toEqual([]);
    // Nor one of more units that has a vent of its own.
    const guest = column(times(3, lavatory)).replace(
      'sewer OUT',
      `node Q from C2 west 0.6 rise 1:48
trap TQ from Q west 0.4 rise 1:48
clothes-washer FQ from TQ up 0.2, trap 2 in
drain 2 in: FQ > TQ > Q > C2
vent 1 1/2 in: Q > QT (to 4.2)
terminal QT
sewer OUT`,
    );
    expect(broken(run(guest))).toEqual([['UPC-R42', 'wetUnits']]);
  });
});

test('a row whose vent stands over a level branch reads by its own table: nothing changes downstream (908.2.5)', () => {
  const mop = armOf('M', 'mop-sink, trap 2 in', { vented: true }).replaceAll('JM', 'K');
  const done = run(`${bathroom([tub, closet])}\n${mop}`, 'public');
  expect(broken(done)).toEqual([]);
});

test('the battery under the slab: one table for all drains, the same 3 in', () => {
  expect(run(circuitVentedRow(battery, { relief: '' })).size('J4-J5')).toBe('3 in');
});
