import type { Recorded } from './ground.ts';
import type { Mutant } from './mutants-of.ts';

/** A test file, ready to run. */
export interface Suite {
  readonly file: string;
  readonly body: string;
  readonly tests: readonly Recorded[];
}

/** One test that may notice a mutant. */
export interface Trial {
  /** File and title. */
  readonly name: string;
  readonly body: string;
  /** Its number in the file. */
  readonly test: number;
  readonly calls: number;
  readonly reached: Uint8Array;
}

export interface Trials {
  /** Tests that reach the mutant, the likeliest to notice it first. */
  orderFor(mutant: number, known: string | null): readonly Trial[];
  noticed(mutant: number, by: Trial): void;
}

/** Lines within which one fault is taken to be of the same rule as another. */
const near = 14;

/**
 * What a rule is made from is reached by every test of its code, what it does by few: a test is the likelier to notice a
 * fault the fewer tests reach what stands beside it.
 */
export function openTrials(suites: readonly Suite[], mutants: readonly Mutant[]): Trials {
  const all = suites.flatMap(({ file, body, tests }) =>
    tests.flatMap(({ name, calls, broken, reached }, test): Trial[] =>
      broken ? [] : [{ name: `${file}: ${name}`, body, test, calls, reached }],
    ),
  );
  const reaching = Float64Array.from(mutants, (_, number) => all.filter(({ reached }) => reached[number] === 1).length);
  const merits = new Map<string, number>();
  const meritOf = (file: string, { name }: Trial): string => `${file} ${name}`;
  return {
    orderFor: (mutant, known) => {
      const { file, line } = mutants[mutant]!;
      const beside: number[] = [];
      for (let at = mutant; mutants[at]?.file === file && line - mutants[at]!.line <= near; at--) beside.push(at);
      for (let at = mutant + 1; mutants[at]?.file === file && mutants[at]!.line - line <= near; at++) beside.push(at);
      const rank = (trial: Trial): number => {
        if (trial.name === known) return Number.POSITIVE_INFINITY;
        const rarest = beside.reduce(
          (top, at) => (trial.reached[at] === 1 ? Math.max(top, 1 / reaching[at]!) : top),
          0,
        );
        const merit = Math.min(4, merits.get(meritOf(file, trial)) ?? 0);
        return (rarest * (1 + merit)) / Math.sqrt(1000 + trial.calls);
      };
      return all
        .filter(({ reached }) => reached[mutant] === 1)
        .map((trial) => ({ trial, rank: rank(trial) }))
        .sort((a, b) => b.rank - a.rank)
        .map(({ trial }) => trial);
    },
    noticed: (mutant, by) => {
      const key = meritOf(mutants[mutant]!.file, by);
      merits.set(key, (merits.get(key) ?? 0) + 1);
    },
  };
}
