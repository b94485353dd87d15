import { describe, expect, test } from 'vitest';
import { armOf, circuitVentedRow, hall, lineOf, times, ventedRow } from '../support/rows.ts';
import { runSketch, type SketchRun } from '../support/run-sketch.ts';
import { floorOf, tower } from '../support/towers.ts';

// National Plumbing Code, sizes of vents: rules R73 to R82, R87. Tables 2.5.7.1., 2.5.8.3., 2.5.8.4. by hand.
const lavatory = 'lavatory, trap 1 1/4 in'; // 1
const mop = 'mop-sink, trap 2 in'; // 2
const closet = 'closet, tank'; // 4
const shower6 = 'shower, heads 6, trap 3 in'; // 6
const stall = 'urinal, stall, trap 2 in'; // 2
const vent = (run: SketchRun, pipe: string) => [run.role(pipe), run.size(pipe)];
const asks = (run: SketchRun, pipe: string, rule: string) =>
  run.pipe(pipe).trail.find((step) => step.rule === rule)?.asks?.label;

describe('R75 individual and dual vents: Table 2.5.7.1. only', () => {
  test.each([
    { trap: '1 1/4', size: '1¼ in' },
    { trap: '1 1/2', size: '1¼ in' },
    { trap: '2', size: '1½ in' },
    { trap: '3', size: '1½ in' },
    { trap: '4', size: '1½ in' },
  ])('a trap of $trap in: $size', ({ trap, size }) => {
    const run = runSketch(ventedRow([`clinical-sink, trap ${trap} in`, lavatory]));
    expect(vent(run, 'V1-VT1')).toEqual(['individual-vent', size]);
  });

  test('20 m of it make no difference', () => {
    const text = ventedRow(['sink, trap 1 1/2 in', lavatory]).replace(
      'V1 > VT1 (to 4.2)',
      'V1 > A1 (to 3) > A2 (east 16) > VT1 (to 4.2)',
    );
    expect(vent(runSketch(text), 'A1-A2')).toEqual(['individual-vent', '1¼ in']);
  });

  test('two fixtures at one joint: a dual vent, by the larger trap', () => {
    const run = runSketch(
      hall(
        'Back to back',
        `node J1 at 0 0 -0.4
${armOf(1, lavatory)}
trap T2 from J1 north 0.4 rise 1:50
mop-sink F2 from T2 to 0, trap 2 in
drain 2 in: F2 > T2 > J1 > K (east 1 fall 1:50) > BF (to -1.2) > OUT (east 4 fall 1:50)
vent 3 in: J1 > VT (to 4.2)
terminal VT
sewer OUT`,
      ),
    );
    expect(vent(run, 'J1-VT')).toEqual(['dual-vent', '1½ in']);
    expect(['F1', 'F2'].map((name) => run.fixture(name).ventedBy.how)).toEqual(['dual-vent', 'dual-vent']);
  });
});

describe('R76 branch vents: all whose air passes, the most distant connection for every part', () => {
  /** Four mop sinks whose vents meet one after another at `M2`, `M3`, `M4`, and run on `run` metres. */
  const meeting = (run: number): SketchRun => {
    const row = ventedRow(times(4, mop));
    const joined = [1, 2, 3, 4].reduce((text, n) => {
      const up = n === 1 ? `V1 > U1 (to 2.5) > M2 (over V2 rise 1:100)` : `V${n} > M${n}`;
      return text.replace(`V${n} > VT${n} (to 4.2)\nterminal VT${n}`, up);
    }, row);
    const on = `vent 1 1/2 in: M2 > M3 (over V3 rise 1:100) > M4 (over V4 rise 1:100) > R (east ${run} rise 1:100) > VT (to 4.2)\nterminal VT`;
    return runSketch(joined.replace('sewer OUT', `${on}\nsewer OUT`));
  };

  test('8 units, the farthest joint 16 m away: 1½ in (row 8 to 30 m)', () => {
    const run = meeting(10.1);
    const parts = ['M2-M3', 'M3-M4', 'M4-R', 'R-VT'];
    expect(parts.map((pipe) => run.role(pipe))).toEqual(times(4, 'branch-vent'));
    expect(parts.map((pipe) => run.pipe(pipe).ventLoad?.most)).toEqual([4, 6, 8, 8]);
    for (const pipe of parts) expect(run.pipe(pipe).developedLength).toBeCloseTo(16.5, 0);
    expect(run.size('R-VT')).toBe('1½ in');
    expect([run.role('U1-M2'), run.size('U1-M2')]).toEqual(['individual-vent', '1½ in']);
  });

  test('past 30 m: 2 in is unread in row 8, the next heavier row with a figure, 42, lets it go 30 m: 3 in, provisional', () => {
    const run = meeting(28);
    expect([run.size('R-VT'), run.pipe('R-VT').provisional]).toEqual(['3 in', true]);
  });
});

describe('R77 stack vents and vent stacks: Table 2.5.8.4. by size and load at the foot', () => {
  const topAt = (text: string, storeys: number, length: number): string =>
    text
      .replace(/VT \(to [\d.]+\)/, `VT (to ${(floorOf(storeys) - 0.4 + length).toFixed(3)})`)
      .replace(/VH \(to [\d.]+\)/, 'VH (up 0.5)')
      .replace(/top \d+ thick/, `top ${floorOf(storeys) + 0.6} thick`);

  test('3 in stack, 35, 3 m: 1½ in', () => {
    // 18 and 17 from two storeys; a 3 in vent elsewhere keeps R78 away.
    const storeys = [times(3, shower6), [...times(2, shower6), 'clinical-sink, trap 3 in']];
    const run = runSketch(topAt(tower(storeys), 2, 3));
    expect([run.size('S1-SF'), run.pipe('VH-VT').ventLoad?.most]).toEqual(['3 in', 35]);
    expect(run.pipe('VH-VT').developedLength).toBeCloseTo(3, 3);
    expect(vent(run, 'VH-VT')).toEqual(['stack-vent', '1½ in']);
  });

  const six17 = times(6, '').map(() => [...times(2, shower6), 'clinical-sink, trap 3 in']);
  test.each([
    { length: 7.5, size: '1½ in', why: 'the limit of 1½ in' },
    { length: 7.6, size: '2 in', why: 'past it' },
    { length: 26, size: '2 in', why: 'the limit of 2 in' },
    { length: 26.1, size: '3 in', why: 'past it' },
  ])('3 in stack, 102, $length m: $size ($why)', ({ length, size }) => {
    const run = runSketch(topAt(tower(six17, { ventStack: true }), 6, length));
    expect(run.size('S1-VF')).toBe('3 in');
    expect(asks(run, 'VH-VT', 'NPC-R77')).toBe(size);
  });

  test('half the stack at its foot: 4 in asks 2 in, though the load is small', () => {
    const run = runSketch(
      tower(
        times(7, '').map(() => [closet]),
        { ventStack: true },
      ),
    );
    expect([run.size('S1-VF'), asks(run, 'S7-VH', 'NPC-R77-half')]).toEqual(['4 in', '2 in']);
  });

  test('the vent stack is measured from its foot to open air', () => {
    const run = runSketch(
      tower(
        times(5, '').map(() => [lavatory]),
        { ventStack: true },
      ),
    );
    // 0.5 m aside, from -0.69 up to the roof at 15.15, back 0.5 m, and 0.6 m on to 15.8.
    expect(run.pipe('VB-VU').developedLength).toBeCloseTo(0.5 + 15.84 + 0.5 + 0.6, 1);
    // The stack's load counts once, also where its vent stack has joined its stack vent.
    expect([run.pipe('VB-VU').ventLoad?.most, run.pipe('VH-VT').ventLoad?.most]).toEqual([5, 5]);
  });
});

describe('R78 one vent of 3 in for every building drain', () => {
  const house = (stackVent: string, more = '') =>
    runSketch(
      tower([[], [closet, lavatory]], { stack: '3 in', more }).replace('vent 3 in: S2', `vent ${stackVent}: S2`),
    );

  test('a house with one 3 in stack: its stack vent is 3 in although 1½ in passes the table', () => {
    const run = house('1 1/2 in');
    expect([asks(run, 'S2-VH', 'NPC-R77'), run.size('S2-VH'), run.size('VH-VT')]).toEqual(['1½ in', '3 in', '3 in']);
    expect(run.findings('undersized').length).toBeGreaterThan(0);
  });

  test('another vent drawn 3 in to open air satisfies it', () => {
    const text = tower([[], [closet, lavatory]], { stack: '3 in' })
      .replace('vent 3 in: S2', 'vent 1 1/2 in: S2')
      .replace('vent 1 1/2 in: V2.1', 'vent 3 in: V2.1');
    expect(runSketch(text).size('VH-VT')).toBe('1½ in');
  });

  test('drawn 3 in at the stack vent: sound, and nothing more is asked', () => {
    const run = house('3 in');
    expect([run.size('VH-VT'), run.findings('main-vent-missing')]).toEqual(['1½ in', []]);
  });

  test('no stack: a finding on the building drain, and no vent grows by itself', () => {
    const run = runSketch(ventedRow([closet, lavatory]));
    expect(run.findings('main-vent-missing')).toHaveLength(1);
    expect([run.size('V1-VT1'), run.size('V2-VT2')]).toEqual(['1½ in', '1¼ in']);
  });
});

describe('R79 to R81 yoke and offset relief vents: one size below, without length', () => {
  test('R79 4 in stack, 3 in vent stack: the yoke vent 2 in', () => {
    // Twelve closets: 4 in from the seventh on; vent stack by row 140 of 4 in: 3 in (2 in to 8 m).
    const run = runSketch(
      tower(
        times(12, '').map(() => [closet]),
        { ventStack: true, yokes: [8, 3] },
      ),
    );
    expect([run.size('S3-Y3'), run.size('W3-W8'), vent(run, 'Y3-W3')]).toEqual(['4 in', '3 in', ['yoke-vent', '2 in']]);
  });

  test('R80 3 in stack vent: the offset relief vent 2 in', () => {
    const vents =
      'node RB from OB down 0.5\nvent 2 in: OA > RA (to 33)\nterminal RA\nvent 2 in: RB > RB2 (north 1 rise 1:50) > RB3 (to 33)\nterminal RB3';
    // 120 on a 4 in stack: row 140, 2 in to 8 m; at 22 m 3 in.
    const twenty = [...times(3, shower6), mop];
    const text = tower([[], [], [], ...times(6, '').map(() => twenty)], { offset: 2, more: vents })
      .replace('SF (to -1.6)', 'RB > SF (to -1.6)')
      .replace(/VT \(to [\d.]+\)/, 'VT (to 40)');
    const run = runSketch(text);
    expect(asks(run, 'S9-VH', 'NPC-R77')).toBe('3 in');
    expect([vent(run, 'OA-RA'), vent(run, 'RB2-RB3')]).toEqual([
      ['offset-relief-vent', '2 in'],
      ['offset-relief-vent', '2 in'],
    ]);
  });
});

describe('R74 no step down towards air', () => {
  test('a vent of 1½ in joins a stack vent of 1¼ in: the latter 1½ in from there up', () => {
    const more = `node FJ from SF east 2 fall 1:50
node V9 from FJ south 0.3 rise 1:50
trap T9 from V9 south 0.3 rise 1:50
mop-sink F9 from T9 to 0, trap 2 in
drain 2 in: F9 > T9 > V9 > FJ
vent 1 1/2 in: V9 > U9 (to 6) > VH`;
    const text = tower([[], [lavatory, lavatory]], { more }).replace(
      'OUT (east 9 fall 1:50)',
      'FJ > OUT (east 5 fall 1:50)',
    );
    const run = runSketch(text);
    expect([vent(run, 'S2-VH'), vent(run, 'VH-VT')]).toEqual([
      ['stack-vent', '1¼ in'],
      ['stack-vent', '1½ in'],
    ]);
    // The stack’s 2, and the mop sink’s 2 that joins: past the one row of a 1¼ in stack, so that of 1½ in: 1¼ in to 15 m.
    expect([run.pipe('VH-VT').ventLoad?.most, asks(run, 'VH-VT', 'NPC-R77')]).toEqual([4, '1¼ in']);
  });
});

describe('R76 vent header: each stack once, from the most distant connection to open air', () => {
  test('two stacks of 18, header at the roof: 36, as long as from the farther stack’s foot of vent', () => {
    const other = `node S9 at 6 0 2.6
${[1, 2, 3].map((n) => `node J9.${n} from S9 west ${n * 0.7} rise 1:50\n${armOf(`9.${n}`, shower6, { floor: 3, vented: true, sky: 7 })}`).join('\n')}
drain 3 in: J9.3 > J9.2 > J9.1 > S9 > G9
node G9 from SF east 6 fall 1:50
vent 3 in: S9 > H9
node H9 from S9 to 6.26`;
    const text = tower([[], times(3, shower6)], { more: other })
      .replace('OUT (east 9 fall 1:50)', 'G9 > OUT (east 9 fall 1:50)')
      .replace('VH (to 6.2) > VT (to 6.8)', 'VH (to 6.2) > H9 > VT (up 0.6)');
    const run = runSketch(text);
    expect([run.role('S2-VH'), run.role('VH-H9'), run.role('S9-H9'), run.role('H9-VT')]).toEqual([
      'stack-vent',
      'stack-vent',
      'stack-vent',
      'vent-header',
    ]);
    expect(run.pipe('H9-VT').ventLoad?.most).toBe(36);
    // 3.6 m up, 6 m along, 0.6 m up. Row 42, past 9 m: 2 in.
    expect(run.pipe('H9-VT').developedLength).toBeCloseTo(10.2, 1);
    expect(run.size('H9-VT')).toBe('2 in');
  });
});

describe('R82 vents of tanks', () => {
  const tank = (word: string, fixtures: readonly string[]) =>
    runSketch(
      hall(
        'A tank',
        `node J1 at 0 0 -0.4
${fixtures.map((what, at) => armOf(at + 1, what, { vented: true })).join('')}
${word} S from J${fixtures.length} east 2 fall 1:50
drain 4 in: J1${lineOf(2, fixtures.length)} > S > OUT (east 4 fall 1:50)
vent 2 in: S > ST (to 4.2)
terminal ST
sewer OUT`,
      ),
    );
  test('the vent of a sump: one size below the largest drain into it, 2 in at least', () => {
    // Three closets: 4 in (R22), so 3 in as RULES has it; a mop sink’s 2 in: 1½ in, but 2 in is the least.
    expect(vent(tank('sump', times(3, closet)), 'S-ST')).toEqual(['tank-vent', '3 in']);
    expect(vent(tank('sump', [mop]), 'S-ST')).toEqual(['tank-vent', '2 in']);
  });

  test('the vent of a manhole inside: 2 in', () => {
    expect(vent(tank('manhole', [mop]), 'S-ST')).toEqual(['tank-vent', '2 in']);
  });
});

test('R87 two roles, one pipe: the larger demand governs, rounded up to a printed size', () => {
  // A circuit vent of 1½ in by its table where a vent of 2 in joins it: 2 in from there (R74).
  const row = times(4, stall);
  const run = runSketch(circuitVentedRow(row));
  const trail = run.pipe('VJ-VT').trail.map(({ rule, asks: size, governs }) => `${rule} ${size?.label} ${governs}`);
  expect(trail).toContain('NPC-R75 1½ in true');
  expect(run.size('VJ-VT')).toBe('1½ in');
});
