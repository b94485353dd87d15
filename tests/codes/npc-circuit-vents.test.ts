import { describe, expect, test } from 'vitest';
import { armOf, circuitVentedRow, hall, lavatoryPair, times } from '../support/rows.ts';
import { runSketch, type SketchRun } from '../support/run-sketch.ts';

// National Plumbing Code, circuit vents: rules R53 to R66. Loads by Table 2.4.9.3., sizes by the tables named.
const stall = 'urinal, stall, trap 2 in'; // 2
const drain2 = 'floor-drain, trap 2 in'; // 2
const drain3 = 'floor-drain, trap 3 in'; // 3
const lavatory = 'lavatory, trap 1 1/4 in'; // 1
const closet = 'closet, tank'; // 4

/** The one battery and the rules that the circuit vent breaks. */
const asCircuit = (text: string) => {
  const run = runSketch(text);
  expect(run.result.batteries).toHaveLength(1);
  const { reading, broken, others } = run.result.batteries[0]!;
  const own =
    reading === 'circuit-vent' ? broken : (others.find((one) => one.reading === 'circuit-vent')?.broken ?? []);
  return { run, reading, broken: own.map(({ rule }) => rule.slice(4)), facts: own.map(({ facts }) => facts) };
};
const sound = { reading: 'circuit-vent', broken: [] };

describe('R53 what may be circuit vented', () => {
  test('four floor drains on one storey, with circuit vent and relief vent: sound', () => {
    expect(asCircuit(circuitVentedRow(times(4, drain2)))).toMatchObject(sound);
  });

  test('a stack from the storey above enters between the second and the third floor drain', () => {
    const stack = `storey "Upper" at 3.6
node S from J8 up 4
node J11 from S west 1 rise 1:50
node J12 from J11 west 1 rise 1:50
${armOf(11, lavatory, { floor: 3.6, vented: true, sky: 8 })}
${armOf(12, lavatory, { floor: 3.6, vented: true, sky: 8 })}
drain 3 in: J12 > J11 > S > J8
vent 3 in: S > VS (to 8)
terminal VS`;
    const text = circuitVentedRow(times(4, drain2), { more: stack })
      .replace('J3 (east 0.7 fall 1:50)', 'J8 (east 0.35 fall 1:50) > J3 (east 0.35 fall 1:50)')
      .replace('VT (to 4.2)', 'VT (to 8)')
      .replace('top 3.6 thick', 'top 7.4 thick');
    const { broken, facts } = asCircuit(text);
    expect(broken).toEqual(['R53']);
    expect(facts).toEqual([{ stackUpstream: true }]);
  });

  test('R66 a drop in the branch: no longer nominally horizontal', () => {
    const text = circuitVentedRow(times(4, drain2)).replace(
      'J3 (east 0.7 fall 1:50)',
      'X (east 0.3 fall 1:50) > Y (down 0.3) > J3 (east 0.4 fall 1:50)',
    );
    const { broken, facts } = asCircuit(text);
    expect([broken, facts]).toEqual([['R53'], [{ verticalPipes: 1 }]]);
  });
});

describe('R54 where the circuit vent joins: between the first and the second fixture, seen from upstream', () => {
  /** The foot at `V`, `after` the joint it is named for. */
  const ventAfter = (joint: string): SketchRun =>
    runSketch(
      hall(
        'Four floor drains',
        `node J1 at 0 0 -0.4
drain 3 in: J1 > J2 (east 0.7 fall 1:50) > J3 (east 0.7 fall 1:50) > J4 (east 0.7 fall 1:50) > RV (east 0.4 fall 1:50) > OUT (east 5 fall 1:50)
${times(4, drain2)
  .map((what, at) => armOf(at + 1, what))
  .join('')}
vent 3 in: RV > RT (to 4.2)
terminal RT
vent 3 in: V > VT (to 4.2)
terminal VT
sewer OUT`,
      )
        .replace(
          `drain 3 in: J1 > J2 (east 0.7 fall 1:50)`,
          `drain 3 in: J1 > ${joint === 'J1' ? 'V (east 0.3 fall 1:50) > J2 (east 0.4 fall 1:50)' : 'J2 (east 0.7 fall 1:50)'}`,
        )
        .replace(
          'J3 (east 0.7 fall 1:50)',
          joint === 'J2' ? 'V (east 0.3 fall 1:50) > J3 (east 0.4 fall 1:50)' : 'J3 (east 0.7 fall 1:50)',
        ),
    );

  test('between a and b: sound', () => {
    const run = ventAfter('J1');
    expect(run.result.batteries[0]).toMatchObject(sound);
    expect(run.findings('unvented-trap')).toEqual([]);
  });

  test('between b and c: a and b have no vent upstream of them, and air does not come from below', () => {
    const run = ventAfter('J2');
    expect(['F1', 'F2'].map((name) => run.fixture(name).ventedBy.how)).toEqual(['unvented', 'unvented']);
    expect(run.findings('unvented-trap')).toHaveLength(2);
  });
});

test('R55 extent: from the circuit vent’s joint, the first fixture’s drain below it included, to the relief vent’s joint', () => {
  const run = runSketch(circuitVentedRow(times(3, stall)));
  expect(
    ['J1-CV', 'CV-J2', 'J2-J3', 'J3-RV', 'RV-K'].map((pipe) => [pipe, run.role(pipe), run.pipe(pipe).also]),
  ).toEqual([
    ['J1-CV', 'fixture-drain', []],
    ['CV-J2', 'circuit-vented-branch', ['fixture-drain']],
    ['J2-J3', 'circuit-vented-branch', ['branch']],
    ['J3-RV', 'circuit-vented-branch', ['branch']],
    ['RV-K', 'branch', []],
  ]);
});

describe('R56 outlets below 2 in are vented apart from larger ones', () => {
  test('a lavatory among closets', () => {
    const { broken } = asCircuit(circuitVentedRow([closet, closet, lavatory, closet]));
    expect(broken).toEqual(['R56']);
  });

  test('a row of small ones only: sound, and 2 in at least (R63)', () => {
    const { run, ...rest } = asCircuit(circuitVentedRow(times(4, lavatory)));
    expect(rest).toMatchObject(sound);
    expect(['CV-J2', 'J4-RV'].map((pipe) => run.size(pipe))).toEqual(['2 in', '2 in']);
  });
});

describe('R57 relief vent required', () => {
  test('a row of closets without one: circuit vented by its kind, and the relief vent is missing', () => {
    const { run, reading, broken } = asCircuit(circuitVentedRow(times(4, closet), { relief: '' }));
    expect([reading, broken]).toEqual(['circuit-vent', ['R57']]);
    expect(run.findings('relief-vent-missing')).toHaveLength(1);
    // It ends at the last circuit-vented fixture's joint (R55).
    expect([run.role('J3-J4'), run.role('J4-RV')]).toEqual(['circuit-vented-branch', 'branch']);
  });

  test('three closets in a row, the first with the vent on its drain: the same', () => {
    const { reading, broken } = asCircuit(circuitVentedRow(times(3, closet), { relief: '' }));
    expect([reading, broken]).toEqual(['circuit-vent', ['R57']]);
  });

  test('urinals of 2 in without one hold as a wet vent: that it is', () => {
    const { reading, broken } = asCircuit(circuitVentedRow(times(4, stall), { relief: '' }));
    expect([reading, broken]).toEqual(['wet-vent', ['R57']]);
  });
});

describe('R58 a drain that stands in for the relief vent: at most 6, vented', () => {
  /** Closets, then a vented drain with these fixtures at `RJ`, in place of the relief vent. */
  const standIn = (fixtures: readonly string[], row: readonly string[] = times(4, closet)) =>
    circuitVentedRow(row, {
      relief: `node J21 from RV north 0.6 rise 1:50
${fixtures.map((_, at) => (at === 0 ? '' : `node J${21 + at} from J${20 + at} north 0.5 rise 1:50`)).join('\n')}
${fixtures.map((what, at) => armOf(21 + at, what, { vented: true })).join('')}
drain 2 in: ${fixtures
        .map((_, at) => `J${21 + at}`)
        .reverse()
        .join(' > ')} > RV`,
    });

  test('two lavatories, 2: the larger of Table -B 1¼, Table 2.5.8.1. 1½ and, with 2 in traps, Table 2.5.7.1. 1½ in', () => {
    const { run, ...rest } = asCircuit(
      standIn(times(2, lavatory), times(4, 'urinal, pedestal, trap 2 in, reading circuit-vent')),
    );
    expect(rest).toMatchObject(sound);
    expect(run.pipe('J21-RV')).toMatchObject({ role: 'branch', also: ['relief-vent'] });
    const asks = run
      .pipe('J21-RV')
      .trail.flatMap(({ rule, asks: size }) => (rule.startsWith('NPC-R58') ? [[rule, size?.label]] : []));
    expect(asks).toEqual([
      ['NPC-R58', '1½ in'],
      ['NPC-R58-branch', '1¼ in'],
      ['NPC-R58-trap', '1½ in'],
    ]);
    expect(run.size('J21-RV')).toBe('1½ in');
    expect(run.role('J4-RV')).toBe('circuit-vented-branch');
  });

  test('6, the limit: 3 in by Table 2.5.8.1. (4 is the limit of 2 in)', () => {
    const { run, broken } = asCircuit(standIn(times(3, drain2)));
    expect([broken, run.pipe('J21-RV').also, run.size('J21-RV')]).toEqual([[], ['relief-vent'], '3 in']);
  });

  test('6.5: too much, and the relief vent is missing', () => {
    const { run, broken } = asCircuit(standIn(['sink, trap 1 1/2 in', ...times(5, lavatory)]));
    expect([broken, run.pipe('J21-RV').also]).toEqual([['R57'], []]);
  });

  test('a drain without a vent of its own stands in for nothing', () => {
    const text = standIn([drain2]).replace(/\nvent 1 1\/2 in: V21 > VT21.*\nterminal VT21/, '');
    expect(text).not.toContain('VT21');
    const run = runSketch(text);
    expect(run.pipe('J21-RV').also).toEqual([]);
  });
});

describe('R59 one relief vent for two rows that join symmetrically', () => {
  /** Two rows from west and east into `RV`, each with its circuit vent; the relief vent stands on their joint. */
  const backToBack = (each: number, what = stall): string => {
    const row = (prefix: number, side: string) => {
      const last = prefix + each - 1;
      const nodes = Array.from(
        { length: each - 1 },
        (_, at) => `J${last - at - 1} from J${last - at} ${side} 0.7 rise 1:50`,
      );
      const arms = Array.from({ length: each }, (_, at) => armOf(prefix + at, what)).join('');
      return `node J${last} from RV ${side} 0.5 rise 1:50
${nodes
  .slice(0, -1)
  .map((text) => `node ${text}`)
  .join('\n')}
node C${prefix} from J${prefix + 1} ${side} 0.4 rise 1:50
node J${prefix} from J${prefix + 1} ${side} 0.7 rise 1:50
drain 3 in: J${prefix} > C${prefix}${lineNames(prefix + 1, last)} > RV
${arms}
vent 3 in: C${prefix} > V${prefix} (to 4.2)
terminal V${prefix}`;
    };
    return hall(
      'Back to back',
      `node RV at 0 0 -0.6
${row(1, 'west')}
${row(31, 'east')}
drain 4 in: RV > K (north 1 fall 1:50) > BF (to -1.4) > OUT (north 6 fall 1:50)
vent 3 in: RV > RT (to 4.2)
terminal RT
sewer OUT`,
    ).replace('roof "Roof" from -5 -5', 'roof "Roof" from -20 -5');
  };
  const lineNames = (first: number, last: number): string =>
    Array.from({ length: last - first + 1 }, (_, at) => ` > J${first + at}`).join('');

  test('rows of five: one relief vent serves both', () => {
    const run = runSketch(backToBack(5));
    expect(run.result.batteries.map(({ reading, broken }) => ({ reading, broken }))).toEqual([sound, sound]);
    expect([run.role('RV-RT'), run.role('C1-V1'), run.role('C31-V31')]).toEqual([
      'relief-vent',
      'circuit-vent',
      'circuit-vent',
    ]);
    // Each circuit vent counts its own row: 10.
    expect([run.pipe('C1-V1').ventLoad?.most, run.pipe('C31-V31').ventLoad?.most]).toEqual([10, 10]);
    // Without stacks the building drain begins below the last row, where two branches meet.
    expect(run.role('RV-K')).toBe('building-drain');
  });

  test('rows of eight are the limit, nine are past it (R60)', () => {
    expect(runSketch(backToBack(8, closet)).result.batteries.map(({ broken }) => broken.length)).toEqual([0, 0]);
    const nine = runSketch(backToBack(9, closet)).result.batteries;
    expect(nine.map(({ broken }) => broken.map(({ rule }) => rule))).toEqual([['NPC-R60'], ['NPC-R60']]);
  });
});

describe('R60 additional circuit vents', () => {
  test('eight fixtures between vents: none; nine: one more in the row', () => {
    expect(asCircuit(circuitVentedRow(times(8, closet)))).toMatchObject(sound);
    const { run, reading, broken, facts } = asCircuit(circuitVentedRow(times(9, closet)));
    expect([reading, broken, facts]).toEqual(['circuit-vent', ['R60'], [{ traps: 9, trapsMost: 8 }]]);
    expect(run.findings('additional-circuit-vent-missing')).toHaveLength(1);
  });

  test('nine with one more vent after the fifth: sound; it is sized with the circuit vent, and without length (R64, R73)', () => {
    const row = times(9, closet);
    const text = circuitVentedRow(row, { run: 34, more: 'vent 3 in: AC > AT (to 4.2)\nterminal AT' }).replace(
      'J6 (east 0.7 fall 1:50)',
      'AC (east 0.35 fall 1:50) > J6 (east 0.35 fall 1:50)',
    );
    const { run, ...rest } = asCircuit(text);
    expect(rest).toMatchObject(sound);
    // 36: row 42, 38 m: past 30 m of 2 in, so 3 in; the additional one 2 in, never more.
    expect([run.role('CV-VJ'), run.pipe('CV-VJ').ventLoad?.most, run.size('CV-VJ')]).toEqual([
      'circuit-vent',
      36,
      '3 in',
    ]);
    expect([run.role('AC-AT'), run.size('AC-AT')]).toEqual(['additional-circuit-vent', '2 in']);
    expect(run.role('J5-AC')).toBe('circuit-vented-branch');
  });

  const turned = (turn: string) =>
    circuitVentedRow(times(4, closet)).replace(
      'J4 (east 0.7 fall 1:50) > RV (east 0.4 fall 1:50)',
      `X (east 0.3 fall 1:50) > J4 (${turn} fall 1:50) > RV (${turn} fall 1:50)`,
    );
  test('a turn of 90° in plan: one more; of 45°: none', () => {
    const { broken, facts } = asCircuit(turned('north 0.8'));
    expect([broken, facts[0]?.turnMostDeg]).toEqual([['R60'], 45]);
    expect(facts[0]?.turnDeg).toBeCloseTo(90, 1);
    expect(asCircuit(turned('east 0.6 north 0.6'))).toMatchObject(sound);
  });

  test('a 90° turn with one more vent beside it: sound', () => {
    const text = turned('north 0.8')
      .replace('X (east 0.3 fall 1:50)', 'X (east 0.3 fall 1:50) > AC (north 0.3 fall 1:50)')
      .replace('sewer OUT', 'vent 2 in: X > AT (to 4.2)\nterminal AT\nsewer OUT');
    expect(asCircuit(text)).toMatchObject(sound);
  });
});

describe('R61 a vented drain that stands in for an additional circuit vent: sized as a wet vent, 2 in at least', () => {
  test('two vented lavatories after the fifth of nine closets', () => {
    const text = circuitVentedRow(times(9, closet), {
      more: `node LL from AC north 0.5 rise 1:50
node LJ from LL to 0.5
${lavatoryPair('LJ')}
drain 2 in: LJ > LL > AC
vent 1 1/2 in: LJ > AT (to 4.2)
terminal AT`,
    }).replace('J6 (east 0.7 fall 1:50)', 'AC (east 0.35 fall 1:50) > J6 (east 0.35 fall 1:50)');
    const { run, ...rest } = asCircuit(text);
    expect(rest).toMatchObject(sound);
    expect(run.pipe('LL-AC')).toMatchObject({ role: 'branch', also: ['additional-circuit-vent'] });
    expect(run.size('LL-AC')).toBe('2 in'); // 2: Table 2.5.8.1. 1½ in, but 2 in at least
    expect([run.role('LJ-AT'), run.size('LJ-AT')]).toEqual(['dual-vent', '1¼ in']);
    expect(run.pipe('CV-VJ').ventLoad?.most).toBe(36); // the lavatories are not on it
  });
});

test('R62 fixtures on the vent itself do not count: eight floor drains and two lavatories on the vent are eight', () => {
  const { run, ...rest } = asCircuit(circuitVentedRow(times(8, drain2), { lavatories: true }));
  expect(rest).toMatchObject(sound);
  expect(run.findings('additional-circuit-vent-missing')).toEqual([]);
});

test('R63 five urinals with 2 in traps, 10: 3 in', () => {
  const run = runSketch(circuitVentedRow(times(5, stall)));
  expect([run.pipe('J5-RV').load.most, run.size('CV-J2'), run.size('J5-RV')]).toEqual([10, '3 in', '3 in']);
});

test('R65 three floor drains and a slop sink with 3 in traps: 12; at 12 m 1½ in (Table 2.5.8.3. row 20 to 15 m)', () => {
  const run = runSketch(circuitVentedRow([drain3, drain3, drain3, 'mop-sink, trap 3 in'], { run: 7.92 }));
  const vent = run.pipe('CV-VJ');
  expect([vent.role, vent.ventLoad?.most, run.size('CV-VJ')]).toEqual(['circuit-vent', 12, '1½ in']);
  expect(vent.developedLength).toBeCloseTo(12, 1);
});

test('R66 a vented sink of 1.5 in the middle: the branch carries it, the circuit vent does not', () => {
  const row = [drain3, drain3, 'sink, trap 1 1/2 in', drain3];
  const text = circuitVentedRow(row).replace(armOf(3, row[2]!), armOf(3, row[2]!, { vented: true }));
  const { run, ...rest } = asCircuit(text);
  expect(rest).toMatchObject(sound);
  expect([run.pipe('J4-RV').load.most, run.pipe('CV-VJ').ventLoad?.most]).toEqual([10.5, 9]);
  expect(run.role('V3-VT3')).toBe('individual-vent');
});
