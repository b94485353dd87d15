import { describe, expect, test } from 'vitest';
import { circuitVentedRow, hall, times, ventedRow } from '../support/rows.ts';
import { runSketch, type SketchRun } from '../support/run-sketch.ts';

// National Plumbing Code, where vents start, meet and end: rules R41, R42, R83 to R86. A paraphrase of each stands beside its test.
const lavatory = 'lavatory, trap 1 1/4 in';
const facts = (run: SketchRun, code: string) => run.findings(code).map((one) => one.facts);

describe('R41 a dry vent leaves a level drain above its centre line (2.5.6.2.)', () => {
  /** A sink whose vent leaves its level arm by these moves. */
  const leaving = (moves: string): SketchRun =>
    runSketch(
      hall(
        'A vent on an arm',
        `sink S at 0 0 0.6, trap 1 1/2 in
trap T from S down 0.15
drain 1 1/2 in: S > T > J (east 0.5 fall 1:50) > K (east 0.3 fall 1:50) > F (to -0.4) > OUT (east 4 fall 1:50)
vent 3 in: J > A (${moves}) > VT (to 4.2)
terminal VT
sewer OUT`,
      ),
    );
  test.each([
    { moves: 'up 0.6', flat: 0, why: 'straight up' },
    { moves: 'north 0.5 up 0.5', flat: 0, why: 'at 45°' },
    { moves: 'north 0.5 rise 1:5', flat: 0, why: 'rolled up by 11°' },
    { moves: 'north 0.5 rise 1:6', flat: 1, why: 'by 9°: the side of the drain' },
    { moves: 'north 0.5 rise 1:50', flat: 1, why: 'RULES: the side outlet of a flat tee' },
  ])('$moves: $why', ({ moves, flat }) => {
    expect(leaving(moves).findings('dry-vent-too-flat')).toHaveLength(flat);
  });

  test('a vent that leaves an upright pipe may leave level: there is no centre line to lie above', () => {
    const run = runSketch(
      hall(
        'A vent on a drop',
        `sink S at 0 0 0.6, trap 1 1/2 in
trap T from S down 0.15
drain 1 1/2 in: S > T > J (east 0.5 fall 1:50) > M (down 0.1) > F (to -0.4) > OUT (east 4 fall 1:50)
vent 3 in: J > VT (to 4.2)
vent 3 in: M > N (north 0.5 rise 1:50) > NT (to 4.2)
terminal VT
terminal NT
sewer OUT`,
      ),
    );
    expect(run.findings('dry-vent-too-flat')).toEqual([]);
  });
});

describe('R42 vents meet above the flood level of the fixtures they serve (2.5.6.4.)', () => {
  /** A counter sink, rim at 0.9 m, and a floor drain; their vents meet at this height. */
  const meeting = (height: number, rim = 0.9): SketchRun =>
    runSketch(
      hall(
        'Two vents',
        `sink S at 0 0 0.6, trap 1 1/2 in, rim ${rim}
trap T from S down 0.15
floor-drain D at 4 0 0, untrapped, trap 2 in
trap DT from D down 0.5
drain 1 1/2 in: S > T > J (east 0.5 fall 1:50) > F (to -0.6) > DJ (over E fall 1:50) > OUT (east 5 fall 1:50)
drain 2 in: D > DT > E (north 0.5 fall 1:50) > DJ
vent 3 in: J > A (to ${height}) > VT (to 4.2)
vent 2 in: E > B (to ${height - 0.1}) > A
terminal VT
sewer OUT`,
      ),
    );
  test.each([
    { height: 0.8, low: 1, why: 'RULES: vents of a 0.9 m counter sink meet at 0.8 m' },
    { height: 0.9, low: 0, why: 'at the flood level' },
    { height: 1.1, low: 0, why: 'above it' },
  ])('at $height m: $why', ({ height, low }) => {
    const run = meeting(height);
    expect(run.findings('vent-joins-too-low')).toHaveLength(low);
    if (low > 0)
      expect(facts(run, 'vent-joins-too-low')[0]).toMatchObject({
        meetsM: expect.closeTo(0.8, 2),
        floodsM: expect.closeTo(0.9, 2),
      });
  });

  test('a lower basin floods lower: 0.8 m is enough for a rim at 0.75 m', () => {
    expect(meeting(0.8, 0.75).findings('vent-joins-too-low')).toEqual([]);
  });

  test('a relief vent serves the row: it joins the circuit vent above the rim of its closets', () => {
    const closets = times(4, 'closet, tank');
    const at = (height: number) =>
      runSketch(
        circuitVentedRow(closets, { relief: `vent 3 in: RV > RT (to ${height}) > VJ (over CV rise 1:100)` }),
      ).findings('vent-joins-too-low');
    // The tank stands to 0.8 m and more; the bowl overflows at 0.4 m (common practice, no source).
    expect([at(0.6), at(0.35).length > 0]).toEqual([[], true]);
  });
});

describe('R83 a vent ends 150 mm above the roof (2.5.6.5.)', () => {
  // The hall's roof lies with its top at 3.6 m; open ends without a cowl.
  test.each([
    { end: 3.75, low: 0 },
    { end: 3.7, low: 1 },
    { end: 4.2, low: 0 },
  ])('at $end m: $low', ({ end, low }) => {
    const run = runSketch(
      ventedRow([lavatory, lavatory])
        .replaceAll('(to 4.2)', `(to ${end})`)
        .replace(/terminal .*/g, ''),
    );
    expect(run.findings('terminal-too-low')).toHaveLength(2 * low);
  });
});

describe('R84 frost: 3 in or more through the roof (2.5.6.5.(6))', () => {
  const through = (size: string, frostEnlargement?: boolean) =>
    runSketch(
      ventedRow([lavatory]).replace(
        /vent 1 1\/2 in: V1 > VT1 \(to 4.2\)/,
        `vent 1 1/2 in: V1 > U (to 3)\nvent ${size} in: U > VT1 (to 4.2)`,
      ),
      frostEnlargement === undefined ? {} : { answers: { settings: { frostEnlargement } } },
    ).findings('frost-enlargement-missing');
  test('RULES: 1½ in: 3 in through the roof', () => {
    expect(through('1 1/2').map((one) => [one.severity, one.facts.size, one.facts.least])).toEqual([
      ['note', '1½ in', '3 in'],
    ]);
    expect(through('3')).toEqual([]);
  });
  test('not where the user says that frost closes no vent', () => {
    expect(through('1 1/2', false)).toEqual([]);
  });
});

describe('R85 air admittance valves (2.2.10.16., 2.5.9.)', () => {
  const withValve = (end: string, more = ''): SketchRun =>
    runSketch(
      ventedRow([lavatory, lavatory], more)
        .replace('VT1 (to 4.2)', `VT1 (${end})`)
        .replace('terminal VT1', 'admittance-valve VT1'),
    );
  test('one is let stand only in cases that the model does not tell: it asks for approval', () => {
    const run = withValve('to 1');
    expect(facts(run, 'valve-needs-approval')).toEqual([{ listed: true }]);
    expect(run.findings('valve-not-allowed')).toEqual([]); // the other lavatory's vent reaches open air
  });
  test('where no vent of the drain reaches open air, it is not allowed', () => {
    const text = ventedRow([lavatory, lavatory])
      .replaceAll('(to 4.2)', '(to 1)')
      .replaceAll('terminal V', 'admittance-valve V');
    expect(facts(runSketch(text), 'valve-not-allowed')).toEqual([{ onlyValves: true }]);
  });
  test('it stands above the drain that it vents', () => {
    expect(withValve('south 0.5 down 0.1').findings('valve-not-allowed')).toHaveLength(1);
  });
});

describe('R86 a trap on the building drain has a fresh air inlet within 1.2 m upstream, 4 in (2.4.5.4., 2.5.5.)', () => {
  const trapped = (inlet: string, away = 1): SketchRun =>
    runSketch(
      `${ventedRow([lavatory, lavatory], inlet).replace(
        'OUT (east 9 fall 1:50)',
        `IN (east ${9 - away} fall 1:50) > BT (east ${away} fall 1:50) > OUT (east 4 fall 1:50)`,
      )}\ntrap BT`,
    );
  const inlet = (size: string) => `vent ${size} in: IN > IT (to 4.2)\nterminal IT`;
  const missing = (run: SketchRun) => facts(run, 'fresh-air-inlet-missing');
  test.each([
    { size: '4', away: 1.2, found: [], why: 'the limit' },
    { size: '4', away: 1.3, found: [expect.objectContaining({ distanceM: expect.closeTo(1.3, 2) })], why: 'past it' },
    { size: '3', away: 1, found: [expect.objectContaining({ size: '3 in', least: '4 in' })], why: 'too small' },
  ])('$size in, $away m away: $why', ({ size, away, found }) => {
    expect(missing(trapped(inlet(size), away))).toEqual(found);
  });
  test('none at all', () => {
    expect(missing(trapped(''))).toHaveLength(1);
  });
});
