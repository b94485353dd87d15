import { rangesText } from './ranges-text.ts';
import type { Result, ResultFinding } from './result.ts';
import { shownText } from './shown-text.ts';
import { blank, heading, paragraph, type TextLine, type Tone } from './text-line.ts';
import { counted, plainWords, tally } from './trade-words.ts';
import { undersizedText } from './undersized-text.ts';
import { isEmpty, understoodText } from './understood-text.ts';
import { wallFitText } from './wall-fit-text.ts';

/**
 * What a coordinator needs on one screen: what was understood, the undersized pipes by cause, the other errors
 * and the warnings, notes folded to counts, then the sums and how far to trust them. Model text comes out harmless.
 * `remarks` are notes that are no findings.
 */
export function checkText(result: Result, remarks: readonly TextLine[] = []): TextLine[] {
  return [
    ...understoodText(result),
    ...undersizedText(result),
    ...otherErrors(result.findings),
    ...rangesText(result),
    ...wallFitText(result.findings),
    ...otherWarnings(result.findings),
    ...(isEmpty(result) ? [] : [blank]),
    ...foldedNotes(result.findings),
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

function otherErrors(findings: readonly ResultFinding[]): TextLine[] {
  const all = findings.filter(({ severity }) => severity === 'error');
  const errors = all.filter(({ code }) => code !== 'undersized');
  return listed(errors, errors.length < all.length ? 'Other errors' : 'Errors', 'error', 12);
}

/** Those of walls have a place of their own. */
const otherWarnings = (findings: readonly ResultFinding[]): TextLine[] =>
  listed(
    findings.filter(({ severity, code }) => severity === 'warning' && code !== 'fit-in-wall'),
    'Warnings',
    'warning',
    8,
  );

/** Sentences by kind, the most frequent kind first; many of one kind folded. */
function listed(findings: readonly ResultFinding[], title: string, tone: Tone, mostCodes: number): TextLine[] {
  if (findings.length === 0) return [];
  const codes = tally(findings.map(({ code }) => code));
  return [
    blank,
    ...heading(`${title}: ${findings.length}`),
    ...codes.slice(0, mostCodes).flatMap(([code, count]) => {
      const some = findings.filter((one) => one.code === code).slice(0, mostSentences);
      const more = count - some.length;
      return [
        ...some.flatMap((one) => paragraph(sentenceText(one), '  - ', tone)),
        ...(more === 0 ? [] : paragraph(`and ${more} more ${plainWords(code)}`, '    ', 'quiet')),
      ];
    }),
    ...(codes.length > mostCodes
      ? paragraph(`and ${codes.length - mostCodes} more kinds of ${tone}`, '  ', 'quiet')
      : []),
  ];
}

/** A sentence names its clause itself, or gets it behind. */
function sentenceText({ sentence, clause }: ResultFinding): string {
  const text = shownText(sentence);
  return clause === null || text.includes(clause) ? text : `${text} (${clause})`;
}

function foldedNotes(findings: readonly ResultFinding[]): TextLine[] {
  const notes = findings.filter(({ severity }) => severity === 'note');
  if (notes.length === 0) return [];
  const kinds = tally(notes.map(({ code }) => code)).map(([code, count]) => `${count} ${plainWords(code)}`);
  return paragraph(`Notes: ${kinds.join(', ')}.`, '', 'quiet');
}
