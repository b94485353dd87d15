import { sumsText } from './check-text.ts';
import type { Result } from './result.ts';
import { blank, paragraph, type TextLine } from './text-line.ts';
import { counted } from './trade-words.ts';
import { undersizedText } from './undersized-text.ts';
import { titleText } from './understood-text.ts';

/** A file that was written, for the summary: path as the user gave it. */
export interface WrittenFile {
  readonly path: string;
  readonly bytes: number;
  readonly sha256: string;
}

/** What `size` tells: the undersized pipes, the sums, and what was written where, a file for each that owns something. */
export function sizeText(result: Result, files: readonly WrittenFile[]): TextLine[] {
  const { pipes, fixtures } = result;
  const sets = `property sets on ${counted(pipes.length, 'pipe')} and ${counted(fixtures.length, 'fixture')}`;
  return [
    ...titleText(result),
    ...undersizedText(result),
    blank,
    ...sumsText(result),
    ...files.flatMap((file, place) => {
      const isLast = place === files.length - 1;
      return paragraph(`Written: ${writtenText(file)}${isLast ? `; ${sets}` : ''}.`, '', 'good');
    }),
    ...caution(result),
  ];
}

/** What `view` tells: the sums, and where the page is. */
export function viewText(result: Result, file: WrittenFile): TextLine[] {
  const page = `Written: ${writtenText(file)}; open it in a browser, it needs no network.`;
  return [...titleText(result), ...sumsText(result), ...paragraph(page, '', 'good'), ...caution(result)];
}

/** What `desk` tells: where the empty page is and what one does with it. */
export const deskText = (file: WrittenFile): TextLine[] =>
  paragraph(
    `Written: ${writtenText(file)}; open it in a browser and drop a model on it. It needs no network, and the model does not leave the machine.`,
    '',
    'good',
  );

/** What `report` tells: the sums, and where the report is. */
export const reportText = (result: Result, file: WrittenFile): TextLine[] => [
  ...titleText(result),
  ...sumsText(result),
  ...paragraph(`Written: ${writtenText(file)}.`, '', 'good'),
  ...caution(result),
];

const writtenText = ({ path, bytes, sha256 }: WrittenFile): string => `${path} (${bytes} bytes, SHA-256 ${sha256})`;

const caution = ({ caution: words }: Result): TextLine[] => paragraph(words, '', 'quiet');
