import { createHash } from 'node:crypto';
import { type CodeSources, plumbingCode } from '../codes/index.ts';
import { modelOf, type OpenedFile } from '../ifc/open.ts';
import { wholeFiles } from '../ifc/whole-files.ts';
import { type Answers, noAnswers } from '../model/answers.ts';
import { matchAnswers } from '../model/match-answers.ts';
import type { Model } from '../model/model.ts';
import { readAnswers } from '../model/read-answers.ts';
import { readNamesTable } from '../model/read-names-table.ts';
import { run } from '../pipeline.ts';
import type { Result, SizeLabel } from '../schedule/result.ts';
import { resultOf } from '../schedule/result-of.ts';
import { readPipeDimensions } from '../tables/read-pipe-dimensions.ts';
import type { Outcome } from '../verdicts/outcome.ts';
import type { ModelOptions } from './options.ts';
import { programVersion } from './program-version.ts';
import { type InputFile, readInputs, readText } from './read-input.ts';
import { localTables, ownTables } from './tables-on-disk.ts';
import { complain } from './terminal.ts';

export interface ModelRun<P> {
  /** In the order given; the model counts its files alike. */
  readonly files: readonly OpenedFile[];
  readonly model: Model;
  readonly outcome: Outcome;
  readonly result: Result;
  /** Sizes that the code offers, smallest first. */
  readonly sizes: readonly SizeLabel[];
  /** What `before` returned. */
  readonly place: P;
}

/**
 * Everything from the paths of one building's files and options to a result. `before` sees the inputs ahead of the long
 * part: a wrong output place is said at once. The code, its tables and the answers are read first for the same reason.
 */
export async function runModel<P>(
  paths: readonly string[],
  options: ModelOptions,
  before: (inputs: readonly InputFile[]) => P | Promise<P> = () => undefined as P,
): Promise<ModelRun<P>> {
  const said = await answersOf(options);
  const sources = sourcesOf(options);
  const code = plumbingCode(options.code, sources, said.settings, options.answers ?? 'answers');
  const inputs = await readInputs(paths);
  const place = await before(inputs);
  const files = opened(inputs);
  const model = modelOf(files);
  const answers = matchAnswers(said, model, code.series, options.answers ?? 'answers');
  const outcome = run(model, code, answers, readNamesTable(sources.tables));
  const result = resultOf(outcome, programVersion());
  if (options.json === true && options.quiet !== true) warn(result);
  const sizes = code.series.sizes.filter(({ label }) => !code.omitSizes.has(label));
  return { files, model, outcome, result, sizes: sizes.map(({ label, dn }) => ({ label, dn })), place };
}

export const sha256 = (bytes: Uint8Array): Uint8Array => createHash('sha256').update(bytes).digest();

/** Our tables, and those the user lays over them. */
export function sourcesOf(options: ModelOptions): CodeSources {
  const tables = ownTables();
  const local = options.tables === undefined ? {} : { local: localTables(options.tables) };
  return { tables, dimensions: readPipeDimensions(tables), ...local };
}

export const answersOf = async ({ answers }: ModelOptions): Promise<Answers> =>
  answers === undefined ? noAnswers : readAnswers(await readText(answers), answers);

/** The files with their lines indexed, each with its digest. */
export const opened = (inputs: readonly InputFile[]): OpenedFile[] =>
  wholeFiles(inputs, {
    sha256,
    hexOf(pieces) {
      const digest = createHash('sha256');
      for (const piece of pieces) digest.update(piece);
      return digest.digest('hex');
    },
  });

/** In text these stand on the first lines; beside JSON they would go unseen. */
function warn({ model, models }: Result): void {
  for (const { file, remarks } of models ?? [model])
    for (const remark of remarks ?? []) complain(`warning: ${file}: ${remark}`);
}
