import type { Command } from 'commander';
import { doneWithErrors } from '../exit.ts';
import { type ModelOptions, modelArgument, modelOptions } from '../options.ts';

export function addCheck(program: Command): void {
  const command = program
    .command('check')
    .summary('network, roles, sizes, verdicts and findings of a model')
    .description('Rebuilds the drainage of a model, sizes every drain and vent, and compares with what is drawn.')
    .argument('<model...>', modelArgument)
    .option(
      '--versus <id>',
      'a second code or edition: lists the pipes whose required size or verdict differs, and why',
    )
    .action(async (models: readonly string[], options: ModelOptions & { readonly versus?: string }) => {
      if (options.versus !== undefined) {
        const { checkVersus } = await import('../check-versus.ts');
        process.exitCode = (await checkVersus(models, options, options.versus)) ? doneWithErrors : 0;
        return;
      }
      const { runModel } = await import('../run-model.ts');
      const { printResult } = await import('../print-result.ts');
      const { checkText } = await import('../../schedule/check-text.ts');
      const { twinsResult, twinsText } = await import('../../schedule/twins.ts');
      const { result, outcome } = await runModel(models, options);
      await printResult(result, options, () => checkText(result, twinsText(twinsResult(outcome))));
      if (result.findings.some(({ severity }) => severity === 'error')) process.exitCode = doneWithErrors;
    });
  for (const option of modelOptions()) command.addOption(option);
}
