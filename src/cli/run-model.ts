import { createHash } from 'node:crypto';
import { plumbingCode } from '../codes/index.ts';
import { InputError } from '../findings/input-error.ts';
import { lineNumber } from '../ifc/lines/line-index.ts';
import { modelOf, type OpenedFile, openFiles } from '../ifc/open.ts';
import { withoutOurLines } from '../ifc/write/append-sets.ts';
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
import { type InputFile, readInput, readText } from './read-input.ts';
import { localTables, ownTables } from './tables-on-disk.ts';
import { complain } from './terminal.ts';

export interface ModelRun<P> {
  readonly file: OpenedFile;
  readonly model: Model;
  readonly outcome: Outcome;
  readonly result: Result;
  /** Sizes that the code offers, smallest first. */
  readonly sizes: readonly SizeLabel[];
  /** What `before` returned. */
  readonly place: P;
}

/**
 * Everything from a path and options to a result. `before` sees the input ahead of the long part: a wrong output place
 * is said at once. The code, its tables and the answers are read first for the same reason.
 */
export async function runModel<P>(
  path: string,
  options: ModelOptions,
  before: (input: InputFile) => P | Promise<P> = () => undefined as P,
): Promise<ModelRun<P>> {
  const said = await answersOf(options);
  const tables = ownTables();
  const local = options.tables === undefined ? {} : { local: localTables(options.tables) };
  const sources = { tables, dimensions: readPipeDimensions(tables), ...local };
  const code = plumbingCode(options.code, sources, said.settings, options.answers ?? 'answers');
  const input = await readInput(path);
  const place = await before(input);
  const file = opened(input);
  const model = modelOf([file]);
  const answers = matchAnswers(said, model, code.series, options.answers ?? 'answers');
  const outcome = run(model, code, answers, readNamesTable(tables));
  const result = resultOf(outcome, programVersion());
  if (options.json === true && options.quiet !== true) warn(result);
  const sizes = code.series.sizes.filter(({ label }) => !code.omitSizes.has(label));
  return { file, model, outcome, result, sizes: sizes.map(({ label, dn }) => ({ label, dn })), place };
}

export const sha256 = (bytes: Uint8Array): Uint8Array => createHash('sha256').update(bytes).digest();

const answersOf = async ({ answers }: ModelOptions): Promise<Answers> =>
  answers === undefined ? noAnswers : readAnswers(await readText(answers), answers);

/** The file with its lines indexed. Its digest leaves out what an earlier run of ours wrote into it. */
function opened({ name, bytes }: InputFile): OpenedFile {
  const [file] = openFiles([{ name, bytes }], () => '');
  if (file === undefined) throw new Error('one file in, none out');
  const { index } = file;
  const { cutOff } = index.damage;
  if (cutOff !== null) {
    const line = lineNumber(index.bytes, cutOff.offset);
    const where = `it ends ${cutOff.where} (line ${line}, byte ${cutOff.offset})`;
    throw new InputError(file.name, `the file is cut off: ${where}; copy or export it again`);
  }
  const digest = createHash('sha256');
  for (const piece of withoutOurLines(index, sha256)) digest.update(piece);
  return { ...file, sha256: digest.digest('hex') };
}

/** In text these stand on the first lines; beside JSON they would go unseen. */
function warn({ model, models }: Result): void {
  for (const { file, remarks } of models ?? [model])
    for (const remark of remarks ?? []) complain(`warning: ${file}: ${remark}`);
}
