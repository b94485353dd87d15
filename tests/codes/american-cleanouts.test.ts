import { describe, expect, test } from 'vitest';
import { hall, times, ventedRow } from '../support/rows.ts';
import { runSketch, type SketchRun } from '../support/run-sketch.ts';
import { tower } from '../support/towers.ts';

// Cleanouts: International Plumbing Code 708 (R32, R34 to R37), Uniform Plumbing Code 707 (R28 to R32). 100 ft are 30.48 m.
const lavatory = 'lavatory, trap 1 1/4 in';
const run = (text: string, code: string, settings: object = {}): SketchRun =>
  runSketch(text, { code, answers: { settings: { use: 'public', ...settings } } as never });
const missing = (done: SketchRun, what: string) =>
  done.findings('cleanout-missing').filter(({ facts }) => facts.what === what);

/** A level drain of 3 in with two lavatories at its head, where a cleanout stands; `way` leads on from there. */
const drain = (way: string, more = ''): string =>
  hall(
    'A long drain',
    `node J1 at 0 0 -0.4
node J2 from J1 east 0.5 fall 1:48
cleanout CO from J1 west 0.3 up 0.3, 3 in
trap T1 from J1 south 0.3 rise 1:48
trap T2 from J2 south 0.3 rise 1:48
lavatory L1 from T1 to 0.1, trap 1 1/4 in
lavatory L2 from T2 to 0.1, trap 1 1/4 in
drain 1 1/4 in: L1 > T1 > J1
drain 1 1/4 in: L2 > T2 > J2
drain 3 in: CO > J1
drain 3 in: J1 > J2 > ${way} > OUT (down 1)
vent 3 in: J1 > VT (to 4.2)
terminal VT
sewer OUT
${more}`,
  );

describe.each(['ipc-2021', 'upc-2021'])('%s', (code) => {
  test.each([
    { length: 29.9, found: 0, why: 'within 100 ft' },
    { length: 30.6, found: 1, why: 'past it' },
  ])('spacing, beyond the last cleanout: $length m, $why', ({ length, found }) => {
    const done = run(drain(`K (east ${length - 0.5} fall 1:96)`), code);
    expect(missing(done, 'spacing')).toHaveLength(found);
  });
  test.each([
    { length: 30, found: 0, why: 'two of them 100 ft apart or less' },
    { length: 31, found: 1, why: 'farther' },
  ])('spacing, between two: $length m, $why', ({ length, found }) => {
    const second = `cleanout C2 from K up 0.4, 3 in\ndrain 3 in: C2 > K`;
    const done = run(drain(`K (east ${length - 0.5} fall 1:96) > E (east 1 fall 1:96)`, second), code);
    expect(missing(done, 'spacing')).toHaveLength(found);
  });
});

describe('size of a cleanout', () => {
  const small = (code: string, pipe: string, cleanout: string) =>
    run(
      ventedRow(
        [lavatory, lavatory],
        `node C1 from J1 west 0.3 rise 1:50\ncleanout CO from C1 to 0, ${cleanout} in\ndrain ${cleanout} in: CO > C1 > J1`,
      ).replace('drain 3 in: J1', `drain ${pipe} in: J1`),
      code,
    )
      .findings('cleanout-too-small')
      .map(({ facts, clause }) => [facts.least, clause]);
  test.each([
    { pipe: '2', cleanout: '2', found: [] },
    { pipe: '2', cleanout: '1 1/2', found: [['2 in', '708.1.5']] },
    { pipe: '4', cleanout: '4', found: [] },
    { pipe: '4', cleanout: '3', found: [['4 in', '708.1.5']] },
    { pipe: '6', cleanout: '4', found: [] },
    { pipe: '6', cleanout: '3', found: [['4 in', '708.1.5']] },
  ])('IPC 708.1.5, the pipe’s own to 4 in, 4 in above: $cleanout in on $pipe in', ({ pipe, cleanout, found }) => {
    expect(small('ipc-2021', pipe, cleanout)).toEqual(found);
  });
  test.each([
    { pipe: '2', cleanout: '1 1/2', found: [] },
    { pipe: '3', cleanout: '2 1/2', found: [] },
    { pipe: '3', cleanout: '2', found: [['2½ in', '707.1, Table 707.1']] },
    { pipe: '4', cleanout: '4', found: [] },
    { pipe: '4', cleanout: '3', found: [['3½ in', '707.1, Table 707.1']] },
    { pipe: '6', cleanout: '3', found: [['3½ in', '707.1, Table 707.1']] },
  ])('UPC Table 707.1, 1½, 2½ and 3½ in: $cleanout in on $pipe in', ({ pipe, cleanout, found }) => {
    expect(small('upc-2021', pipe, cleanout)).toEqual(found);
  });
});

describe('International Plumbing Code', () => {
  test('R35 a quarter bend in a level drain has a cleanout within 40 ft, an eighth bend needs none (708.1.4)', () => {
    const bend = (far: number, turn: string) =>
      missing(
        run(drain(`K (east ${far} fall 1:96) > M (${turn} fall 1:96) > N (north 2 fall 1:96)`), 'ipc-2021'),
        'bend',
      );
    expect(bend(11.5, 'north 3')).toEqual([]);
    const [found] = bend(12.5, 'north 3');
    expect([found?.clause, found?.facts.limitDeg]).toEqual(['708.1.4', 45]);
    expect(bend(12.5, 'east 2 north 2')).toEqual([]);
  });
  test('R34 one where the building drain leaves, unless the foot of a stack within 10 ft of it has one (708.1.3)', () => {
    const leaving = (length: number, foot: boolean) =>
      missing(
        run(
          tower([[lavatory], [lavatory]], {
            more: foot
              ? 'cleanout CO at 0.4 0 -0.2, 4 in\ndrain 4 in: CO > SC'
              : 'cleanout CO at -0.3 -1.7 -0.1, 4 in\ndrain 2 in: CO > J1.1',
          })
            .replace('> SF (to -1.6) >', foot ? '> SC (to -0.9) > SF (to -1.6) >' : '> SF (to -1.6) >')
            .replace('OUT (east 9 fall 1:50)', `OUT (east ${length} fall 1:48)`),
          'ipc-2021',
        ),
        'building drain',
      ).map(({ clause }) => clause);
    expect(leaving(9, true)).toEqual(['708.1.3']);
    expect(leaving(2.9, true)).toEqual([]);
    expect(leaving(2.9, false)).toEqual(['708.1.3']);
  });
  test.each([
    { size: '8', lengths: [60.9], found: [], why: 'the first within 200 ft' },
    { size: '8', lengths: [61.2], found: ['708.1.2'], why: 'past it' },
    { size: '8', lengths: [50, 121.8], found: [], why: 'the next within 400 ft' },
    { size: '8', lengths: [50, 122.2], found: ['708.1.2'], why: 'past it' },
    { size: '6', lengths: [70], found: [], why: 'a smaller sewer has cleanouts' },
  ])('R33 manholes of a sewer of 8 in or more: $size in, $lengths m, $why (708.1.2)', ({ size, lengths, found }) => {
    // The slab ends 6 m from the stack, the sewer begins 30 in, 0.762 m, farther out: lengths run from there.
    const ends = lengths.map(
      (length, at) => `${at === lengths.length - 1 ? 'OUT' : `M${at}`} (east ${length} fall 1:48)`,
    );
    const text = `${tower([[lavatory], [lavatory]], { stack: `${size} in` })
      .replace('OUT (east 9 fall 1:50)', `B (east 6.762 fall 1:48) > ${ends.join(' > ')}`)
      .replace(/roof "Roof" from -20 -20 to 20 20/, 'roof "Roof" from -5 -5 to 6 5')}
slab "Slab" from -5 -5 to 6 5 top 0 thick 0.2
${lengths
  .slice(1)
  .map((_, at) => `manhole M${at}`)
  .join('\n')}`;
    expect(missing(run(text, 'ipc-2021'), 'manhole').map(({ clause }) => clause)).toEqual(found);
  });
  test('R37 at the foot of a stack, where the place still asks for it (setting)', () => {
    const text = tower([[lavatory], [lavatory]], { more: 'cleanout CO at 9.3 0 -1, 4 in\ndrain 4 in: CO > OUT' });
    const feet = (settings: object) => missing(run(text, 'ipc-2021', settings), 'stack foot').length;
    expect([feet({}), feet({ stackFootCleanout: false })]).toEqual([1, 0]);
  });
});

describe('Uniform Plumbing Code', () => {
  const noHead = (text: string): string =>
    text
      .replace('cleanout CO from J1 west 0.3 up 0.3, 3 in\n', 'cleanout CO from K up 0.3, 3 in\n')
      .replace('drain 3 in: CO > J1\n', 'drain 3 in: CO > K\n');
  test('R28, R31 at the upper end of a level drain longer than 5 ft (707.4)', () => {
    const head = (length: number) =>
      missing(run(noHead(drain(`K (east ${length} fall 1:48) > E (east 0.3 fall 1:48)`)), 'upc-2021'), 'upper end');
    expect(head(2).map(({ clause }) => clause)).toEqual(['707.4']);
    expect(head(0.6)).toEqual([]);
    expect(missing(run(drain('K (east 9 fall 1:48)'), 'upc-2021'), 'upper end')).toEqual([]);
  });
  test('R29 one more for each 135 degrees of turns: one quarter bend none, two one', () => {
    const turns = (way: string) => missing(run(drain(way), 'upc-2021'), 'turns').map(({ facts }) => facts.turnDeg);
    expect(turns('K (east 3 fall 1:48) > M (north 3 fall 1:48)')).toEqual([]);
    const [turned] = turns('K (east 3 fall 1:48) > M (north 3 fall 1:48) > N (west 2 fall 1:48)');
    expect(turned).toBeCloseTo(180, 0);
  });
  test('R31 above the lowest floor a branch to a stack is excused, its urinals are not (R30)', () => {
    const text = tower([[lavatory], ['urinal, stall, trap 2 in', 'urinal, stall, trap 2 in', ...times(6, lavatory)]], {
      more: 'cleanout CO at 0.4 0 -0.2, 4 in\ndrain 4 in: CO > SC',
    }).replace('> SF (to -1.6) >', '> SC (to -0.9) > SF (to -1.6) >');
    const done = run(text, 'upc-2021');
    expect(missing(done, 'upper end')).toEqual([]);
    expect(missing(done, 'urinal').map(({ about, clause }) => [about.length, clause])).toEqual([[2, '707.4']]);
    const opened = run(
      `${text}\ncleanout C1 at -5.6 -0.2 3.3, 2 in\ncleanout C2 at -4.9 -0.2 3.3, 2 in\ndrain 2 in: C1 > T2.1\ndrain 2 in: C2 > T2.2`,
      'upc-2021',
    );
    expect(missing(opened, 'urinal')).toEqual([]);
  });
  test('2024 takes kitchen sinks out of the exception as well', () => {
    const text = tower([[lavatory], ['kitchen-sink, trap 1 1/2 in', lavatory]], {
      more: 'cleanout CO at 0.4 0 -0.2, 4 in\ndrain 4 in: CO > SC',
    }).replace('> SF (to -1.6) >', '> SC (to -0.9) > SF (to -1.6) >');
    const sinks = (code: string) => missing(run(text, code), 'kitchen sink').map(({ clause }) => clause);
    expect(['upc-2015', 'upc-2018', 'upc-2021', 'upc-2024'].map(sinks)).toEqual([[], [], [], ['707.4 exceptions']]);
  });
  test('a model that draws no cleanout: said once, with what the code wants', () => {
    const found = run(ventedRow(times(3, 'urinal, stall, trap 2 in')), 'upc-2021').findings('cleanout-missing');
    expect(found.map(({ facts }) => [facts.what, facts.urinals, facts.upperEnds])).toEqual([['none drawn', 3, 1]]);
  });
});
