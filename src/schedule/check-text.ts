import { rangesText } from './ranges-text.ts';
import type { Result, ResultFinding } from './result.ts';
import { shownText } from './shown-text.ts';
import { blank, heading, paragraph, type TextLine, type Tone } from './text-line.ts';
import { counted, plainWords, tally } from './trade-words.ts';
import { undersizedText } from './undersized-text.ts';
import { isEmpty, understoodText } from './understood-text.ts';
import { wallFitText } from './wall-fit-text.ts';

/**
 * What a coordinator needs on one screen: what was understood, the undersized pipes by cause, the other errors,
 * warnings folded to counts, then the sums and how far to trust them. Model text comes out harmless.
 * `remarks` are notes that are no findings.
 */
export function checkText(result: Result, remarks: readonly TextLine[] = []): TextLine[] {
  return [
    ...understoodText(result),
    ...undersizedText(result),
    ...otherErrors(result.findings),
    ...rangesText(result),
    ...wallFitText(result.findings),
    ...(isEmpty(result) ? [] : [blank]),
    ...foldedText(result.findings, 'warning', 'Warnings'),
    ...foldedText(result.findings, 'note', 'Notes'),
    ...remarks,
    ...(isEmpty(result) ? [] : [...sumsText(result), ...paragraph(shownText(result.caution), '', 'quiet')]),
  ];
}

/** Errors, warnings and verdicts in two lines, and what the sizes rest on. */
export const sumsText = (result: Result): TextLine[] =>
  sums(result).flatMap(({ text, lead, tone }) => paragraph(text, lead, tone));

/** The same as sentences, each by itself. */
export function sums({ pipes, findings, code }: Result): { text: string; lead: string; tone: Tone }[] {
  const count = (severity: string): number => findings.filter((finding) => finding.severity === severity).length;
  const verdicts = { undersized: 0, agrees: 0, oversized: 0, unknown: 0 };
  for (const { verdict } of pipes) verdicts[verdict]++;
  const errors = count('error');
  const unsure = tally(pipes.flatMap(({ reason, verdict }) => (verdict === 'unknown' && reason ? [reason] : [])));
  const provisional = pipes.filter((pipe) => pipe.provisional).length;
  const memory = pipes.filter(({ trail }) => trail.some(({ governs, trust }) => governs && trust === 'memory')).length;
  const line = (text: string, tone: Tone, lead = ''): ReturnType<typeof sums>[number] => ({ text, lead, tone });
  return [
    line(
      `${counted(errors, 'error')}, ${counted(count('warning'), 'warning')}, ${counted(count('note'), 'note')}. ` +
        `Of ${counted(pipes.length, 'pipe')} ${verdicts.undersized} undersized, ${verdicts.agrees} as required, ` +
        `${verdicts.oversized} oversized, ${verdicts.unknown} unknown.`,
      errors > 0 ? 'error' : 'good',
    ),
    ...unsure
      .slice(0, mostReasons)
      .map(([reason, times]) => line(`${times} unknown: ${shownText(reason)}`, 'warning', '  ')),
    ...(provisional === 0
      ? []
      : [line(`${counted(provisional, 'size')} provisional: a figure of the code could not be read.`, 'warning')]),
    ...(memory === 0
      ? []
      : [
          line(
            `${memory} of ${counted(pipes.length, 'size')} rest on figures not yet checked against print ` +
              `(drainwright codes ${code.id}).`,
            'quiet',
          ),
        ]),
  ];
}

const mostReasons = 4;
const mostSentences = 3;
const mostCodes = 12;

function otherErrors(findings: readonly ResultFinding[]): TextLine[] {
  const errors = findings.filter(({ severity, code }) => severity === 'error' && code !== 'undersized');
  if (errors.length === 0) return [];
  const codes = tally(errors.map(({ code }) => code));
  return [
    blank,
    ...heading(
      `${errors.length < findings.filter(({ severity }) => severity === 'error').length ? 'Other errors' : 'Errors'}: ${errors.length}`,
    ),
    ...codes.slice(0, mostCodes).flatMap(([code, count]) => {
      const some = errors.filter((error) => error.code === code).slice(0, mostSentences);
      const more = count - some.length;
      return [
        ...some.flatMap((error) => paragraph(sentenceText(error), '  - ', 'error')),
        ...(more === 0 ? [] : paragraph(`and ${more} more ${plainWords(code)}`, '    ', 'quiet')),
      ];
    }),
    ...(codes.length > mostCodes
      ? paragraph(`and ${codes.length - mostCodes} more kinds of error`, '  ', 'quiet')
      : []),
  ];
}

/** A sentence names its clause itself, or gets it behind. */
function sentenceText({ sentence, clause }: ResultFinding): string {
  const text = shownText(sentence);
  return clause === null || text.includes(clause) ? text : `${text} (${clause})`;
}

function foldedText(findings: readonly ResultFinding[], severity: string, title: string): TextLine[] {
  const some = findings.filter((finding) => finding.severity === severity);
  if (some.length === 0) return [];
  const kinds = tally(some.map(({ code }) => code)).map(([code, count]) => `${count} ${plainWords(code)}`);
  const tone = severity === 'warning' ? 'warning' : 'quiet';
  return paragraph(`${title}: ${kinds.join(', ')}.`, '', tone);
}
