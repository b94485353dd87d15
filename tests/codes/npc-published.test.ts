import { describe, expect, test } from 'vitest';
import { armOf, circuitVentedRow, hall, rowBehindVent, times, ventedRow } from '../support/rows.ts';
import { runSketch } from '../support/run-sketch.ts';
import { tower } from '../support/towers.ts';

// Published decisions, answers of inspectors and worked examples on the National Plumbing Code and its provincial
// siblings where the rule is the same. Source above each; where the source is wrong, our answer with the reason.
const lavatory = 'lavatory, trap 1 1/4 in'; // 1
const kitchen = 'kitchen-sink, trap 1 1/2 in'; // 1.5
const closet = 'closet, tank'; // 4
const shower6 = 'shower, heads 6, trap 3 in'; // 6

test('a house drain of 24 units at 1:50: 3 in by the load table, from the foot of the most remote stack', () => {
  // BC Building Code Appeal Board, decision 1352 (1994). The 4 in for drains under ground is of the 1992 BC code alone.
  const run = runSketch(tower([times(2, shower6), times(2, shower6)]));
  expect([run.role('SF-OUT'), run.pipe('SF-OUT').load.most, run.size('SF-OUT')]).toEqual([
    'building-drain',
    24,
    '3 in',
  ]);
});

test('closets on a circuit-vented branch, its circuit vent wet in part: allowed', () => {
  // BC Building Code Appeal Board, decision 1350R (1994).
  const run = runSketch(circuitVentedRow(times(4, closet), { lavatories: true }));
  expect(run.result.batteries.map(({ reading, broken }) => [reading, broken])).toEqual([['circuit-vent', []]]);
  expect(run.pipe('LJ-CV').portion).toBe('wet');
});

test('a bath waste of 0.9 m before its trap complies (1.2 m)', () => {
  // BC Building Code Appeal Board, decision 943 (1988), answer 1.
  const run = runSketch(
    hall(
      'Bath waste',
      `node O from T west 0.6
bathtub B from O up 0.3, trap 1 1/2 in
trap T at 0 0 -0.3, 1 1/2 in
drain 1 1/2 in: B > O > T > J (east 0.5 fall 1:50) > D (down 0.5) > OUT (east 3 fall 1:50)
vent 3 in: J > VT (to 4.2)
terminal VT
sewer OUT`,
    ),
  );
  expect(run.findings('outlet-pipe-too-long')).toEqual([]);
});

test('an island sink with its dishwasher on an air admittance valve: vented, and the dishwasher counts nothing', () => {
  // BC Building Code Appeal Board, decision 1801 (2017).
  const run = runSketch(
    hall(
      'Island on a valve',
      `node N from T up 0.15
kitchen-sink S from N up 0.15, trap 1 1/2 in
dishwasher DW from N west 0.6 up 0.2
drain 1 1/2 in: S > N
drain 1 1/2 in: DW > N > T
trap T at 0 0 0.4, 1 1/2 in
drain 1 1/2 in: T > J (east 0.4 fall 1:50) > F (to -0.4) > OUT (east 4 fall 1:50)
vent 1 1/2 in: J > A (to 0.8)
admittance-valve A
sewer OUT`,
    ),
  );
  expect([run.fixture('S').ventedBy.how, run.pipe('F-OUT').load.most, run.size('J-A')]).toEqual([
    'individual-vent',
    1.5,
    '1¼ in',
  ]);
});

test('a branch vent that runs level over the fixtures needs no grade', () => {
  // BC Building Code Appeal Board, decision 1641 (2008).
  const text = ventedRow(times(2, lavatory)).replace('V1 > VT1 (to 4.2)', 'V1 > A (to 3) > B (east 4) > VT1 (to 4.2)');
  const run = runSketch(text);
  expect(run.findings('slope-too-small')).toEqual([]);
  expect(run.findings('dry-vent-too-flat')).toEqual([]);
});

test('three 3 in floor drains and a mop sink of 3 in on one circuit vent: 12, 1½ in by its traps, relief vent not above 2 in', () => {
  // Trade forum, Ontario circuit venting thread (2006/2012 code).
  const run = runSketch(circuitVentedRow([...times(3, 'floor-drain, trap 3 in'), 'mop-sink, trap 3 in'], { run: 130 }));
  const byTraps = run.pipe('CV-VJ').trail.find(({ rule }) => rule === 'NPC-R75');
  expect([run.pipe('CV-VJ').ventLoad?.most, byTraps?.asks?.label, run.size('RV-RT')]).toEqual([12, '1½ in', '2 in']);
});

test('three 45° bends on a fixture drain: 135°, the limit; the Y at the vent is not counted', () => {
  // Ontario plumbing inspectors, code question 05-13, answer 2.
  const run = runSketch(
    hall(
      'Three bends',
      `trap T at 0 0 0.3, 2 in
sink S from T up 0.2, trap 2 in
drain 2 in: S > T > A (east 0.4 fall 1:50) > B (east 0.3 north 0.3 fall 1:50) > C (north 0.4 fall 1:50) > J (north 0.3 west 0.3 fall 1:50) >
  D (down 0.6) > OUT (west 4 fall 1:50)
vent 3 in: J > VT (to 4.2)
terminal VT
sewer OUT`,
    ),
  );
  expect(run.fixture('S').trapArm?.turn).toBeCloseTo(135, 1);
  expect(run.findings('trap-arm-too-long')).toEqual([]);
});

test('a stack through ten storeys with fixtures on the top four: no vent stack, no yoke vents are due', () => {
  // Ontario plumbing inspectors, code question 05-13, answer 4: its height is ten, but it drains four.
  const run = runSketch(tower([...times(6, '').map(() => []), ...times(4, '').map(() => [closet])]));
  expect([...run.findings('vent-stack-missing'), ...run.findings('yoke-vent-missing')]).toEqual([]);
});

test('a bathroom group is a closet, a lavatory and a bath or shower; a second lavatory is none of it', () => {
  // Ontario plumbing inspectors, code question 05-13, answer 3.
  const room = 'space "Bathroom" from -1 -2 to 3 1 height 2.5';
  const run = runSketch(ventedRow([lavatory, 'shower, heads 1, trap 1 1/2 in', closet, lavatory], room));
  expect(['J3-J4', 'J4-K'].map((pipe) => run.pipe(pipe).load.most)).toEqual([6, 7]);
});

describe('a branch vent that collects loads: 2, 4.5, 7.5', () => {
  // Open textbook on plumbing (BC, level 2), D-1.8, figures 1 and 2.
  test('two lavatories; a kitchen sink and a lavatory; two kitchen sinks', () => {
    const row = [lavatory, lavatory, kitchen, lavatory, kitchen, kitchen];
    const joined = row.reduce((text, _, at) => {
      const n = at + 1;
      const to = n === 1 ? 'V1 > U1 (to 2.5) > M2 (over V2 rise 1:100)' : `V${n} > M${n}`;
      return text.replace(`V${n} > VT${n} (to 4.2)\nterminal VT${n}`, to);
    }, ventedRow(row));
    const on = [3, 4, 5, 6].map((n) => `M${n} (over V${n} rise 1:100)`).join(' > ');
    const text = joined.replace('sewer OUT', `vent 1 1/2 in: M2 > ${on} > VT (to 4.2)\nterminal VT\nsewer OUT`);
    const run = runSketch(text);
    expect(['M2-M3', 'M4-M5', 'M6-VT'].map((pipe) => run.pipe(pipe).ventLoad?.most)).toEqual([2, 4.5, 7.5]);
    const lengths = ['M2-M3', 'M6-VT'].map((pipe) => run.pipe(pipe).developedLength!);
    expect(lengths[0]).toBeCloseTo(lengths[1]!, 6); // from the most distant connection, for every part
  });
});

test('4.5 from an upper storey is more than a wet vent takes', () => {
  // Open textbook on plumbing (BC, level 2), D-1.7: 4 at most from any storey above the first.
  const upper = [1, 2, 3].map(
    (n) => `trap T2${n} from S2 ${['south', 'north', 'west'][n - 1]} 0.4 rise 1:50
kitchen-sink F2${n} from T2${n} up 0.15, trap 1 1/2 in
drain 1 1/2 in: F2${n} > T2${n} > S2`,
  );
  const run = runSketch(`model "Two storeys"
storey "Storey 1" at 0
storey "Storey 2" at 3
storey "Storey 3" at 6
node S3 at 0 0 6.5
node S2 at 0 0 3.5
node S1 at 0 0 0.5
on "Storey 3"
trap T3 from S3 south 0.4 rise 1:50
lavatory F3 from T3 up 0.12, trap 1 1/4 in
drain 1 1/4 in: F3 > T3 > S3
on "Storey 2"
${upper.join('\n')}
on "Storey 1"
trap T1 from S1 south 0.4 rise 1:50
lavatory F1 from T1 up 0.12, trap 1 1/4 in
drain 1 1/4 in: F1 > T1 > S1
drain 3 in: S3 > S2 > S1 > SF (to -0.6) > OUT (east 4 fall 1:50)
vent 3 in: S3 > VT (to 10)
terminal VT
sewer OUT
roof "Roof" from -9 -9 to 9 9 top 9 thick 0.3`);
  expect(run.findings('unvented-trap')).toHaveLength(4);
});

test('a trap arm of 1.8 m on 1½ in: the source says 1.5 m; 1.5 m belongs to 1¼ in, and 1.8 m complies', () => {
  // Canadian examination practice page; Table 2.5.6.3. has 1.8 m for 1½ in.
  const run = runSketch(
    hall(
      'Trap arm',
      `trap T at 0 0 0.5, 1 1/2 in
kitchen-sink S from T up 0.2, trap 1 1/2 in
drain 1 1/2 in: S > T > J (east 1.8 fall 1:50) > D (down 0.8) > OUT (east 3 fall 1:50)
vent 3 in: J > VT (to 4.2)
terminal VT
sewer OUT`,
    ),
  );
  expect(run.fixture('S').trapArm?.limit).toBe(1.8);
  expect(run.findings('trap-arm-too-long')).toEqual([]);
});

test('a building drain with three closets: 3 in up to the third, 4 in after it', () => {
  // Exam cards, plumbing theory (Canada): 12 units would fit 3 in (27 at 1:50). A forum's “fourth closet” is the UPC’s.
  const more = ['D1', 'D2'].map(
    (joint, at) => `node ${joint} from SF east ${2 + 2 * at} fall 1:50
${armOf(`9${at}`, closet, { vented: true, sky: 8 }).replaceAll(`J9${at}`, joint)}`,
  );
  const text = tower([[], [closet, lavatory]], { more: more.join('\n') }).replace(
    'OUT (east 9 fall 1:50)',
    'D1 > D2 > OUT (east 4 fall 1:50)',
  );
  const run = runSketch(text);
  expect(['SF-D1', 'D1-D2', 'D2-OUT'].map((pipe) => [run.role(pipe), run.size(pipe)])).toEqual([
    ['building-drain', '3 in'],
    ['building-drain', '3 in'],
    ['building-drain', '4 in'],
  ]);
});

test('a wet vent of 3.5 whose dry vent is 12 m long: 1½ in', () => {
  // Open textbook, D-1.8: sink 1.5 and mop sink 2.
  const text = rowBehindVent(['sink, trap 1 1/2 in', 'mop-sink, trap 2 in']).replace(
    'V1 > VT1 (to 4.2)',
    'V1 > A (to 3) > B (east 7.4) > VT1 (to 4.2)',
  );
  const run = runSketch(text);
  expect([run.pipe('V1-A').ventLoad?.most, run.size('V1-A')]).toEqual([3.5, '1½ in']);
  expect(run.pipe('V1-A').developedLength).toBeCloseTo(12, 1);
});
