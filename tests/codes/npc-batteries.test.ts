import { describe, expect, test } from 'vitest';
import { circuitVentedRow, times, wetVentedRow } from '../support/rows.ts';
import { runSketch, type SketchRun } from '../support/run-sketch.ts';

// Loads by Table 2.4.9.3.: stall urinal 2, lavatory on a 1¼ in trap 1, wall urinal (washout) 1.5, pedestal urinal 4,
// closet with flush valve 6. Sizes are read off the printed tables by hand; none comes from a run.
const stall = 'urinal, stall, trap 2 in';
const washout = 'urinal, washout, trap 1 1/2 in';
const pedestal = 'urinal, pedestal, trap 2 in';
const valveCloset = 'closet, valve';

const only = (run: SketchRun) => {
  expect(run.result.batteries).toHaveLength(1);
  return run.result.batteries[0]!;
};
const line = (run: SketchRun, pipes: readonly string[]) =>
  pipes.map((pipe) => `${pipe}: ${run.role(pipe)}, ${run.size(pipe)}`);
const joints = (first: number, last: number): string[] =>
  Array.from({ length: last - first }, (_, at) => `J${first + at}-J${first + at + 1}`);

describe('wet vented: Table 2.5.8.1. takes the load less the most downstream fixture (2.5.8.1.(2), R50)', () => {
  test.each([
    { urinals: 7, counted: 14, size: '4 in', why: '2 + 6 x 2 = 14: 3 in takes 12, 4 in takes 36' },
    { urinals: 6, counted: 12, size: '3 in', why: '2 + 5 x 2 = 12: the limit of 3 in itself' },
    { urinals: 3, counted: 6, size: '3 in', why: '2 + 2 x 2 = 6: past 2 in, which takes 4' },
    { urinals: 2, counted: 4, size: '2 in', why: '2 + 2 = 4: the limit of 2 in itself' },
    { urinals: 1, counted: 2, size: '1½ in', why: '2: the limit of 1½ in itself' },
    { urinals: 18, counted: 36, size: '4 in', why: '2 + 17 x 2 = 36: the limit of 4 in itself' },
  ])('two lavatories and $urinals stall urinals count $counted: $size along the whole of it', (row) => {
    const run = runSketch(wetVentedRow(times(row.urinals, stall)));
    expect(only(run).reading).toBe('wet-vent');
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

  test('downstream of the last urinal everything counts, and the pipe is not below the wet vent (2.4.9.1.)', () => {
    const run = runSketch(wetVentedRow(times(7, stall)));
    // 16 fits 3 in by Table -B (27) and by Table -C at 1:50 (27); the 4 in wet vent above decides.
    expect(line(run, ['J7-K', 'BF-OUT'])).toEqual(['J7-K: branch, 4 in', 'BF-OUT: building-drain, 4 in']);
    expect(run.pipe('J7-K').load).toEqual({ least: 16, most: 16 });
  });

  test('its dry vent carries all 16: Table 2.5.8.3. row 20, 3.7 m, 1¼ in; 2 in traps ask for 1½ in (2.5.7.1.)', () => {
    const run = runSketch(wetVentedRow(times(7, stall)));
    expect(line(run, ['LJ-VT'])).toEqual(['LJ-VT: continuous-vent, 1½ in']);
    expect(run.pipe('LJ-VT').ventLoad?.most).toBe(16);
  });
});

describe('circuit vented: the branch carries everything (Table 2.4.10.6.-B), and is 3 in at least (2.5.3.1.(9), R63)', () => {
  test('seven stall urinals with the two lavatories on the circuit vent: 16, 3 in', () => {
    const run = runSketch(circuitVentedRow(times(7, stall), { lavatories: true }));
    expect(only(run).reading).toBe('circuit-vent');
    const branch = ['CV-J2', ...joints(2, 7), 'J7-RV'];
    expect(line(run, branch)).toEqual(branch.map((pipe) => `${pipe}: circuit-vented-branch, 3 in`));
    expect(run.pipe('J7-RV').load).toEqual({ least: 16, most: 16 });
    expect(run.findings().filter(({ severity }) => severity === 'error')).toEqual([]);
  });

  test('the wet portion of the circuit vent with 2 units: 1½ in by Table 2.5.8.1.', () => {
    const run = runSketch(circuitVentedRow(times(7, stall), { lavatories: true }));
    expect(run.pipe('LJ-CV')).toMatchObject({ role: 'circuit-vent', portion: 'wet', ventLoad: { least: 2, most: 2 } });
    expect(run.size('LJ-CV')).toBe('1½ in');
    expect(run.pipe('LJ-VJ')).toMatchObject({ role: 'circuit-vent', portion: 'dry' });
    expect(run.size('LJ-VJ')).toBe('1½ in');
  });

  test('four urinals and the two lavatories: 10, which 2½ in takes (12); the floor of 3 in decides', () => {
    const run = runSketch(circuitVentedRow(times(4, stall), { lavatories: true }));
    expect(run.pipe('J4-RV').load).toEqual({ least: 10, most: 10 });
    const trail = run.pipe('J4-RV').trail.map(({ rule, asks, governs }) => `${rule} ${asks?.label} ${governs}`);
    expect(trail).toContain('NPC-R16 2½ in false');
    expect(trail).toContain('NPC-R63 3 in true');
    expect(line(run, ['CV-J2', 'J4-RV'])).toEqual([
      'CV-J2: circuit-vented-branch, 3 in',
      'J4-RV: circuit-vented-branch, 3 in',
    ]);
  });

  test('six wall urinals with 1½ in traps: 9, Table -B 2½ in; with that size left out 3 in', () => {
    // All traps below 2 in: the floor is 2 in (2.5.3.1.(9)), and Table -B 2 in takes 6.
    const text = circuitVentedRow(times(6, washout));
    expect(runSketch(text).size('J6-RV')).toBe('2½ in');
    const omitted = runSketch(text, { answers: { settings: { omitSizes: ['2½ in'] } } });
    expect(omitted.size('J6-RV')).toBe('3 in');
    const four = runSketch(circuitVentedRow(times(4, washout)));
    expect([four.pipe('J4-RV').load.most, four.size('J4-RV'), four.size('CV-J2')]).toEqual([6, '2 in', '2 in']);
  });
});

describe('the relief vent: one size below the circuit vent, at most 2 in, never below the trap’s own (2.5.7.3.(1), R73)', () => {
  // Table 2.5.8.3. by load and length of the circuit vent, Table 2.5.7.1. by the largest trap.
  test.each([
    {
      fixture: stall,
      count: 7,
      run: 0,
      circuit: '1½ in',
      relief: '1½ in',
      why: '14: row 20, 1¼ in; trap 2 in: 1½ in; one below is 1¼ in, the trap asks 1½ in',
    },
    {
      fixture: washout,
      count: 6,
      run: 8,
      circuit: '1½ in',
      relief: '1¼ in',
      why: '9: row 20, past 7.5 m 1½ in to 15 m; trap 1½ in: 1¼ in',
    },
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
      run: 12,
      circuit: '2 in',
      relief: '1½ in',
      why: '32: row 42, 1½ in to 9 m, 2 in to 30 m',
    },
    {
      fixture: pedestal,
      count: 8,
      run: 32,
      circuit: '3 in',
      relief: '2 in',
      why: '32: row 42, past 30 m 3 in, no limit',
    },
    {
      fixture: valveCloset,
      count: 8,
      run: 130,
      circuit: '4 in',
      relief: '2 in',
      why: '48: row 60, 3 in to 120 m, then 4 in; never asked above 2 in',
    },
  ])(
    '$count of $fixture, vents run $run m: circuit $circuit, relief $relief',
    ({ fixture, count, run: level, ...size }) => {
      const run = runSketch(circuitVentedRow(times(count, fixture), level === 0 ? {} : { run: level }));
      expect(only(run).reading).toBe('circuit-vent');
      expect(line(run, ['CV-VJ', 'RV-RT', 'RT-VJ'])).toEqual([
        `CV-VJ: circuit-vent, ${size.circuit}`,
        `RV-RT: relief-vent, ${size.relief}`,
        `RT-VJ: relief-vent, ${size.relief}`,
      ]);
    },
  );
});
