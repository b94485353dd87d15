import { oneLine, wrapped } from './shown-text.ts';

/** One line for a person to read, at most `pageColumns` wide. The tone is for colour; the words alone say everything. */
export interface TextLine {
  readonly text: string;
  readonly tone: Tone;
}
export type Tone = 'plain' | 'heading' | 'error' | 'warning' | 'good' | 'quiet';

/** Width of every text the program prints. */
export const pageColumns = 100;

export const blank: TextLine = { text: '', tone: 'plain' };
export const heading = (text: string): TextLine[] => paragraph(text, '', 'heading');

/**
 * `text` broken to the width of the page, behind `lead` on the first line and as far in, at least two columns, on the
 * others. Whatever model text has got into it stays within these lines and comes out harmless.
 */
export const paragraph = (text: string, lead = '  ', tone: Tone = 'plain'): TextLine[] =>
  // Only what the program says begins a line at the margin: a long name cannot pass for a heading.
  wrapped(oneLine(text), pageColumns, lead, lead === '' ? '  ' : undefined).map((line) => ({ text: line, tone }));

export const plainText = (lines: readonly TextLine[]): string =>
  lines.map(({ text }) => `${text.trimEnd()}\n`).join('');
