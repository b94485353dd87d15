import { existsSync, readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { describe, expect, test } from 'vitest';
import { workedCase, workedNames } from '../support/worked-case.ts';

// Worked examples, rulings and exam questions that other people published, by their number in a list of 34. Each that a
// code of ours covers is a case of the open set (sample-models/worked/pe-NN-…); the others stand here with the reason.
const notCovered: Readonly<Record<string, string>> = {
  'PE-26': 'loads of a handbook of about 2000 that no code of ours prints: bidet and tub count otherwise in each',
  'PE-27': 'a copper stack in a wall is no rule of a plumbing code; tests/verdicts/wall-fit.test.ts has its figures',
  'PE-28':
    'a hole in a stud is the building code’s; tests/verdicts/wall-fit.test.ts and tests/tables/wall-rules.test.ts have its rule',
  'PE-30': 'a residential code that is none of ours; the vent of 50 ft is 2 in in tests/codes/ipc-vents.test.ts',
};
const cases = workedNames().map((name) => ({ name, ...workedCase(name) }));
const published = cases.flatMap(({ name, published: example }) =>
  example === undefined ? [] : [{ name, ...example }],
);
const covered = new Set(published.map(({ example }) => example));
const numbered = Array.from({ length: 34 }, (_, at) => `PE-${String(at + 1).padStart(2, '0')}`);

describe('published examples', () => {
  test('34 in all: 30 covered, four not, each with its reason', () => {
    expect([...covered, ...Object.keys(notCovered)].sort()).toEqual(numbered);
    expect(covered.size).toBe(30);
  });

  test('the names of their cases begin with their numbers', () => {
    expect(published.length).toBeGreaterThanOrEqual(covered.size);
    for (const { name, example } of published) expect(name.startsWith(`${example.toLowerCase()}-`)).toBe(true);
    expect(cases.filter(({ kind }) => kind === 'published')).toHaveLength(published.length);
  });

  test('a source that is wrong, or right for its own place alone, says why', () => {
    const wrong = published.filter(({ agrees }) => !agrees);
    expect(wrong.map(({ example }) => example)).toEqual(['PE-29']);
    for (const { remark } of wrong) expect(remark).toMatch(/\.$/);
  });

  const list = resolve(import.meta.dirname, '../../../shared/checks/published-examples.json');
  const isHere = existsSync(list);
  test.skipIf(!isHere)(`the list itself has no other number${isHere ? '' : ': it is not here'}`, () => {
    const ids = [...readFileSync(list, 'utf8').matchAll(/"id": "(PE-\d\d)"/g)].map(([, id]) => id);
    expect(ids).toEqual(numbered);
  });
});
