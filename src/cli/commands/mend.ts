import type { Command } from 'commander';
import { InputError } from '../../findings/input-error.ts';
import { type ModelOptions, modelArgument, modelOptions } from '../options.ts';

interface MendOptions extends ModelOptions {
  readonly out?: string;
  readonly page?: string;
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
    .option('--page <file>', 'the offline page, with the building before and after')
    .option('--weights <file>', 'JSON file with what changes cost, to compare plans by; printed with the plan')
    .option('--runs <count>', 'how long to search: runs of all stages at most')
    .action(async (models: readonly string[], options: MendOptions) => {
      const { readText } = await import('../read-input.ts');
      const { runModel } = await import('../run-model.ts');
      const { printJson } = await import('../print-result.ts');
      const { outputPlace } = await import('../output-place.ts');
      const { pageOf } = await import('../page-of.ts');
      const { printLines } = await import('../terminal.ts');
      const { writeNew } = await import('../write-new.ts');
      const { planCopies, writeCopies } = await import('../sized-copies.ts');
      const { mendedIfc } = await import('../sized-ifc.ts');
      const { mendResult } = await import('../../schedule/mend-result.ts');
      const { mendText } = await import('../../schedule/mend-text.ts');
      const { mend, usualRuns } = await import('../../study/mend/mend.ts');
      const { readWeights, standardWeights } = await import('../../study/mend/weights.ts');
      const { out, page, weights: file } = options;
      const weights = file === undefined ? standardWeights : readWeights(await readText(file), file);
      const runs = options.runs === undefined ? usualRuns : runsOf(options.runs);
      const run = await runModel(models, options, async (inputs) => ({
        copies: out === undefined ? null : await planCopies(models, inputs, { out }),
        page: page === undefined ? null : await outputPlace(page, inputs, false),
      }));
      const found = mend(run.outcome, weights, runs);
      const plan = mendResult(found, run.result);
      const { copies, page: pagePlace } = run.place;
      if (copies !== null) await writeCopies({ ...run, place: copies }, (one, path) => mendedIfc(run, plan, one, path));
      if (pagePlace !== null && page !== undefined) await writeNew(pagePlace, [pageOf(run, found)], page);
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
