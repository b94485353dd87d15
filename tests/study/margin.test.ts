import { describe, expect, test } from 'vitest';
import { noAnswers } from '../../src/model/answers.ts';
import { run } from '../../src/pipeline.ts';
import { marginResult, marginSentences } from '../../src/schedule/margin.ts';
import { marginOf, moreFixtures } from '../../src/study/margin.ts';
import { loadOf, unitsOf } from '../../src/units/quantity.ts';
import type { Outcome } from '../../src/verdicts/outcome.ts';
import { elementIdOf, idOf, modelOf } from '../support/model-of.ts';
import { codeOf, names } from '../support/run-sketch.ts';
import { type Sketch, sketch } from '../support/sketch.ts';
import { hall, row, sampleText } from '../support/study-samples.ts';

// Margins by hand, from the figures that the National Plumbing Code's tables print.

const outcomeOf = (drawing: Sketch): Outcome => run(modelOf(drawing), codeOf('npc-2020'), noAnswers, names);

describe('how much more a pipe takes', () => {
  const school = sketch(sampleText('school'));
  const outcome = outcomeOf(school);
  const margin = (name: string) => marginOf(outcome, outcome.network.pipesOf.get(elementIdOf(school, name))![0]!)!;
  const units = (name: string): number => unitsOf(margin(name).load!);

  test.each([
    // Table 2.4.10.6.-B: 3 in takes 27, 4 in takes 180.
    ['S1.J8-S1.RV', 3, '4 in', 'urinal branch, 24 of 27'],
    ['S1.J2-S1.J3', 21, '4 in', 'two urinals, 6 of 27'],
    ['S1.Q2-S1.Q3', 156, '5 in', 'closet branch, 24 of 180'],
    ['S1.Q5-S1.SC', 140, '5 in', 'closets and lavatories, 40 of 180'],
    // Table 2.4.10.6.-A, one storey: 4 in takes 100, and storey 4 brings 64; the whole stack: 540 of which 64 are there.
    ['S4.SC-S3.SU', 36, '5 in', 'stack below storey 4, 64 of 100 from one storey'],
    // Table 2.4.10.6.-C at 1:25: 4 in takes 300, 259 are there.
    ['MJ-CB', 41, '5 in', 'building drain'],
  ])('%s: %f units more, then %s (%s)', (name, more, next) => {
    expect(units(name)).toBe(more);
    expect(margin(name).next?.size).toBe(next);
  });
  test('a vent by its length: row 42 of Table 2.5.8.3., 2 in to 30 m, of which 19.74 m are used', () => {
    // 2 in reaches 30 m; the developed length of the circuit vent to the stack vent is drawn, and the code reads it.
    const section = outcome.network.pipesOf.get(elementIdOf(school, 'S1.CV-S1.CT'))![0]!;
    const { length } = outcome.shown.roles.uses[section]!.vent!;
    expect(length! + margin('S1.CV-S1.CT').length!).toBeCloseTo(30, 2);
  });
  test('a ninth urinal needs an additional circuit vent, whatever the pipe would take', () => {
    const urinal = { kind: 'urinal', load: loadOf(3), closet: false };
    const section = outcome.network.pipesOf.get(elementIdOf(school, 'S1.J2-S1.J3'))![0]!;
    expect(moreFixtures(outcome, section, urinal)).toBe(0);
    const battery = marginResult(outcome).batteries[0]!;
    expect(battery.more).toEqual([{ kind: 'urinal', count: 0 }]);
  });
  test('a third closet asks for 4 in where two drain (2.4.9.2.(2)); a branch with none takes two', () => {
    const closet = { kind: 'water-closet', load: loadOf(6), closet: true };
    const section = (name: string) => outcome.network.pipesOf.get(elementIdOf(school, name))![0]!;
    expect(moreFixtures(outcome, section('S1.P1-S1.Q1'), closet)).toBe(0);
    // 24 + 3 = 27: no closet of 6 fits, by load alone.
    expect(moreFixtures(outcome, section('S1.RV-S1.D'), closet)).toBe(0);
  });
  test('a stack takes what its tightest section does', () => {
    const { stacks } = marginResult(outcome);
    expect(stacks).toHaveLength(1);
    expect(stacks[0]!.load).toBe(36);
  });
});

describe('wet vents, by Table 2.5.8.1.: 3 in takes 12 units without a closet', () => {
  // Wall urinals of 1.5: six are 9, the last one left out 7.5; three more make 12, a fourth 13.5.
  const drawing = sketch(hall(row(6, 'urinal, washout, trap 1 1/2 in')));
  const outcome = outcomeOf(drawing);
  const line = outcome.network.pipesOf.get(elementIdOf(drawing, 'J2-J3'))![0]!;
  test('the row takes 4.5 units more', () => {
    expect(outcome.shown.sizes[line]!.size).toBe('3 in');
    expect(unitsOf(marginOf(outcome, line)!.load!)).toBe(4.5);
    expect(moreFixtures(outcome, line, { kind: 'urinal', load: loadOf(1.5), closet: false })).toBe(3);
  });
  test('drawn too small it is told by how much: 2 in takes 4, so 3.5 too much', () => {
    const small = sketch(hall(row(6, 'urinal, washout, trap 1 1/2 in', '2 in')));
    const narrow = outcomeOf(small);
    const pipe = narrow.network.pipesOf.get(elementIdOf(small, 'J2-J3'))![0]!;
    expect(unitsOf(marginOf(narrow, pipe)!.drawn!)).toBe(-3.5);
    expect(marginSentences(narrow, elementIdOf(small, 'J2-J3'))).toContain(
      'As drawn it carries 3.5 fixture units too much.',
    );
  });
  test('the engine agrees: with three more of them the row stays 3 in, with four it needs 4 in', () => {
    for (const [count, size] of [
      [9, '3 in'],
      [10, '4 in'],
    ] as const) {
      const more = sketch(hall(row(count, 'urinal, washout, trap 1 1/2 in')));
      const pipe = outcomeOf(more);
      expect(pipe.shown.sizes[pipe.network.pipesOf.get(elementIdOf(more, 'J2-J3'))![0]!]!.size, `${count}`).toBe(size);
    }
  });
  test('one row a pipe that needs a size, by GlobalId', () => {
    const { pipes } = marginResult(outcome);
    expect(pipes.find(({ globalId }) => globalId === idOf(drawing, 'J2-J3'))).toMatchObject({ load: 4.5, drawn: 4.5 });
    expect(new Set(pipes.map(({ globalId }) => globalId)).size).toBe(pipes.length);
  });
});
