import type { Command } from 'commander';
import { type ModelOptions, modelArgument, modelOptions } from '../options.ts';

interface ViewOptions extends ModelOptions {
  readonly out: string;
}

export function addView(program: Command): void {
  const command = program
    .command('view')
    .summary('one page with the model in it, to open from disk with no network')
    .description(
      'Writes one HTML file that shows the drainage in the building, undersized pipes lit, each with its reasons.',
    )
    .argument('<model...>', modelArgument)
    .requiredOption('-o, --out <file>', 'the page to write')
    .action(async (models: readonly string[], options: ViewOptions) => {
      const { outputPlace } = await import('../output-place.ts');
      const { runModel } = await import('../run-model.ts');
      const { printResult } = await import('../print-result.ts');
      const { pageOf } = await import('../page-of.ts');
      const { quickPlan } = await import('../../deliver/quick-plan.ts');
      const { writeNew } = await import('../write-new.ts');
      const { viewText } = await import('../../schedule/size-text.ts');
      const run = await runModel(models, options, (inputs) => outputPlace(options.out, inputs, false));
      const written = await writeNew(run.place, [pageOf(run, quickPlan(run.outcome))], options.out);
      await printResult(run.result, options, () => viewText(run.result, written));
    });
  for (const option of modelOptions()) command.addOption(option);
}
