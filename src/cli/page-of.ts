import { readFileSync } from 'node:fs';
import { pageData } from '../deliver/page-data.ts';
import { pageHtml } from '../deliver/page-html.ts';
import type { ModelRun } from './run-model.ts';

/** The page of a run as the bytes of one HTML file. Its script and style are those that the build made. */
export function pageOf({ result, outcome, sizes }: ModelRun<unknown>): Uint8Array {
  const data = pageData(result, { ...outcome, paths: { ...outcome.paths, traps: outcome.shown.roles.air } }, sizes);
  return new TextEncoder().encode(pageHtml(data, { js: built('bundle.js'), css: built('bundle.css') }));
}

const built = (name: string): string => readFileSync(new URL(`../page/${name}`, import.meta.url), 'utf8');
