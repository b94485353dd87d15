import { elementNames } from './element-names.ts';
import { loadText, sizeText } from './number-text.ts';
import { openByUse } from './open-by-use.ts';
import type { Result, ResultFixture, ResultPipe } from './result.ts';
import { blank, heading, paragraph, type TextLine } from './text-line.ts';
import { counted, listed, plainWords } from './trade-words.ts';

/** Fixtures that may be read more than one way, and ask for something else by it. In the order of the result. */
export const openFixtures = ({ fixtures }: Result): readonly ResultFixture[] =>
  fixtures.filter(({ open }) => open !== undefined);

/** The lightest and the heaviest reading ask for different sizes. */
export const isRange = ({ required }: ResultPipe): boolean =>
  required !== null && required.least?.label !== required.most?.label;

/** The fixtures leave nothing open, but the way drains enter a stack does. */
export const hangsOnEntries = (pipe: ResultPipe): boolean => isRange(pipe) && pipe.load.least === pipe.load.most;

/** Verdicts that hold however the open fixtures are read, and those that hang on them. Nothing where none is open. */
export function rangesText(result: Result): TextLine[] {
  const open = openFixtures(result);
  if (open.length === 0) return [];
  const names = elementNames(result);
  const byUse = openByUse(result);
  const others = open.filter(({ globalId }) => !byUse.has(globalId));
  const judged = result.pipes.filter(({ modelled, required }) => modelled !== null && required !== null);
  const undecided = judged.filter((pipe) => isRange(pipe) && pipe.verdict === 'unknown');
  const firm = judged.filter(({ verdict }) => verdict !== 'unknown');
  const count = (verdict: string): number => firm.filter((pipe) => pipe.verdict === verdict).length;
  const larger = firm.filter((pipe) => isRange(pipe) && pipe.verdict === 'agrees').length;
  const says = [
    `${count('undersized')} undersized`,
    `${count('agrees')} as required${larger === 0 ? '' : ` (${larger} of them more than the lightest reading needs)`}`,
    `${count('oversized')} oversized`,
  ];
  const pipes = undecided.slice(0, mostPipes);
  return [
    blank,
    ...heading(`Open: ${counted(open.length, 'fixture')} may be read more than one way`),
    ...byUseText(result, open),
    ...others
      .slice(0, mostFixtures)
      .flatMap((fixture) =>
        paragraph(`${names.of(fixture.globalId)}: ${loadText(fixture.load, result.code.unit)}`, '  - ', 'warning'),
      ),
    ...rest(others.length - mostFixtures, 'more'),
    ...paragraph(`Either way: ${listed(says)}.`),
    ...paragraph(
      undecided.length === 0
        ? 'No verdict hangs on it.'
        : `${counted(undecided.length, 'verdict')} ${undecided.length === 1 ? 'hangs' : 'hang'} on it:`,
    ),
    ...pipes.flatMap((pipe) =>
      paragraph(
        `${names.of(pipe.globalId)}: drawn ${pipe.modelled?.label}, needs ${sizeText(pipe.required)}`,
        '  - ',
        'warning',
      ),
    ),
    ...rest(undecided.length - mostPipes, 'more'),
  ];
}

/** What the use of the building leaves open, alike together: `18 water closets by the use of the building: 3 to 4 units each`. */
function byUseText(result: Result, open: readonly ResultFixture[]): TextLine[] {
  const byUse = openByUse(result);
  const alike = new Map<string, number>();
  for (const { globalId, kind, load } of open) {
    if (!byUse.has(globalId)) continue;
    const key = `${plainWords(kind ?? 'fixture')}|${loadText(load, result.code.unit)}`;
    alike.set(key, (alike.get(key) ?? 0) + 1);
  }
  return [...alike].flatMap(([key, count]) => {
    const [kind = '', load = ''] = key.split('|');
    return paragraph(
      `${counted(count, kind)} by the use of the building (setting use): ${load}${count === 1 ? '' : ' each'}`,
      '  - ',
      'warning',
    );
  });
}

const mostFixtures = 4;
const mostPipes = 8;

const rest = (count: number, words: string): TextLine[] =>
  count > 0 ? paragraph(`and ${count} ${words}`, '    ', 'quiet') : [];

const entryStory = ({ required }: ResultPipe): string =>
  `Its size hangs on how the drains enter the stack: ${required?.least?.label ?? 'no size'} swept, at 45 degrees or less or with a radius of at least their bore; ${required?.most?.label ?? 'more than any size holds'} square.`;

/** Of one pipe: whether its verdict hangs on fixtures that are open, and how far. Empty where none of them uses it. */
export function rangeStory(result: Result, pipe: ResultPipe): string[] {
  const users = new Set([...(pipe.servesWater ?? []), ...(pipe.servesAir ?? [])]);
  const open = openFixtures(result).filter(({ globalId }) => users.has(globalId));
  if (open.length === 0) return hangsOnEntries(pipe) ? [entryStory(pipe)] : [];
  const names = elementNames(result);
  const who = listed(open.slice(0, mostFixtures).map(({ globalId }) => names.short(globalId)));
  const what = open.length > mostFixtures ? `${who} and ${open.length - mostFixtures} more` : who;
  const { required, modelled, verdict } = pipe;
  if (!isRange(pipe) || required === null) return [`This holds whatever ${what} may be: the size is the same.`];
  const sizes = `at the lightest reading of ${what} it needs ${required.least?.label ?? 'no size'}, at the heaviest ${required.most?.label ?? 'more than any size holds'}`;
  if (modelled === null) return [`Its size is open: ${sizes}.`];
  return [verdict === 'unknown' ? `Its verdict is open: ${sizes}.` : `Its verdict holds either way: ${sizes}.`];
}
