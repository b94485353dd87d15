import type { Command } from 'commander';
import { InputError } from '../../findings/input-error.ts';
import { type ModelOptions, modelArgument, modelOptions } from '../options.ts';

interface MendOptions extends ModelOptions {
  readonly out?: string;
  readonly weights?: string;
  readonly runs?: string;
}

export function addMend(program: Command): void {
  const command = program
    .command('mend')
    .summary('the least change that puts a model right, and the proof')
    .description(
      'Finds the cheapest changes after which no error is left: larger pipe, vents added, moved or led to open air, rows read another way, falls, traps; then runs all stages on the changed building.',
    )
    .argument('<model...>', modelArgument)
    .option(
      '-o, --out <file>',
      'a copy with sizes and proposals as property sets, of several models a folder; nothing that is drawn moves',
    )
    .option('--weights <file>', 'JSON file with what changes cost, to compare plans by; printed with the plan')
    .option('--runs <count>', 'how long to search: runs of all stages at most')
    .action(async (models: readonly string[], options: MendOptions) => {
      const { readText } = await import('../read-input.ts');
      const { runModel } = await import('../run-model.ts');
      const { printJson } = await import('../print-result.ts');
      const { printLines } = await import('../terminal.ts');
      const { planCopies, writeCopies } = await import('../sized-copies.ts');
      const { mendedIfc } = await import('../sized-ifc.ts');
      const { mendResult } = await import('../../schedule/mend-result.ts');
      const { mendText } = await import('../../schedule/mend-text.ts');
      const { mend, usualRuns } = await import('../../study/mend/mend.ts');
      const { readWeights, standardWeights } = await import('../../study/mend/weights.ts');
      const { out, weights: file } = options;
      const weights = file === undefined ? standardWeights : readWeights(await readText(file), file);
      const runs = options.runs === undefined ? usualRuns : runsOf(options.runs);
      const run = await runModel(models, options, (inputs) =>
        out === undefined ? null : planCopies(models, inputs, { out }),
      );
      const plan = mendResult(mend(run.outcome, weights, runs), run.result);
      const { place } = run;
      if (place !== null) await writeCopies({ ...run, place }, (file, path) => mendedIfc(run, plan, file, path));
      if (options.json === true) await printJson({ ...plan });
      else await printLines(mendText(plan, run.result));
    });
  for (const option of modelOptions()) command.addOption(option);
}

function runsOf(text: string): number {
  const count = Number(text);
  if (!/^\d{1,6}$/.test(text) || count === 0)
    throw new InputError('--runs', `is ${text}, expected a whole number from 1 on`, { exit: 2 });
  return count;
}
