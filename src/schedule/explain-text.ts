import type { Explanation } from './explain.ts';
import { blank, paragraph, type TextLine } from './text-line.ts';

/** The story of an explanation as lines: the first sentence as heading, the caution last. */
export function explainText({ story, caution, code }: Explanation): TextLine[] {
  const [first = '', ...rest] = story;
  return [
    ...paragraph(first, '', 'heading'),
    ...rest.flatMap((sentence) => paragraph(sentence)),
    blank,
    ...paragraph(`By ${code.title} ${code.edition} (${code.id}). ${caution}`, '', 'quiet'),
  ];
}
