import type { Finding } from '../findings/finding.ts';
import { onlyIfText, sentences } from '../findings/sentences.ts';
import type { ElementId } from '../model/model.ts';
import type { Outcome } from '../verdicts/outcome.ts';
import { decimal, lengthText, slopeText } from './number-text.ts';
import type { ResultFinding } from './result.ts';
import type { ResultIndex } from './result-index.ts';
import { printedFacts } from './result-trail.ts';
import { shortened, shownText } from './shown-text.ts';

const order = { error: 0, warning: 1, note: 2 } as const;

/** Errors, then warnings, then notes; inside by code, then by the first element's GlobalId. */
export function resultFindings(outcome: Outcome, index: ResultIndex): ResultFinding[] {
  return outcome.findings
    .map((finding) => resultFinding(outcome, index, finding))
    .sort(
      (a, b) =>
        order[a.severity] - order[b.severity] ||
        compare(a.code, b.code) ||
        compare(a.about[0] ?? '', b.about[0] ?? '') ||
        compare(a.sentence, b.sentence),
    );
}

/** One finding of an outcome as it is published. */
export function resultFinding(outcome: Outcome, index: ResultIndex, finding: Finding): ResultFinding {
  const { code } = outcome;
  const sentence = sentences[finding.code]({
    facts: finding.facts,
    about: finding.about.map((element) => elementName(outcome, element as ElementId)),
    clause: finding.clause === undefined ? '' : ` (${code.id}, ${finding.clause})`,
    unit: code.unit,
    length: lengthText,
    slope: slopeText,
    number: (value) => decimal(value, 2),
  });
  return {
    code: finding.code,
    severity: finding.severity,
    about: finding.about.map((element) => index.idOf(element as ElementId)),
    facts: printedFacts(outcome, index, finding.facts),
    clause: finding.clause ?? null,
    sentence: sentence + onlyIfText(finding.facts),
  };
}

/** What a sentence calls an element: its name, else its type or class. */
export function elementName({ model }: Pick<Outcome, 'model'>, element: ElementId): string {
  const { name, objectType, ifcClass, stepId } = model.elements[element]!;
  return shortened(shownText(name || objectType || `${ifcClass.replace(/^Ifc/, '')} #${stepId}`), 48);
}

const compare = (a: string, b: string): number => (a < b ? -1 : a > b ? 1 : 0);
