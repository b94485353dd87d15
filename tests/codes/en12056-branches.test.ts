import { describe, expect, test } from 'vitest';
import { branchTable } from '../../src/codes/en12056/branch-tables.ts';
import { reachOf } from '../../src/codes/en12056/reach.ts';
import type { FlowSystem } from '../../src/codes/en12056/system.ts';
import { steepestAt } from '../../src/codes/en12056/system-three.ts';
import type { FixtureAnswer, Settings } from '../../src/model/answers.ts';
import { nominalSize } from '../../src/units/nominal-size.ts';
import { europeanTower, ontoStack } from '../support/european.ts';
import { runSketch, type SketchRun } from '../support/run-sketch.ts';
import { openOwn } from '../support/table-files.ts';

// EN 12056-2:2000, branches: rules R10 to R16, Tables 4 to 9. W: worked checks of the rules.
const run = (text: string, settings: Settings = {}, fixtures: Record<string, FixtureAnswer> = {}): SketchRun =>
  runSketch(text, { code: 'en12056-2000', answers: { settings, fixtures: new Map(Object.entries(fixtures)) } });
const asks = (it: SketchRun, pipe: string, rule: string): string | undefined =>
  it.pipe(pipe).trail.find((step) => step.rule === rule)?.asks?.label;
const outOfReach = (it: SketchRun) => it.findings('branch-too-long').map(({ facts }) => facts);
const family = openOwn('en12056-2000');
const tools = (settings: Settings) => ({
  family,
  omit: new Set<never>(),
  settings: { K: 0.5, national: 'none', ...settings },
});

describe('Tables 4 and 7: each row at its limit, one step past it, and past the last', () => {
  // Printed columns; NP rows are passed by.
  const printed: [string, FlowSystem, (readonly [number, string])[]][] = [
    [
      'branch-unventilated',
      'I',
      [
        [0.5, 'DN 40'],
        [0.8, 'DN 50'],
        [1, 'DN 60'],
        [1.5, 'DN 70'],
        [2, 'DN 80'],
        [2.25, 'DN 90'],
        [2.5, 'DN 100'],
      ],
    ],
    [
      'branch-unventilated',
      'II',
      [
        [0.4, 'DN 30'],
        [0.5, 'DN 40'],
        [1, 'DN 50'],
        [1.5, 'DN 60'],
        [2, 'DN 70'],
        [2.25, 'DN 80'],
        [2.5, 'DN 90'],
      ],
    ],
    [
      'branch-unventilated',
      'IV',
      [
        [0.4, 'DN 30'],
        [0.5, 'DN 40'],
        [1, 'DN 50'],
        [1.5, 'DN 60'],
        [2, 'DN 70'],
        [2.25, 'DN 80'],
        [2.5, 'DN 100'],
      ],
    ],
    [
      'branch-ventilated',
      'I',
      [
        [0.75, 'DN 50'],
        [1.5, 'DN 60'],
        [2.25, 'DN 70'],
        [3, 'DN 80'],
        [3.4, 'DN 90'],
        [3.75, 'DN 100'],
      ],
    ],
    [
      'branch-ventilated',
      'II',
      [
        [0.6, 'DN 30'],
        [0.75, 'DN 40'],
        [1.5, 'DN 50'],
        [2.25, 'DN 60'],
        [3, 'DN 70'],
        [3.4, 'DN 80'],
        [3.75, 'DN 90'],
      ],
    ],
    [
      'branch-ventilated',
      'IV',
      [
        [0.6, 'DN 30'],
        [0.75, 'DN 40'],
        [1.5, 'DN 50'],
        [2.25, 'DN 60'],
        [3, 'DN 70'],
        [3.4, 'DN 80'],
        [3.75, 'DN 90'],
      ],
    ],
  ];
  test.each(printed)('%s, system %s', (table, system, rows) => {
    const look = branchTable(family.table(table), system, tools({ system }));
    rows.forEach(([flow, size], at) => {
      expect(look.forFlow(flow)?.size).toBe(size);
      expect(look.forFlow(flow + 0.001)?.size ?? null).toBe(rows[at + 1]?.[1] ?? null);
    });
  });

  test('W14 the leap in system II: 0.6 l/s takes DN 50', () => {
    expect(branchTable(family.table('branch-unventilated'), 'II', tools({ system: 'II' })).forFlow(0.6)?.size).toBe(
      'DN 50',
    );
  });

  test('R16 water closets: how many, and how far they may turn', () => {
    const one = branchTable(family.table('branch-unventilated'), 'I', tools({ system: 'I' }));
    expect(one.forClosets(0, 0)).toBeNull();
    expect([one.forClosets(1, 0)?.size, one.forClosets(2, 90)?.size, one.forClosets(3, 0)?.size]).toEqual([
      'DN 90',
      'DN 90',
      'DN 100',
    ]);
    expect([one.forClosets(1, 90)?.size, one.forClosets(1, 91)?.size]).toEqual(['DN 90', 'DN 100']);
    const two = branchTable(family.table('branch-ventilated'), 'II', tools({ system: 'II' }));
    expect([two.forClosets(1, 270)?.size, two.forClosets(2, 0)?.size]).toEqual(['DN 80', 'DN 90']);
  });

  test('W16 German sums of discharge units are the squares of the flows, K 1.0, within 0.03 l/s', () => {
    const sums = family.table('din-branch-unventilated').rows.map((row) => (row.amount('K1.0').value as number) / 60);
    const flows = [0.8, 1, 1.5, 2, 2.25, 2.5];
    expect(sums.slice(1).every((sum, at) => Math.abs(Math.sqrt(sum) - flows[at + 1]!) < 0.031)).toBe(true);
  });
});

describe('bathroom branch', () => {
  // Closet nearest to the stack, bath and basin behind it; the closet joins the line straight, a bend before the stack.
  const bathroom = ontoStack(`
node A from S2 west 0.5 rise 1:50
node B from A north 0.5 rise 1:50
node C from B north 0.6 rise 1:50
node D from C north 0.6 rise 1:50
drain DN 100: D > C > B > A > S2
lavatory LAV from D north 0.4 rise 1:50
drain DN 50: LAV > D
bathtub BATH from C east 0.4 rise 1:50
drain DN 50: BATH > C
closet WC from B west 0.4 rise 1:50
drain DN 100: WC > B`);

  test('W01 system I: 3.3, Qww 0.908, 2.0 l/s by the closet: DN 80 by flow, DN 90 by the closet', () => {
    const it = run(bathroom);
    expect([asks(it, 'A-S2', 'EN-R10'), asks(it, 'A-S2', 'EN-R16'), it.size('A-S2')]).toEqual([
      'DN 80',
      'DN 90',
      'DN 90',
    ]);
    expect(it.pipe('A-S2').trail[0]?.facts).toMatchObject({ loadUnits: 3.3, flowLps: 2, ventilated: false });
    expect([it.size('LAV-D'), it.size('BATH-C'), it.size('WC-B')]).toEqual(['DN 40', 'DN 50', 'DN 90']);
    expect(outOfReach(it)).toEqual([]);
    expect(it.fixture('LAV').ventedBy).toMatchObject({ how: 'free' });
  });

  test('W02 system II: 2.7, 1.8 l/s: DN 70 by flow, DN 80 by the closet', () => {
    const it = run(bathroom, { system: 'II' });
    expect(it.pipe('A-S2').trail[0]?.facts).toMatchObject({ loadUnits: 2.7, flowLps: 1.8 });
    expect([asks(it, 'A-S2', 'EN-R10'), it.size('A-S2')]).toEqual(['DN 70', 'DN 80']);
  });

  test('R15 no pipe is smaller than one that drains into it', () => {
    const it = run(bathroom);
    expect(asks(it, 'B-A', 'EN-R15')).toBe('DN 90');
  });
});

describe('Tables 5 and 8: reach at the limit and past it', () => {
  const level = { length: 0, bends: 0, drop: 0, flattest: 0.02, steepest: 0.02 };
  const small = nominalSize('DN 50');
  const large = nominalSize('DN 80');
  const what = (settings: Settings, way: object, vented: boolean, size = small) =>
    reachOf(tools(settings))({ ...level, ...way }, vented, size).map((breach) => breach.what);

  test.each([
    ['I', { length: 4 }, { length: 4.01 }, 'length', small],
    ['I', { bends: 3 }, { bends: 3.5 }, 'bends', small],
    ['I', { drop: 1 }, { drop: 1.01 }, 'drop', large],
    ['II', { length: 10 }, { length: 10.01 }, 'length', small],
    ['II', { bends: 1 }, { bends: 1.5 }, 'bends', small],
    ['II', { drop: 3 }, { drop: 3.01 }, 'drop', small],
    ['II', { drop: 6 }, { drop: 6.01 }, 'drop', large],
    ['IV', { length: 10 }, { length: 10.01 }, 'length', small],
    ['IV', { bends: 3 }, { bends: 3.5 }, 'bends', small],
    ['IV', { drop: 1 }, { drop: 1.01 }, 'drop', small],
  ])('Table 5, system %s: %o holds, %o does not', (system, holds, breaks, measure, size) => {
    expect([what({ system }, holds, false, size), what({ system }, breaks, false, size)]).toEqual([[], [measure]]);
  });

  test.each([
    ['I', { length: 10, bends: 20, drop: 3 }, { length: 10.01, drop: 3.01 }, ['length', 'drop']],
    ['II', { length: 500, bends: 20, drop: 3 }, { length: 500, drop: 3.01 }, ['drop']],
    ['IV', { length: 10, bends: 20, drop: 3 }, { length: 10.01, drop: 3.01 }, ['length', 'drop']],
  ])('Table 8, system %s: %o holds, %o does not', (system, holds, breaks, measures) => {
    expect([what({ system }, holds, true), what({ system }, breaks, true)]).toEqual([[], measures]);
  });

  test('in Germany the reach goes by size: DN 70 4 m, DN 80 10 m', () => {
    const german = { system: 'I', national: 'din' };
    expect([
      what(german, { length: 4 }, false, nominalSize('DN 70')),
      what(german, { length: 4.01 }, false, nominalSize('DN 70')),
    ]).toEqual([[], ['length']]);
    expect([what(german, { length: 10 }, false, large), what(german, { length: 10.01 }, false, large)]).toEqual([
      [],
      ['length'],
    ]);
  });

  test('a steep fall into the stack counts as a drop, the bend beside the appliance as none', () => {
    const text = (down: number) =>
      ontoStack(
        `node A from S2 west 1 rise 1:50
node B from A up ${down}
lavatory X from B west 1 rise 1:50
drain DN 50: X > B > A > S2`,
      );
    expect(outOfReach(run(text(1)))).toEqual([]);
    expect(outOfReach(run(text(1.2)))).toEqual([{ what: 'drop', lengthM: 1.2, limitM: 1, ventilated: false }]);
  });

  test('least gradient: 1 % without a vent, said where it is drawn flatter', () => {
    const text = (slope: string) => ontoStack(`lavatory X from S2 west 2 rise ${slope}\ndrain DN 50: X > S2`);
    const flat = (it: SketchRun) => it.findings('slope-too-small').map(({ facts }) => facts.least);
    expect([flat(run(text('1:100'))), flat(run(text('1:110')))]).toEqual([[], [0.01]]);
  });
});

describe('W09 sink 5 m from the stack, system I', () => {
  const sink = (vent: string) =>
    ontoStack(`node A from S2 west 2.5 rise 1:100
node B from A north 2.2 rise 1:100
kitchen-sink X from B north 0.3 rise 1:100
drain DN 50: X > B > A > S2
${vent}`);

  test('without a vent it is too far: 4 m', () => {
    const it = run(sink(''));
    expect([asks(it, 'A-S2', 'EN-R10'), it.fixture('X').ventedBy.how]).toEqual(['DN 50', 'unvented']);
    expect(outOfReach(it)).toEqual([{ what: 'length', lengthM: expect.closeTo(5, 2), limitM: 4, ventilated: false }]);
  });

  test('with one: 0.75 l/s of DN 50 is less than 0.8: DN 60, vent DN 40, up to 10 m', () => {
    const it = run(sink('vent DN 40: B > BT (to 9.6)\nterminal BT'));
    expect([asks(it, 'A-S2', 'EN-R13'), asks(it, 'B-BT', 'EN-R40')]).toEqual(['DN 60', 'DN 40']);
    expect([it.role('B-BT'), outOfReach(it).length]).toEqual(['individual-vent', 0]);
  });
});

describe('W07 five closets in a school, system I, K 0.7', () => {
  // One closet at the head, four along the line; `run` metres from the first joint to the stack.
  const closets = (length: number, vent = '') =>
    ontoStack(`
node J5 from S2 west ${(length - 2.4).toFixed(2)} rise 1:100
node J4 from J5 west 0.6 rise 1:100
node J3 from J4 west 0.6 rise 1:100
node J2 from J3 west 0.6 rise 1:100
node J1 from J2 west 0.6 rise 1:100
drain DN 100: J1 > J2 > J3 > J4 > J5 > S2
${[1, 2, 3, 4, 5].map((n) => `closet W${n} from J${n} south 0.2 rise 1:100\ndrain DN 100: W${n} > J${n}`).join('\n')}
${vent}`);

  test('3.5 m: 2.214 l/s; DN 90 carries it but takes two closets: DN 100, no vent', () => {
    const it = run(closets(3.5), { K: 0.7 });
    expect([asks(it, 'J5-S2', 'EN-R10'), asks(it, 'J5-S2', 'EN-R16')]).toEqual(['DN 90', 'DN 100']);
    expect(it.pipe('J5-S2').trail[0]?.facts.flowLps).toBeCloseTo(2.214, 3);
    expect([it.fixture('W1').ventedBy.how, outOfReach(it).length]).toEqual(['free', 0]);
  });

  test('7 m: too far without; ventilated DN 100 and its vent DN 60', () => {
    expect(outOfReach(run(closets(7), { K: 0.7 })).map(({ what }) => what)).toEqual(['length']);
    const it = run(closets(7, 'vent DN 60: J1 > JT (to 9.6)\nterminal JT'), { K: 0.7 });
    expect([it.size('J5-S2'), it.size('J1-JT'), it.role('J1-JT')]).toEqual(['DN 100', 'DN 60', 'branch-vent']);
    expect(outOfReach(it)).toEqual([]);
    expect(it.result.batteries[0]).toMatchObject({ reading: 'ventilated-branch', others: [] });
    expect(it.fixture('W3').ventedBy.how).toBe('ventilated-branch');
  });

  test('11 m: too far with a vent as well, 10 m', () => {
    const it = run(closets(11, 'vent DN 60: J1 > JT (to 9.6)\nterminal JT'), { K: 0.7 });
    expect(outOfReach(it).map(({ what, limitM, ventilated }) => [what, limitM, ventilated])).toEqual([
      ['length', 10, true],
    ]);
  });
});

describe('more than a branch carries: sized as a drain', () => {
  test('2.5 l/s without a vent is the limit; past it DN by hydraulics at its slope', () => {
    // Thirteen closets of 2.0, K 0.5: 2.55 l/s; half full at 1:50 DN 100 carries 3.53.
    const branch = (count: number) =>
      europeanTower([{ west: ['lavatory'] }, { west: Array.from({ length: count }, () => 'closet') }]);
    const at = run(branch(12));
    expect(asks(at, 'J2.w12-S2', 'EN-R10')).toBe('DN 100');
    const past = run(branch(13));
    expect([asks(past, 'J2.w13-S2', 'EN-R10'), asks(past, 'J2.w13-S2', 'EN-R30')]).toEqual([undefined, 'DN 100']);
    expect(past.pipe('J2.w13-S2').trail.find(({ rule }) => rule === 'EN-R30')?.facts).toMatchObject({
      beyondTable: true,
      fillingShare: 0.5,
    });
  });
});

describe('system III: each appliance by itself', () => {
  const rows = family.table('appliance-unventilated').rows;

  test('W08 basin 1.5 m away on DN 30: at most 2.93 %', () => {
    const curve = rows.filter((row) => row.text('fixture') === 'wash-basin' && row.size('size').value === 'DN 30');
    expect(steepestAt(curve, 1.5)).toBeCloseTo(0.0293, 4);
    expect([steepestAt(curve, 1.7), steepestAt(curve, 0.7), steepestAt(curve, 0.3)]).toEqual([0.022, 0.087, 0.087]);
  });

  test.each([
    ['1:40', 'DN 30'],
    ['1:25', 'DN 40'],
  ])('1.5 m at %s: %s', (slope, size) => {
    const it = run(ontoStack(`lavatory X from S2 west 1.5 rise ${slope}\ndrain DN 30: X > S2`), { system: 'III' });
    expect(asks(it, 'X-S2', 'EN-R12')).toBe(size);
    expect([it.fixture('X').ventedBy.how, outOfReach(it).length]).toEqual(['free', 0]);
  });

  test.each([
    ['lavatory', 'DN 30', 1.5],
    ['shower', 'DN 40', 6],
    ['bathtub', 'DN 40', 6],
    ['urinal, tank', 'DN 40', 3],
    ['kitchen-sink', 'DN 40', 6],
    ['dishwasher', 'DN 40', 3],
    ['closet', 'DN 100', 6],
  ])('%s: %s', (what, size, length) => {
    const [word, ...details] = what.split(', ');
    const it = run(
      ontoStack(
        `${word} X from S2 west ${length} rise 1:40${details.map((one) => `, ${one}`).join('')}\ndrain DN 100: X > S2`,
      ),
      { system: 'III' },
    );
    expect([asks(it, 'X-S2', 'EN-R12'), outOfReach(it).length]).toEqual([size, 0]);
  });

  test.each([
    ['lavatory', 3.1, 'length', 3],
    ['urinal, tank', 3.1, 'length', 3],
    ['dishwasher', 3.1, 'length', 3],
  ])('%s %f m: past its row', (what, length, measure, limit) => {
    const [word, ...details] = what.split(', ');
    const it = run(
      ontoStack(
        `${word} X from S2 west ${length} rise 1:40${details.map((one) => `, ${one}`).join('')}\ndrain DN 100: X > S2`,
      ),
      { system: 'III' },
    );
    expect(outOfReach(it).map(({ what: which, limitM }) => [which, limitM])).toEqual([[measure, limit]]);
  });

  test.each([
    [4, 'lavatory', 'DN 50', []],
    [5, 'lavatory', 'DN 30', ['group']],
    [8, 'closet', 'DN 100', []],
    [9, 'closet', 'DN 100', ['group']],
  ])('%i of %s on one branch: %s %o', (count, what, size, breaches) => {
    const it = run(europeanTower([{ east: ['lavatory'] }, { west: Array.from({ length: count }, () => what) }]), {
      system: 'III',
    });
    expect(asks(it, `J2.w${count}-S2`, 'EN-R12')).toBe(size);
    expect(outOfReach(it).map(({ what: which }) => which)).toEqual(breaches);
  });

  test('a closet and a basin on one branch stand in no row: they need a vent', () => {
    const it = run(europeanTower([{ east: ['lavatory'] }, { west: ['lavatory', 'closet'] }]), { system: 'III' });
    expect(outOfReach(it)).toMatchObject([{ what: 'group', fixtures: 2, fixturesMost: 1 }]);
    // The larger of both by their own rows (Table 6): the closet's, whose outlet is above 80 mm.
    expect(asks(it, 'J2.w2-S2', 'EN-R12')).toBe('DN 100');
  });

  test('R41 branch vent: DN 25 up to 15 m (14.87 here), DN 30 past it (15.37)', () => {
    const branch = (length: number) =>
      ontoStack(`node A from S2 west 2 rise 1:40
bathtub X from A west 1 rise 1:40
drain DN 40: X > A > S2
vent DN 30: A > AB (to 4) > AC (east ${length} rise 1:100) > AT (to 9.6)
terminal AT`);
    expect(asks(run(branch(8), { system: 'III' }), 'A-AB', 'EN-R41')).toBe('DN 25');
    expect(asks(run(branch(8.5), { system: 'III' }), 'A-AB', 'EN-R41')).toBe('DN 30');
  });

  test('Table 9 is read where a vent stands', () => {
    const it = run(
      ontoStack(`node A from S2 west 2.5 rise 1:40
lavatory X from A west 0.4 rise 1:40
drain DN 30: X > A > S2
vent DN 30: A > AT (to 9.6)
terminal AT`),
      { system: 'III' },
    );
    expect([asks(it, 'A-S2', 'EN-R14'), outOfReach(it).length]).toEqual(['DN 30', 0]);
  });
});

describe('system IV: closets and urinals on a stack of their own', () => {
  test('a stack that takes both is said', () => {
    const mixed = run(europeanTower([{ west: ['closet'] }, { west: ['lavatory'] }]), { system: 'IV' });
    expect(mixed.findings('appliance-not-allowed').map(({ facts }) => facts)).toEqual([
      { what: 'mixed', soil: 1, others: 1 },
    ]);
    const soil = run(europeanTower([{ west: ['closet'] }, { west: ['urinal, tank'] }]), { system: 'IV' });
    expect(soil.findings('appliance-not-allowed')).toEqual([]);
  });
});
