import { describe, expect, test } from 'vitest';
import { hall, times, ventedRow } from '../support/rows.ts';
import { runSketch, type SketchRun } from '../support/run-sketch.ts';

// National Plumbing Code, loads: rules R08 to R12. Table 2.4.9.3. unless another is named.
const lavatory = 'lavatory, trap 1 1/4 in';
const tub = 'bathtub, trap 1 1/2 in';

describe('R08 the load of a fixture, by its trap where the table says so', () => {
  test.each([
    { fixture: lavatory, load: 1, why: 'lavatory, 1¼ in trap' },
    { fixture: 'lavatory, trap 1 1/2 in', load: 1.5, why: 'lavatory, 1½ in trap' },
    { fixture: 'mop-sink, trap 3 in', load: 3, why: 'RULES: mop sink with a 3 in trap' },
    { fixture: 'mop-sink, trap 2 in', load: 2, why: 'other sinks, 2 in trap' },
    { fixture: 'kitchen-sink, trap 1 1/2 in', load: 1.5, why: 'domestic sink; other sinks on 1½ in the same' },
    { fixture: tub, load: 1.5, why: 'bathtub' },
    { fixture: 'bidet, trap 1 1/4 in', load: 1, why: 'bidet' },
    { fixture: 'drinking-fountain, trap 1 1/4 in', load: 0.5, why: 'drinking fountain' },
    { fixture: 'floor-drain, trap 2 in', load: 2, why: 'floor drain, 2 in trap' },
    { fixture: 'floor-drain, trap 3 in', load: 3, why: 'floor drain, 3 in trap' },
    { fixture: 'floor-drain, trap 4 in', load: 6, why: 'above 3 in: Table 2.4.10.2., 4 in' },
    { fixture: 'clothes-washer, trap 2 in', load: 2, why: 'clothes washer' },
    { fixture: 'shower, heads 1, trap 1 1/2 in', load: 1.5, why: 'one head' },
    { fixture: 'shower, heads 3, trap 2 in', load: 3, why: 'two or three heads' },
    { fixture: 'shower, heads 6, trap 3 in', load: 6, why: 'four to six heads' },
    { fixture: 'urinal, pedestal, trap 2 in', load: 4, why: 'pedestal' },
    { fixture: 'urinal, stall, trap 2 in', load: 2, why: 'stall' },
    { fixture: 'urinal, washout, trap 1 1/2 in', load: 1.5, why: 'wall, washout' },
    { fixture: 'urinal, siphon, trap 2 in', load: 3, why: 'wall, other' },
    { fixture: 'closet, tank', load: 4, why: 'flush tank' },
    { fixture: 'closet, valve', load: 6, why: 'direct flush valve' },
    { fixture: 'laundry-tray, trap 1 1/2 in', load: 1.5, why: 'laundry tray' },
    { fixture: 'dental-unit, trap 1 1/4 in', load: 1, why: 'dental unit' },
  ])('$fixture: $load ($why)', ({ fixture, load }) => {
    const run = runSketch(ventedRow([fixture, lavatory]));
    expect(run.fixture('F1').load).toEqual({ least: load, most: load });
    expect(run.findings('fixture-unidentified')).toEqual([]);
  });
});

describe('what the model leaves open is a range', () => {
  test.each([
    { fixture: 'closet', least: 4, most: 6, why: 'tank 4 or valve 6' },
    { fixture: 'urinal, wall, trap 2 in', least: 1.5, most: 3, why: 'washout 1.5 or another 3' },
    { fixture: 'urinal, trap 2 in', least: 1.5, most: 4, why: 'any of the four' },
    { fixture: 'kitchen-sink, trap 2 in', least: 1.5, most: 2, why: 'domestic 1.5, or another sink on a 2 in trap 2' },
  ])('$fixture: $least to $most ($why)', ({ fixture, least, most }) => {
    const run = runSketch(ventedRow([fixture, lavatory]));
    expect(run.fixture('F1').load).toEqual({ least, most });
    expect(run.pipe('J2-K').load).toEqual({ least: least + 1, most: most + 1 });
    expect(run.findings('fixture-unidentified')).toHaveLength(1);
  });

  test('tank or valve: five vented closets are 20 or 30, a branch of 3 in or 4 in by load; three closets ask 4 in', () => {
    const two = runSketch(ventedRow(['closet', 'closet', ...times(15, lavatory)]));
    // 2 x 4 + 15 = 23, 2 x 6 + 15 = 27: both within 3 in (27).
    expect([two.pipe('J17-K').load, two.size('J17-K')]).toEqual([{ least: 23, most: 27 }, '3 in']);
    const one = runSketch(ventedRow(['closet', 'closet', ...times(16, lavatory)]));
    // 24 fits 3 in; 28 does not.
    expect([one.pipe('J18-K').load, one.size('J18-K')]).toEqual([{ least: 24, most: 28 }, '3 in to 4 in']);
  });

  test('a thing nobody named: as the lightest, as the heaviest, and as a closet', () => {
    const run = runSketch(ventedRow(['thing, trap 1 1/4 in', lavatory]));
    // Lightest row: emergency floor drain 0; a closet with a valve 6, or a shower of six heads 6.
    expect(run.fixture('F1').load).toEqual({ least: 0, most: 6 });
    expect(run.findings('fixture-unidentified')).toHaveLength(1);
    // As a closet it asks 3 in; as a drinking fountain 1¼ in would do for 1 of the lavatory.
    const { required } = run.pipe('J2-K');
    expect(required?.most?.label).toBe('3 in');
    expect(required?.least?.label).not.toBe('3 in');
  });
});

describe('R09 a fixture that the table lacks: by trap, Table 2.4.10.2.', () => {
  test.each([
    { trap: '1 1/4', load: 1 },
    { trap: '1 1/2', load: 2 },
    { trap: '2', load: 3 },
    { trap: '3', load: 5 },
    { trap: '4', load: 6 },
  ])('clinical sink on a trap of $trap in: $load', ({ trap, load }) => {
    expect(runSketch(ventedRow([`clinical-sink, trap ${trap} in`, lavatory])).fixture('F1').load.most).toBe(load);
  });
});

/** A sink and what stands beside it on the sink's own trap, then out; the vent on the arm. */
const onOneTrap = (sink: string, beside: readonly string[]): SketchRun =>
  runSketch(
    hall(
      'One trap',
      `node N from T up 0.15
${sink.split(',')[0]} S from N up 0.15, ${sink.split(', ').slice(1).join(', ')}
drain 1 1/2 in: S > N > T
${beside.map((what, at) => `${what.split(',')[0]} B${at + 1} from N west ${at + 0.5} up 0.2${what.includes(',') ? `, ${what.split(', ').slice(1).join(', ')}` : ''}\ndrain 1 1/2 in: B${at + 1} > N`).join('\n')}
trap T at 0 0 0.5, 1 1/2 in
drain 1 1/2 in: T > J (east 0.8 fall 1:50) > F (to -0.4) > OUT (east 4 fall 1:50)
vent 3 in: J > VT (to 4.2)
terminal VT
sewer OUT`,
    ),
  );

describe('R10 steady flow, stated by the user: 31.7 units for each litre a second (2.4.10.3.(1))', () => {
  test.each([
    { flow: 0.5, load: 15.85, branch: '3 in', why: 'RULES: 0.5 l/s: 15.85; more than the 12 of 2½ in' },
    { flow: 0.1, load: 3.17, branch: '2 in', why: 'more than the 3 of 1½ in' },
  ])('$flow l/s: $load ($why)', ({ flow, load, branch }) => {
    const run = runSketch(ventedRow(['floor-drain, trap 2 in']), {
      answers: { fixtures: new Map([['name:F1', { detail: { flow } }]]) },
    });
    expect(run.fixture('F1').load.most).toBeCloseTo(load, 1); // loads are counted in sixtieths, upward
    expect(run.size('V1-J1')).toBe(branch);
  });
});

describe('R11 fixtures that count zero', () => {
  test('sink 1.5 and its dishwasher 0: 1.5', () => {
    const run = onOneTrap('kitchen-sink, trap 1 1/2 in', ['dishwasher']);
    expect([run.fixture('S').load.most, run.fixture('B1').load.most, run.pipe('F-OUT').load.most]).toEqual([
      1.5, 0, 1.5,
    ]);
  });

  test('a dishwasher with a drain of its own: 1.5 domestic, 3 commercial', () => {
    expect(runSketch(ventedRow(['dishwasher, trap 2 in', lavatory])).fixture('F1').load).toEqual({
      least: 1.5,
      most: 3,
    });
  });

  test('an emergency floor drain: no load, but its pipe keeps the size of its trap, and it has a vent', () => {
    const run = runSketch(ventedRow(['floor-drain, emergency, trap 2 in', lavatory]));
    expect(run.fixture('F1').load.most).toBe(0);
    expect([run.size('T1-V1'), run.role('V1-VT1'), run.size('V1-VT1')]).toEqual(['2 in', 'individual-vent', '1½ in']);
  });
});

describe('two singles on one trap count as one (rows “lavatory, domestic” and “sink, domestic”)', () => {
  test('two sinks: 1.5', () => {
    const run = onOneTrap('kitchen-sink, trap 1 1/2 in', ['kitchen-sink, trap 1 1/2 in']);
    expect(run.pipe('F-OUT').load.most).toBe(1.5);
  });

  test('two lavatories on a 1½ in trap: 1.5; three fixtures on one trap are no such pair', () => {
    expect(onOneTrap('lavatory, trap 1 1/2 in', ['lavatory, trap 1 1/2 in']).pipe('F-OUT').load.most).toBe(1.5);
    expect(onOneTrap('lavatory, trap 1 1/2 in', times(2, 'lavatory, trap 1 1/2 in')).pipe('F-OUT').load.most).toBe(4.5);
  });
});

describe('R12 the load of a pipe: everything whose water passes', () => {
  test('three lavatories of 1 and two tank closets of 4: 11', () => {
    const run = runSketch(ventedRow([...times(3, lavatory), ...times(2, 'closet, tank')]));
    const pipes = ['J1-J2', 'J2-J3', 'J3-J4', 'J4-J5', 'J5-K', 'BF-OUT'];
    expect(pipes.map((pipe) => run.pipe(pipe).load.most)).toEqual([1, 2, 3, 7, 11, 11]);
  });

  test('vents carry no water', () => {
    expect(runSketch(ventedRow(times(2, tub))).pipe('V1-VT1').load.most).toBe(0);
  });
});
