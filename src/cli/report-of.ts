import { extname } from 'node:path';
import { bcf } from '../deliver/bcf.ts';
import { quickPlan } from '../deliver/quick-plan.ts';
import { reportHtml } from '../deliver/report-html.ts';
import { reportSource } from '../deliver/report-source.ts';
import { InputError } from '../findings/input-error.ts';
import { fileOrigin } from '../ifc/file-origin.ts';
import { jsonText } from '../schedule/json-text.ts';
import { takeOffCsv } from '../schedule/take-off.ts';
import type { ModelRun } from './run-model.ts';

type Report = (run: ModelRun<unknown>) => Iterable<Uint8Array>;

/** What each ending of a file asks for. */
const reports: Readonly<Record<string, Report>> = {
  '.bcf': ({ result, model, files }) => [bcf(result, model, files.map(fileOrigin))],
  '.csv': ({ outcome }) => [bytes(takeOffCsv(outcome))],
  '.html': ({ outcome, result }) => [bytes(reportHtml(reportSource(outcome, result, quickPlan(outcome))))],
  '.json': ({ result }) => [bytes([...jsonText({ ...result })].join(''))],
};

/** The report that a file name asks for; another ending is wrong usage and names those there are. */
export function reportFor(out: string): Report {
  const ending = extname(out).toLowerCase();
  const found = reports[ending];
  if (found !== undefined) return found;
  const known = Object.keys(reports).join(', ');
  throw new InputError(out, `${ending === '' ? 'has no ending' : `no report ends in ${ending}`}; there are ${known}`, {
    exit: 2,
  });
}

const bytes = (text: string): Uint8Array => new TextEncoder().encode(text);
