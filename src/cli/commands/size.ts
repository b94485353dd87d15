import type { Command } from 'commander';
import { InputError } from '../../findings/input-error.ts';
import { type ModelOptions, modelArgument, modelOptions } from '../options.ts';

interface SizeOptions extends ModelOptions {
  readonly out?: string;
  readonly inPlace?: boolean;
}

export function addSize(program: Command): void {
  const command = program
    .command('size')
    .summary('the same, and the sizes written into a copy of the model')
    .description(
      'Sizes a model and writes roles, sizes, verdicts and clauses into a copy, as property sets. The input is not touched.',
    )
    .argument('<model...>', modelArgument)
    .option('-o, --out <file>', 'the copy to write; .ifc.gz and .ifczip are packed; of several models, the folder')
    .option('--in-place', 'replace the input instead; it stays as it is until the new file is complete')
    .action(async (models: readonly string[], options: SizeOptions) => {
      refuseNowhere(models, options);
      const { runModel } = await import('../run-model.ts');
      const { printResult } = await import('../print-result.ts');
      const { planCopies, writeCopies } = await import('../sized-copies.ts');
      const { sizedIfc } = await import('../sized-ifc.ts');
      const { sizeText } = await import('../../schedule/size-text.ts');
      const run = await runModel(models, options, (inputs) => planCopies(models, inputs, options));
      const written = await writeCopies(run, (file, out) => sizedIfc(run, file, out));
      await printResult(run.result, options, () => sizeText(run.result, written));
    });
  for (const option of modelOptions()) command.addOption(option);
}

function refuseNowhere(models: readonly string[], { out, inPlace }: SizeOptions): void {
  if (out !== undefined) return;
  if (inPlace !== true) throw new InputError('size', 'say where the copy goes: -o OUT.ifc, or --in-place', { exit: 2 });
  if (models.includes('-'))
    throw new InputError('size', 'standard input cannot be replaced in place: give -o OUT.ifc', { exit: 2 });
}
