import type { Explanation } from './explain.ts';
import { shownText } from './shown-text.ts';
import { blank, paragraph, type TextLine } from './text-line.ts';

/** The story of an explanation as lines: the first sentence as heading, the caution last. */
export function explainText({ story, caution, code, models }: Explanation): TextLine[] {
  const [first = '', ...rest] = story;
  return [
    ...paragraph(first, '', 'heading'),
    ...rest.flatMap((sentence) => paragraph(sentence)),
    blank,
    ...(models ?? []).flatMap(({ file, sha256 }) => paragraph(`${shownText(file)}: SHA-256 ${sha256}`, '', 'quiet')),
    ...paragraph(`By ${code.title} ${code.edition} (${code.id}). ${caution}`, '', 'quiet'),
  ];
}
