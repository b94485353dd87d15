import type { Command } from 'commander';
import { type ModelOptions, modelArgument, modelOptions } from '../options.ts';

interface WeighOptions extends ModelOptions {
  readonly battery?: string;
  readonly prices?: string;
  readonly picture?: string;
}

export function addWeigh(program: Command): void {
  const command = program
    .command('weigh')
    .summary('each battery wet vented, circuit vented and individually vented, side by side')
    .description(
      'Builds each battery of fixtures under every reading in the model’s own geometry, sizes all of them, and lays them side by side.',
    )
    .argument('<model...>', modelArgument)
    .option('--battery <id>', 'only this one, such as battery-2, or the GlobalId of one of its fixtures')
    .option('--prices <file>', 'JSON file with your own prices; quantities alone without it')
    .option('--picture <file>', 'write a cut through the wall under each reading as SVG')
    .action(async (models: readonly string[], options: WeighOptions) => {
      const { outputPlace } = await import('../output-place.ts');
      const { runModel } = await import('../run-model.ts');
      const { readText } = await import('../read-input.ts');
      const { printJson } = await import('../print-result.ts');
      const { printLines } = await import('../terminal.ts');
      const { writeNew } = await import('../write-new.ts');
      const { cavitySvg } = await import('../../schedule/cavity.ts');
      const { batteriesNamed } = await import('../../schedule/find-battery.ts');
      const { readPrices } = await import('../../schedule/prices.ts');
      const { weighResult } = await import('../../schedule/weigh-result.ts');
      const { weighText } = await import('../../schedule/weigh-text.ts');
      const { weighEach } = await import('../../study/weigh.ts');
      const priceFile = options.prices === undefined ? null : await readText(options.prices);
      const { picture } = options;
      const { outcome, result, place } = await runModel(models, options, (inputs) =>
        picture === undefined ? null : outputPlace(picture, inputs, false),
      );
      const prices = priceFile === null ? null : readPrices(priceFile, options.prices ?? '', outcome.code.series);
      const chosen = batteriesNamed(outcome, result, options.battery);
      const weighed = weighResult(outcome, result, weighEach(outcome, chosen), prices);
      if (place !== null && picture !== undefined)
        await writeNew(place, [new TextEncoder().encode(cavitySvg(weighed))], picture);
      if (options.json === true) await printJson({ ...weighed });
      else await printLines(weighText(weighed));
    });
  for (const option of modelOptions()) command.addOption(option);
}
