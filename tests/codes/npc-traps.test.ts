import { describe, expect, test } from 'vitest';
import { hall, times, ventedRow } from '../support/rows.ts';
import { runSketch, type SketchRun } from '../support/run-sketch.ts';
import { tower } from '../support/towers.ts';

// National Plumbing Code, protection of traps: rules R36 to R40.
const lavatory = 'lavatory, trap 1 1/4 in';

/** One fixture with a drawn trap, `path` from the trap to the vent joint `J`, then a drop and out. */
const armOf = (fixture: string, path: string, bore: string): SketchRun => {
  const [word = '', ...details] = fixture.split(', ');
  return runSketch(
    hall(
      'One trap arm',
      `trap T at 0 0 0.5, ${bore} in
${word} F from T up 0.2, ${details.join(', ')}
drain ${bore} in: F > T > ${path}
drain ${bore} in: J > D (down 0.8) > OUT (south 4 fall 1:50)
vent 3 in: J > VT (to 4.2)
terminal VT
sewer OUT`,
    ),
  );
};
const codes = (run: SketchRun) =>
  run
    .findings()
    .filter(({ clause }) => clause?.startsWith('2.5.6.3'))
    .map(({ code, facts }) => (typeof facts.what === 'string' ? `${code}: ${facts.what}` : code));

describe('R36 every trap is vented', () => {
  const unvented = (vent: string) =>
    runSketch(
      hall(
        'Vented or not',
        `lavatory L at 0 0 0.6, trap 1 1/4 in
trap T from L down 0.12
drain 1 1/4 in: L > T > J (east 0.5 fall 1:50) > F (to -0.4) > OUT (east 4 fall 1:50)
${vent}
sewer OUT
slab "Ceiling" from -5 -5 to 20 5 top 3 thick 0.2`,
      ),
    );

  test('no vent at all: unvented', () => {
    const run = unvented('');
    expect([run.fixture('L').ventedBy.how, run.findings('unvented-trap').length]).toEqual(['unvented', 1]);
  });

  test('a vent that ends under the ceiling brings no air', () => {
    const run = unvented('vent 1 1/4 in: J > X (to 2.4)');
    expect(run.fixture('L').ventedBy.how).toBe('unvented');
    expect([run.findings('no-open-air').length, run.findings('unvented-trap').length]).toEqual([1, 1]);
    expect(run.role('J-X')).toBe('idle');
  });

  test('an open end over the roof does, and an air admittance valve does', () => {
    expect(unvented('vent 1 1/4 in: J > X (to 4.2)').fixture('L').ventedBy.how).toBe('individual-vent');
    const valve = unvented('vent 1 1/4 in: J > X (to 1.2)\nadmittance-valve X');
    expect([valve.fixture('L').ventedBy.how, valve.size('J-X')]).toEqual(['individual-vent', '1¼ in']);
    expect(valve.findings('unvented-trap')).toEqual([]);
  });

  test('air never comes from downstream: a vent past the trap’s own drain and the next fixture is none of its own', () => {
    // The lavatory joins a branch at its upstream end; the only vent stands further down.
    const run = runSketch(
      hall(
        'A vent downstream',
        `node J1 at 0 0 -0.4
trap T1 from J1 up 0.9
lavatory F1 from T1 up 0.12, trap 1 1/4 in
node J2 from J1 east 1 fall 1:50
trap T2 from J2 south 0.3 rise 1:50
floor-drain F2 from T2 to 0, untrapped, trap 2 in
node J3 from J2 east 1 fall 1:50
drain 2 in: F1 > T1 > J1 > J2 > J3 > OUT (east 3 fall 1:50)
drain 2 in: F2 > T2 > J2
vent 3 in: J3 > VT (to 4.2)
terminal VT
sewer OUT`,
      ),
    );
    expect([run.fixture('F1').ventedBy.how, run.fixture('F2').ventedBy.how]).toEqual(['unvented', 'unvented']);
    expect(run.findings('unvented-trap')).toHaveLength(2);
  });
});

describe('R37 a floor drain that needs no vent: trap 3 in or more, drain 450 mm or more, fall not above its size', () => {
  // On the building drain, 3 m past the foot of a stack: a stack of five units is no wet vent for it (2.5.2.1.(1)(h)).
  const onDrain = (what: string): SketchRun =>
    runSketch(
      tower([[], times(5, lavatory)], {
        more: `node FJ from SF east 3 fall 1:50\n${what}`,
      }).replace('OUT (east 9 fall 1:50)', 'FJ > OUT (east 9 fall 1:50)'),
    );
  const drain = (trap: string, plan: number, move: string): SketchRun =>
    onDrain(`trap FT from FJ south ${plan} ${move}, ${trap} in
floor-drain FD from FT to 0, untrapped
drain ${trap} in: FD > FT > FJ`);

  test.each([
    { trap: '3', plan: 0.6, move: 'rise 1:50', how: 'free', why: 'RULES: 600 mm at 1:50' },
    { trap: '3', plan: 0.45, move: 'rise 1:50', how: 'free', why: 'the limit of length' },
    { trap: '3', plan: 0.43, move: 'rise 1:50', how: 'unvented', why: 'too short' },
    { trap: '3', plan: 0.6, move: 'up 0.075', how: 'free', why: 'falls its own size' },
    { trap: '3', plan: 0.6, move: 'up 0.09', how: 'unvented', why: 'falls more than its size' },
    { trap: '4', plan: 0.6, move: 'rise 1:50', how: 'free', why: 'a larger trap' },
  ])('$trap in trap, $plan m, $move: $how ($why)', ({ trap, plan, move, how }) => {
    const run = drain(trap, plan, move);
    expect(run.fixture('FD').ventedBy.how).toBe(how);
    expect(run.findings('unvented-trap')).toHaveLength(how === 'free' ? 0 : 1);
  });

  test('where the setting asks it, only on a drain that ends upstream in a stack of 3 in (Ontario 2012)', () => {
    const text = (stack: string) =>
      tower([[], times(5, lavatory)], {
        stack,
        more: `node FJ from SF east 3 fall 1:50
trap FT from FJ south 0.6 rise 1:50, 3 in
floor-drain FD from FT to 0, untrapped
drain 3 in: FD > FT > FJ`,
      }).replace('OUT (east 9 fall 1:50)', 'FJ > OUT (east 9 fall 1:50)');
    const how = (stack: string, floorDrainAtStack: boolean) =>
      runSketch(text(stack), { answers: { settings: { floorDrainAtStack } } }).fixture('FD').ventedBy.how;
    expect([how('3 in', true), how('2 in', true), how('2 in', false)]).toEqual(['free', 'unvented', 'free']);
  });

  test('an emergency floor drain follows the same rule', () => {
    const text = `trap FT from FJ south 0.6 rise 1:50, 3 in
floor-drain FD from FT to 0, emergency, untrapped
drain 3 in: FD > FT > FJ`;
    const run = onDrain(text);
    expect([run.fixture('FD').ventedBy, run.fixture('FD').load.most]).toEqual([
      { how: 'free', vents: [], rule: 'NPC-R37' },
      0,
    ]);
    expect(onDrain(text.replaceAll('3 in', '2 in')).fixture('FD').ventedBy.how).toBe('unvented');
  });

  test('no drain of the stack becomes a wet vent because a trap below it lacks a vent', () => {
    const run = drain('2', 0.6, 'rise 1:50');
    expect(run.result.batteries).toEqual([]);
    expect([run.role('S2-SF'), run.role('SF-FJ'), run.role('FJ-OUT')]).toEqual([
      'stack',
      'building-drain',
      'building-drain',
    ]);
  });

  test('other fixtures are not freed, whatever their trap', () => {
    const run = onDrain(`trap FT from FJ south 0.6 rise 1:50, 3 in
mop-sink FD from FT to 0
drain 3 in: FD > FT > FJ`);
    expect(run.fixture('FD').ventedBy.how).toBe('unvented');
  });
});

test('R38 traps outside the rule: a roof drain is another system, and no trap of it is asked for a vent', () => {
  const run = runSketch(
    ventedRow([lavatory, lavatory], 'roof-drain RD at 8 4 3.6\nrain 3 in: RD > R1 (to -1.4) > R2 (east 3 fall 1:50)'),
  );
  expect(run.result.fixtures).toHaveLength(2);
  expect(run.findings('unvented-trap')).toEqual([]);
  expect(Object.keys(run.result.counts.leftOut)).toContain('rainwater');
});

describe('R39 trap arm: Table 2.5.6.3.', () => {
  const basin = (trap: string) => `sink, trap ${trap} in`;
  test.each([
    { trap: '1 1/4', plan: 1.5, slope: '1:50', found: [], why: 'the limit' },
    { trap: '1 1/4', plan: 1.51, slope: '1:50', found: ['trap-arm-too-long: length'], why: 'past it' },
    { trap: '1 1/2', plan: 1.8, slope: '1:50', found: [], why: 'the limit' },
    {
      trap: '1 1/2',
      plan: 2,
      slope: '1:50',
      found: ['trap-arm-too-long: length', 'trap-arm-too-steep'],
      why: 'RULES: 2.0 m; it falls 40 mm',
    },
    { trap: '2', plan: 2.4, slope: '1:50', found: [], why: 'the limit: it falls 48 mm' },
    { trap: '2', plan: 2.45, slope: '1:50', found: ['trap-arm-too-long: length'], why: 'past it' },
    { trap: '3', plan: 3.6, slope: '1:50', found: [], why: 'the limit: it falls 72 mm' },
    { trap: '3', plan: 3.65, slope: '1:50', found: ['trap-arm-too-long: length'], why: 'past it' },
    { trap: '4', plan: 9.8, slope: '1:100', found: [], why: 'the limit' },
    { trap: '4', plan: 9.9, slope: '1:100', found: ['trap-arm-too-long: length'], why: 'past it' },
    { trap: '1 1/2', plan: 1, slope: '1:20', found: ['trap-arm-too-steep'], why: 'falls 50 mm, its bore is 38' },
    { trap: '1 1/2', plan: 1, slope: '1:27', found: [], why: 'falls 37 mm' },
    {
      trap: '1 1/2',
      plan: 0.07,
      slope: '1:50',
      found: ['trap-arm-too-long: too short'],
      why: 'less than two sizes, 76 mm',
    },
    { trap: '1 1/2', plan: 0.08, slope: '1:50', found: [], why: 'two sizes' },
    { trap: '2', plan: 1, slope: '1:60', found: ['slope-too-small'], why: 'flatter than 1:50' },
    { trap: '4', plan: 2, slope: '1:100', found: [], why: '4 in may lie at 1:100' },
  ])('$trap in, $plan m at $slope: $found ($why)', ({ trap, plan, slope, found }) => {
    expect(codes(armOf(basin(trap), `J (east ${plan} fall ${slope})`, trap))).toEqual(found);
  });

  test('turns of 135° in all, the fitting at the vent left out', () => {
    const turned = (path: string) => codes(armOf(basin('2'), path, '2'));
    const corner = 'A (east 0.5 fall 1:50) > ';
    expect(turned(`${corner}B (north 0.4 fall 1:50) > J (north 0.3 east 0.3 fall 1:50)`)).toEqual([]); // 90 + 45
    expect(turned(`${corner}B (north 0.4 fall 1:50) > J (east 0.3 fall 1:50)`)).toEqual(['trap-arm-too-long: turn']); // 180
  });
});

describe('R40 water closet to its vent: 1 m down, 3 m along, turns of 225°', () => {
  const closet = (drop: number, path: string): string[] => {
    const text = hall(
      'A closet',
      `closet C at 0 0 0, tank
drain 3 in: C > B (down ${drop}) > ${path}
drain 3 in: J > D (down 0.5) > OUT (south 4 fall 1:50)
vent 3 in: J > VT (to 4.2)
terminal VT
sewer OUT`,
    );
    return codes(runSketch(text));
  };
  test.each([
    { drop: 0.4, path: 'J (east 2.8 fall 1:50)', found: [], why: 'RULES: 0.4 m drop, 2.8 m run' },
    { drop: 0.4, path: 'J (east 3 fall 1:50)', found: [], why: 'the limit' },
    { drop: 0.4, path: 'J (east 3.05 fall 1:50)', found: ['trap-arm-too-long: closet length'], why: 'past it' },
    { drop: 0.98, path: 'J (east 1 fall 1:50)', found: [], why: '0.98 + 0.02: the limit' },
    { drop: 1, path: 'J (east 1 fall 1:50)', found: ['trap-arm-too-long: closet height'], why: '1.02 m' },
    {
      drop: 0.4,
      path: 'A (east 0.5 fall 1:50) > E (north 0.5 fall 1:50) > J (north 0.3 east 0.3 fall 1:50)',
      found: [],
      why: '90 + 90 + 45: the limit',
    },
    {
      drop: 0.4,
      path: 'A (east 0.5 fall 1:50) > E (north 0.5 fall 1:50) > J (east 0.5 fall 1:50)',
      found: ['trap-arm-too-long: closet turn'],
      why: '270°',
    },
  ])('$drop m down, $path: $found ($why)', ({ drop, path, found }) => {
    expect(closet(drop, path)).toEqual(found);
  });

  test('a pedestal urinal works by siphonage and carries its trap: the same limits', () => {
    const text = hall(
      'A pedestal urinal',
      `urinal U at 0 0 0, pedestal, trap 2 in
drain 2 in: U > B (down 0.4) > J (east 2.8 fall 1:50) > D (down 0.5) > OUT (south 4 fall 1:50)
vent 3 in: J > VT (to 4.2)
terminal VT
sewer OUT`,
    );
    expect(codes(runSketch(text))).toEqual([]);
  });
});
