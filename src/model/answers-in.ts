import { sizeIn } from '../tables/printed-value.ts';
import type { SizeSeries } from '../units/nominal-size.ts';
import type { Answers } from './answers.ts';

/** The answers without sizes that a code's series has not: those were given for the sizes of another code. */
export function answersIn(series: SizeSeries, answers: Answers): Answers {
  const has = (size: string | undefined): boolean => size === undefined || sizeIn(series, size.trim()) !== undefined;
  return {
    ...answers,
    fixtures: new Map(
      [...answers.fixtures].map(([key, answer]) => {
        const { trapSize, ...rest } = answer;
        return [key, has(trapSize) ? answer : rest];
      }),
    ),
    pipes: new Map(
      [...answers.pipes].map(([key, answer]) => {
        const { size, ...rest } = answer;
        return [key, has(size) ? answer : rest];
      }),
    ),
  };
}
