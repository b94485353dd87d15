import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { readModel } from '../../src/ifc/open.ts';
import { noAnswers } from '../../src/model/answers.ts';
import { readNamesTable } from '../../src/model/read-names-table.ts';
import { run } from '../../src/pipeline.ts';
import type { Result } from '../../src/schedule/result.ts';
import { resultOf } from '../../src/schedule/result-of.ts';
import type { Outcome } from '../../src/verdicts/outcome.ts';
import { codeOf, tables } from './run-sketch.ts';

const names = readNamesTable(tables);

/** A model of sample-models/ carried through every stage. */
export function sampleOutcome(name: string): { readonly outcome: Outcome; readonly result: Result } {
  const bytes = readFileSync(join(import.meta.dirname, `../../sample-models/${name}.ifc`));
  const model = readModel([{ name: `${name}.ifc`, bytes }], () => 'ab'.repeat(32));
  const outcome = run(model, codeOf('npc-2020'), noAnswers, names);
  return { outcome, result: resultOf(outcome, '0.1.0') };
}
