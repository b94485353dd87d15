import { describe, expect, test } from 'vitest';
import {
  armOf,
  circuitVentedRow,
  hall,
  lineOf,
  rowBehindVent,
  times,
  ventedRow,
  wetVentedRow,
} from '../support/rows.ts';
import { runSketch, type SketchRun } from '../support/run-sketch.ts';

// Cases that take judgement, each with its argument from the National Plumbing Code. Others of the kind stand beside
// their rules: exactly 45° (R01), offsets (R18), floor drain free of vent (R37), closet above a tub (R44), a drop in a
// branch (R66), vent between the wrong fixtures (R54), back-to-back rows (R59), nine fixtures and a turn of 90° (R60),
// five storeys and the foot of their vent stack (R68, R70), yoke vents at twelve (R71).
const lavatory = 'lavatory, trap 1 1/4 in';
const stall = 'urinal, stall, trap 2 in';
const closet = 'closet, tank';
const how = (run: SketchRun, ...names: string[]) => names.map((name) => run.fixture(name).ventedBy.how);
const errors = (run: SketchRun) => run.findings().flatMap(({ severity, code }) => (severity === 'error' ? [code] : []));
const rows = (run: SketchRun) =>
  run.result.batteries.map(({ reading, broken, fixtures }) => [
    reading,
    fixtures.length,
    broken.map(({ rule }) => rule),
  ]);

describe('a dry vent with a lavatory on it', () => {
  // The tub's vent rises from its arm; above the tub a lavatory drains into it. What carries the lavatory's water is no
  // dry vent: it is the wet vent of the tub (2.5.2.1.), 1 unit, 1½ in; above the lavatory the vent is dry.
  const run = runSketch(
    hall(
      'Lavatory on a vent',
      `trap TB at 0 0 -0.4
bathtub B from TB to 0, trap 1 1/2 in
node V from TB east 0.5 fall 1:50
node LJ from V to 0.5
trap TL from LJ south 0.4 rise 1:50
lavatory L from TL up 0.12, trap 1 1/4 in
drain 1 1/4 in: L > TL > LJ
drain 1 1/2 in: B > TB > V
drain 3 in: LJ > V > K (east 1 fall 1:50) > BF (to -1) > OUT (east 4 fall 1:50)
vent 3 in: LJ > VT (to 4.2)
terminal VT
sewer OUT`,
    ),
  );
  test('the pipe below it is a wet vent, the one above it dry', () => {
    expect([run.role('LJ-V'), run.size('LJ-V'), run.role('LJ-VT')]).toEqual(['wet-vent', '1½ in', 'continuous-vent']);
    expect(how(run, 'L', 'B')).toEqual(['continuous-vent', 'wet-vent']);
    expect(errors(run)).toEqual([]);
  });
});

describe('a relief vent that takes a lavatory', () => {
  // 2.5.4.5. lets fixtures drain into circuit, yoke and offset relief vents, not into a relief vent; but a vented drain of
  // at most 6 may act as one (2.5.3.1.(4)). The pipe with the lavatory's water is that drain.
  const relief = `node LJ from RV to 0.5
trap TL from LJ south 0.4 rise 1:50
lavatory L from TL up 0.12, trap 1 1/4 in
drain 1 1/4 in: L > TL > LJ
drain 1 1/2 in: LJ > RV
vent 3 in: LJ > RT (to 2.5) > VJ (over CV rise 1:100)`;
  const run = runSketch(circuitVentedRow(times(4, closet), { relief }));
  test('is the lavatory’s drain, and stands in for the relief vent', () => {
    expect(run.pipe('LJ-RV')).toMatchObject({ role: 'fixture-drain', also: ['relief-vent'] });
    // 1: Table 2.5.8.1. 1½ in; closet traps of 3 in: Table 2.5.7.1. 1½ in.
    expect([run.size('LJ-RV'), run.role('LJ-RT')]).toEqual(['1½ in', 'individual-vent']);
    expect(rows(run)).toEqual([['circuit-vent', 4, []]]);
  });
});

describe('a cleanout extension beside a vent', () => {
  // A dry pipe from the end of the branch up to a cleanout in the floor: nobody's air, nobody's water.
  const more = 'node C1 from J1 west 0.3 rise 1:50\ncleanout CO from C1 to 0, 3 in\ndrain 3 in: CO > C1 > J1';
  test('is idle and no fault; the vent beside it is a vent', () => {
    const run = runSketch(ventedRow(times(3, lavatory), more));
    expect([run.role('CO-C1'), run.role('C1-J1'), run.role('V1-VT1')]).toEqual(['idle', 'idle', 'individual-vent']);
    const about = run.findings().filter(({ code }) => ['dead-end', 'open-end', 'no-open-air', 'loop'].includes(code));
    expect(about).toEqual([]);
    expect(run.pipe('C1-J1').verdict).toBe('unknown');
  });

  test('open at its top under the roof instead of a cleanout: a vent that never gets out', () => {
    const text = ventedRow(
      times(3, lavatory),
      more.replace('cleanout CO from C1 to 0, 3 in', 'node CO from C1 to 2.4'),
    );
    expect(runSketch(text).findings('no-open-air')).toHaveLength(1);
  });
});

describe('an island sink', () => {
  // Its vent rises under the counter, turns down below the floor and goes up in the wall. Water in it drains back at its
  // low point. The trap has a vent of its own; the low point is a second foot of the same vent.
  const run = runSketch(
    hall(
      'Island',
      `kitchen-sink S at 0 0 0.6, trap 1 1/2 in
trap T from S down 0.15
drain 1 1/2 in: S > T > J (east 0.3 fall 1:50) > F (to -0.3) > L (east 1 fall 1:50) > OUT (east 5 fall 1:50)
vent 1 1/2 in: J > A (to 0.85) > B (east 0.4 rise 1:50) > D (to -0.25) > E (north 3 rise 1:50) > VT (to 4.2)
drain 1 1/2 in: D > L
terminal VT
sewer OUT`,
    ),
  );
  test('is vented by its own vent, round the loop', () => {
    expect([run.role('J-A'), run.role('B-D'), run.role('E-VT')]).toEqual(times(3, 'individual-vent'));
    expect(how(run, 'S')).toEqual(['individual-vent']);
    expect([run.size('J-A'), run.size('E-VT')]).toEqual(['1¼ in', '1¼ in']);
    expect(run.findings('unvented-trap')).toEqual([]);
    expect(run.findings('loop')).toEqual([]);
  });
});

describe('two rows on one branch', () => {
  /** Four closets, circuit vent and relief vent; further down four more with their own. */
  const second = (
    foot: string,
  ) => `${[11, 12, 13, 14].map((n) => armOf(n, closet, { vented: n === 11 && foot === 'arm' })).join('')}
vent 3 in: RW > RX (to 4.2)
terminal RX
${foot === 'line' ? 'vent 3 in: CW > CX (to 4.2)\nterminal CX' : ''}`;
  const line = (foot: string) =>
    circuitVentedRow(times(4, closet), { more: second(foot) }).replace(
      'K (east 0.7 fall 1:50)',
      `J11 (east 0.7 fall 1:50)${foot === 'line' ? ' > CW (east 0.3 fall 1:50)' : ''}${lineOf(12, 14)} > RW (east 0.4 fall 1:50) > K (east 0.7 fall 1:50)`,
    );

  test('each with its circuit vent on its first fixture’s own drain: two circuit-vented rows', () => {
    // Both hold by themselves; nothing in 2.5.3.1. forbids the second to take the first one's drain.
    const run = runSketch(line('arm'));
    expect(rows(run)).toEqual([
      ['circuit-vent', 4, []],
      ['circuit-vent', 4, []],
    ]);
    expect([run.role('CV-VJ'), run.role('RV-RT'), run.role('V11-VT11'), run.role('RW-RX')]).toEqual([
      'circuit-vent',
      'relief-vent',
      'circuit-vent',
      'relief-vent',
    ]);
    expect([run.pipe('CV-VJ').ventLoad?.most, run.pipe('V11-VT11').ventLoad?.most]).toEqual([16, 16]);
  });

  test('the second vent on the line itself: one row of eight, its vents in between are additional circuit vents', () => {
    // Alone the second row would lack a circuit vent on its first fixture's drain (R54); as one row of eight it is sound.
    const run = runSketch(line('line'));
    expect(rows(run)).toEqual([['circuit-vent', 8, []]]);
    expect([run.role('RV-RT'), run.role('CW-CX'), run.role('RW-RX')]).toEqual([
      'additional-circuit-vent',
      'additional-circuit-vent',
      'relief-vent',
    ]);
    expect(errors(run)).not.toContain('unvented-trap');
  });
});

describe('a trap past the relief vent', () => {
  // Air comes from the relief vent above it only through the branch: a wet vent with the row's 14 units as guests, which
  // may be 2 (2.5.2.1.(1)(f)). So it is none, and the trap is unvented; the relief vent is no trap's only vent.
  test('is unvented', () => {
    const run = runSketch(
      circuitVentedRow(times(7, stall), { more: armOf(20, stall) }).replace(
        'K (east 0.7 fall 1:50)',
        'J20 (east 0.5 fall 1:50) > K (east 0.5 fall 1:50)',
      ),
    );
    expect(how(run, 'F7', 'F20')).toEqual(['circuit-vent', 'unvented']);
    expect([run.role('RV-J20'), run.role('RV-RT'), errors(run)]).toEqual(['branch', 'relief-vent', ['unvented-trap']]);
  });
});

describe('who brings the air', () => {
  test('an air admittance valve over a wet vent: the row is vented, but the drain has no vent to open air', () => {
    const text = wetVentedRow(times(2, stall), { vent: 'vent 1 1/2 in: LJ > VT (to 1.4)' }).replace(
      'terminal VT',
      'admittance-valve VT',
    );
    const run = runSketch(text);
    expect(how(run, 'L1', 'F1', 'F2')).toEqual(['continuous-vent', 'wet-vent', 'wet-vent']);
    // A valve is no way to open air: neither the vent of 3 in (2.5.8.4.(5)) nor any other (2.5.9.) reaches it.
    expect(errors(run)).toEqual(['main-vent-missing', 'valve-not-allowed']);
  });

  test('water that climbs is a backfall, not another way out', () => {
    const run = runSketch(ventedRow(times(2, lavatory)).replace('K (east 0.7 fall 1:50)', 'K (east 0.7 up 0.2)'));
    expect([run.pipe('J2-K').load.most, run.findings('backfall').map(({ facts }) => facts.climbM)]).toEqual([
      2,
      [expect.closeTo(0.17, 1)], // between the bends at its ends
    ]);
  });

  test('a row whose first fixture has the only vent, all 1½ in traps: a wet vent, not a circuit vent without relief', () => {
    const run = runSketch(rowBehindVent(times(3, 'urinal, washout, trap 1 1/2 in')));
    expect(rows(run)).toEqual([['wet-vent', 3, []]]);
  });

  test('the designer’s word decides where both readings hold, and not where his does not', () => {
    const urinals = (word: string) => times(4, `${stall}, reading ${word}`);
    expect(rows(runSketch(circuitVentedRow(urinals('wet-vent'))))).toEqual([['wet-vent', 4, []]]);
    expect(rows(runSketch(circuitVentedRow(urinals('circuit-vent'))))).toEqual([['circuit-vent', 4, []]]);
    const unrelieved = circuitVentedRow(urinals('circuit-vent'), { relief: '' });
    expect(rows(runSketch(unrelieved))).toEqual([['wet-vent', 4, []]]);
    // The user's own word stands even so, with what it breaks.
    const batteries = new Map([['name:F1', { reading: 'circuit-vent' }]]);
    expect(rows(runSketch(unrelieved, { answers: { batteries } }))).toEqual([['circuit-vent', 4, ['NPC-R57']]]);
  });
});
