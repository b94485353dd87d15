import { shortened, shownText } from './shown-text.ts';
import type { Survey, SurveyTerminal } from './survey.ts';
import { paragraph, type TextLine } from './text-line.ts';
import { counted, countedKinds, plainWords } from './trade-words.ts';
import { row } from './understood-text.ts';

const mostShown = 4;
const longestEvidence = 60;

/** Fixtures that no drain reaches, and kinds that a person should look at; nothing where there are none. */
export function terminalsText({ terminals }: Survey): TextLine[] {
  const stray = terminals.filter(({ part, use, joined }) => part === 'fixture' && use === 'fixture' && !joined);
  const weak = terminals.filter(
    (terminal) => terminal.weak && terminal.part === 'fixture' && terminal.use === 'fixture',
  );
  const shown = weak.slice(0, mostShown).map(doubtText);
  const more = weak.length > shown.length ? [`and ${weak.length - shown.length} more`] : [];
  return [
    ...(stray.length === 0
      ? []
      : paragraph(
          `${counted(stray.length, 'fixture')} without a drain pipe: ${countedKinds(stray.map(kindText))}`,
          row('No drain'),
          'warning',
        )),
    ...(weak.length === 0 ? [] : paragraph([...shown, ...more].join('; '), row('To look at'), 'warning')),
  ];
}

const kindText = ({ kind }: SurveyTerminal): string => plainWords(kind ?? 'unidentified');

/** `#120 "Basin 4" read as lavatory by name "Basin 4"`. */
const doubtText = ({ stepId, evidence, kind }: SurveyTerminal): string =>
  `#${stepId} is ${kind === null ? 'of unknown kind' : `read as ${plainWords(kind)}`} by ${shortened(shownText(evidence), longestEvidence)}`;
