import type { Result } from '../schedule/result.ts';
import type { WeighBattery } from '../schedule/weigh.ts';
import { weighResult } from '../schedule/weigh-result.ts';
import { weighEach } from '../study/weigh.ts';
import type { Outcome } from '../verdicts/outcome.ts';

/** A battery takes about a tenth of a second to weigh: of a tower's hundreds the readings alone are told. */
const mostWeighed = 40;

/** All batteries under each reading; none where there are too many to do so in passing. */
export function weighedBatteries(outcome: Outcome, result: Result): readonly WeighBattery[] {
  const { batteries } = outcome.shown.roles;
  if (batteries.length > mostWeighed) return [];
  return weighResult(outcome, result, weighEach(outcome, batteries)).batteries;
}
