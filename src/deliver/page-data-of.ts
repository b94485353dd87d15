import { marginResult } from '../schedule/margin.ts';
import { mendResult } from '../schedule/mend-result.ts';
import type { Result, SizeLabel } from '../schedule/result.ts';
import { resultOf } from '../schedule/result-of.ts';
import type { WeighBattery } from '../schedule/weigh.ts';
import { weighResult } from '../schedule/weigh-result.ts';
import { mend, type Plan, usualRuns } from '../study/mend/mend.ts';
import { standardWeights } from '../study/mend/weights.ts';
import { weighEach } from '../study/weigh.ts';
import type { Outcome } from '../verdicts/outcome.ts';
import { type PageData, type PageMend, pageData } from './page-data.ts';

/**
 * All that the page shows of a run, its batteries weighed. `sizes`: those the code offers, smallest first. `plan`: the
 * least change that mends it, where somebody looked for one.
 */
export function pageDataOf(
  outcome: Outcome,
  result: Result,
  sizes: readonly SizeLabel[],
  plan: Plan | null = null,
): PageData {
  const data = pageData(result, sourceOf(outcome), {
    sizes,
    weighed: weighed(outcome, result),
    margins: marginResult(outcome),
  });
  return plan === null || plan.steps.length === 0 ? data : { ...data, mend: pageMend(plan, data) };
}

const sourceOf = (outcome: Outcome) => ({ ...outcome, paths: { ...outcome.paths, traps: outcome.shown.roles.air } });

function pageMend(plan: Plan, { result, sizes, scene }: PageData): PageMend {
  const { last } = plan;
  const after = pageData(resultOf(last, result.program.version), sourceOf(last), {
    sizes,
    margins: marginResult(last),
    origin: scene.origin,
  });
  return { plan: mendResult(plan, result), after };
}

/** Pipes times runs of all stages: a few seconds, so that a page is not long in the making. `mend --page` takes its time. */
const mostWork = 30_000;

/** A plan for a page that nobody asked a plan of: with as long a search as a building of its size allows. */
export function quickPlan(outcome: Outcome): Plan | null {
  const runs = Math.min(usualRuns, Math.floor(mostWork / Math.max(1, outcome.network.pipes.length)));
  const wrong = outcome.findings.some(({ severity }) => severity === 'error');
  return wrong && runs > fewestRuns ? mend(outcome, standardWeights, runs) : null;
}
const fewestRuns = 10;

/** A battery takes about a tenth of a second to weigh: of a tower's hundreds the page shows the readings alone. */
const mostWeighed = 40;

function weighed(outcome: Outcome, result: Result): readonly WeighBattery[] {
  const { batteries } = outcome.shown.roles;
  if (batteries.length > mostWeighed) return [];
  return weighResult(outcome, result, weighEach(outcome, batteries)).batteries;
}
