import { type ElementNames, elementNames } from '../schedule/element-names.ts';
import type { MendResult } from '../schedule/mend.ts';
import { mendResult } from '../schedule/mend-result.ts';
import type { Result } from '../schedule/result.ts';
import { type TakeOffRow, takeOff } from '../schedule/take-off.ts';
import { type TwinsResult, twinsResult } from '../schedule/twins.ts';
import type { WeighBattery } from '../schedule/weigh.ts';
import type { Plan } from '../study/mend/mend.ts';
import type { Outcome } from '../verdicts/outcome.ts';
import { weighedBatteries } from './weighed-batteries.ts';

/** What a report tells of a run. */
export interface ReportSource {
  readonly result: Result;
  readonly names: ElementNames;
  /** Empty where there are so many batteries that nobody weighed them. */
  readonly weighed: readonly WeighBattery[];
  readonly takeOff: readonly TakeOffRow[];
  readonly twins: readonly TwinsResult[];
  /** null: nothing to mend, or the building is too large to look for a plan in passing. */
  readonly plan: MendResult | null;
}

export const reportSource = (outcome: Outcome, result: Result, plan: Plan | null): ReportSource => ({
  result,
  names: elementNames(result),
  weighed: weighedBatteries(outcome, result),
  takeOff: takeOff(outcome),
  twins: twinsResult(outcome),
  plan: plan === null ? null : mendResult(plan, result),
});
