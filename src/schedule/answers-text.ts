import { elementNames } from './element-names.ts';
import { slopeText } from './number-text.ts';
import type { Result, ResultAnswer } from './result.ts';
import { shownText } from './shown-text.ts';
import { counted, plainWords } from './trade-words.ts';

/** What the user set and answered, a few words each: it stands on everything that is handed on. */
export function answerTexts(result: Result): string[] {
  const names = elementNames(result);
  const settings = Object.entries(result.settings).map(
    ([name, value]) => `${shownText(name)} ${shownText(Array.isArray(value) ? value.join(', ') : String(value))}`,
  );
  return [...settings, ...(result.answers ?? []).map((answer) => answerText(answer, names.of))];
}

function answerText({ part, key, field, value, meets }: ResultAnswer, nameOf: (globalId: string) => string): string {
  const isPattern = key.startsWith('name:');
  const who = isPattern
    ? `${shownText(key.slice('name:'.length))} (${counted(meets, part === 'pipes' ? 'pipe' : 'fixture')})`
    : nameOf(key);
  if (part === 'sewerEnds') return `to the sewer at ${who}`;
  if (part === 'leaveOut') return `system ${who} left out`;
  if (part === 'cleanouts') return `${who} is a cleanout`;
  if (part === 'batteries') return `row of ${who} read as ${plainWords(String(value))}`;
  if (field === 'slope' && typeof value === 'number') return `${who} at ${slopeText(value)}`;
  const what = field === 'kind' || field === null ? '' : `${plainWords(field.replace(/^detail\./, ''))} `;
  return `${who}: ${what}${plainWords(shownText(String(value)))}`;
}
