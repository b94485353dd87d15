import type { Finding } from '../findings/finding.ts';
import type { Run } from './outcome.ts';

/**
 * What the checks of every run find, in the order of the run that is shown, then of the others. What only some readings of
 * an open fixture have is no error yet: it says with which readings it comes, and warns.
 */
export function findingsOfRuns(runs: readonly Run[], findingsOf: (run: Run) => readonly Finding[]): Finding[] {
  const shown = runs.at(-1)!;
  if (runs.length === 1) return [...findingsOf(shown)];
  const found = new Map<string, { readonly first: Finding; readonly runs: Set<Run> }>();
  for (const run of [shown, ...runs.slice(0, -1)])
    for (const one of findingsOf(run)) {
      const key = keyOf(one);
      const known = found.get(key);
      if (known === undefined) found.set(key, { first: one, runs: new Set([run]) });
      else known.runs.add(run);
    }
  return [...found.values()].map(({ first, runs: having }) => {
    if (having.size === runs.length) return first;
    const severity = first.severity === 'error' ? 'warning' : first.severity;
    return { ...first, severity, facts: { ...first.facts, onlyIf: readingsOf(runs, having) } };
  });
}

/** One fault, whatever its figures come to in a run and whichever limit it breaks. */
const keyOf = ({ code, about, facts }: Finding): string =>
  JSON.stringify([code, about[0], facts.rule, facts.what, Object.keys(facts).sort()]);

/** What an unidentified fixture would have to be; where that is not it, the lightest or the heaviest reading. */
function readingsOf(runs: readonly Run[], having: ReadonlySet<Run>): readonly string[] {
  const own = runs.filter((run) => having.has(run));
  const kinds = own.flatMap(({ kind, loads }) => kind ?? (loads.scenario === 'closet' ? 'water-closet' : []));
  const words =
    kinds.length > 0 ? kinds : own.map(({ loads }) => (loads.scenario === 'lightest' ? 'lightest' : 'heaviest'));
  return [...new Set(words)];
}
