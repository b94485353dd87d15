import { describe, expect, test } from 'vitest';
import { armOf, times } from '../support/rows.ts';
import { runSketch, type SketchRun } from '../support/run-sketch.ts';
import { floorOf, type Tower, tower } from '../support/towers.ts';

// National Plumbing Code, what stands near the foot of a stack and at its offsets: rules R27, R28 and R71. Loads by Table 2.4.9.3.
const lavatory = 'lavatory, trap 1 1/4 in'; // 1
const shower6 = 'shower, heads 6, trap 3 in'; // 6
const washer = 'clothes-washer, trap 2 in'; // 2

describe('R27 nothing joins within 1.5 m of the foot of a stack of 30 units, or of two storeys (2.4.2.1.)', () => {
  /** A stack, and a vented lavatory whose drain joins so far along the drain below it. */
  const joined = (storeys: readonly (readonly string[])[], away: number): SketchRun =>
    runSketch(
      tower(storeys, {
        more: `node J90 from SF east ${away} fall 1:50${armOf(90, lavatory, { vented: true, length: 0.5 })}`,
      }).replace('OUT (east 9 fall 1:50)', 'J90 > OUT (east 9 fall 1:50)'),
    );
  const oneStorey = (units: number) => [[], [...times(Math.floor(units / 6), shower6), ...times(units % 6, lavatory)]];
  test.each([
    { storeys: [[lavatory], [lavatory], [lavatory]], away: 0.9, near: 1, why: 'RULES: at 0.9 m' },
    { storeys: [[lavatory], [lavatory]], away: 1.4, near: 1, why: 'two storeys' },
    { storeys: [[lavatory], [lavatory]], away: 1.5, near: 0, why: 'the limit' },
    { storeys: oneStorey(30), away: 1.4, near: 1, why: '30 units from one storey' },
    { storeys: oneStorey(29), away: 0.9, near: 0, why: '29 units from one storey: no distance is asked' },
  ])('$away m: $why', ({ storeys, away, near }) => {
    const run = joined(storeys, away);
    expect(run.findings('branch-near-foot')).toHaveLength(near);
    if (near > 0) expect(run.findings('branch-near-foot')[0]?.facts).toMatchObject({ leastM: 1.5 });
  });

  /** The stack steps aside; a vented lavatory joins so far along the offset. */
  const inOffset = (away: number): SketchRun =>
    runSketch(
      tower([[], [], [lavatory], [lavatory]], {
        offset: 3,
        more: `node J90 from OA east ${away} fall 1:50${armOf(90, lavatory, { vented: true, length: 0.5, floor: floorOf(3) - 1, sky: 14 })}`,
      }).replace('OB (east 3 fall 1:50)', `J90 > OB (east ${3 - away} fall 1:50)`),
    );
  test('nor within 1.5 m of the head of an offset', () => {
    const near = inOffset(1).findings('branch-near-foot');
    expect(near.map(({ facts }) => facts)).toEqual([{ distanceM: expect.closeTo(1, 1), leastM: 1.5, offset: true }]);
    expect(inOffset(1.6).findings('branch-near-foot')).toEqual([]);
  });

  test('what joins at the lower end of a short offset joins the upright part below', () => {
    const arm = armOf(90, lavatory, { vented: true, length: 0.5, floor: floorOf(3) - 1, sky: 14 });
    const run = runSketch(tower([[], [], [lavatory], [lavatory]], { offset: 1, more: arm.replaceAll('J90', 'OB') }));
    expect([run.role('OA-OB'), run.findings('branch-near-foot')]).toEqual(['stack', []]);
  });
});

describe('R28 suds: near the turn of a pipe of several washers nothing joins (2.4.2.1.)', () => {
  /** Washers on storey 2; the branch of storey 1 joins 1.2 m above the foot of the stack. */
  const above = (upper: readonly string[], lower: readonly string[], stack = '3 in'): SketchRun =>
    runSketch(tower([lower, upper], { stack }));
  const zones = (run: SketchRun) => run.findings('suds-zone').map(({ facts }) => facts);

  test('RULES: a 3 in stack of washers: nothing within 2.44 m above its foot', () => {
    expect(zones(above(times(2, washer), [lavatory]))).toEqual([
      // 40 x 2 in = 2.03 m: the stack of 5 units needs 2 in.
      { distanceM: expect.closeTo(1.2, 1), leastM: expect.closeTo(2.03, 2), above: true },
    ]);
    // Ten washers, 20 + 1: one storey of more than 18 needs 4 in, 40 x 4 in = 4.06 m, held to 2.44 m.
    expect(zones(above(times(10, washer), [lavatory]))[0]).toMatchObject({ leastM: 2.44 });
  });

  test('one washer makes no zone, nor do two that join below everything else', () => {
    expect(zones(above([washer], [lavatory]))).toEqual([]);
    expect(zones(above([lavatory], times(2, washer)))).toEqual([]);
  });

  test('nor within ten sizes past the foot: 0.51 m at 2 in', () => {
    const past = (away: number): SketchRun =>
      runSketch(
        tower([[], times(2, washer)], {
          more: `node J90 from SF east ${away} fall 1:50${armOf(90, lavatory, { vented: true, length: 0.5 })}`,
        }).replace('OUT (east 9 fall 1:50)', 'J90 > OUT (east 9 fall 1:50)'),
      );
    expect(zones(past(0.45)).map((one) => one.above)).toEqual([false]);
    expect(zones(past(0.55))).toEqual([]);
  });
});

describe('R71 yoke vents at offsets, and clear of the floor (2.5.4.3.)', () => {
  const yokes = (count: number, more: Tower): SketchRun =>
    runSketch(
      tower(
        times(count, '').map(() => [lavatory]),
        { ventStack: true, ...more },
      ),
    );
  const missing = (run: SketchRun) =>
    run.findings('yoke-vent-missing').map(({ facts }) => [facts.storey, facts.offset ?? false]);

  /** Storeys 1 to 3 hold the offset, a lavatory joins below it; so many storeys above have a fixture each. */
  const stepped = (storeys: number, above: readonly number[]): SketchRun =>
    runSketch(
      tower([[], [], [], ...times(storeys, '').map(() => [lavatory])], {
        ventStack: true,
        offset: 1,
        yokes: above,
        more: `node J90 from OB down 3${armOf(90, lavatory, { vented: true, length: 0.5, floor: 4.5, sky: 50 })}`,
      })
        .replace('VF (down 0.3) > OA', 'OA')
        .replace('SF (to -1.6)', 'J90 > VF (down 0.3) > SF (to -1.6)'),
    );
  const atOffset = (run: SketchRun) => missing(run).filter(([, offset]) => offset);
  test('thirteen storeys and an offset: one at or just above it too', () => {
    expect(atOffset(stepped(12, [11, 6]))).toHaveLength(1);
    expect(atOffset(stepped(12, [11, 6, 4]))).toEqual([]);
  });
  test('below the lowest drain the foot of the vent stack stands at the offset: none is asked there', () => {
    const none = [[], [], []];
    const run = runSketch(
      tower([...none, ...times(12, '').map(() => [lavatory])], { ventStack: true, offset: 1, yokes: [11, 6] }),
    );
    expect(run.role('VF-VB')).toBe('vent-stack');
    expect(atOffset(run)).toEqual([]);
  });
  test('eleven storeys in all need none', () => {
    expect(missing(stepped(10, []))).toEqual([]);
  });

  test('it joins the vent stack at least 1 m above the floor', () => {
    const misplaced = (height: number) =>
      runSketch(
        tower(
          times(12, '').map(() => [lavatory]),
          { ventStack: true, yokes: [8, 3] },
        ).replace(`W8 (to ${floorOf(8) + 1.1})`, `W8 (to ${floorOf(8) + height})`),
      )
        .findings('yoke-vent-misplaced')
        .map(({ facts }) => facts.heightM);
    expect(misplaced(1)).toEqual([]);
    expect(misplaced(0.9)).toEqual([expect.closeTo(0.9, 2)]);
    expect(yokes(12, { yokes: [8, 3] }).findings('yoke-vent-misplaced')).toEqual([]);
  });
});
