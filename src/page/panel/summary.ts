import type { Verdict } from '../../schedule/result.ts';
import { undersizedGroups } from '../../schedule/undersized-text.ts';
import { planWords } from '../words/plan-words.ts';
import { countedKind, phrase } from '../words/words.ts';
import { verdictMark } from './chips.ts';
import type { Desk } from './desk.ts';
import { make } from './element.ts';

/** First what was understood, then what is true and surprising about it; only then the findings below. */
export function summary(desk: Desk): HTMLElement {
  const { building, words } = desk;
  const { result } = building;
  if (result.pipes.length === 0 && result.fixtures.length === 0)
    return make(
      'section',
      { class: 'summary' },
      make('h2', { class: 'headline' }, words.summary.nothing),
      make('ul', { class: 'understood' }, leftOutLine(desk)),
    );
  const kinds = new Map<string | null, number>();
  for (const { kind } of result.fixtures) kinds.set(kind, (kinds.get(kind) ?? 0) + 1);
  const kindTexts = [...kinds]
    .sort(([a, m], [b, n]) => n - m || ((a ?? '') < (b ?? '') ? -1 : 1))
    .map(([kind, count]) => countedKind(words, kind, count));
  const dry = result.fixtures.filter((_, row) => building.water(row).length === 0 && hasPaths(desk)).length;
  const unvented = result.fixtures.filter(({ ventedBy }) => ventedBy.how === 'unvented').length;
  const groups = undersizedGroups(result);
  const small = groups.reduce((sum, { pipes }) => sum + pipes.length, 0);
  const reach = dry === 0 ? words.summary.allReach(result.fixtures.length) : words.summary.notReach(dry);
  return make(
    'section',
    { class: 'summary', 'aria-labelledby': 'headline' },
    building.plan?.side === 'after' && make('p', { class: 'side-note' }, planWords[words.language].afterNote),
    make(
      'h2',
      { id: 'headline', class: small > 0 ? 'headline bad' : 'headline' },
      small > 0
        ? words.summary.tooSmall(small, groups.length)
        : result.pipes.every(({ verdict }) => verdict === 'unknown')
          ? words.summary.noneJudged(result.pipes.length)
          : words.summary.noneTooSmall,
    ),
    unvented > 0 && make('p', { class: 'headline-also' }, words.summary.unvented(unvented)),
    verdictBar(desk),
    make('h3', { class: 'small-heading' }, words.summary.understood),
    make(
      'ul',
      { class: 'understood' },
      result.fixtures.length > 0 &&
        make(
          'li',
          {},
          make('b', {}, words.summary.fixtures(result.fixtures.length)),
          `${words.colon}${kindTexts.join(', ')}; `,
          reach,
        ),
      make(
        'li',
        {},
        words.summary.sanitary(result.counts.pipes, result.systems.length),
        result.batteries.length > 0 ? `, ${words.summary.batteries(result.batteries.length)}` : '',
      ),
      leftOutLine(desk),
      result.counts.unresolved > 0 && make('li', {}, words.summary.unplaced(result.counts.unresolved)),
    ),
  );
}

const hasPaths = ({ building }: Desk): boolean => building.data.scene.paths.first.length > 0;

function leftOutLine({ building, words }: Desk): HTMLElement | null {
  const left = Object.entries(building.result.counts.leftOut).sort(([a, m], [b, n]) => n - m || (a < b ? -1 : 1));
  const count = left.reduce((sum, [, of]) => sum + of, 0);
  if (count === 0) return null;
  return make(
    'li',
    {},
    words.summary.leftOut(count, left.map(([reason, of]) => `${of} ${phrase(words, reason)}`).join(', ')),
  );
}

const order: readonly Verdict[] = ['undersized', 'unknown', 'oversized', 'agrees'];

/** One bar for all pipes. Each part is a button that leaves only its pipes in the list. */
function verdictBar(desk: Desk): HTMLElement {
  const { building, words, store } = desk;
  const counts = new Map<Verdict, number>();
  for (const { verdict } of building.result.pipes) counts.set(verdict, (counts.get(verdict) ?? 0) + 1);
  const present = order.filter((verdict) => counts.has(verdict));
  const bar = make('div', { class: 'bar', 'aria-hidden': 'true' });
  for (const verdict of present) {
    const part = make('i', { class: `bar-${verdict}` });
    part.style.flexGrow = String(counts.get(verdict));
    bar.append(part);
  }
  return make(
    'div',
    { class: 'verdicts' },
    bar,
    make(
      'ul',
      { class: 'verdict-counts', 'aria-label': words.summary.share },
      ...present.map((verdict) =>
        make(
          'li',
          {},
          make(
            'button',
            {
              type: 'button',
              class: 'count',
              onclick: () => store.set({ tab: 'pipes', search: words.verdict[verdict], chosen: null }),
            },
            verdictMark(verdict),
            make('b', {}, String(counts.get(verdict))),
            ` ${words.verdict[verdict]}`,
          ),
        ),
      ),
    ),
  );
}
