import { readFileSync } from 'node:fs';
import { pageData } from '../deliver/page-data.ts';
import { pageHtml } from '../deliver/page-html.ts';
import type { Result } from '../schedule/result.ts';
import type { WeighBattery } from '../schedule/weigh.ts';
import { weighResult } from '../schedule/weigh-result.ts';
import { weighBattery } from '../study/weigh.ts';
import type { Outcome } from '../verdicts/outcome.ts';
import type { ModelRun } from './run-model.ts';

/** The page of a run as the bytes of one HTML file. Its script and style are those that the build made. */
export function pageOf({ result, outcome, sizes }: ModelRun<unknown>): Uint8Array {
  const source = { ...outcome, paths: { ...outcome.paths, traps: outcome.shown.roles.air } };
  const data = pageData(result, source, sizes, weighed(outcome, result));
  return new TextEncoder().encode(pageHtml(data, { js: built('bundle.js'), css: built('bundle.css') }));
}

/** A battery takes about a tenth of a second to weigh: of a tower's hundreds the page shows the readings alone. */
const mostWeighed = 40;

function weighed(outcome: Outcome, result: Result): readonly WeighBattery[] {
  const { batteries } = outcome.shown.roles;
  if (batteries.length > mostWeighed) return [];
  return weighResult(
    outcome,
    result,
    batteries.map((battery) => weighBattery(outcome, battery)),
  ).batteries;
}

const built = (name: string): string => readFileSync(new URL(`../page/${name}`, import.meta.url), 'utf8');
