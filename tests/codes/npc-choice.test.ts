import { describe, expect, test } from 'vitest';
import { circuitVentedRow, times, wetVentedRow } from '../support/rows.ts';
import { runSketch } from '../support/run-sketch.ts';

// National Plumbing Code, RULES 4.3: no reading holds and wet and circuit vent break equally many conditions. Then a
// closet beyond the second or an arm above 2 in speaks for a circuit vent, else the row is read as a wet vent. Every row
// here lacks a relief vent, the one condition of a circuit vent that it breaks (R57). Loads by Table 2.4.9.3.: a shower
// of four to six heads 6, a closet with a tank 4.
const shower = (trap: string): string => `shower, heads 6, trap ${trap} in`;

const read = (row: readonly string[]) => {
  const run = runSketch(circuitVentedRow(row, { relief: '' }));
  expect(run.result.batteries).toHaveLength(1);
  const { reading, broken, others } = run.result.batteries[0]!;
  const brokenAs = (as: string): readonly string[] =>
    (as === reading ? broken : (others.find((one) => one.reading === as)?.broken ?? [])).map(({ rule }) => rule);
  return { reading, wet: brokenAs('wet-vent'), circuit: brokenAs('circuit-vent') };
};

describe('neither reading holds and both break one condition', () => {
  test.each([
    // 7 x 6 = 42 past the last limit of a wet vent, 36 (R43).
    { row: times(8, shower('2')), wet: 'NPC-R43', reading: 'wet-vent', why: 'arms of 2 in' },
    // 2 x 6 = 12 is within it; the arms are too large (R45).
    { row: times(3, shower('2 1/2')), wet: 'NPC-R45', reading: 'circuit-vent', why: 'arms of 2½ in' },
    { row: [...times(2, shower('2')), shower('3')], wet: 'NPC-R45', reading: 'circuit-vent', why: 'one arm of 3 in' },
    { row: times(3, shower('3')), wet: 'NPC-R45', reading: 'circuit-vent', why: 'arms of 3 in' },
    {
      row: [...times(7, shower('2')), 'closet, tank'],
      wet: 'NPC-R43',
      reading: 'wet-vent',
      why: 'the one arm of 3 in is a closet’s',
    },
    // Two closets at two places (R44); a third is one too many, the same condition.
    { row: ['closet, tank', 'closet, tank'], wet: 'NPC-R44', reading: 'wet-vent', why: 'two closets' },
    { row: times(3, 'closet, tank'), wet: 'NPC-R44', reading: 'circuit-vent', why: 'a third closet' },
  ])('$why: $reading', ({ row, wet, reading }) => {
    expect(read(row)).toEqual({ reading, wet: [wet], circuit: ['NPC-R57'] });
  });
});

test('read as individually vented, each trap of a row without a vent of its own is a condition broken (2.5.1.1.(1), R36)', () => {
  const { others } = runSketch(wetVentedRow(times(3, 'urinal, stall, trap 2 in'))).result.batteries[0]!;
  const alone = others.find(({ reading }) => reading === 'individual-vent');
  // Three urinals; the lavatories' own arms end at the vent.
  expect(alone?.broken.map(({ rule, facts }) => [rule, facts])).toEqual([['NPC-R36', { traps: 3 }]]);
});

test('what a wet vent may carry is said beside its load: nothing where the last cell is unread, else the last limit (R43)', () => {
  const overloaded = (row: readonly string[]) => {
    const { reading, broken, others } = runSketch(circuitVentedRow(row, { relief: '' })).result.batteries[0]!;
    const wet = [{ reading, broken }, ...others].find((one) => one.reading === 'wet-vent');
    return wet?.broken.find(({ rule }) => rule === 'NPC-R43')?.facts;
  };
  expect(overloaded(times(8, shower('2')))).toEqual({ loadUnits: 42, limitUnits: null });
  // With a closet 23 in 6 in (Table 2.5.8.1.); the closet, most downstream, is left out.
  expect(overloaded([...times(7, shower('2')), 'closet, tank'])).toEqual({ loadUnits: 42, limitUnits: 23 });
});
