import { describe, expect, test } from 'vitest';
import { hall, times, ventedRow } from '../support/rows.ts';
import { runSketch, type SketchRun } from '../support/run-sketch.ts';
import { tower } from '../support/towers.ts';

// National Plumbing Code, cleanouts and standpipes: rules R29 to R35. Spacing and sizes by Table 2.4.7.2.
const lavatory = 'lavatory, trap 1 1/4 in';
const missing = (run: SketchRun, what?: string) =>
  run.findings('cleanout-missing').flatMap(({ facts }) => (what === undefined || facts.what === what ? [facts] : []));

describe('R30 all of the drainage can be rodded: 15 m one way at 3 and 4 in, 7.5 m below', () => {
  /** A branch of 3 in with a cleanout at its head, and so much drain before the next one. */
  const long = (length: number, size = '3', more = ''): SketchRun =>
    runSketch(
      hall(
        'A long drain',
        `node J1 at 0 0 -0.4
node J2 from J1 east 0.5 fall 1:50
node K from J2 east ${length - 1} fall 1:50
node E from K east 0.5 fall 1:50
cleanout CO from J1 west 0.3 up 0.3, ${size} in
trap T1 from J1 south 0.3 rise 1:50
trap T2 from J2 south 0.3 rise 1:50
lavatory L1 from T1 to 0.1, trap 1 1/4 in
lavatory L2 from T2 to 0.1, trap 1 1/4 in
drain 1 1/4 in: L1 > T1 > J1
drain 1 1/4 in: L2 > T2 > J2
drain ${size} in: CO > J1
drain ${size} in: J1 > J2 > K > E > OUT (down 1)
vent 3 in: J1 > VT (to 4.2)
terminal VT
sewer OUT
${more}`,
      ),
    );
  test('between two cleanouts each reaches half way: 30 m at 3 in', () => {
    const between = (length: number) => missing(long(length, '3', 'cleanout E, 3 in'), 'spacing').length;
    expect([between(29.9), between(30.2)]).toEqual([0, 1]);
  });

  test.each([
    { size: '3', length: 14.9, found: 0, why: 'within 15 m' },
    { size: '3', length: 15.1, found: 1, why: 'past it' },
    { size: '2', length: 7.4, found: 0, why: 'within 7.5 m' },
    { size: '2', length: 7.6, found: 1, why: 'past it' },
  ])('$size in, $length m: $why', ({ size, length, found }) => {
    const run = long(length, size);
    expect(run.role('J1-J2')).not.toBe('idle');
    expect(missing(run, 'spacing')).toHaveLength(found);
  });

  test('a model without any cleanout says so once, with what the code wants', () => {
    const run = runSketch(tower([[lavatory], [lavatory], [lavatory]]));
    expect(missing(run)).toEqual([{ what: 'none drawn', buildingDrains: 1, stacks: 1, sinks: 0, interceptors: 0 }]);
    expect(run.findings('cleanout-missing').map((one) => one.severity)).toEqual(['warning']);
  });
});

describe('R31 size of a cleanout: the pipe’s own below 3 in, 3 in at 3 and 4 in, 4 in above (2.4.7.2.)', () => {
  const sized = (pipe: string, cleanout: string) =>
    runSketch(
      ventedRow(
        [lavatory, lavatory],
        `node C1 from J1 west 0.3 rise 1:50\ncleanout CO from C1 to 0, ${cleanout} in\ndrain ${cleanout} in: CO > C1 > J1`,
      ).replace('drain 3 in: J1', `drain ${pipe} in: J1`),
    ).findings('cleanout-too-small');
  test.each([
    { pipe: '2', cleanout: '2', small: 0, why: 'its own size' },
    { pipe: '2', cleanout: '1 1/2', small: 1, why: 'below it' },
    { pipe: '3', cleanout: '3', small: 0, why: '3 in' },
    { pipe: '4', cleanout: '3', small: 0, why: '3 in is enough at 4 in' },
    { pipe: '4', cleanout: '2', small: 1, why: 'below 3 in' },
    { pipe: '6', cleanout: '4', small: 0, why: 'RULES: 6 in drain, 4 in cleanout' },
    { pipe: '6', cleanout: '3', small: 1, why: 'below 4 in' },
  ])('$cleanout in on $pipe in: $why', ({ pipe, cleanout, small }) => {
    expect(sized(pipe, cleanout)).toHaveLength(small);
  });
});

/** A stack of three storeys with a cleanout tee on it, or on its drain. */
const stack = (at: 'foot' | 'drain' | number): SketchRun => {
  const text = tower(times(3, '').map(() => [lavatory]));
  // The lowest branch joins 1.2 m above the foot; the next 4.2 m above it.
  const drawn =
    at === 'foot'
      ? text.replace('SF (to -1.6)', 'SF (to -1.6)').concat('\ncleanout SF')
      : at === 'drain'
        ? text
            .replace('OUT (east 9 fall 1:50)', 'CO (east 8 fall 1:50) > OUT (east 1 fall 1:50)')
            .concat('\ncleanout CO, 4 in')
        : text
            .replace(
              at < 1.2 ? 'S1 > SF' : 'S2 > S1',
              at < 1.2 ? `S1 > CO (to ${-1.6 + at}) > SF` : `S2 > CO (to ${-1.6 + at}) > S1`,
            )
            .concat('\ncleanout CO, 4 in');
  return runSketch(drawn);
};

describe('R33 a cleanout on the building drain, near where it leaves the building', () => {
  test('one there: none missing; none: missing', () => {
    expect(missing(stack('drain'), 'building drain')).toEqual([]);
    expect(missing(stack(0.6), 'building drain')).toHaveLength(1);
  });
});

describe('R32 a sewer of 8 in or more has manholes: the first within 75 m, the next within 90 m (recalled; 2.4.7.1.)', () => {
  /** The slab ends 6 m from the stack, the sewer begins 1 m farther out; lengths run from there. */
  const sewer = (size: string, lengths: readonly number[]): string[] => {
    const ends = lengths.map(
      (length, at) => `${at === lengths.length - 1 ? 'OUT' : `M${at}`} (east ${length} fall 1:50)`,
    );
    const run = runSketch(
      `${tower([[lavatory], [lavatory]], { stack: `${size} in` })
        .replace('OUT (east 9 fall 1:50)', `B (east 7 fall 1:50) > ${ends.join(' > ')}`)
        .replace(/roof "Roof" from -20 -20 to 20 20/, 'roof "Roof" from -5 -5 to 6 5')}
slab "Slab" from -5 -5 to 6 5 top 0 thick 0.2
${lengths
  .slice(1)
  .map((_, at) => `manhole M${at}`)
  .join('\n')}`,
    );
    return run
      .findings('cleanout-missing')
      .flatMap(({ facts }) => (facts.what === 'manhole' ? [`${facts.limitM}`] : []));
  };
  test.each([
    { size: '8', lengths: [74.9], found: [], why: 'within 75 m' },
    { size: '8', lengths: [75.2], found: ['75'], why: 'past it' },
    { size: '8', lengths: [70, 89.9], found: [], why: 'the next within 90 m' },
    { size: '8', lengths: [70, 90.2], found: ['90'], why: 'past it' },
    { size: '6', lengths: [80], found: [], why: 'a smaller sewer has cleanouts' },
  ])('$size in, $lengths m: $why', ({ size, lengths, found }) => {
    expect(sewer(size, lengths)).toEqual(found);
  });
});

describe('R34 a cleanout at the foot of a stack, or within 3 m above it', () => {
  test.each([
    { at: 0.6, found: [], why: 'RULES: an access tee 0.6 m up' },
    { at: 2.9, found: [], why: 'within 3 m' },
    { at: 3.1, found: [{ distanceM: expect.closeTo(3.1, 1), withinM: 3 }], why: 'past it' },
  ])('$at m above: $why', ({ at, found }) => {
    expect(missing(stack(at), 'stack foot')).toEqual(found.map((one) => expect.objectContaining(one)));
  });
  test('on the drain far from the foot it serves no stack', () => {
    expect(missing(stack('drain'), 'stack foot')).toHaveLength(1);
  });
});

describe('R35 other places', () => {
  /** A sink whose drain drops and then runs level to a closet's; a cleanout stands on the building drain. */
  const sink = (kind: string, more = ''): SketchRun =>
    runSketch(
      hall(
        'A sink',
        `trap T at 0 0 0.4
${kind} S from T up 0.2, trap 1 1/2 in
drain 1 1/2 in: S > T > J (east 0.3 fall 1:50) > D (to -0.5) > M (east 3 fall 1:50)
node B from M west 1 rise 1:50
closet C from B to 0, tank
drain 3 in: C > B > M > CX (south 4 fall 1:50) > OUT (south 1 fall 1:50)
vent 3 in: J > VT (to 4.2)
cleanout CX
terminal VT
sewer OUT
${more}`,
      ),
    );
  test('RULES: a kitchen sink’s drain with two turns of 90° needs one; a lavatory’s does not', () => {
    expect(missing(sink('kitchen-sink'), 'sink')).toEqual([
      { what: 'sink', turnDeg: expect.closeTo(177.7, 0), limitDeg: 90 }, // 2 x 90, less the falls of 1:50
    ]);
    expect(missing(sink('kitchen-sink', 'cleanout D, 1 1/2 in'), 'sink')).toEqual([]);
    expect(missing(sink('lavatory'), 'sink')).toEqual([]);
  });

  /** A branch with something in it, a cleanout at its head, and perhaps another one here. */
  const inLine = (part: string, more: string): SketchRun =>
    runSketch(
      `${ventedRow(
        [lavatory, lavatory],
        'node C1 from J1 west 0.3 rise 1:50\ncleanout C0 from C1 to 0, 3 in\ndrain 3 in: C0 > C1 > J1',
      )
        .replace('K (east 0.7 fall 1:50)', 'IN (east 0.7 fall 1:50) > K (east 2 fall 1:50)')
        .replace('OUT (east 9 fall 1:50)', 'BC (east 3 fall 1:50) > BT (east 3 fall 1:50) > OUT (east 3 fall 1:50)')}
${part}
${more}`,
    );
  test('one follows an interceptor before other water joins', () => {
    expect(missing(inLine('interceptor IN', ''), 'interceptor')).toHaveLength(1);
    expect(missing(inLine('interceptor IN', 'cleanout BC'), 'interceptor')).toEqual([]);
  });
  test('one stands before a trap on the building drain', () => {
    expect(missing(inLine('trap BT', ''), 'running trap')).toHaveLength(1);
    expect(missing(inLine('trap BT', 'cleanout BC'), 'running trap')).toEqual([]);
  });
});

describe('R29 a washer’s standpipe rises 600 mm above its trap', () => {
  const standpipe = (height: number): number =>
    runSketch(
      hall(
        'A washer',
        `trap T at 0 0 0.2
clothes-washer W from T up ${height}, trap 2 in
drain 2 in: W > T > J (east 0.5 fall 1:50) > F (to -0.4) > OUT (east 4 fall 1:50)
vent 3 in: J > VT (to 4.2)
terminal VT
sewer OUT`,
      ),
    ).findings('standpipe-too-short').length;
  test.each([
    { height: 0.75, short: 0, why: 'RULES: 0.75 m' },
    { height: 0.6, short: 0, why: 'the limit' },
    { height: 0.55, short: 1, why: 'past it' },
  ])('$height m: $why', ({ height, short }) => {
    expect(standpipe(height)).toBe(short);
  });
});
