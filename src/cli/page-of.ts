import { readFileSync } from 'node:fs';
import { pageDataOf } from '../deliver/page-data-of.ts';
import { pageHtml } from '../deliver/page-html.ts';
import type { Plan } from '../study/mend/mend.ts';
import type { ModelRun } from './run-model.ts';

/** The page of a run, and of the plan that mends it, as the bytes of one HTML file. Its script and style are those that the build made. */
export function pageOf({ result, outcome, sizes }: ModelRun<unknown>, plan: Plan | null): Uint8Array {
  const data = pageDataOf(outcome, result, sizes, plan);
  return new TextEncoder().encode(pageHtml(data, { js: builtPart('bundle.js'), css: builtPart('bundle.css') }));
}

/** The text of a part that the build put beside the page's modules. */
export const builtPart = (name: string): string => readFileSync(new URL(`../page/${name}`, import.meta.url), 'utf8');
