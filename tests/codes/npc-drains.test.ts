import { describe, expect, test } from 'vitest';
import { bringing } from '../support/flows.ts';
import { armOf, circuitVentedRow, hall, times, ventedRow } from '../support/rows.ts';
import { runSketch, type SketchRun } from '../support/run-sketch.ts';
import { tower } from '../support/towers.ts';

// National Plumbing Code, drains: rules R16 to R24. Loads by Table 2.4.9.3., sizes read off the tables named.
const lavatory = 'lavatory, trap 1 1/4 in'; // 1
const mop = 'mop-sink, trap 2 in'; // 2
const drain3 = 'floor-drain, trap 3 in'; // 3
const shower6 = 'shower, heads 6, trap 3 in'; // 6
const closet = 'closet, tank'; // 4
const none = (count: number): string[][] => Array.from({ length: count }, () => []);

const asks = (run: SketchRun, pipe: string, rule: string): string | undefined =>
  run.pipe(pipe).trail.find((step) => step.rule === rule)?.asks?.label;

describe('R16 branch: Table 2.4.10.6.-B', () => {
  test.each([
    { fixtures: times(2, lavatory), load: 2, size: '1¼ in', why: 'the limit of 1¼ in' },
    { fixtures: times(3, lavatory), load: 3, size: '1½ in', why: 'the limit of 1½ in' },
    { fixtures: times(4, lavatory), load: 4, size: '2 in', why: 'past 1½ in' },
    { fixtures: times(3, mop), load: 6, size: '2 in', why: 'the limit of 2 in' },
    { fixtures: times(11, lavatory), load: 11, size: '2½ in', why: 'RULES: 11 without a closet' },
    { fixtures: times(6, mop), load: 12, size: '2½ in', why: 'the limit of 2½ in' },
    { fixtures: [...times(6, mop), lavatory], load: 13, size: '3 in', why: 'past 2½ in' },
    { fixtures: times(9, drain3), load: 27, size: '3 in', why: 'the limit of 3 in' },
    { fixtures: [...times(9, drain3), lavatory], load: 28, size: '4 in', why: 'past 3 in' },
    { fixtures: times(30, shower6), load: 180, size: '4 in', why: 'the limit of 4 in' },
    { fixtures: [...times(30, shower6), lavatory], load: 181, size: '5 in', why: 'past 4 in' },
  ])('$load: $size ($why)', ({ fixtures, load, size }) => {
    const run = runSketch(ventedRow(fixtures));
    const last = `J${fixtures.length}-K`;
    expect([run.role(last), run.pipe(last).load.most, asks(run, last, 'NPC-R16')]).toEqual(['branch', load, size]);
    expect(run.size(last)).toBe(size);
  });

  test('11 with 2½ in left out: 3 in', () => {
    const run = runSketch(ventedRow(times(11, lavatory)), { answers: { settings: { omitSizes: ['2½ in'] } } });
    expect(run.size('J11-K')).toBe('3 in');
  });

  test('a vertical branch takes the branch table too; a vertical fixture drain no more than its trap', () => {
    const run = runSketch(ventedRow([...times(6, mop), lavatory]));
    expect([run.role('K-BF'), run.size('K-BF')]).toEqual(['branch', '3 in']);
    const one = runSketch(ventedRow([mop]));
    expect([one.role('K-BF'), one.size('K-BF')]).toEqual(['fixture-drain', '2 in']);
  });
});

describe('R17 stack: Table 2.4.10.6.-A, both columns, section by section', () => {
  const storey20 = [...times(3, shower6), mop];
  const storey18 = times(3, shower6);
  const storey17 = [...times(2, shower6), 'clinical-sink, trap 3 in']; // 6 + 6 + 5 (Table 2.4.10.2.)

  test('three storeys of 20: 60 fits 3 in (102), 20 from one storey does not (18): 4 in', () => {
    const run = runSketch(tower([storey20, storey20, storey20]));
    expect([asks(run, 'S1-SF', 'NPC-R17'), asks(run, 'S1-SF', 'NPC-R17-storey')]).toEqual(['3 in', '4 in']);
    expect([run.role('S1-SF'), run.size('S1-SF'), run.pipe('S1-SF').load.most]).toEqual(['stack', '4 in', 60]);
  });

  test('18 from one storey is the limit of 3 in', () => {
    expect(runSketch(tower([storey18, storey18])).size('S1-SF')).toBe('3 in');
  });

  test('six storeys of 17: 102, the limit of 3 in; one lavatory more: 4 in from where it joins', () => {
    expect(runSketch(tower(times(6, '').map(() => storey17))).size('S1-SF')).toBe('3 in');
    const more = runSketch(tower([[...storey17, lavatory], ...times(5, '').map(() => storey17)]));
    expect([more.size('S2-S1'), more.size('S1-SF')]).toEqual(['3 in', '4 in']);
  });

  test('a heavy storey low down: the sections above keep their own load; their 2 in is the stack vent’s', () => {
    // 4 and 2 take 1½ and 1¼ in, but the stack vent is half of the 4 in foot (2.5.8.4.(3)), and no vent joins a
    // smaller pipe (2.4.9.1.).
    const run = runSketch(tower([storey20, [lavatory, lavatory], [lavatory, lavatory]]));
    expect([asks(run, 'S3-S2', 'NPC-R17'), asks(run, 'S2-S1', 'NPC-R17')]).toEqual(['1¼ in', '1½ in']);
    expect([run.size('S3-S2'), run.size('S2-S1'), run.size('S1-SF')]).toEqual(['2 in', '2 in', '4 in']);
  });

  test('it never shrinks downward: below a 4 in storey it stays 4 in', () => {
    const run = runSketch(tower([[lavatory, lavatory], storey20]));
    expect([run.size('S2-S1'), run.size('S1-SF')]).toEqual(['4 in', '4 in']);
  });

  test('2 from one storey is the limit of 1¼ and 1½ in, 6 of 2 in; 8 in all is the limit of 1½ in', () => {
    expect(runSketch(tower([[], [lavatory, lavatory]])).size('S2-SF')).toBe('1¼ in');
    expect(runSketch(tower(times(4, '').map(() => [lavatory, lavatory]))).size('S1-SF')).toBe('1½ in');
    expect(runSketch(tower([[lavatory], ...times(4, '').map(() => [lavatory, lavatory])])).size('S1-SF')).toBe('2 in');
    expect(runSketch(tower([[], times(3, lavatory)])).size('S2-SF')).toBe('2 in');
    expect(runSketch(tower([[], times(3, mop)])).size('S2-SF')).toBe('2 in');
    expect(runSketch(tower([[], [...times(3, mop), lavatory]])).size('S2-SF')).toBe('3 in');
  });
});

describe('R18 horizontal offset of a stack', () => {
  // Four storeys of 37 and one of 2: 150. Storeys 1 to 3 hold the offset and the lower part.
  const storey37 = [...times(6, shower6), lavatory];
  const storey50 = [...times(8, shower6), mop];

  test('150, 2 m at 1:50: 4 in by Table -B (180) and by Table -C (240)', () => {
    const run = runSketch(tower([...none(3), [mop], ...times(4, '').map(() => storey37)], { offset: 2 }));
    expect([run.role('OA-OB'), run.pipe('OA-OB').load.most, run.size('OA-OB')]).toEqual(['stack', 150, '4 in']);
    expect(run.pipe('OA-OB').trail.find(({ rule }) => rule === 'NPC-R18')?.facts).toMatchObject({
      byBranchTable: '4 in',
      byDrainTable: '4 in',
    });
  });

  test('200: 5 in by Table -B (180 in 4 in), 4 in by Table -C at 1:50 (240): the larger unless the user says otherwise', () => {
    const text = tower([...none(3), ...times(4, '').map(() => storey50)], { offset: 2 });
    const run = runSketch(text);
    expect([run.size('OA-OB'), run.size('OB-SF')]).toEqual(['5 in', '5 in']); // the part below is not smaller
    expect(runSketch(text, { answers: { settings: { stackOffset: 'lesser' } } }).size('OA-OB')).toBe('4 in');
  });

  test('4000 is past the last cell of Table -B that could be read: no size, though Table -C has one', () => {
    const text = tower([...none(3), [lavatory], ...times(2, '').map(() => storey37)], { offset: 2 });
    const run = runSketch(text, { answers: bringing({ 'F4.1': 4000 }) });
    const step = run.pipe('OA-OB').trail.find(({ rule }) => rule === 'NPC-R18');
    expect([step?.asks ?? null, step?.facts.byBranchTable, step?.facts.byDrainTable]).toEqual([null, null, '10 in']);
    expect(run.size('OA-OB')).toBe('none');
  });

  test('1.4 m counts as stack: 200 takes 4 in (540); 1.5 m is an offset', () => {
    const short = runSketch(tower([...none(3), ...times(4, '').map(() => storey50)], { offset: 1.4 }));
    expect([short.role('OA-OB'), short.size('OA-OB')]).toEqual(['stack', '4 in']);
    const limit = runSketch(tower([...none(3), ...times(4, '').map(() => storey50)], { offset: 1.5 }));
    expect(limit.size('OA-OB')).toBe('5 in');
  });
});

describe('R20 no reduction downstream', () => {
  test('a 3 in floor drain’s pipe of 3: its branch with two lavatories is 3 in though 2 in takes 5', () => {
    const run = runSketch(ventedRow([drain3, lavatory, lavatory]));
    expect([asks(run, 'J3-K', 'NPC-R16'), run.size('J3-K')]).toEqual(['2 in', '3 in']);
  });

  test('nor below a vent that joins: a circuit vent of 3 in does not drop onto a wet portion of 1½ in', () => {
    // 8 pedestal urinals of 4: 32, 36 m: Table 2.5.8.3. row 42: 2 in to 30 m, then 3 in. Two lavatories: 1½ in by 2.5.8.1.
    const run = runSketch(circuitVentedRow(times(8, 'urinal, pedestal, trap 2 in'), { lavatories: true, run: 34 }));
    expect([run.size('LJ-VJ'), asks(run, 'LJ-CV', 'NPC-R69'), run.size('LJ-CV')]).toEqual(['3 in', '1½ in', '3 in']);
  });
});

describe('R21 to R23 water closets', () => {
  test('R21 one closet, 4: 3 in although 2 in would take the load', () => {
    const run = runSketch(ventedRow([closet, lavatory]));
    expect([asks(run, 'J2-K', 'NPC-R16'), run.size('J1-J2'), run.size('J2-K')]).toEqual(['2 in', '3 in', '3 in']);
  });

  test('R22 closets A, B, C along a branch: 3 in up to C, 4 in after C', () => {
    const run = runSketch(ventedRow(times(3, closet)));
    expect(['J1-J2', 'J2-J3', 'J3-K', 'BF-OUT'].map((pipe) => run.size(pipe))).toEqual([
      '3 in',
      '3 in',
      '4 in',
      '4 in',
    ]);
    expect(run.size('B3-V3')).toBe('3 in');
  });

  test('R22 two closets: 3 in throughout', () => {
    const run = runSketch(ventedRow(times(2, closet)));
    expect(['J1-J2', 'J2-K', 'BF-OUT'].map((pipe) => run.size(pipe))).toEqual(['3 in', '3 in', '3 in']);
  });

  test('R23 seven one-closet storeys: the stack is 4 in at the section that carries the seventh', () => {
    const run = runSketch(tower(times(7, '').map(() => [closet])));
    expect([run.size('S3-S2'), run.size('S2-S1'), run.size('S1-SF')]).toEqual(['3 in', '3 in', '4 in']);
    // A stack is no branch: three closets do not make it 4 in, but the building drain below is.
    expect(run.size('SF-OUT')).toBe('4 in');
  });
});
describe('R24 the pumped discharge of a macerating toilet: ¾ in at least, whatever its load (2.4.9.2.)', () => {
  // It pumps up and along to a branch that a vented mop sink drains into.
  const run = runSketch(
    hall(
      'A pumped toilet',
      `closet M at 0 0 0, tank, named "Macerating toilet"
node J1 at 3 0 0.4
drain 3/4 in: M > U (up 0.8) > U1 (east 2.6 fall 1:200) > J1
${armOf(1, mop, { floor: 0.6, vented: true })}
drain 3 in: J1 > K (east 1 fall 1:50) > BF (to -1) > OUT (east 5 fall 1:50)
sewer OUT`,
    ),
  );
  test('¾ in holds, upward and almost flat too', () => {
    expect(run.fixture('M')).toMatchObject({ kind: 'macerating-toilet', load: { most: 4 } });
    expect([run.size('M-U'), run.size('U-U1'), run.pipe('U-U1').verdict]).toEqual(['¾ in', '¾ in', 'agrees']);
    expect(['backfall', 'slope-too-small'].flatMap((code) => run.findings(code))).toEqual([]);
  });

  test('its vent is 1½ in (2.5.7.7.), though the table by trap would let a ¾ in outlet have 1¼ in', () => {
    const text = hall(
      'A pumped toilet, vented',
      `closet M at 0 0 0.5, tank, named "Macerating toilet"
drain 3/4 in: M > V (east 0.3 fall 1:50) > F (to -1) > OUT (east 4 fall 1:50)
vent 1 1/4 in: V > VT (to 4.2)
terminal VT
sewer OUT`,
    );
    const vented = runSketch(text);
    expect([vented.size('V-VT'), vented.pipe('V-VT').verdict]).toEqual(['1½ in', 'undersized']);
  });

  test('past the joint it is a load like another: 4 + 2 = 6, 2 in, no 3 in for a closet', () => {
    expect([run.role('J1-K'), run.pipe('J1-K').load.most, run.size('J1-K')]).toEqual(['branch', 6, '2 in']);
  });
});
