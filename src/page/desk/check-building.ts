import { plumbingCode } from '../../codes/index.ts';
import type { PlumbingCode } from '../../codes/plumbing-code.ts';
import type { DeskParts } from '../../deliver/desk-html.ts';
import { sha256 } from '../../deliver/sha256.ts';
import { type ModelInput, modelOf, type OpenedFile } from '../../ifc/open.ts';
import { wholeFiles } from '../../ifc/whole-files.ts';
import { noAnswers } from '../../model/answers.ts';
import { matchAnswers } from '../../model/match-answers.ts';
import type { Model } from '../../model/model.ts';
import { readNamesTable } from '../../model/read-names-table.ts';
import { run } from '../../pipeline.ts';
import type { Result, SizeLabel } from '../../schedule/result.ts';
import { resultOf } from '../../schedule/result-of.ts';
import { readPipeDimensions } from '../../tables/read-pipe-dimensions.ts';
import type { TableSource } from '../../tables/table-source.ts';
import type { Outcome } from '../../verdicts/outcome.ts';
import { joined } from './joined.ts';

/** Files of one building as they were dropped, read. */
export interface DeskBuilding {
  readonly files: readonly OpenedFile[];
  readonly model: Model;
}

export interface DeskCheck {
  readonly outcome: Outcome;
  readonly result: Result;
  /** Sizes that the code offers, smallest first. */
  readonly sizes: readonly SizeLabel[];
}

/** The files with their lines indexed. Throws an InputError as the command line does. */
export const openBuilding = (inputs: readonly ModelInput[]): readonly OpenedFile[] =>
  wholeFiles(inputs, {
    sha256,
    hexOf: (pieces) => [...sha256(joined(pieces))].map((byte) => byte.toString(16).padStart(2, '0')).join(''),
  });

export const readBuilding = (files: readonly OpenedFile[]): DeskBuilding => ({ files, model: modelOf(files) });

/** The same as the command line makes of the same files with this code and no answers. */
export function checkBuilding({ model }: DeskBuilding, codeId: string, parts: DeskParts): DeskCheck {
  const tables = tablesOf(parts);
  const code = codeOf(codeId, parts);
  const answers = matchAnswers(noAnswers, model, code.series, 'answers');
  const outcome = run(model, code, answers, readNamesTable(tables));
  const sizes = code.series.sizes.filter(({ label }) => !code.omitSizes.has(label));
  return {
    outcome,
    result: resultOf(outcome, parts.version),
    sizes: sizes.map(({ label, dn }) => ({ label, dn })),
  };
}

/** One of the codes that the page carries, as it is without settings. */
export function codeOf(id: string, parts: DeskParts): PlumbingCode {
  const tables = tablesOf(parts);
  return plumbingCode(id, { tables, dimensions: readPipeDimensions(tables) }, noAnswers.settings, 'answers');
}

function tablesOf({ tables }: DeskParts): TableSource {
  const paths = Object.keys(tables).sort();
  return {
    list: () => paths,
    read(path) {
      if (!Object.hasOwn(tables, path)) throw new Error(`the page holds no table ${path}`);
      return tables[path];
    },
  };
}
