import { describe, expect, test } from 'vitest';
import { runSketch } from '../support/run-sketch.ts';

/** A lavatory with its drop to a drain that falls south, and its vent up to `H`. */
const lavatory = (n: number, east: number) => `
node F${n} at ${east} 0 -0.3
node J${n} from F${n} to 0.5
node H${n} from J${n} to 2.5
trap T${n} from J${n} south 0.15 rise 1:50
lavatory L${n} from T${n} up 0.12, trap 1 1/4 in
drain 1 1/4 in: L${n} > T${n} > J${n} > F${n}
vent 1 1/4 in: J${n} > H${n}`;
const roof = 'vent 1 1/4 in: H1 > H2\nvent 1 1/4 in: H2 > VT (to 5)\nterminal VT';

const endsOf = ({ result }: ReturnType<typeof runSketch>) =>
  result.systems.map(({ sewerEnd, fixtures }) => {
    const pipe = result.pipes.find(({ globalId }) => globalId === sewerEnd.pipe);
    return `${pipe?.name} ${sewerEnd.how} ${fixtures}`;
  });
const waterOf = (run: ReturnType<typeof runSketch>, fixture: string) =>
  run
    .fixture(fixture)
    .waterPath?.map((id) => run.result.pipes.find(({ globalId }) => globalId === id)?.name)
    .at(-1);

describe('drains that only vents hold together', () => {
  const two = (ends: string) => `${lavatory(1, 0)}${lavatory(2, 3)}
${roof}
drain 3 in: F1 > S1 (south 4 fall 1:50)
drain 3 in: F2 > S2 (south 5 fall 1:50)
${ends}`;

  test.each([
    ['both are named', 'sewer S1\nsewer S2', ['F2-S2 named 1', 'F1-S1 named 1']],
    ['one is named', 'sewer S2', ['F2-S2 named 1', 'F1-S1 ports 1']],
    ['none is named', '', ['F2-S2 ports 1', 'F1-S1 ports 1']],
  ])('leave by an end each: %s', (_, ends, expected) => {
    const run = runSketch(two(ends));
    expect(endsOf(run)).toEqual(expected);
    expect([waterOf(run, 'L1'), waterOf(run, 'L2')]).toEqual(['F1-S1', 'F2-S2']);
    expect(run.findings('backfall')).toEqual([]);
  });

  test('leave by an end each where the user names both', () => {
    const idOf = (name: string) => runSketch(two('')).pipe(name).globalId;
    const run = runSketch(two(''), { answers: { sewerEnds: [idOf('F1-S1'), idOf('F2-S2')] } });
    expect(endsOf(run)).toEqual(['F2-S2 answer 1', 'F1-S1 answer 1']);
  });

  test('vents belong to the drain that they stand on', () => {
    const run = runSketch(two('sewer S1\nsewer S2'));
    expect(run.result.systems.map(({ pipes }) => pipes).reduce((a, b) => a + b)).toBe(run.result.pipes.length);
    expect([run.role('J1-H1'), run.role('J2-H2')]).toEqual(['individual-vent', 'individual-vent']);
  });
});

describe('a drain that is broken off', () => {
  // 0.3 m lie between B1 and B2: too far for a joint, so the lavatory upstream has only its vent in common with the rest.
  const broken = `storey "Ground floor" at 0
slab "Slab" from -1 -2 to 6 1 top 0 thick 0.2
${lavatory(1, 0)}${lavatory(2, 3)}
${roof}
drain 3 in: F1 > B1 (east 1 fall 1:50)
node B2 from B1 east 0.3 fall 1:50
drain 3 in: B2 > C
node C from F2 down 0.06
drain 1 1/4 in: F2 > C
drain 3 in: C > S (south 5 fall 1:50)
sewer S`;

  test('ends where it is open: its water does not climb over the roof', () => {
    const run = runSketch(broken);
    expect(endsOf(run)).toEqual(['C-S named 1', 'F1-B1 ports 1']);
    expect(run.findings('backfall')).toEqual([]);
    expect(run.findings('unvented-trap')).toEqual([]);
  });

  test('is told, with what it leaves uncounted', () => {
    const run = runSketch(broken);
    const told = run.findings('open-end').filter(({ facts }) => facts.cutOff === true);
    expect(told.map(({ about, facts }) => [about, facts.fixtures])).toEqual([[[run.pipe('F1-B1').globalId], 1]]);
    expect(told[0]!.sentence).toBe(
      'F1-B1 is broken off: what drains into it (one fixture) goes no farther, and no size beyond counts it.',
    );
    expect(run.result.systems.map(({ isCutOff }) => isCutOff)).toEqual([undefined, true]);
  });

  test('is a way out of its own where it ends outside, or where nothing tells inside from outside', () => {
    for (const slab of ['slab "Slab" from 1.5 -2 to 6 1 top 0 thick 0.2', '']) {
      const run = runSketch(broken.replace(/slab .*/, slab));
      expect(run.result.systems.map(({ isCutOff }) => isCutOff)).toEqual([undefined, undefined]);
    }
  });

  test('is no building drain, which every code sizes and vents by rules of its own', () => {
    expect(runSketch(broken).role('F1-B1')).toBe('fixture-drain');
    const run = runSketch(broken);
    const about = run.findings('main-vent-missing').flatMap((one) => one.about);
    expect(about).toEqual([run.pipe('C-S').globalId]);
  });
});

test('an end that lies on the way to another is passed by', () => {
  const run = runSketch(`${lavatory(1, 0)}
vent 1 1/4 in: H1 > VT (to 5)
terminal VT
drain 3 in: F1 > M (south 3 fall 1:50) > S (south 4 fall 1:50)
sewer M
sewer S`);
  expect(endsOf(run)).toEqual(['M-S named 1']);
});

test('a drain with nowhere else to go climbs, and that is told', () => {
  const run = runSketch(`${lavatory(1, 0)}
vent 1 1/4 in: H1 > VT (to 5)
terminal VT
drain 3 in: F1 > P (south 3 fall 1:50) > Q (to 2) > S (south 4 fall 1:50)
sewer S`);
  expect(endsOf(run)).toEqual(['Q-S named 1']);
  expect(run.findings('backfall')).toHaveLength(1);
});
