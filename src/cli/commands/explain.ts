import type { Command } from 'commander';
import { type ModelOptions, modelArgument, modelOptions } from '../options.ts';

export function addExplain(program: Command): void {
  const command = program
    .command('explain')
    .summary('everything about one pipe or fixture: whose water, whose air, why this size')
    .description(
      'Tells the story of one pipe or fixture: who drains through it, who breathes through it, each demand and which governs.',
    )
    .usage('[options] <model...> <what>')
    .argument('<model>', modelArgument)
    .argument('<what...>', 'GlobalId, #STEP id or name of a pipe or fixture, behind the last file')
    .action(async (first: string, rest: readonly string[], options: ModelOptions) => {
      const { runModel } = await import('../run-model.ts');
      const { printJson } = await import('../print-result.ts');
      const { printLines } = await import('../terminal.ts');
      const { explain } = await import('../../schedule/explain.ts');
      const { explainText } = await import('../../schedule/explain-text.ts');
      const { findInResult } = await import('../../schedule/find-in-result.ts');
      const { result, sizes } = await runModel([first, ...rest.slice(0, -1)], options);
      const explanation = explain(result, findInResult(result, rest.at(-1) ?? ''), sizes);
      if (options.json === true) await printJson({ ...explanation });
      else await printLines(explainText(explanation));
    });
  for (const option of modelOptions()) command.addOption(option);
}
