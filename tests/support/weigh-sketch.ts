import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { noAnswers } from '../../src/model/answers.ts';
import { readNamesTable } from '../../src/model/read-names-table.ts';
import { run } from '../../src/pipeline.ts';
import type { Prices } from '../../src/schedule/prices.ts';
import { resultOf } from '../../src/schedule/result-of.ts';
import type { WeighAlternative, WeighBattery, WeighResult } from '../../src/schedule/weigh.ts';
import { weighResult } from '../../src/schedule/weigh-result.ts';
import { weighEach } from '../../src/study/weigh.ts';
import type { Outcome } from '../../src/verdicts/outcome.ts';
import { modelOf } from './model-of.ts';
import { codeOf, type RunOptions, tables } from './run-sketch.ts';
import { sketch } from './sketch.ts';

const names = readNamesTable(tables);

/** A sketch carried through every stage. */
export function outcomeOf(
  text: string,
  { code = 'npc-2020', answers, ports = true, sizes = true }: RunOptions = {},
): Outcome {
  const said = { ...noAnswers, ...answers };
  return run(modelOf(sketch(text), { ports, sizes }), codeOf(code, said.settings), said, names);
}

export interface Weighed {
  readonly result: WeighResult;
  readonly battery: (id?: string) => WeighBattery;
  readonly of: (reading: string, id?: string) => WeighAlternative;
}

/** A sketch with every battery weighed. Without an id the only battery is meant. */
export function weighSketch(text: string, options: RunOptions = {}, prices: Prices | null = null): Weighed {
  const outcome = outcomeOf(text, options);
  const result = weighResult(
    outcome,
    resultOf(outcome, '0.0.0'),
    weighEach(outcome, outcome.shown.roles.batteries),
    prices,
  );
  const battery = (id?: string): WeighBattery => {
    const found = result.batteries.filter((one) => id === undefined || one.id === id);
    if (found.length !== 1)
      throw new Error(`${found.length} batteries: ${result.batteries.map((one) => one.id).join(', ')}`);
    return found[0]!;
  };
  return {
    result,
    battery,
    of: (reading, id) => battery(id).alternatives.find((one) => one.reading === reading)!,
  };
}

export const sampleText = (name: string): string =>
  readFileSync(resolve(import.meta.dirname, `../../sample-models/${name}.piping`), 'utf8');

/** `3 in`, or `none`. */
export const label = (size: { readonly label: string } | null | undefined): string => size?.label ?? 'none';

/** Metres of pipe with a role, all sizes together. */
export const lengthOf = ({ pipes }: WeighAlternative, role: string): number =>
  pipes.filter((one) => one.role === role).reduce((sum, { length }) => sum + length, 0);

/** `wet-vent 4 in`, by role and size. */
export const rolesOf = ({ pipes }: WeighAlternative): string[] =>
  pipes.map(({ role, size }) => `${role} ${label(size)}`);
