import { describe, expect, test } from 'vitest';
import { times } from '../support/rows.ts';
import { type RunOptions, runSketch } from '../support/run-sketch.ts';
import { at48 } from '../support/stack-rows.ts';
import { tower } from '../support/towers.ts';

// International Plumbing Code 711 and 907: rules IPC-R26 to R29, R79, R80.
const drain = 'floor-drain, trap 2 in'; // 2
const run = (text: string, options: RunOptions['answers'] = {}) =>
  runSketch(at48(text), { code: 'ipc-2021', answers: { settings: { use: 'public' }, ...options } });

/** Storeys of 4 units above a step of 2 m to the east, `OA-OB`, and one storey below it. */
const stepped = (above: number, size = '2 in', more = '') =>
  tower(
    times(above + 1, '').map(() => [drain, drain]),
    { stack: size, more },
  )
    .replace('node S1 at 0 0 -0.4', 'node S1 at 2 0 -0.4')
    .replace('S2 > S1', `S2 > XA (down 0.6) > OA (to 1.4) > OB (east 2 fall 1:48) > XB (to 0.6) > S1`);

const missing = (text: string, options: RunOptions['answers'] = {}) =>
  run(text, options).findings('offset-relief-vent-missing');

describe('R26, R79 an offset below more than four branch intervals is vented (711.2, 907)', () => {
  test('five above: missing, and the finding says what would do', () => {
    const [found] = missing(stepped(5));
    expect(found?.clause).toBe('907.1, 907.2');
    expect(found?.facts).toMatchObject({ intervals: 5, intervalsMost: 4, reliefVents: 0 });
    expect(found?.sentence).toContain('it needs a vent above it and one below it, and has 0 of the two');
  });
  test('four above: none needed', () => {
    expect(missing(stepped(4))).toEqual([]);
  });
  test('an offset below the lowest branch has nothing to keep in balance (711.4)', () => {
    expect(
      missing(
        tower(
          times(6, '').map(() => [drain, drain]),
          { offset: 2, stack: '2 in' },
        ),
      ),
    ).toEqual([]);
  });
  test('with a vent above and one below, led to the stack vent: none missing; one alone is not enough', () => {
    const sky = 'VT';
    const upper = `vent 3 in: XA > XU (north 0.5 rise 1:50) > ${sky}U (to 18.8)\nterminal ${sky}U`;
    const lower = `vent 3 in: XB > XL (south 0.5 rise 1:50) > ${sky}L (to 18.8)\nterminal ${sky}L`;
    expect(missing(stepped(5, '2 in', `${upper}\n${lower}`))).toEqual([]);
    expect(missing(stepped(5, '2 in', upper)).map(({ facts }) => facts.reliefVents)).toEqual([1]);
  });
});

describe('R27 the vents may be left out where stack and offset are one size larger (711.2.1)', () => {
  // 20 at 1/4 in per ft on the offset: 2 in by Table 710.1(1) (21); 24 on the stack of six: 2 in (24), its vent 1½ in or less.
  test('2 in needed, all drawn 2½ in: 6.25 is 4 and 2.25 together; drawn 2 in it is not larger', () => {
    const vented = missing(stepped(5, '2 1/2 in'));
    expect(vented).toEqual([]);
    expect(missing(stepped(5, '2 in')).map(({ facts }) => facts.larger)).toEqual(['2½ in']);
  });
});

describe('R28 a branch within 2 ft of an inclined offset below more than four branch intervals (711.1)', () => {
  /** Storeys of 4 units above an offset at 45°, whose foot lies so far above the branch of the lowest storey. */
  const inclined = (above: number, gap: number, more = '') =>
    run(
      tower(
        times(above + 1, '').map(() => [drain, drain]),
        { stack: '2 in', more },
      )
        .replace('node S1 at 0 0 -0.4', 'node S1 at 0.8 0 -0.4')
        .replace('S2 > S1', `S2 > OA (to ${0.4 + gap}) > OB (east 0.8 down 0.8) > S1`),
    ).findings('offset-relief-vent-missing');
  test.each([
    { above: 5, gap: 0.6, found: 1, why: '0.60 m, less than 2 ft' },
    { above: 5, gap: 0.62, found: 0, why: '0.62 m' },
    { above: 4, gap: 0.3, found: 0, why: 'four intervals above' },
  ])('$above above, a branch $gap m below: $why', ({ above, gap, found }) => {
    expect(inclined(above, gap).map(({ clause }) => clause)).toEqual(times(found, '711.1'));
  });
  test('a vent to the vent stack beside it settles it', () => {
    const yoke =
      'vent 2 in: OA > YU (north 0.5 rise 1:50) > VQ (to 18.15)\nvent 2 in: VF > VB (north 0.6 rise 1:50) > VQ > VH';
    const text = tower(
      times(6, '').map(() => [drain, drain]),
      { stack: '2 in', more: yoke },
    )
      .replace('node S1 at 0 0 -0.4', 'node S1 at 0.8 0 -0.4')
      .replace('S2 > S1', 'S2 > OA (to 0.9) > OB (east 0.8 down 0.8) > S1')
      .replace('S1 > SF', 'S1 > VF (down 0.3) > SF');
    const done = run(text);
    expect(done.role('OA-YU')).toBe('yoke-vent');
    expect(done.findings('offset-relief-vent-missing')).toEqual([]);
  });
});

test('R17 nothing joins a level offset within ten stack sizes of its head: 25 in, 0.635 m, of a 2½ in stack for 14 (704.3)', () => {
  const joined = (distance: number) =>
    run(
      tower(
        times(3, '').map(() => [drain, drain]),
        {
          stack: '2 in',
          more: `node Q from M north 2 rise 1:48
trap TQ from Q north 0.3 rise 1:48
floor-drain FQ from TQ to 3, untrapped, trap 2 in
drain 2 in: FQ > TQ > Q > M
vent 2 in: Q > QT (to 9.8)
terminal QT`,
        },
      )
        .replace('node S1 at 0 0 -0.4', 'node S1 at 2 0 -0.4')
        .replace(
          'S2 > S1',
          `S2 > OA (to 1.4) > M (east ${distance} fall 1:48) > OB (east ${2 - distance} fall 1:48) > S1`,
        ),
    )
      .findings('branch-near-foot')
      .map(({ clause, facts }) => [clause, facts.offset]);
  expect(joined(0.62)).toEqual([['704.3', true]]);
  expect(joined(0.65)).toEqual([]);
});
