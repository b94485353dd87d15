import { type Command, Option } from 'commander';
import { tableOptions } from '../options.ts';

interface CodesOptions {
  readonly tables?: string;
  readonly json?: boolean;
  readonly verify?: boolean;
}

export function addCodes(program: Command): void {
  const command = program
    .command('codes')
    .summary('the plumbing codes and their tables, each figure with its source')
    .description(
      'Lists the plumbing codes, the tables of one, or every cell of a table with its source and how far to trust it.',
    )
    .argument('[id]', 'a code, such as npc-2020')
    .argument('[table]', 'one of its tables, by id or printed number, such as branch or 2.4.10.6.-B')
    .option('--verify', 'what to look at first with the printed code in hand')
    .addOption(new Option('--json', 'print as JSON'))
    .addOption(new Option('--quiet', 'no warnings on standard error'))
    .action(async (id: string | undefined, table: string | undefined, options: CodesOptions) => {
      const { codeBook } = await import('../code-book-of.ts');
      const { printJson } = await import('../print-result.ts');
      const { printLines } = await import('../terminal.ts');
      const { data, lines } = codeBook(id, table, options);
      if (options.json === true) await printJson(data);
      else await printLines(lines());
    });
  for (const option of tableOptions()) command.addOption(option);
}
