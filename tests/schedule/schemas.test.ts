import { describe, expect, test } from 'vitest';
import { answersForm } from '../../src/schedule/answers-form.ts';
import { explain } from '../../src/schedule/explain.ts';
import { findInResult } from '../../src/schedule/find-in-result.ts';
import { questionsOf } from '../../src/schedule/questions.ts';
import { surveyOf } from '../../src/schedule/survey.ts';
import { exampleResult, size } from '../support/example-result.ts';
import { faults } from '../support/schemas.ts';

const sizes = [size('2 in', 50), size('3 in', 80), size('4 in', 100)];

test('the example result is valid, and so is what is made of it', () => {
  expect(faults('result', exampleResult)).toEqual([]);
  for (const what of ['#2101', '#3001', '#2301'])
    expect(faults('explain', explain(exampleResult, findInResult(exampleResult, what), sizes))).toEqual([]);
  expect(faults('answers', answersForm(questionsOf(exampleResult)))).toEqual([]);
  const empty = {
    files: [],
    elements: [],
    ports: [],
    systems: [],
    storeys: [],
    spaces: [],
    walls: [],
    slabs: [],
    roofs: [],
    findings: [],
  };
  expect(faults('survey', surveyOf(empty, [], exampleResult))).toEqual([]);
});

/** Every object and list in a value, with the way to it. */
function* places(value: unknown, way: readonly (string | number)[] = []): Generator<readonly (string | number)[]> {
  if (typeof value !== 'object' || value === null) return;
  yield way;
  const entries = Array.isArray(value) ? [...value.entries()].slice(0, 3) : Object.entries(value);
  for (const [key, part] of entries) yield* places(part, [...way, key]);
}
const free = (way: readonly (string | number)[]): boolean =>
  way.some((key) => key === 'facts' || key === 'leftOut' || key === 'settings');

describe('the schema notices', () => {
  test('a key that it does not know, wherever it stands', () => {
    let tried = 0;
    for (const way of places(exampleResult)) {
      const copy = structuredClone(exampleResult) as unknown;
      const spot = way.reduce<unknown>((part, key) => (part as Record<string | number, unknown>)[key], copy);
      if (Array.isArray(spot) || free(way)) continue;
      (spot as Record<string, unknown>).surprise = 1;
      expect(faults('result', copy), `/${way.join('/')}`).not.toEqual([]);
      tried++;
    }
    expect(tried).toBeGreaterThan(60);
  });

  const broken: readonly [string, (result: Record<string, never>) => void][] = [
    ['a wrong format', (result) => Object.assign(result, { format: 'other' })],
    ['a missing caution', (result) => Reflect.deleteProperty(result, 'caution')],
    ['a digest of the wrong length', (result) => Object.assign(result.model ?? {}, { sha256: 'ab' })],
    ['a verdict of no known word', (result) => Object.assign(result.pipes?.[0] ?? {}, { verdict: 'good' })],
    ['a negative load', (result) => Object.assign(result.pipes?.[0] ?? {}, { load: { least: -1, most: 0 } })],
    ['a severity of no known word', (result) => Object.assign(result.findings?.[0] ?? {}, { severity: 'fatal' })],
    ['a size without its DN', (result) => Object.assign(result.fixtures?.[0] ?? {}, { trapSize: { label: '2 in' } })],
  ];
  for (const [what, damage] of broken) {
    test(what, () => {
      const copy = structuredClone(exampleResult) as unknown as Record<string, never>;
      damage(copy);
      expect(faults('result', copy)).not.toEqual([]);
    });
  }
});
