import type { DeskParts } from '../../deliver/desk-html.ts';
import { sha256 } from '../../deliver/sha256.ts';
import { type ModelInput, modelOf, type OpenedFile } from '../../ifc/open.ts';
import { wholeFiles } from '../../ifc/whole-files.ts';
import { matchAnswers } from '../../model/match-answers.ts';
import type { Model } from '../../model/model.ts';
import { readNamesTable } from '../../model/read-names-table.ts';
import { run } from '../../pipeline.ts';
import type { Result, SizeLabel } from '../../schedule/result.ts';
import { resultOf } from '../../schedule/result-of.ts';
import type { Outcome } from '../../verdicts/outcome.ts';
import { joined } from '../joined.ts';
import type { DeskCode } from './desk-code.ts';

/** Files of one building as they were dropped, read. */
export interface DeskBuilding {
  readonly files: readonly OpenedFile[];
  readonly model: Model;
}

export interface DeskCheck {
  readonly own: DeskCode;
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

/** The same as the command line makes of the same files, code, answers and tables. */
export function checkBuilding({ model }: DeskBuilding, own: DeskCode, { version }: DeskParts): DeskCheck {
  const { code, tables } = own;
  const answers = matchAnswers(own.answers, model, code.series, own.answersName);
  const outcome = run(model, code, answers, readNamesTable(tables));
  const sizes = code.series.sizes.filter(({ label }) => !code.omitSizes.has(label));
  return {
    own,
    outcome,
    result: resultOf(outcome, version),
    sizes: sizes.map(({ label, dn }) => ({ label, dn })),
  };
}
