import type { Result, ResultElement } from './result.ts';

/** Element rows by the id that pipes, fixtures and findings use: with file and STEP id where a model doubles or lacks it. */
export function elementRows({ elements, model, models }: Result): ReadonlyMap<string, ResultElement> {
  const files = new Map((models ?? [model]).map(({ file }, place) => [file, place]));
  const rows = new Map<string, ResultElement>();
  for (const element of elements) {
    rows.set(element.globalId, element);
    rows.set(`${element.globalId}#${files.get(element.file)}.${element.stepId}`, element);
  }
  return rows;
}
