import { Option } from 'commander';
import { standardCode } from '../schedule/code-book.ts';

/** What every verb that reads a model takes. */
export interface ModelOptions {
  readonly code: string;
  readonly answers?: string;
  readonly tables?: string;
  readonly json?: boolean;
  readonly lean?: boolean;
  readonly quiet?: boolean;
}

export const modelArgument =
  'IFC file (.ifc, .ifc.gz, .ifczip), or - for standard input; several are read as one building';

/** Made anew for each verb: commander keeps state in them. */
export const modelOptions = (): Option[] => [
  new Option('--code <id>', 'plumbing code and edition; `drainwright codes` lists them').default(standardCode),
  new Option('--answers <file>', 'JSON file with what you know and the model does not say'),
  ...tableOptions(),
  new Option('--json', 'print the result as JSON, by its published schema'),
  new Option('--lean', 'with --json: without the lists of ids, which grow with depth'),
  new Option('--quiet', 'no warnings on standard error'),
];

export const tableOptions = (): Option[] => [
  new Option('--tables <folder>', 'corrected or local tables, laid over ours; the trail says so'),
];
