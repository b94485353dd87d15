import { describe, expect, test } from 'vitest';
import { hall, times, ventedRow } from '../support/rows.ts';
import { runSketch, type SketchRun } from '../support/run-sketch.ts';
import { tower } from '../support/towers.ts';

// National Plumbing Code, drains: rules R14, R15, R19, R25, R26.
const lavatory = 'lavatory, trap 1 1/4 in'; // 1
const mop = 'mop-sink, trap 2 in'; // 2
const drain3 = 'floor-drain, trap 3 in'; // 3
const shower6 = 'shower, heads 6, trap 3 in'; // 6
const closet = 'closet, tank'; // 4

describe('R14 fixture outlet pipe: not below Table 2.4.9.3.', () => {
  /** Sinks side by side, one trap of 1½ in under the last. */
  const compartments = (count: number): SketchRun =>
    runSketch(
      hall(
        'A sink of several compartments',
        `node N from T up 0.15
${Array.from({ length: count }, (_, at) => `sink S${at + 1} from N west ${at * 0.4} up 0.2, trap 1 1/2 in\ndrain 1 1/2 in: S${at + 1} > N`).join('\n')}
trap T at 0 0 0.5, 1 1/2 in
drain 1 1/2 in: N > T > J (east 0.8 fall 1:50) > F (to -0.4) > OUT (east 4 fall 1:50)
vent 3 in: J > VT (to 4.2)
terminal VT
sewer OUT`,
      ),
    );

  test('three 1½ in outlets: the common pipe is one size larger, 2 in, and so is what follows', () => {
    const run = compartments(3);
    expect(run.pipe('N-T')).toMatchObject({ role: 'fixture-drain', portion: 'outlet' });
    expect([run.size('S1-N'), run.size('N-T'), run.size('T-J')]).toEqual(['1½ in', '2 in', '2 in']);
  });

  test('two outlets: no larger', () => {
    const run = compartments(2);
    expect([run.size('N-T'), run.role('T-J'), run.size('T-J')]).toEqual(['1½ in', 'fixture-drain', '1½ in']);
  });

  test('the drain after the trap is not below the trap: a lavatory on a 1½ in trap', () => {
    const run = runSketch(ventedRow(['lavatory, trap 1 1/2 in', lavatory]));
    expect([run.size('F1-T1'), run.size('T1-V1'), run.size('T2-V2')]).toEqual(['1¼ in', '1½ in', '1¼ in']);
  });
});

describe('R15 fixture outlet pipe: at most 1200 mm', () => {
  const tailpiece = (length: number): SketchRun =>
    runSketch(
      hall(
        'A long tailpiece',
        `lavatory L at 0 0 2.2, trap 1 1/4 in
trap T from L down ${length}
drain 1 1/4 in: L > T > J (east 0.5 fall 1:50) > F (to -0.4) > OUT (east 4 fall 1:50)
vent 3 in: J > VT (to 4.2)
terminal VT
sewer OUT`,
      ),
    );

  test('1.35 m: too long (RULES); 1.2 m, the limit, fits', () => {
    expect(tailpiece(1.35).findings('outlet-pipe-too-long')).toHaveLength(1);
    expect(tailpiece(1.2).findings('outlet-pipe-too-long')).toEqual([]);
  });
});

describe('R19 building drain: Table 2.4.10.6.-C at the slope, rounded to the flatter column', () => {
  // Storeys above carry the load in stacks; the drain SF-OUT takes it at its own slope.
  const storey50 = [...times(8, shower6), mop];
  const at = (fixtures: readonly (readonly string[])[], slope: string) =>
    runSketch(tower(fixtures).replace('OUT (east 9 fall 1:50)', `OUT (east 9${slope === '' ? '' : ` fall ${slope}`})`));
  const storeys50 = (count: number) => times(count, '').map(() => storey50);

  test.each([
    { storeys: storeys50(4), slope: '1:50', size: '4 in', why: '200: 4 in takes 240' },
    { storeys: storeys50(4), slope: '1:100', size: '5 in', why: '200: 4 in takes 180, 5 in 390' },
    { storeys: storeys50(4), slope: '1:60', size: '5 in', why: '1:60 is read at 1:100' },
    {
      storeys: storeys50(4),
      slope: '',
      size: '5 in',
      why: 'not drawn: 4 in at 1:100 takes 180, 5 in at 1:133 takes 380',
    },
    { storeys: storeys50(6), slope: '1:25', size: '4 in', why: '300: the limit of 4 in at 1:25' },
    { storeys: [...storeys50(6), [lavatory]], slope: '1:25', size: '5 in', why: '301: past it' },
    {
      storeys: [[], times(9, drain3)],
      slope: '1:50',
      size: '4 in',
      why: '27 from one storey: the stack above is 4 in (18)',
    },
    {
      storeys: times(3, '').map(() => times(3, drain3)),
      slope: '1:50',
      size: '3 in',
      why: '27: the limit of 3 in at 1:50',
    },
    {
      storeys: times(4, '').map(() => times(3, drain3)),
      slope: '1:25',
      size: '3 in',
      why: '36: the limit of 3 in at 1:25',
    },
    {
      storeys: [[lavatory], ...times(3, '').map(() => times(3, drain3))],
      slope: '1:50',
      size: '4 in',
      why: '28: past 27',
    },
    {
      storeys: [times(3, drain3), times(3, drain3)],
      slope: '1:100',
      size: '3 in',
      why: '18: 3 in is read at its least, 1:50; the slope is a finding',
    },
  ])('$why: $size', ({ storeys, slope, size }) => {
    const run = at(storeys, slope);
    expect([run.role('SF-OUT'), run.size('SF-OUT')]).toEqual(['building-drain', size]);
  });

  test('a slope that nobody gives is assumed, and said so; the user may give one', () => {
    const text = tower(storeys50(4)).replace('OUT (east 9 fall 1:50)', 'OUT (east 9)');
    const run = runSketch(text);
    expect(run.pipe('SF-OUT').trail.find(({ rule }) => rule === 'NPC-R19')?.facts).toMatchObject({
      slopeAssumed: true,
    });
    expect(run.findings('slope-unknown')).toHaveLength(1);
    const told = runSketch(text, { answers: { pipes: new Map([['name:SF-OUT', { slope: 0.02 }]]) } });
    expect([told.size('SF-OUT'), told.findings('slope-unknown').length]).toEqual(['4 in', 0]);
    const assumed = runSketch(text, { answers: { settings: { assumedSlope: 0.02 } } });
    expect(assumed.size('SF-OUT')).toBe('4 in');
  });
});

describe('R25 least building drain and sewer', () => {
  const slab = 'slab "Slab" from -5 -5 to 6 5 top 0 thick 0.2';
  const house = (settings = {}) => runSketch(ventedRow(times(3, lavatory), slab), { answers: { settings } });

  test('12 units or 3: the drain is 3 in inside, the sewer 4 in outside', () => {
    const [inside, outside] = house().pipe('BF-OUT').sections ?? [];
    expect([inside?.role, inside?.required?.most?.label]).toEqual(['building-drain', '3 in']);
    expect([outside?.role, outside?.required?.most?.label]).toEqual(['building-sewer', '4 in']);
  });

  test('sewerFloor 3 in: 3 in outside too', () => {
    const sections = house({ sewerFloor: '3 in' }).pipe('BF-OUT').sections ?? [];
    expect(sections.map(({ required }) => required?.most?.label)).toEqual(['3 in', '3 in']);
  });
});

describe('R26 least slope', () => {
  const flat = (fixtures: readonly string[], size: string, slope: string) =>
    runSketch(
      ventedRow(fixtures)
        .replaceAll('drain 3 in: J1', `drain ${size}: J1`)
        .replaceAll('K (east 0.7 fall 1:50)', `K (east 2 fall ${slope})`),
    )
      .findings('slope-too-small')
      .map(({ facts }) => [facts.slope, facts.least]);

  test.each([
    { size: '3 in', slope: '1:60', found: true, why: 'RULES: 3 in at 1:60' },
    { size: '3 in', slope: '1:50', found: false, why: 'the limit' },
    { size: '4 in', slope: '1:100', found: false, why: '4 in branch: the limit' },
    { size: '4 in', slope: '1:110', found: true, why: '4 in branch, past it' },
    { size: '2 in', slope: '1:75', found: true, why: 'smaller pipes as 3 in' },
  ])('$size branch at $slope: $found ($why)', ({ size, slope, found }) => {
    expect(flat([closet, closet, lavatory], size, slope)).toHaveLength(found ? 1 : 0);
  });

  test.each([
    { size: '4 in', slope: '1:100', found: 0, why: 'RULES: 4 in drain at 1:100 fits' },
    { size: '4 in', slope: '1:120', found: 1, why: 'Table -C has no figure for 4 in at 1:133' },
    { size: '5 in', slope: '1:133', found: 0, why: 'Table -C: 380' },
    { size: '5 in', slope: '1:150', found: 1, why: 'none at 1:200' },
    { size: '8 in', slope: '1:200', found: 0, why: 'Table -C: 1400' },
    { size: '3 in', slope: '1:60', found: 1, why: '3 in only from 1:50' },
  ])('$size building drain at $slope: $found ($why)', ({ size, slope, found }) => {
    const text = tower([[], [lavatory, lavatory]], { stack: size }).replace(
      'OUT (east 9 fall 1:50)',
      `OUT (east 9 fall ${slope})`,
    );
    expect(runSketch(text).findings('slope-too-small')).toHaveLength(found);
  });
});
