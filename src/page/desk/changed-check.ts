import { findInResult } from '../../schedule/find-in-result.ts';
import { resultOf } from '../../schedule/result-of.ts';
import { readWhatIf } from '../../schedule/what-if-words.ts';
import { whatIf } from '../../study/what-if.ts';
import type { DeskCheck } from './check-building.ts';
import type { DeskEdit } from './messages.ts';

/** The check as it would be with the changes, run through all stages; the check itself where there are none. */
export function changedCheck(check: DeskCheck, edits: readonly DeskEdit[], version: string): DeskCheck {
  if (edits.length === 0) return check;
  const asked = edits.flatMap(({ about, words }) =>
    readWhatIf(words, findInResult(check.result, about), check.outcome).map(({ edit }) => edit),
  );
  const { outcome } = whatIf(check.outcome, asked, check.own.other);
  return { ...check, outcome, result: resultOf(outcome, version) };
}
