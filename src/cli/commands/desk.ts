import type { Command } from 'commander';

export function addDesk(program: Command): void {
  program
    .command('desk')
    .summary('the same page, empty: drop a model on it and it is checked in the browser')
    .description(
      'Writes one HTML file that checks any model dropped on it, with no network: sizes, page, sized IFC, issues, take-off and result.',
    )
    .requiredOption('-o, --out <file>', 'the page to write')
    .action(async ({ out }: { readonly out: string }) => {
      const { outputPlace } = await import('../output-place.ts');
      const { deskOf } = await import('../desk-of.ts');
      const { writeNew } = await import('../write-new.ts');
      const { printLines } = await import('../terminal.ts');
      const { deskText } = await import('../../schedule/size-text.ts');
      const written = await writeNew(await outputPlace(out, [], false), [deskOf()], out);
      await printLines(deskText(written));
    });
}
