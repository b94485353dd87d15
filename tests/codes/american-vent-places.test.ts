import { describe, expect, test } from 'vitest';
import { hall, times, ventedRow } from '../support/rows.ts';
import { runSketch, type SketchRun } from '../support/run-sketch.ts';
import { tower } from '../support/towers.ts';

// Where vents start, rise, meet and end: International Plumbing Code 903, 905, 908 (R81, R82, R84), Uniform Plumbing Code
// 905 to 907 (R63 to R65, R67). Rims of fixtures without a body of their own: common practice, no source.
const lavatory = 'lavatory, trap 1 1/4 in';
const codes = [
  { code: 'ipc-2021', meet: '905.4, 905.5', leave: '905.4, 905.5', roof: '903.1' },
  { code: 'upc-2021', meet: '905.3', leave: '905.2', roof: '906.1' },
];

describe.each(codes)('$code', ({ code, meet, leave, roof }) => {
  const run = (text: string): SketchRun => runSketch(text, { code, answers: { settings: { use: 'public' } } as never });
  const clauses = (done: SketchRun, finding: string) => done.findings(finding).map(({ clause }) => clause);

  /** A counter sink with its rim at 0.9 m, and a floor drain; their vents meet at this height. */
  const meeting = (height: number): SketchRun =>
    run(
      hall(
        'Two vents',
        `sink S at 0 0 0.6, trap 1 1/2 in, rim 0.9
trap T from S down 0.15
floor-drain D at 4 0 0, untrapped, trap 2 in
trap DT from D down 0.5
drain 1 1/2 in: S > T > J (east 0.5 fall 1:48) > F (to -0.6) > DJ (over E fall 1:48) > OUT (east 5 fall 1:48)
drain 2 in: D > DT > E (north 0.5 fall 1:48) > DJ
vent 3 in: J > A (to ${height}) > VT (to 4.2)
vent 2 in: E > B (to ${height - 0.1}) > A
terminal VT
sewer OUT`,
      ),
    );
  test.each([
    { height: 1.0, low: 1, why: 'above the rim, but not by 6 in' },
    { height: 1.05, low: 1, why: '… 5.9 in' },
    { height: 1.06, low: 0, why: '6.3 in above it' },
  ])('vents meet 6 in above the rim of 0.9 m: at $height m, $why', ({ height, low }) => {
    const done = meeting(height);
    expect(clauses(done, 'vent-joins-too-low')).toEqual(times(low, meet));
    if (low > 0) expect(done.findings('vent-joins-too-low')[0]?.sentence).toContain('let them meet 152 mm above that');
  });

  test.each([
    { moves: 'up 0.8', flat: 0, why: 'straight up' },
    { moves: 'north 0.5 rise 1:5', flat: 0, why: 'by 11° above the centre line' },
    { moves: 'north 0.25 rise 1:20', flat: 1, why: 'by 3°: the side of the drain' },
  ])('a vent leaves a level drain above its centre line: $moves, $why', ({ moves, flat }) => {
    const done = run(
      hall(
        'A vent on an arm',
        `sink S at 0 0 0.6, trap 1 1/2 in
trap T from S down 0.15
drain 1 1/2 in: S > T > J (east 0.5 fall 1:48) > K (east 0.3 fall 1:48) > F (to -0.4) > OUT (east 4 fall 1:48)
vent 3 in: J > A (${moves}) > VT (to 4.2)
terminal VT
sewer OUT`,
      ),
    );
    expect(done.findings('dry-vent-too-flat').filter(({ facts }) => facts.angleDeg !== undefined)).toHaveLength(flat);
    if (flat > 0) expect(clauses(done, 'dry-vent-too-flat')).toContain(leave);
  });

  test.each([
    { end: 3.76, low: 0 },
    { end: 3.7, low: 1 },
  ])('a vent ends 6 in above the roof, whose top lies at 3.6 m: at $end m, $low', ({ end, low }) => {
    const done = run(
      ventedRow([lavatory, lavatory])
        .replaceAll('(to 4.2)', `(to ${end})`)
        .replace(/terminal .*/g, ''),
    );
    expect(clauses(done, 'terminal-too-low')).toEqual(times(2 * low, roof));
  });
});

describe('a vent rises above the rim before it runs level (IPC 905.4)', () => {
  /** The vent of a counter sink, rim at 0.9 m, runs 2 m level at this height. */
  const level = (height: number, code = 'ipc-2021', more = 'north 2 rise 1:48'): SketchRun =>
    runSketch(
      hall(
        'A vent led aside',
        `sink S at 0 0 0.6, trap 1 1/2 in, rim 0.9
trap T from S down 0.15
drain 1 1/2 in: S > T > J (east 0.5 fall 1:48) > F (to -0.4) > OUT (east 4 fall 1:48)
vent 1 1/2 in: J > A (to ${height}) > B (${more}) > VT (to 4.2)
terminal VT
sewer OUT`,
      ),
      { code },
    );
  test.each([
    { height: 0.8, flat: 1, why: 'below the rim' },
    { height: 1.0, flat: 1, why: 'above it, not by 6 in' },
    { height: 1.06, flat: 0, why: 'by 6 in' },
  ])('at $height m: $why', ({ height, flat }) => {
    const found = level(height).findings('dry-vent-too-flat');
    expect(found.map(({ clause, severity }) => [clause, severity])).toEqual(
      times(flat, '').map(() => ['905.4, 905.5', 'warning']),
    );
  });
  test('a jog of 0.25 m brings it into its wall; at 45 degrees or steeper it is not level', () => {
    expect(level(0.8, 'ipc-2021', 'north 0.25 rise 1:48').findings('dry-vent-too-flat')).toEqual([]);
    expect(level(0.8, 'ipc-2021', 'north 0.6 up 0.6').findings('dry-vent-too-flat')).toEqual([]);
  });
  test('the Uniform Plumbing Code lets it run lower in drainage fittings, which no model tells (905.3)', () => {
    expect(level(0.8, 'upc-2021').findings('dry-vent-too-flat')).toEqual([]);
  });
  test('an island vent comes down on purpose (916)', () => {
    const island = `sink S at 0 0 0.4, trap 1 1/2 in, rim 0.9
trap T from S down 0.15
drain 2 in: S > T > J (east 0.3 fall 1:48) > D (to -0.4) > K (east 2 fall 1:48) > OUT (east 6 fall 1:48)
vent 1 1/2 in: J > UP (up 0.5) > A (south 0.4) > DN (to -0.3) > W (south 3 rise 1:48) > VT (to 4.2)
terminal VT
sewer OUT`;
    expect(runSketch(hall('An island', island), { code: 'ipc-2021' }).findings('dry-vent-too-flat')).toEqual([]);
  });
});

describe('yoke vents join the vent stack clear of the floor: 3 ft (IPC 908), 42 in (UPC 907)', () => {
  const twelve = (storey: number, height: number, code: string) =>
    runSketch(
      tower(
        times(12, '').map(() => ['floor-drain, trap 2 in', 'floor-drain, trap 2 in']),
        { ventStack: true, yokes: [storey] },
      ).replace(/W(\d+) \(to ([\d.]+)\)/, (_, at: string) => `W${at} (to ${(Number(at) - 1) * 3 + height})`),
      { code },
    )
      .findings('yoke-vent-misplaced')
      .map(({ clause }) => clause);
  test('IPC: 0.90 m is too low, 0.92 m is not', () => {
    expect(twelve(3, 0.9, 'ipc-2021')).toEqual(['908.1, 908.2']);
    expect(twelve(3, 0.92, 'ipc-2021')).toEqual([]);
  });
  test('UPC: 1.06 m is too low, 1.07 m is not', () => {
    expect(twelve(8, 1.06, 'upc-2021')).toEqual(['907.1, 907.2']);
    expect(twelve(8, 1.07, 'upc-2021')).toEqual([]);
  });
});
