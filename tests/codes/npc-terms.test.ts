import { describe, expect, test } from 'vitest';
import { hall, times, ventedRow, wetVentedRow } from '../support/rows.ts';
import { runSketch } from '../support/run-sketch.ts';
import { tower } from '../support/towers.ts';

// National Plumbing Code, Division A 1.4.1.2., rules R01 to R07.
const lavatory = 'lavatory, trap 1 1/4 in';
const closet = 'closet, tank';

/** Two vented lavatories, then one pipe that falls `fall` over `plan` metres, then out. */
const slanting = (fall: number, plan: number): string =>
  ventedRow(times(2, lavatory)).replace('BF (to -1.2)', `BF (east ${plan} down ${fall})`);

describe('R01 vertical and horizontal: vertical at 45° or less to the vertical', () => {
  test.each([
    { fall: 1, plan: 0.9, is: 'vertical', why: 'RULES: 1 m over 0.9 m of plan' },
    { fall: 1, plan: 1.1, is: 'horizontal', why: 'RULES: 1 m over 1.1 m' },
    { fall: 1, plan: 1, is: 'vertical', why: 'exactly 45° is vertical' },
    { fall: 1, plan: 1.001, is: 'horizontal', why: 'a millimetre past it: 44.97°, more than the 0.01° of coordinates' },
  ])('$fall m down over $plan m: $is ($why)', ({ fall, plan, is }) => {
    expect(runSketch(slanting(fall, plan)).pipe('K-BF').orientation).toBe(is);
  });
});

test('R02 developed length: along the centre line through the fittings, nothing added', () => {
  // The vent rises from 0.5 to 3, runs 2 m level and ends at 4.2: 2.5 + 2 + 1.2 = 5.7 m.
  const text = wetVentedRow(times(3, 'urinal, stall, trap 2 in')).replace(
    'LJ > VT (to 4.2)',
    'LJ > (to 3) > (east 2) > VT (to 4.2)',
  );
  const run = runSketch(text);
  const vents = run.result.pipes.filter(({ role }) => role === 'continuous-vent');
  expect(vents).toHaveLength(3);
  for (const { developedLength } of vents) expect(developedLength).toBeCloseTo(5.7, 3);
});

test('R03 pipes near a fixture: outlet pipe, trap arm, fixture drain', () => {
  // A tailpiece of 0.3 m, 0.8 m to the tee whose top is the vent, 2 m down to the branch.
  const run = runSketch(
    hall(
      'One lavatory',
      `lavatory L at 0 0 0.8, trap 1 1/4 in
trap T from L down 0.3
drain 1 1/4 in: L > T > J (east 0.8 fall 1:50) > F (down 2) > OUT (east 3 fall 1:50)
vent 1 1/4 in: J > VT (to 4.2)
terminal VT
sewer OUT`,
    ),
  );
  expect(run.pipe('L-T')).toMatchObject({ role: 'fixture-drain', portion: 'outlet' });
  expect(run.pipe('T-J').portion).toBeUndefined();
  expect([run.role('T-J'), run.role('J-F')]).toEqual(['fixture-drain', 'fixture-drain']);
  expect(run.fixture('L').trapArm?.length).toBeCloseTo(Math.hypot(0.8, 0.016), 3);
  expect(run.fixture('L').ventedBy.how).toBe('individual-vent');
});

describe('R04 branch, stack, building drain, building sewer', () => {
  test('a drop of 1.2 m inside one storey is no stack', () => {
    const run = runSketch(ventedRow(times(3, lavatory)).replace('BF (to -1.2)', 'BF (down 1.2)'));
    expect([run.role('J1-J2'), run.role('J2-J3'), run.role('K-BF'), run.role('BF-OUT')]).toEqual([
      'fixture-drain',
      'branch',
      'branch',
      'building-drain',
    ]);
  });

  test('a drop from storey 2 to the drain under storey 1 is one, and its foot begins the building drain', () => {
    const run = runSketch(tower([[], [lavatory, lavatory]]));
    expect([run.role('J2.2-S2'), run.role('S2-SF'), run.role('SF-OUT')]).toEqual(['branch', 'stack', 'building-drain']);
  });

  test('the pipe from another stack’s foot, in the lowest level, is building drain too', () => {
    const other = `
storey "Other" at 3
node S9 at 6 4 2.6
node J9.1 from S9 west 0.7 rise 1:50
node J9.2 from S9 west 1.4 rise 1:50
lavatory F9.1 from T9.1 to 3, trap 1 1/4 in
trap T9.1 from J9.1 south 0.3 rise 1:50
lavatory F9.2 from T9.2 to 3, trap 1 1/4 in
trap T9.2 from J9.2 south 0.3 rise 1:50
drain 1 1/4 in: F9.1 > T9.1 > J9.1
drain 1 1/4 in: F9.2 > T9.2 > J9.2
node Y from SF east 6 fall 1:50
node G from Y north 4 rise 1:50
drain 3 in: J9.2 > J9.1 > S9 > G > Y
vent 3 in: S9 > V9 (to 9)
terminal V9`;
    const text = tower([[], [lavatory, lavatory]], { more: other }).replace(
      'SF (to -1.6) > OUT (east 9 fall 1:50)',
      'SF (to -1.6) > Y > OUT',
    );
    const run = runSketch(`${text}\nnode OUT from Y east 3 fall 1:50`);
    expect([run.role('S9-G'), run.role('G-Y'), run.role('SF-Y'), run.role('Y-OUT')]).toEqual([
      'stack',
      'building-drain',
      'building-drain',
      'building-drain',
    ]);
  });

  test('the building sewer begins 1 m outside the wall', () => {
    const text = ventedRow(times(3, lavatory), 'slab "Slab" from -5 -5 to 6 5 top 0 thick 0.2');
    const run = runSketch(text.replace('roof "Roof" from -5 -5 to 60 10', 'roof "Roof" from -5 -5 to 6 5'));
    // BF stands at 2.1 m east, OUT at 11.1; the wall at 6 m: building drain for 4.9 m, less half the bend at BF.
    const sections = run.pipe('BF-OUT').sections ?? [];
    expect(sections.map(({ role }) => role)).toEqual(['building-drain', 'building-sewer']);
    expect(Math.abs(sections[0]!.to - 4.85)).toBeLessThan(0.06);
  });
});

describe('R06 storeys of plumbing', () => {
  test('ten storeys high, fixtures on the top four: drains from four, so no vent stack is asked for (2.5.4.2.)', () => {
    const four = tower([...times(6, '').map(() => []), ...times(4, '').map(() => [lavatory])]);
    expect(runSketch(four).findings('vent-stack-missing')).toEqual([]);
    const five = tower([...times(5, '').map(() => []), ...times(5, '').map(() => [lavatory])]);
    expect(runSketch(five).findings('vent-stack-missing')).toHaveLength(1);
  });
});

describe('R07 bathroom group: 6 with a flush tank, 8 with a flush valve, on pipes that carry the whole group', () => {
  const tub = 'bathtub, trap 1 1/2 in';
  const room = 'space "Bathroom" from -1 -2 to 1.9 1 height 2.5';
  const bathroom = (fixtures: readonly string[], space = room) => runSketch(ventedRow(fixtures, space));
  const loads = (run: ReturnType<typeof bathroom>, pipes: readonly string[]) =>
    pipes.map((pipe) => run.pipe(pipe).load.most);

  test('lavatory 1 and tub 1.5: 2.5; with the closet the group: 6, not 6.5', () => {
    expect(loads(bathroom([lavatory, tub, closet]), ['J1-J2', 'J2-J3', 'J3-K', 'BF-OUT'])).toEqual([1, 2.5, 6, 6]);
  });

  test('a part never counts above the group’s figure: closet 4, with the tub 5.5', () => {
    expect(loads(bathroom([closet, tub, lavatory]), ['J1-J2', 'J2-J3', 'J3-K'])).toEqual([4, 5.5, 6]);
  });

  test('flush valve: 8, not 8.5', () => {
    expect(loads(bathroom(['closet, valve', tub, lavatory]), ['J3-K'])).toEqual([8]);
  });

  test('a shower of one head serves as the bath; one of three heads does not', () => {
    expect(loads(bathroom([lavatory, 'shower, heads 1, trap 1 1/2 in', closet]), ['J3-K'])).toEqual([6]);
    expect(loads(bathroom([lavatory, 'shower, heads 3, trap 2 in', closet]), ['J3-K'])).toEqual([8]); // 1 + 3 + 4
  });

  test('a second lavatory in the room is added: 7', () => {
    const wide = 'space "Bathroom" from -1 -2 to 3 1 height 2.5';
    expect(loads(bathroom([lavatory, tub, closet, lavatory], wide), ['J4-K'])).toEqual([7]);
  });

  test('the closet in another room: one by one, 6.5, and no note since rooms are known', () => {
    const apart = 'space "Bathroom" from -1 -2 to 1 1 height 2.5\nspace "Closet" from 1 -2 to 3 1 height 2.5';
    const run = bathroom([lavatory, tub, closet], apart);
    expect(loads(run, ['J3-K'])).toEqual([6.5]);
    expect(run.findings('group-not-applied')).toEqual([]);
  });

  test('no room in the model: one by one, 6.5, with a note', () => {
    const run = bathroom([lavatory, tub, closet], '');
    expect(loads(run, ['J3-K'])).toEqual([6.5]);
    expect(run.findings('group-not-applied')).toHaveLength(1);
  });

  test('no room in the model, but the user says they share one: 6', () => {
    const fixtures = new Map([['name:F*', { space: 'bathroom' }]]);
    const run = runSketch(ventedRow([lavatory, tub, closet]), { answers: { fixtures } });
    expect(loads(run, ['J3-K'])).toEqual([6]);
  });
});
