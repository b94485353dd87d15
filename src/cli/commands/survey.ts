import type { Command } from 'commander';
import { type ModelOptions, modelArgument, modelOptions } from '../options.ts';

interface SurveyOptions extends ModelOptions {
  readonly questions?: string;
}

export function addSurvey(program: Command): void {
  const command = program
    .command('survey')
    .summary('what is in a model, what of it can be used, and what to ask the designer')
    .description('Tells what a model holds and what the program can and cannot use of it, before anything is judged.')
    .argument('<model...>', modelArgument)
    .option('--questions <file>', 'write an answers file to fill in, most weighty question first')
    .action(async (models: readonly string[], options: SurveyOptions) => {
      const { outputPlace } = await import('../output-place.ts');
      const { runModel } = await import('../run-model.ts');
      const { printJson } = await import('../print-result.ts');
      const { printLines } = await import('../terminal.ts');
      const { writeNew } = await import('../write-new.ts');
      const { answersFormText } = await import('../../schedule/answers-form.ts');
      const { surveyOf } = await import('../../schedule/survey.ts');
      const { surveyText } = await import('../../schedule/survey-text.ts');
      const { twinsResult } = await import('../../schedule/twins.ts');
      const { questions: file } = options;
      const run = await runModel(models, options, (inputs) =>
        file === undefined ? null : outputPlace(file, inputs, false),
      );
      const twins = twinsResult(run.outcome);
      const surveyed = surveyOf(run.model, run.outcome.identities, run.result);
      const survey = twins.length === 0 ? surveyed : { ...surveyed, twins };
      if (run.place !== null && file !== undefined) {
        await writeNew(run.place, [new TextEncoder().encode(answersFormText(survey.questions))], file);
      }
      if (options.json === true) await printJson({ ...survey });
      else await printLines(surveyText(survey, run.result));
    });
  for (const option of modelOptions()) command.addOption(option);
}
