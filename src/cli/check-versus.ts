import { plumbingCode } from '../codes/index.ts';
import { settingsOf } from '../codes/settings-of.ts';
import { modelOf } from '../ifc/open.ts';
import type { Answers } from '../model/answers.ts';
import { answersIn } from '../model/answers-in.ts';
import { matchAnswers } from '../model/match-answers.ts';
import type { Model } from '../model/model.ts';
import { readNamesTable } from '../model/read-names-table.ts';
import { run } from '../pipeline.ts';
import { resultOf } from '../schedule/result-of.ts';
import { type VersusInput, versusResult } from '../schedule/versus-result.ts';
import { versusText } from '../schedule/versus-text.ts';
import { openCode } from '../tables/open-family.ts';
import type { ModelOptions } from './options.ts';
import { printJson } from './print-result.ts';
import { programVersion } from './program-version.ts';
import { readInputs } from './read-input.ts';
import { answersOf, opened, sourcesOf } from './run-model.ts';
import { printLines } from './terminal.ts';

/** `check --versus`: one model under two codes. True where the first finds errors. */
export async function checkVersus(paths: readonly string[], options: ModelOptions, other: string): Promise<boolean> {
  const said = await answersOf(options);
  const where = options.answers ?? 'answers';
  const sources = sourcesOf(options);
  const families = [options.code, other].map((id) => openCode(sources.tables, id, sources.local));
  const known = families.map((family) => settingsOf(family, said.settings));
  // What neither knows is refused as it would be for one code.
  const strange = Object.entries(said.settings).filter(([id]) => known.every((one) => one[id] === undefined));
  const codes = [options.code, other].map((id, at) =>
    plumbingCode(id, sources, at === 0 ? { ...known[at], ...Object.fromEntries(strange) } : known[at]!, where),
  );
  const model = modelOf(opened(await readInputs(paths)));
  const names = readNamesTable(sources.tables);
  const input = (at: 0 | 1): VersusInput => {
    const code = codes[at]!;
    const answers = { ...answersFor(said, model, codes, at, where), settings: known[at]! };
    const outcome = run(model, code, answers, names);
    const only = Object.keys(known[at]!).filter((id) => known[1 - at]![id] === undefined);
    return { outcome, result: resultOf(outcome, programVersion()), only };
  };
  const [first, second] = [input(0), input(1)];
  const result = versusResult(first, second);
  if (options.json === true) await printJson({ ...result });
  else await printLines(versusText(result, first.result));
  return result.counts.errors.code > 0;
}

/** A size that only the other code's series has was said for that one; one that neither has is refused. */
function answersFor(
  said: Answers,
  model: Model,
  codes: readonly { readonly series: Parameters<typeof answersIn>[0] }[],
  at: 0 | 1,
  where: string,
): Answers {
  const series = codes[at]!.series;
  const others = answersIn(codes[1 - at]!.series, said);
  const own = answersIn(series, said);
  const isStrange = (key: string, part: 'pipes' | 'fixtures'): boolean => {
    const size = (answers: Answers): string | undefined =>
      part === 'pipes' ? answers.pipes.get(key)?.size : answers.fixtures.get(key)?.trapSize;
    return size(said) !== undefined && size(own) === undefined && size(others) === undefined;
  };
  const strange =
    [...said.pipes.keys()].some((key) => isStrange(key, 'pipes')) ||
    [...said.fixtures.keys()].some((key) => isStrange(key, 'fixtures'));
  return matchAnswers(strange ? said : own, model, series, where);
}
