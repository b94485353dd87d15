import { describe, expect, test } from 'vitest';
import { armOf, circuitVentedRow, hall, lavatoryPair, times } from '../support/rows.ts';
import { runSketch } from '../support/run-sketch.ts';

// National Plumbing Code, relief and additional circuit vents: rules R58 to R61. Loads by Table 2.4.9.3., sizes by the tables named.
const stall = 'urinal, stall, trap 2 in'; // 2
const drain2 = 'floor-drain, trap 2 in'; // 2
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
