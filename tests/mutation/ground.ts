import { readdirSync, readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { runInThisContext, Script } from 'node:vm';
import fc from 'fast-check';
import { type Declared, standIn } from './stand-in.ts';

/** Calls of `__mutant` after which a run is taken to go on for ever, as a multiple of what it takes with all asleep. */
const patience = 40;

/** Where the tests of one file run, whole or one by one, with one mutant awake or none. */
export interface Ground {
  /** All its tests, with the mutants that each reaches. Those reached while the file itself is read count for every test. */
  record(body: string): readonly Recorded[];
  /**
   * Whether the test of that number fails with the mutant awake. `allowance`: calls of `__mutant` that it takes with all
   * asleep.
   */
  fails(body: string, mutant: number, test: number, allowance: number): boolean;
}

export interface Recorded {
  readonly name: string;
  /** Calls of `__mutant`: a measure of its cost that no busy machine changes. */
  readonly calls: number;
  /** Fails with every mutant asleep: no measure of anything. */
  readonly broken: boolean;
  /** 1 at the number of each mutant that it reaches. */
  readonly reached: Uint8Array;
}

export function ground(mutants: number): Ground {
  let awake = -1;
  let calls = 0;
  let most = Number.POSITIVE_INFINITY;
  let isRecording = false;
  const reached = new Uint8Array(mutants);
  const kept = new WeakMap<object, Map<string, unknown>>();
  const words = new WeakMap<object, string>();
  Object.assign(globalThis, {
    __mutant: (number: number): boolean => {
      calls++;
      if (calls > most) throw new Error('goes on for ever');
      if (isRecording) reached[number] = 1;
      return number === awake;
    },
    __recording: () => isRecording,
    __tables: {},
    __kept: (on: object, key: string, make: () => unknown): unknown => {
      const known = kept.get(on) ?? new Map<string, unknown>();
      if (known.size > 2000) known.clear();
      kept.set(on, known);
      if (!known.has(key)) known.set(key, make());
      return known.get(key);
    },
    __word: (answers: object): string => {
      const word =
        words.get(answers) ??
        JSON.stringify(answers, (_, value) => (value instanceof Map || value instanceof Set ? [...value] : value));
      words.set(answers, word);
      return word;
    },
    __limit: limit,
    __size: size,
  });
  fc.configureGlobal({ seed: 20_261, endOnFailure: true });

  const scripts = new Map<string, (...given: unknown[]) => void>();
  const declared = (body: string): readonly Declared[] => {
    if (scripts.size > 60) scripts.clear();
    const script =
      scripts.get(body) ?? new Script(`(function(require, module, exports){${body}\n})`).runInThisContext();
    scripts.set(body, script);
    const { api, tests } = standIn();
    const module = { exports: {} };
    const given = (name: string) => (name === 'vitest' ? api : name === 'node:fs' ? files : require(name));
    script(given, module, module.exports);
    return tests;
  };
  /** The process is stopped from outside only where nothing of ours is called: a loop without a mutant in it. */
  const watched = <T>(run: () => T): T => {
    let answer: T | undefined;
    Object.assign(globalThis, { __watched: () => (answer = run()) });
    runInThisContext('__watched()', { timeout: 60_000 });
    return answer as T;
  };

  return {
    record: (body) => {
      awake = -1;
      most = Number.POSITIVE_INFINITY;
      isRecording = true;
      reached.fill(0);
      const tests = declared(body);
      const shared = reached.slice();
      const found = tests.map(({ name, run }) => {
        reached.set(shared);
        calls = 0;
        let broken = false;
        try {
          broken = run() instanceof Promise;
        } catch {
          broken = true;
        }
        return { name, calls, broken, reached: Buffer.from(reached) };
      });
      isRecording = false;
      return found;
    },
    fails: (body, mutant, test, allowance) => {
      awake = mutant;
      calls = 0;
      most = 1e5 + patience * allowance;
      try {
        watched(() => declared(body)[test]!.run());
        return false;
      } catch {
        return true;
      } finally {
        awake = -1;
      }
    },
  };
}

const require = createRequire(import.meta.url);
const texts = new Map<string, unknown>();
const once = <T>(key: string, read: () => T): T => {
  if (!texts.has(key)) texts.set(key, read());
  return texts.get(key) as T;
};
/** Files do not change meanwhile. */
const files = {
  ...(require('node:fs') as object),
  readFileSync: (path: string, encoding?: 'utf8') => once(`${path}|${encoding}`, () => readFileSync(path, encoding)),
  readdirSync: (path: string, options?: object) =>
    once(`${path}|${JSON.stringify(options)}`, () => readdirSync(path, options as { encoding: 'utf8' })),
};

type Way = 'up' | 'down';

/** A printed limit one step off: a count by one, a load by one unit, a measure by a tenth. */
function limit(cell: { readonly value: number }, dimension: string, way: Way): object {
  const { value } = cell;
  const step = dimension === 'count' ? 1 : dimension === 'load' ? 60 : value / 10;
  return { ...cell, value: way === 'up' ? value + step : value - step };
}

/** A printed size one step off in the series; the last of it stays. */
function size(
  cell: { readonly value: string },
  series: { readonly sizes: readonly { readonly label: string }[] },
  way: Way,
): object {
  const at = series.sizes.findIndex(({ label }) => label === cell.value);
  return { ...cell, value: series.sizes[at + (way === 'up' ? 1 : -1)]?.label ?? cell.value };
}
