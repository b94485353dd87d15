import { marginResult } from '../schedule/margin.ts';
import { mendResult } from '../schedule/mend-result.ts';
import type { Result, SizeLabel } from '../schedule/result.ts';
import { resultOf } from '../schedule/result-of.ts';
import type { Plan } from '../study/mend/mend.ts';
import type { Outcome } from '../verdicts/outcome.ts';
import { type PageData, type PageMend, pageData } from './page-data.ts';
import { weighedBatteries } from './weighed-batteries.ts';

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
    weighed: weighedBatteries(outcome, result),
    margins: marginResult(outcome),
  });
  return plan === null ? data : { ...data, mend: pageMend(plan, data) };
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
