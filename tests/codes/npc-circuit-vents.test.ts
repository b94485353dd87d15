import { describe, expect, test } from 'vitest';
import { armOf, circuitVentedRow, hall, times } from '../support/rows.ts';
import { runSketch, type SketchRun } from '../support/run-sketch.ts';

// National Plumbing Code, circuit vents: rules R53 to R66, R69. Loads by Table 2.4.9.3., sizes by the tables named.
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

  test('a vent on the drain that the branch joins is none of its own', () => {
    // A branch of five closets, 20, comes in at M; the vent V9 stands past it on the drain of both.
    const heavy = [31, 32, 33, 34, 35].map((n) => armOf(n, closet, { vented: true })).join('');
    const others = `node J35 from M north 1 rise 1:50
${[34, 33, 32, 31].map((n) => `node J${n} from J${n + 1} north 0.7 rise 1:50`).join('\n')}
${heavy.replaceAll('south', 'west')}
drain 4 in: J31 > J32 > J33 > J34 > J35 > M
vent 3 in: V9 > V9T (to 4.2)
terminal V9T`;
    const text = circuitVentedRow(times(4, closet), { relief: '', more: others }).replace(
      'K (east 0.7 fall 1:50)',
      'M (east 1 fall 1:50) > V9 (east 1 fall 1:50) > K (east 0.7 fall 1:50)',
    );
    expect(asCircuit(text).broken).toEqual(['R57']);
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

describe('R69 fixtures on a vertical circuit vent: two of 1½ units at most, at one joint', () => {
  const onVent = (lines: string) => {
    const text = circuitVentedRow(times(4, stall), { lavatories: true });
    const start = text.indexOf('trap TL1');
    const end = text.indexOf('drain 3 in: LJ > CV');
    const run = runSketch(`${text.slice(0, start)}${lines}\n${text.slice(end)}`);
    return run.result.batteries.map(({ reading, broken, others }) => {
      const circuit =
        reading === 'circuit-vent' ? broken : others.find((one) => one.reading === 'circuit-vent')!.broken;
      return circuit.map(({ rule, facts }) => [rule.slice(4), Object.keys(facts)[0]]);
    })[0];
  };
  const at = (name: string, joint: string, side: string, what = 'lavatory', trap = '1 1/4') =>
    `trap T${name} from ${joint} ${side} 0.4 rise 1:50\n${what} ${name} from T${name} up 0.12, trap ${trap} in\ndrain ${trap} in: ${name} > T${name} > ${joint}`;

  test('two lavatories at a double fitting: allowed; a lavatory of 1.5 is the limit', () => {
    expect(onVent(`${at('L1', 'LJ', 'west')}\n${at('L2', 'LJ', 'east')}`)).toEqual([]);
    expect(
      onVent(`${at('L1', 'LJ', 'west', 'lavatory', '1 1/2')}\n${at('L2', 'LJ', 'east', 'sink', '1 1/2')}`),
    ).toEqual([]);
  });

  test('three; two apart; one heavier than 1.5', () => {
    const three = `${at('L1', 'LJ', 'west')}\n${at('L2', 'LJ', 'east')}\n${at('L3', 'LJ', 'north')}`;
    expect(onVent(three)).toEqual([['R69', 'fixturesOnVent']]);
    expect(onVent(at('L1', 'LJ', 'west', 'mop-sink', '2'))).toEqual([['R69', 'loadUnits']]);
    const apart = `node LK from CV to 0.2\n${at('L1', 'LJ', 'west')}\n${at('L2', 'LK', 'east')}`;
    expect(onVent(apart)).toEqual([['R69', 'fixturesApart']]);
  });

  test('the wet portion is 1½ in with 2 units, and 2 in where the user asks British Columbia’s least', () => {
    const text = circuitVentedRow(times(4, stall), { lavatories: true });
    expect(runSketch(text).size('LJ-CV')).toBe('1½ in');
    const settings = { leastWetPortion: '2 in' };
    expect(runSketch(text, { answers: { settings } }).size('LJ-CV')).toBe('2 in');
  });
});
