import type { PlumbingCode } from '../codes/plumbing-code.ts';
import type { Outcome } from '../verdicts/outcome.ts';
import type { Result } from './result.ts';
import { resultAnswers } from './result-answers.ts';
import { battery, joints, systems } from './result-batteries.ts';
import { counts, elements } from './result-elements.ts';
import { resultFindings } from './result-findings.ts';
import { resultFixtures } from './result-fixtures.ts';
import { resultIndex } from './result-index.ts';
import { resultPipes } from './result-pipes.ts';

/** The published result of one run. The same outcome gives the same bytes: every list has a stated order. */
export function resultOf(outcome: Outcome, version: string): Result {
  const index = resultIndex(outcome);
  const answered = resultAnswers(outcome);
  const { model, code, answers, shown } = outcome;
  const files = model.files.map((file) => ({
    file: file.name,
    sha256: file.sha256,
    schema: file.schema,
    lengthUnit: file.lengthUnit.name,
    ...(file.remarks.length === 0 ? {} : { remarks: file.remarks }),
  }));
  return {
    format: 'drainwright-result',
    version: 1,
    program: { name: 'drainwright', version },
    model: files[0]!,
    ...(files.length > 1 ? { models: files } : {}),
    code: {
      id: code.id,
      title: code.title,
      edition: code.edition,
      unit: code.unit,
      ...(code.localTables.length === 0 ? {} : { localTables: code.localTables }),
    },
    settings: answers.settings,
    ...(answered.length === 0 ? {} : { answers: answered }),
    counts: counts(outcome),
    elements: elements(outcome),
    fixtures: resultFixtures(outcome, index),
    pipes: resultPipes(outcome, index),
    batteries: shown.roles.batteries.map((one) => battery(one, outcome, index)),
    joints: joints(outcome, index),
    systems: systems(outcome, index),
    findings: resultFindings(outcome, index),
    unresolved: unresolved(outcome),
    caution: cautionFor(code),
  };
}

function unresolved({ model, network }: Outcome): Result['unresolved'] {
  return network.fates.flatMap(({ use, reason }, element) => {
    const { globalId, stepId } = model.elements[element]!;
    return use === 'unresolved' ? [{ globalId, stepId, reason: reason ?? 'not said' }] : [];
  });
}

/** Shown on every deliverable: what is not checked, and who decides. */
export const cautionFor = ({ unchecked }: Pick<PlumbingCode, 'unchecked'>): string =>
  'Sizes follow from the model and from tables that are not all checked against print. ' +
  (unchecked.length === 0 ? '' : `Not checked, since a model does not tell it: ${unchecked.join('; ')}. `) +
  'Undersized drains and vents let sewer gas in: have a licensed person check every size, and ask the authority having ' +
  'jurisdiction; the local code decides.';
