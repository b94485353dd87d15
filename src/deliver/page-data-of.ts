import type { Result, SizeLabel } from '../schedule/result.ts';
import type { WeighBattery } from '../schedule/weigh.ts';
import { weighResult } from '../schedule/weigh-result.ts';
import { weighEach } from '../study/weigh.ts';
import type { Outcome } from '../verdicts/outcome.ts';
import { type PageData, pageData } from './page-data.ts';

/** All that the page shows of a run, its batteries weighed. `sizes`: those the code offers, smallest first. */
export function pageDataOf(outcome: Outcome, result: Result, sizes: readonly SizeLabel[]): PageData {
  const source = { ...outcome, paths: { ...outcome.paths, traps: outcome.shown.roles.air } };
  return pageData(result, source, sizes, weighed(outcome, result));
}

/** A battery takes about a tenth of a second to weigh: of a tower's hundreds the page shows the readings alone. */
const mostWeighed = 40;

function weighed(outcome: Outcome, result: Result): readonly WeighBattery[] {
  const { batteries } = outcome.shown.roles;
  if (batteries.length > mostWeighed) return [];
  return weighResult(outcome, result, weighEach(outcome, batteries)).batteries;
}
