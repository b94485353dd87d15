import type { Command } from 'commander';
import { type ModelOptions, modelArgument, modelOptions } from '../options.ts';

interface ReportOptions extends ModelOptions {
  readonly out: string;
}

export function addReport(program: Command): void {
  const command = program
    .command('report')
    .summary('by the ending of the file: .bcf the issues, .csv the take-off, .html to read and print, .json the result')
    .description(
      'Writes a report of a model. The ending of the file decides: .bcf is the issues to settle with the designer (BCF 2.1, one topic a cause), .csv is the take-off (pipes, fittings, cleanouts), .html is everything for reading and printing (undersized pipes and why, batteries side by side, the plan that mends it, schedules), .json the whole result.',
    )
    .argument('<model...>', modelArgument)
    .requiredOption('-o, --out <file>', 'the report to write')
    .action(async (models: readonly string[], options: ReportOptions) => {
      const { reportFor } = await import('../report-of.ts');
      const { outputPlace } = await import('../output-place.ts');
      const { runModel } = await import('../run-model.ts');
      const { printResult } = await import('../print-result.ts');
      const { writeNew } = await import('../write-new.ts');
      const { reportText } = await import('../../schedule/size-text.ts');
      const made = reportFor(options.out);
      const run = await runModel(models, options, (inputs) => outputPlace(options.out, inputs, false));
      const written = await writeNew(run.place, made(run), options.out);
      await printResult(run.result, options, () => reportText(run.result, written));
    });
  for (const option of modelOptions()) command.addOption(option);
}
