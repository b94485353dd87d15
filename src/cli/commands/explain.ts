import type { Command } from 'commander';
import { type ModelOptions, modelArgument, modelOptions } from '../options.ts';

interface ExplainOptions extends ModelOptions {
  readonly if?: string;
}

const whatIfHelp =
  'what would change: "size 3 in", "slope 1:50", "reading circuit-vent", "kind urinal stall", "add 2 floor-drain", "code npc-2015"; several with ; between them';

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
    .option('--if <words>', whatIfHelp)
    .action(async (first: string, rest: readonly string[], options: ExplainOptions) => {
      const { plumbingCode } = await import('../../codes/index.ts');
      const { runModel, sourcesOf } = await import('../run-model.ts');
      const { printJson } = await import('../print-result.ts');
      const { printLines } = await import('../terminal.ts');
      const { explain } = await import('../../schedule/explain.ts');
      const { explainText } = await import('../../schedule/explain-text.ts');
      const { findInResult } = await import('../../schedule/find-in-result.ts');
      const { marginOfPipe } = await import('../../schedule/margin.ts');
      const { whatIfResult, whatIfText } = await import('../../schedule/what-if.ts');
      const { readWhatIf } = await import('../../schedule/what-if-words.ts');
      const { whatIf } = await import('../../study/what-if.ts');
      const { result, outcome, sizes } = await runModel([first, ...rest.slice(0, -1)], options);
      const found = findInResult(result, rest.at(-1) ?? '');
      const asked = options.if === undefined ? [] : readWhatIf(options.if, found, outcome);
      const different =
        asked.length === 0
          ? null
          : whatIfResult(
              outcome,
              whatIf(
                outcome,
                asked.map(({ edit }) => edit),
                (id) => plumbingCode(id, sourcesOf(options), outcome.answers.settings, options.answers ?? 'answers'),
              ),
              asked.map(({ words }) => words),
            );
      const plain = explain(result, found, sizes);
      const more = found.kind === 'pipe' ? marginOfPipe(outcome, found.pipe.globalId) : null;
      const explanation = {
        ...plain,
        story: [...plain.story, ...(more?.sentences ?? [])],
        ...(more === null ? {} : { margin: more.margin }),
        ...(different === null ? {} : { whatIf: different }),
      };
      if (options.json === true) await printJson(explanation);
      else
        await printLines([...explainText(explanation), ...(different === null ? [] : whatIfText(different, result))]);
    });
  for (const option of modelOptions()) command.addOption(option);
}
