import { mend, type Plan, usualRuns } from '../study/mend/mend.ts';
import { standardWeights } from '../study/mend/weights.ts';
import type { Outcome } from '../verdicts/outcome.ts';

/** Pipes times runs of all stages: a few seconds, so that a page or a report is not long in the making. */
const mostWork = 30_000;
const fewestRuns = 10;

/** A plan that somebody asks for in passing, whatever the size of the building: what so few runs find. */
export const shortPlan = (outcome: Outcome): Plan => mend(outcome, standardWeights, fewestRuns);

/**
 * A plan in passing, with as long a search as a building of its size allows; `mend` takes its time. null: nothing is
 * wrong, or the building is so large that a search would end before it began.
 */
export function quickPlan(outcome: Outcome): Plan | null {
  const runs = Math.min(usualRuns, Math.floor(mostWork / Math.max(1, outcome.network.pipes.length)));
  const wrong = outcome.findings.some(({ severity }) => severity === 'error');
  return wrong && runs > fewestRuns ? mend(outcome, standardWeights, runs) : null;
}
