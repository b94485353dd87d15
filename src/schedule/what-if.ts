import type { ElementId } from '../model/model.ts';
import type { PipeSeen, WhatIf } from '../study/what-if.ts';
import { unitsOf } from '../units/quantity.ts';
import type { Outcome } from '../verdicts/outcome.ts';
import { elementNames } from './element-names.ts';
import { loadText } from './number-text.ts';
import type { LoadRange, Result, ResultFinding, SizeLabel } from './result.ts';
import { resultFinding } from './result-findings.ts';
import { resultIndex } from './result-index.ts';
import { shownText } from './shown-text.ts';
import { heading, paragraph, type TextLine } from './text-line.ts';
import { counted, plainWords } from './trade-words.ts';

/** What would be different: plain JSON, for people and for the page. */
export interface WhatIfResult {
  /** What was asked, as it was read. */
  readonly asked: readonly string[];
  /** In the order of the model. */
  readonly changes: readonly PipeWhatIf[];
  /** Errors and warnings that go and come. */
  readonly gone: readonly ResultFinding[];
  readonly come: readonly ResultFinding[];
}

export interface PipeWhatIf {
  readonly globalId: string;
  readonly from: PipeState;
  readonly to: PipeState;
}

export interface PipeState {
  readonly verdict: string;
  readonly role: string;
  /** null: no size holds it, or none is asked. */
  readonly required: SizeLabel | null;
  readonly load: LoadRange;
}

export function whatIfResult(
  before: Outcome,
  { outcome, changes, gone, come }: WhatIf,
  asked: readonly string[],
): WhatIfResult {
  const index = resultIndex(outcome);
  const old = resultIndex(before);
  const state = ({ verdict, role, required, load }: PipeSeen): PipeState => ({
    verdict,
    role,
    // By another code a size may stand in another series.
    required: required === null ? null : before.code.series.has(required) ? old.size(required) : index.size(required),
    load: { least: unitsOf(load.least), most: unitsOf(load.most) },
  });
  return {
    asked,
    changes: changes.map(({ element, from, to }) => ({
      globalId: old.idOf(element as ElementId),
      from: state(from),
      to: { ...state(to), required: to.required === null ? null : index.size(to.required) },
    })),
    gone: gone.map((finding) => resultFinding(before, old, finding)),
    come: come.map((finding) => resultFinding(outcome, index, finding)),
  };
}

const mostPipes = 12;
const mostFindings = 6;

/** For a person: sizes and verdicts that change, then findings. */
export function whatIfText({ asked, changes, gone, come }: WhatIfResult, result: Result): TextLine[] {
  const names = elementNames(result);
  const told = changes.filter(
    ({ from, to }) => from.required?.label !== to.required?.label || from.verdict !== to.verdict,
  );
  const silent = changes.length - told.length;
  const rest =
    silent === 0
      ? ''
      : `; ${counted(silent, 'more pipe')} ${silent === 1 ? 'carries' : 'carry'} another load or role at the same size`;
  return [
    ...heading(`If ${asked.join(', and ')}:`),
    ...paragraph(
      `${told.length === 0 ? 'no size and no verdict changes' : `${counted(told.length, 'pipe')} ${told.length === 1 ? 'changes' : 'change'}`}${rest}.`,
    ),
    ...told
      .slice(0, mostPipes)
      .flatMap(({ globalId, from, to }) =>
        paragraph(
          `${names.of(globalId)} (${plainWords(to.role)}): ${changeText(from, to, result.code.unit)}`,
          '  - ',
          to.verdict === 'undersized' ? 'error' : from.verdict === 'undersized' ? 'good' : 'plain',
        ),
      ),
    ...(told.length > mostPipes ? paragraph(`and ${told.length - mostPipes} more`, '    ', 'quiet') : []),
    ...findingsText('New', come, 'error'),
    ...findingsText('Gone', gone, 'good'),
  ];
}

function changeText(from: PipeState, to: PipeState, unit: string): string {
  const size = (one: PipeState): string => one.required?.label ?? 'no size';
  const needs = size(from) === size(to) ? `needs ${size(to)} as before` : `needs ${size(to)} instead of ${size(from)}`;
  const load =
    from.load.most === to.load.most ? '' : ` for ${loadText(to.load, unit)} instead of ${loadText(from.load, unit)}`;
  const verdict =
    from.verdict === to.verdict
      ? ''
      : `; now ${verdicts[to.verdict] ?? to.verdict}, it was ${verdicts[from.verdict] ?? from.verdict}`;
  return `${needs}${load}${verdict}`;
}

const verdicts: Readonly<Record<string, string>> = {
  undersized: 'undersized',
  agrees: 'as required',
  oversized: 'larger than required',
  unknown: 'no verdict',
};

function findingsText(title: string, findings: readonly ResultFinding[], tone: 'error' | 'good'): TextLine[] {
  // Sizes are told above, pipe by pipe.
  const others = findings.filter(({ code }) => code !== 'undersized');
  if (others.length === 0) return [];
  return [
    ...paragraph(`${title}: ${counted(others.length, 'finding')}`),
    ...others.slice(0, mostFindings).flatMap(({ sentence }) => paragraph(shownText(sentence), '  - ', tone)),
    ...(others.length > mostFindings ? paragraph(`and ${others.length - mostFindings} more`, '    ', 'quiet') : []),
  ];
}
