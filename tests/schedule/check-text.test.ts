import { describe, expect, test } from 'vitest';
import { checkText } from '../../src/schedule/check-text.ts';
import type { Result, ResultFinding } from '../../src/schedule/result.ts';
import { columnsOf } from '../../src/schedule/shown-text.ts';
import { plainText } from '../../src/schedule/text-line.ts';
import { undersizedGroups } from '../../src/schedule/undersized-text.ts';
import { exampleResult } from '../support/example-result.ts';

const textOf = (result: Result): string => plainText(checkText(result));
const text = textOf(exampleResult);
const finding = (over: Partial<ResultFinding>): ResultFinding => ({
  code: 'unvented-trap',
  severity: 'error',
  about: ['1Dr4inExample000003001'],
  facts: {},
  clause: '2.5.1.1.',
  sentence: 'The trap of Lavatory 1 has no vent.',
  ...over,
});

test('first what was understood, then the undersized pipes, then the sums and the caution', () => {
  const order = [
    'community-hall.ifc: IFC4, millimetre; National Plumbing Code of Canada 2020 (npc-2020)',
    '7 urinals, 2 lavatories',
    'to the sewer at Pipe 2201 #2201',
    'battery-1: 7 urinals, 2 lavatories; wet vent, since no dry relief vent is drawn',
    'As circuit vent it would break "relief vent of a circuit vent" (2.5.3.1.)',
    'Undersized: 8 of 19 pipes',
    'Drawn 3 in, needs 4 in: 7 wet vents, 1 branch, battery-1',
    'Wet vent size: 14 fixture units; 3 in holds 12, 4 in 36; Table 2.5.8.1.',
    'Warnings: 1 - ',
    '8 errors, 1 warning, 1 note.',
    'sewer gas',
  ].map((words) => text.replace(/\s+/g, ' ').indexOf(words));
  expect(order).not.toContain(-1);
  expect(order).toEqual(order.toSorted((a, b) => a - b));
});

test('one screen: forty lines of at most a hundred columns', () => {
  const lines = text.split('\n');
  expect(lines.length).toBeLessThanOrEqual(40);
  expect(Math.max(...lines.map(columnsOf))).toBeLessThanOrEqual(100);
});

test('undersized pipes are grouped by cause; every one is in one group, most pipes first', () => {
  const groups = undersizedGroups(exampleResult);
  expect(groups.map(({ cause, pipes, root }) => [cause, pipes.map(({ stepId }) => stepId), root.stepId])).toEqual([
    ['NPC-R50 battery 1', [2101, 2102, 2103, 2104, 2105, 2106, 2107, 2108], 2101],
  ]);
  const alone = exampleResult.findings.map((one) =>
    one.about[0] === '1Dr4inExample000002108' ? { ...one, facts: { cause: 'NPC-R20 pipe 3' } } : one,
  );
  const two = undersizedGroups({ ...exampleResult, findings: alone.toReversed() });
  expect(two.map(({ cause, pipes }) => [cause, pipes.length])).toEqual([
    ['NPC-R50 battery 1', 7],
    ['NPC-R20 pipe 3', 1],
  ]);
});

test('other errors stand with their sentence and clause, many of one kind are folded', () => {
  const many = Array.from({ length: 9 }, (_, place) =>
    finding({ sentence: `The trap of Lavatory ${place} has no vent.` }),
  );
  const shown = textOf({ ...exampleResult, findings: [...exampleResult.findings, ...many] });
  expect(shown).toContain('Other errors: 9');
  expect(shown).toContain('- The trap of Lavatory 0 has no vent. (2.5.1.1.)');
  expect(shown).toContain('and 6 more unvented trap');
  expect(shown).not.toContain('Lavatory 5 has no vent');
});

test('a model without drainage says so on the first line, and nothing of sizes', () => {
  const empty: Result = { ...exampleResult, fixtures: [], pipes: [], batteries: [], systems: [], findings: [] };
  const without = { ...empty, counts: { ...empty.counts, fixtures: 0 } };
  const shown = textOf(without);
  expect(shown.split('\n')[0]).toBe('community-hall.ifc: no sanitary drainage in this model (42 elements read)');
  expect(shown).not.toContain('undersized');
  // Fixtures that no pipe reaches are told, since somebody may have left the piping out of the export.
  expect(textOf(empty).replace(/\s+/g, ' ')).toContain('9 fixtures, but no drain at any');
});

describe('what is unsure is said', () => {
  const change = (over: Partial<Result['pipes'][number]>): Result => ({
    ...exampleResult,
    pipes: exampleResult.pipes.map((pipe) => (pipe.stepId === 2001 ? { ...pipe, ...over } : pipe)),
  });
  test('a verdict that is unknown, with its reason', () => {
    const shown = textOf(change({ verdict: 'unknown', reason: 'the drawn size cannot be read' }));
    expect(shown).toContain('1 unknown: the drawn size cannot be read');
  });
  test('a provisional size', () => expect(textOf(change({ provisional: true }))).toContain('1 size provisional'));
  test('damage to the file', () => {
    const damaged = {
      ...exampleResult,
      model: { ...exampleResult.model, remarks: ['the file is cut off in an instance'] },
    };
    expect(textOf(damaged)).toContain('File        the file is cut off in an instance');
  });
});

test('hostile names come out as text, on their own lines', () => {
  const hostile = '\u001B[2J\u0007fake\nUndersized: 0 of 0 pipes\u202E';
  const result: Result = {
    ...exampleResult,
    model: { ...exampleResult.model, file: hostile },
    pipes: exampleResult.pipes.map((pipe) => ({ ...pipe, name: hostile })),
    fixtures: exampleResult.fixtures.map((fixture) => ({ ...fixture, name: hostile, kind: hostile })),
    batteries: exampleResult.batteries.map((battery) => ({ ...battery, why: hostile })),
    findings: [...exampleResult.findings, finding({ sentence: hostile })],
    unresolved: [{ globalId: 'x', stepId: 1, reason: hostile }],
  };
  const shown = textOf(result);
  // biome-ignore lint/suspicious/noControlCharactersInRegex: the test looks for control characters
  expect(shown).not.toMatch(/[\u0000-\u0009\u000B-\u001F\u007F-\u009F\u202A-\u202E]/);
  expect(shown.match(/^Undersized:/gm)).toHaveLength(1);
});
