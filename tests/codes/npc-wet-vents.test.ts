import { describe, expect, test } from 'vitest';
import { armOf, rowBehindVent, times, wetVentedRow } from '../support/rows.ts';
import { type RunOptions, runSketch, type SketchRun } from '../support/run-sketch.ts';

// National Plumbing Code, wet vents: rules R43 to R52. Table 2.5.8.1. by hand; loads by Table 2.4.9.3.
const stall = 'urinal, stall, trap 2 in'; // 2
const tub = 'bathtub, trap 1 1/2 in'; // 1.5
const closet = 'closet, tank'; // 4

/** The one battery: `wet-vent` or another reading, and the rules that the wet vent breaks. */
const asWet = (text: string, options: RunOptions = {}) => {
  const run = runSketch(text, options);
  expect(run.result.batteries).toHaveLength(1);
  const { reading, broken, others } = run.result.batteries[0]!;
  const own = reading === 'wet-vent' ? broken : (others.find((one) => one.reading === 'wet-vent')?.broken ?? []);
  return { run, reading, broken: own.map(({ rule }) => rule.slice(4)), facts: own.map(({ facts }) => facts) };
};
const wetLoad = (run: SketchRun, pipe: string) => [run.role(pipe), run.pipe(pipe).ventLoad?.most, run.size(pipe)];

test('R43 lavatory 1, tub 1.5, closet: 2.5 against 3 of 2 in; sound', () => {
  const { run, reading, broken } = asWet(wetVentedRow([tub, closet], { lavatories: 1 }));
  expect([reading, broken]).toEqual(['wet-vent', []]);
  for (const pipe of ['LJ-LF', 'LF-J1', 'J1-J2']) expect(wetLoad(run, pipe)).toEqual(['wet-vent', 2.5, '2 in']);
  expect(run.findings().filter(({ severity }) => severity === 'error')).toEqual([]);
  expect(['L1', 'F1', 'F2'].map((name) => run.fixture(name).ventedBy.how)).toEqual([
    'continuous-vent',
    'wet-vent',
    'wet-vent',
  ]);
});

describe('R43 Table 2.5.8.1. with closets', () => {
  // Two lavatories 2, then tubs of 1.5, the closet last: it is left out, all others count.
  test.each([
    { tubs: 0, counted: 2, size: '2 in', why: 'no figure below 2 in' },
    { tubs: 1, counted: 3.5, size: '3 in', why: 'past 3, the limit of 2 in' },
    { tubs: 4, counted: 8, size: '3 in', why: 'the limit of 3 in' },
    { tubs: 8, counted: 14, size: '4 in', why: 'the limit of 4 in' },
    { tubs: 9, counted: 15.5, size: '5 in', why: 'past it: 5 in takes 18' },
    { tubs: 14, counted: 23, size: '6 in', why: 'the last limit' },
  ])('$tubs tubs: $counted, $size ($why)', ({ tubs, counted, size }) => {
    const { run } = asWet(wetVentedRow([...times(tubs, tub), closet]));
    expect(wetLoad(run, 'LJ-LF')).toEqual(['wet-vent', counted, size]);
  });

  test('past the last row: 24.5 is overloaded, and no size is offered', () => {
    const { run, broken } = asWet(wetVentedRow([...times(15, tub), closet]));
    expect([broken, run.size('LJ-LF')]).toEqual([['R43'], 'none']);
    expect(run.findings('wet-vent-overloaded')).toHaveLength(1);
  });
});

describe('R44 closets in a wet vent', () => {
  const pair = (joint: string) =>
    `node BN from ${joint} north 0.3 rise 1:50\ncloset FN from BN to 0, tank\ndrain 3 in: FN > BN > ${joint}`;

  test('two by a double fitting, last: allowed; the pair is left out', () => {
    const { run, broken } = asWet(wetVentedRow([tub, closet], { lavatories: 1, more: pair('J2') }));
    expect([broken, wetLoad(run, 'J1-J2')]).toEqual([[], ['wet-vent', 2.5, '2 in']]);
  });

  test('a closet and a urinal by a double fitting: the closet joins before neither', () => {
    const beside =
      'trap TN from J2 north 0.3 rise 1:50\nurinal FN from TN to 0, stall, trap 2 in\ndrain 2 in: FN > TN > J2';
    expect(asWet(wetVentedRow([tub, closet], { lavatories: 1, more: beside })).broken).toEqual([]);
  });

  test('two, one after the other: not at one level', () => {
    const { broken, facts } = asWet(wetVentedRow([tub, closet, closet], { lavatories: 1 }));
    expect([broken, facts]).toEqual([['R44'], [{ closetsApart: true }]]);
  });

  test('three: one too many', () => {
    const { broken, facts } = asWet(wetVentedRow([tub, closet, closet], { lavatories: 1, more: pair('J3') }));
    expect([broken, facts[0]]).toEqual([['R44'], { closets: 3, closetsMost: 2 }]);
  });

  test('closet upstream of the tub: not a wet vent', () => {
    const { run, broken, facts } = asWet(wetVentedRow([closet, tub], { lavatories: 1 }));
    expect([broken, facts]).toEqual([['R44'], [{ closetUpstream: true }]]);
    expect(run.findings('wet-vent-not-allowed')).toHaveLength(1);
  });

  test('the same where the closet stands at the head, with the vent on its own drain', () => {
    const { broken, facts } = asWet(rowBehindVent([closet, tub]));
    expect([broken, facts]).toEqual([['R44'], [{ closetUpstream: true }]]);
  });

  test('Quebec’s 2010 wording (a setting) leaves the order open on a horizontal wet vent', () => {
    const settings = { wetVentClosetOrder: 'vertical' };
    expect(asWet(wetVentedRow([closet, tub], { lavatories: 1 }), { answers: { settings } }).broken).toEqual([]);
  });
});

describe('R45 arms into a wet vent: 2 in at most', () => {
  test('a 3 in floor drain cannot be wet vented', () => {
    const { broken, facts } = asWet(wetVentedRow([stall, 'floor-drain, trap 3 in']));
    expect([broken, facts]).toEqual([['R45'], [{ arm: '3 in', armMost: '2 in', arms: 1 }]]);
  });

  test('an emergency floor drain that needs no vent is excepted', () => {
    const free = armOf(2, 'floor-drain, emergency, trap 3 in', { length: 0.6 });
    const text = wetVentedRow([stall, stall, stall]).replace(armOf(2, stall), free);
    const { broken, reading } = asWet(
      text.replace('trap T2 from J2 south 0.6 rise 1:50', 'trap T2 from J2 south 0.6 rise 1:50, 3 in'),
    );
    expect([reading, broken]).toEqual(['wet-vent', []]);
  });

  test('one whose drain is too short to go without a vent is not', () => {
    const text = wetVentedRow([stall, 'floor-drain, emergency, trap 3 in', stall]);
    const { broken, facts } = asWet(text);
    expect([broken, facts]).toEqual([['R45'], [{ arm: '3 in', armMost: '2 in', arms: 1 }]]);
  });

  test('by Quebec’s 2010 wording (a setting) only over several storeys', () => {
    const settings = { wetVentArms: 'several-storeys' };
    expect(asWet(wetVentedRow([stall, 'floor-drain, trap 3 in']), { answers: { settings } }).broken).toEqual([]);
  });
});

describe('R46 guests with vents of their own: 2 units together', () => {
  /** The row with its middle fixtures vented by themselves. */
  const vented = (guests: readonly string[]): string => {
    const all = [stall, ...guests, stall];
    const plain = wetVentedRow(all);
    return guests.reduce(
      (text, what, at) => text.replace(armOf(at + 2, what), armOf(at + 2, what, { vented: true })),
      plain,
    );
  };

  test('a vented sink of 1.5: the wet vent counts it, its dry vent does not', () => {
    const { run, broken } = asWet(vented(['sink, trap 1 1/2 in']));
    // 2 + 2 + 1.5, the last urinal left out: 5.5, 3 in. The dry vent: 2 + 2 + 2 = 6.
    expect([broken, wetLoad(run, 'LJ-LF')]).toEqual([[], ['wet-vent', 5.5, '3 in']]);
    expect(run.pipe('LJ-VT').ventLoad?.most).toBe(6);
    // The urinal past the guest breathes through the row's own vent, and the guest's vent serves the guest alone.
    expect(run.pipe('V2-VT2')).toMatchObject({ role: 'individual-vent', servesAir: [run.fixture('F2').globalId] });
    expect(run.size('V2-VT2')).toBe('1¼ in');
  });

  test('two lavatories of 1 are the limit; a sink and a lavatory, 2.5, are past it', () => {
    expect(asWet(vented(times(2, 'lavatory, trap 1 1/4 in'))).broken).toEqual([]);
    const past = asWet(vented(['sink, trap 1 1/2 in', 'lavatory, trap 1 1/4 in']));
    expect([past.broken, past.facts[0]]).toEqual([['R46'], { guestUnits: 2.5, guestUnitsMost: 2, guests: 2 }]);
  });
});

describe('R48 offsets of a vertical wet vent', () => {
  const offset = (length: number, urinals: number) =>
    asWet(wetVentedRow(times(urinals, stall), { down: `A (down 0.3) > B (east ${length} fall 1:50) > LF (to -0.4)` }));
  test.each([
    { length: 1.2, urinals: 2, broken: [], why: '4: 2 in; the limit' },
    { length: 1.5, urinals: 2, broken: ['R48'], why: 'RULES: 2 in, 1.5 m' },
    { length: 1.5, urinals: 3, broken: [], why: '6: 3 in' },
    { length: 2.5, urinals: 3, broken: [], why: 'the limit of larger ones' },
    { length: 2.6, urinals: 3, broken: ['R48'], why: 'past it' },
  ])('$length m, $urinals urinals: $broken ($why)', ({ length, urinals, broken }) => {
    expect(offset(length, urinals).broken).toEqual(broken);
  });

  test('two offsets', () => {
    const down = 'A (down 0.2) > B (east 0.5 fall 1:50) > C (down 0.2) > D (east 0.5 fall 1:50) > LF (to -0.5)';
    const { broken, facts } = asWet(wetVentedRow(times(2, stall), { down }));
    expect([broken, facts]).toEqual([['R48'], [{ offsets: 2, offsetsMost: 1 }]]);
  });

  test('something joins in the offset', () => {
    const down = 'A (down 0.2) > J9 (east 0.4 fall 1:50) > B (east 0.4 fall 1:50) > LF (to -0.4)';
    const joined = wetVentedRow(times(2, stall), { down, more: armOf(9, 'lavatory, trap 1 1/4 in', { floor: 0.6 }) });
    expect(asWet(joined).facts).toEqual([{ joinedInOffset: true }]);
  });
});

test('R49 one size throughout: 4 units ask 2 in, also where one lavatory of 1 drains through', () => {
  const run = runSketch(wetVentedRow(times(2, 'urinal, stall, trap 2 in'), { lavatories: 1 }));
  // 1 + 2, the last one left out: 3, within the 4 of 2 in; a lavatory by itself would do with 1½ in.
  expect(['LJ-LF', 'LF-J1', 'J1-J2'].map((pipe) => [run.role(pipe), run.size(pipe)])).toEqual(
    times(3, '').map(() => ['wet-vent', '2 in']),
  );
});

describe('R50 the load that sizes a wet vent', () => {
  test('urinals 2 + 2 + 2 behind the first one’s vent: 4 counted, 2 in', () => {
    const { run } = asWet(rowBehindVent(times(3, stall)));
    for (const pipe of ['V1-J1', 'J1-J2', 'J2-J3']) expect(wetLoad(run, pipe)).toEqual(['wet-vent', 4, '2 in']);
    expect([run.role('J3-K'), run.pipe('J3-K').load.most]).toEqual(['branch', 6]);
  });

  test('two that join symmetrically at the end are both left out', () => {
    const twin =
      'trap TN from J2 north 0.3 rise 1:50\nurinal FN from TN to 0, stall, trap 2 in\ndrain 2 in: FN > TN > J2';
    const { run } = asWet(wetVentedRow(times(2, stall), { more: twin }));
    expect(wetLoad(run, 'LJ-LF')).toEqual(['wet-vent', 4, '2 in']); // 2 + 2
  });

  test('part of a bathroom group: the fixtures’ own loads, not the group’s', () => {
    const space = 'space "Bathroom" from -1 -2 to 2 1 height 2.5';
    const { run } = asWet(wetVentedRow([tub, closet], { lavatories: 1, more: space }));
    expect(wetLoad(run, 'J1-J2')).toEqual(['wet-vent', 2.5, '2 in']);
    expect(run.pipe('J2-K').load.most).toBe(6);
  });
});

describe('R51 the dry vent above: Table 2.5.8.3. with all that is wet vented, closets too', () => {
  test('bathroom group of 6, 6 m: 1½ in (row 8 at 1¼ in is unread; closet trap 3 in asks 1½ in)', () => {
    const space = 'space "Bathroom" from -1 -2 to 2 1 height 2.5';
    const vent = 'vent 3 in: LJ > (to 3) > (east 2.3) > VT (to 4.2)';
    const { run } = asWet(wetVentedRow([tub, closet], { lavatories: 1, vent, more: space }));
    const dry = run.result.pipes.filter(({ role }) => role === 'continuous-vent');
    expect(dry.map(({ required, ventLoad }) => [required?.most?.label, ventLoad?.most])).toEqual(
      times(3, '').map(() => ['1½ in', 6]),
    );
    expect(dry[0]?.developedLength).toBeCloseTo(6, 3);
  });

  // A sink of 1.5 and a mop sink of 2: 3.5, the most downstream one counted too (textbook on the 2020 code).
  test('sink 1.5 and mop sink 2: 3.5', () => {
    const { run } = asWet(rowBehindVent(['sink, trap 1 1/2 in', 'mop-sink, trap 2 in']));
    expect(run.pipe('V1-VT1').ventLoad?.most).toBe(3.5);
    expect(wetLoad(run, 'J1-J2')).toEqual(['wet-vent', 1.5, '1½ in']);
  });
});

test('R52 also a drain: a 4 in wet vent of 30 still asks Table -B, 4 in (180)', () => {
  const { run } = asWet(wetVentedRow(times(15, stall)));
  expect(wetLoad(run, 'J14-J15')).toEqual(['wet-vent', 30, '4 in']);
  const step = run.pipe('J14-J15').trail.find(({ rule }) => rule === 'NPC-R16');
  expect([run.pipe('J14-J15').load.most, step?.asks?.label]).toEqual([30, '4 in']);
});
