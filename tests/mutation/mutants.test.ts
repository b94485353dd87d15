import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { codeOf } from '../support/run-sketch.ts';
import { allMutants, filesUnder } from './all-mutants.ts';
import { equivalents } from './equivalents.ts';
import { keeping } from './kept.ts';
import { mutantsOf } from './mutants-of.ts';

// `npm run mutants` switches the mutants on one by one, which takes too long for every build. Here: that none is forgotten.
const read = (file: string): string => readFileSync(file, 'utf8');
const { mutants } = allMutants(read);

describe('what becomes of a line', () => {
  const made = (source: string): string[] =>
    mutantsOf('a.ts', source).mutants.map(({ key }) => key.replace(/^a\.ts: /, ''));

  test('a condition: each part left out, the whole never, each limit one step off', () => {
    expect(made('if (load > 6 && !isFree) undersized();').sort()).toEqual([
      '> as >=: load > 6',
      'left out: !isFree',
      'left out: load > 6',
      'left undone: undersized();',
      'never: load > 6 && !isFree',
      'one more: 6',
    ]);
    expect(made('const a = wet || dry ? 1 : length;').sort()).toEqual([
      'always: wet || dry',
      'left out: dry',
      'left out: wet',
      'one more: 1',
    ]);
  });

  test('a rule in a list, a printed limit, a lookup', () => {
    expect(made('const checks = [slopes(tools), arms(tools)];')).toEqual([
      'not in the list: slopes(tools)',
      'not in the list: arms(tools)',
    ]);
    expect(made("const most = family.number('closets-most', 'count');")).toEqual([
      "limit up: family.number('closets-most', 'count')",
      "limit down: family.number('closets-most', 'count')",
    ]);
    expect(made("sizeForLoad(branch, 'load', load, omit).size;")).toEqual([
      "read +1 off: sizeForLoad(branch, 'load', load, omit)",
      "read -60 off: sizeForLoad(branch, 'load', load, omit)",
    ]);
  });

  test('with all asleep it says what it said, and with one awake it does not', () => {
    const { text } = mutantsOf('a.ts', 'answer = list.some((one) => one > 2 || one === 0) ? 7 : 8;');
    const answers = (awake: number): unknown =>
      new Function('list', '__mutant', `let answer; ${text} return answer;`)(
        [1, 2],
        (number: number) => number === awake,
      );
    expect(answers(-1)).toBe(8);
    expect([0, 1, 2, 3].map(answers)).toContain(7);
  });

  test('types, imports and guards against faults of our own are left alone', () => {
    expect(
      made("import { a } from './a.ts';\ntype B<T> = T extends 1 ? 2 : 3;\nif (a === null) throw new Error('no a');"),
    ).toEqual([]);
  });
});

describe('all mutants', () => {
  test('every comparison and every joined condition of the codes and the roles has one', () => {
    const missing: string[] = [];
    let seen = 0;
    for (const file of ['src/codes', 'src/roles'].flatMap((folder) => filesUnder(folder, '.ts'))) {
      const own = mutants.filter((one) => one.file === file);
      // Words in comments and texts are no conditions; a guard that throws a plain error is not asked for.
      const source = read(file)
        .replace(/\/\*[\s\S]*?\*\/|\/\/.*|'[^'\n]*'/g, (found) => found.replace(/[^\n]/g, '·'))
        .replace(/if \([^\n]*\)\s*(\{\s*)?throw new Error/g, (found) => found.replace(/[^\n]/g, '·'));
      for (const { index, 0: sign } of source.matchAll(/\bif \(\s*| (?:&&|\|\||===|!==|<=?|>=?)(?=\s)/g)) {
        seen++;
        const at = sign.startsWith('if (') ? index + sign.length : index;
        if (own.every(({ start, end }) => at < start || at >= end))
          missing.push(`${file}:${source.slice(0, at).split('\n').length}: ${sign.trim()}`);
      }
    }
    expect(missing).toEqual([]);
    expect(seen).toBeGreaterThan(1500);
  });

  test('every rule of every family can be left out', () => {
    for (const [family, code] of Object.entries({
      npc: 'npc-2020',
      ipc: 'ipc-2021',
      upc: 'upc-2021',
      en12056: 'en12056-2000',
    })) {
      const { rules, checks, readings } = codeOf(code);
      const own = mutants.filter(
        ({ file, what }) => file.startsWith(`src/codes/${family}/`) && what === 'not in the list',
      );
      expect(own.length, family).toBeGreaterThanOrEqual(rules.length + checks.length + readings.length);
    }
  });

  test('no two bear one name, and every equivalent one is still there', () => {
    const keys = new Set(mutants.map(({ key }) => key));
    expect(keys.size).toBe(mutants.length);
    expect(equivalents.flatMap(({ keys: named }) => named).filter((key) => !keys.has(key))).toEqual([]);
    expect(equivalents.every(({ why }) => why.length > 20)).toBe(true);
  });

  test('what is worked out once for all runs still stands where the runner looks for it', () => {
    expect(keeping(read).size).toBe(3);
  });
});
