import { placeText } from '../../schedule/demand-text.ts';
import type { PipeState, TrailStep } from '../../schedule/result.ts';
import { decimal, lengthText, oneSize, placeIn, shortLoad } from '../format.ts';
import { ruleName } from '../words/words.ts';
import type { Desk } from './desk.ts';
import { nameOfId } from './names.ts';

/** One line: which demand, the load that chose the row, what the size holds, where it is printed. */
export function reasonText({ building, words }: Desk, pipe: PipeState, step: TrailStep | null): string {
  const { unit } = building.result.code;
  const parts = step === null ? [] : [ruleName(words, step)];
  const upstream = step?.facts.upstream;
  if (typeof upstream === 'string') parts.push(nameOfId(building, words, upstream));
  else parts.push(shortLoad(words, pipe.ventLoad ?? pipe.load, unit));
  if (pipe.developedLength !== undefined) parts.push(lengthText(words, pipe.developedLength));
  const limit = step?.facts.limitUnits;
  if (step !== null && typeof limit === 'number' && step.asks !== null)
    parts.push(words.pipe.holds(oneSize(words, step.asks), `${decimal(words, limit, 2)} ${words.shortUnit(unit)}`));
  if (step !== null) parts.push(clauseText(words, step));
  return parts.join(' · ');
}

/** `2.4.10.6., Table 2.4.10.6.-B, row 3 in` in the page's language. */
export function clauseText(words: Desk['words'], step: TrailStep): string {
  return placeIn(words, placeText(step));
}
