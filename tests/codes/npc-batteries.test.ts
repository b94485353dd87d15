import { describe, expect, test } from 'vitest';
import { circuitVentedRow, times, wetVentedRow } from '../support/rows.ts';
import { runSketch, type SketchRun } from '../support/run-sketch.ts';

// Limits of rows of urinals that the open set (sample-models/worked) does not hold. Loads by Table 2.4.9.3.: stall urinal
// 2, lavatory on a 1¼ in trap 1, wall urinal (washout) 1.5, pedestal urinal 4. Sizes by hand off the printed tables.
const stall = 'urinal, stall, trap 2 in';
const washout = 'urinal, washout, trap 1 1/2 in';
const pedestal = 'urinal, pedestal, trap 2 in';

const line = (run: SketchRun, pipes: readonly string[]) =>
  pipes.map((pipe) => `${pipe}: ${run.role(pipe)}, ${run.size(pipe)}`);
const joints = (first: number, last: number): string[] =>
  Array.from({ length: last - first }, (_, at) => `J${first + at}-J${first + at + 1}`);

describe('wet vented: Table 2.5.8.1. takes the load less the most downstream fixture (2.5.8.1.(2), R50)', () => {
  test.each([
    { urinals: 3, counted: 6, size: '3 in', why: '2 + 2 x 2 = 6: past 2 in, which takes 4' },
    { urinals: 1, counted: 2, size: '1½ in', why: '2: the limit of 1½ in itself' },
    { urinals: 18, counted: 36, size: '4 in', why: '2 + 17 x 2 = 36: the limit of 4 in itself' },
  ])('two lavatories and $urinals stall urinals count $counted: $size along the whole of it', (row) => {
    const run = runSketch(wetVentedRow(times(row.urinals, stall)));
    expect(run.result.batteries.map(({ reading }) => reading)).toEqual(['wet-vent']);
    const wet = ['LJ-LF', 'LF-J1', ...joints(1, row.urinals)];
    expect(line(run, wet)).toEqual(wet.map((pipe) => `${pipe}: wet-vent, ${row.size}`));
    for (const pipe of wet) expect(run.pipe(pipe).ventLoad).toEqual({ least: row.counted, most: row.counted });
    expect(run.findings('wet-vent-overloaded')).toEqual([]);
  });

  test('past the last row: nineteen urinals count 38, and the cells for 5 and 6 in are unread: no size', () => {
    const run = runSketch(wetVentedRow(times(19, stall)));
    expect(run.size('J1-J2')).toBe('none');
    expect(run.pipe('J1-J2').verdict).toBe('unknown');
  });
});

test('circuit vented: four wall urinals on 1½ in traps, 6, the limit of 2 in (Table 2.4.10.6.-B), and its least (R63)', () => {
  const run = runSketch(circuitVentedRow(times(4, washout)));
  expect([run.pipe('J4-RV').load.most, run.size('J4-RV'), run.size('CV-J2')]).toEqual([6, '2 in', '2 in']);
});

describe('the relief vent: one size below the circuit vent, at most 2 in, never below the trap’s own (2.5.7.3.(1), R73)', () => {
  // Table 2.5.8.3. by load and length of the circuit vent, Table 2.5.7.1. by the largest trap.
  test.each([
    {
      fixture: washout,
      count: 6,
      run: 0,
      circuit: '1¼ in',
      relief: '1¼ in',
      why: '9: row 20, 1¼ in to 7.5 m; nothing below 1¼ in',
    },
    {
      fixture: pedestal,
      count: 8,
      run: 32,
      circuit: '3 in',
      relief: '2 in',
      why: '32: row 42, past 30 m 3 in, no limit',
    },
  ])(
    '$count of $fixture, vents run $run m: circuit $circuit, relief $relief',
    ({ fixture, count, run: level, ...size }) => {
      const run = runSketch(circuitVentedRow(times(count, fixture), level === 0 ? {} : { run: level }));
      expect(line(run, ['CV-VJ', 'RV-RT', 'RT-VJ'])).toEqual([
        `CV-VJ: circuit-vent, ${size.circuit}`,
        `RV-RT: relief-vent, ${size.relief}`,
        `RT-VJ: relief-vent, ${size.relief}`,
      ]);
    },
  );
});
