import { describe, expect, test } from 'vitest';
import { noAnswers } from '../../src/model/answers.ts';
import { readNamesTable } from '../../src/model/read-names-table.ts';
import { run } from '../../src/pipeline.ts';
import { resultOf } from '../../src/schedule/result-of.ts';
import { plainText } from '../../src/schedule/text-line.ts';
import { type VersusResult, versusResult } from '../../src/schedule/versus-result.ts';
import { versusText } from '../../src/schedule/versus-text.ts';
import { versus } from '../../src/study/versus.ts';
import { europeanTower } from '../support/european.ts';
import { modelOf } from '../support/model-of.ts';
import { times, ventedRow } from '../support/rows.ts';
import { codeOf, tables } from '../support/run-sketch.ts';
import { faults } from '../support/schemas.ts';
import { sketch } from '../support/sketch.ts';

// One model under two codes. Sizes are read off the tables named; see the tests of each code.
const names = readNamesTable(tables);
const both = (text: string, first: string, second: string) => {
  const model = modelOf(sketch(text));
  const outcomes = [first, second].map((id) => run(model, codeOf(id), noAnswers, names));
  const inputs = outcomes.map((outcome) => ({ outcome, result: resultOf(outcome, '0.0.0'), only: [] }));
  return { outcomes, inputs, result: versusResult(inputs[0]!, inputs[1]!) };
};
const told = ({ pipes }: VersusResult, name: string) => pipes.find((pipe) => pipe.name === name);

// Three kitchen sinks, each with its vent, on one branch drawn 3 in. NPC: 1.5 units each, 4.5: 2 in (Table -B, 6).
// EN 12056-2, system I: 2.4 DU, the largest 0.8; Qww 0.77: ventilated branch DN 60 (Table 7, 1.5 l/s).
const sinks = ventedRow(times(3, 'kitchen-sink, trap 1 1/2 in'));

describe('two families', () => {
  const { result } = both(sinks, 'npc-2020', 'en12056-2000');

  test('a pipe with another size, with the demand that decides under each', () => {
    const pipe = told(result, 'J3-K');
    expect([pipe?.from.required?.most?.label, pipe?.to.required?.most?.label]).toEqual(['2 in', 'DN 60']);
    expect([pipe?.from.because?.rule, pipe?.to.because?.rule]).toEqual(['NPC-R16', 'EN-R13']);
    expect(pipe?.what).toContain('required');
  });

  test('the reason stands at the pipe where it starts: a drain that only follows its stack names the stack', () => {
    // Two closets, 2.0 l/s: EN asks DN 100 of the stack for a closet, and of the drain below it no less.
    const text = europeanTower([{ west: ['closet'] }, { west: ['closet'] }], { slope: '1:20' });
    const drain = told(both(text, 'npc-2020', 'en12056-2000').result, 'SF-OUT');
    const foot = modelOf(sketch(text)).elements.find(({ name }) => name === 'S1-SF');
    expect([drain?.to.because?.rule, drain?.to.at]).toEqual(['EN-R23', foot?.globalId]);
  });

  test('sums add up, and the schema holds', () => {
    expect(result.counts.alike + result.pipes.length).toBe(result.counts.pipes);
    expect(result.counts.required).toBe(result.pipes.filter(({ what }) => what.includes('required')).length);
    expect(faults('versus', result)).toEqual([]);
  });

  test('the text names both codes, both sizes and both reasons', () => {
    const { inputs } = both(sinks, 'npc-2020', 'en12056-2000');
    const text = plainText(versusText(result, inputs[0]!.result)).replace(/\s+/g, ' ');
    for (const words of [
      '(npc-2020) against EN 12056-2',
      '2 in becomes DN 60',
      'Table 2.4.10.6.-B',
      '6.4.2, Tables 7, 8',
    ])
      expect(text).toContain(words);
  });
});

describe('two editions', () => {
  test('the same code against itself: nothing differs', () => {
    const { result, inputs } = both(sinks, 'npc-2020', 'npc-2020');
    expect([result.pipes, result.counts.alike]).toEqual([[], result.counts.pipes]);
    expect(result.counts.pipes).toBeGreaterThan(10);
    expect(plainText(versusText(result, inputs[0]!.result))).toContain('the same required size and verdict under both');
  });

  test('turned round, every difference is turned round', () => {
    const there = both(sinks, 'npc-2020', 'ipc-2021').result;
    const back = both(sinks, 'ipc-2021', 'npc-2020').result;
    expect(there.pipes.length).toBeGreaterThan(0);
    expect(back.pipes.map(({ name, from, to }) => [name, to, from])).toEqual(
      there.pipes.map(({ name, from, to }) => [name, from, to]),
    );
  });
});

test('outcomes of two models are refused', () => {
  const [one, other] = [both(sinks, 'npc-2020', 'npc-2020'), both(sinks, 'npc-2020', 'npc-2020')];
  expect(() => versus(one.outcomes[0]!, other.outcomes[1]!)).toThrow('one model');
});
