import { limitCounts, type NextSmaller, nextSmallerOf } from '../../schedule/next-smaller.ts';
import type { ResultPipe, TrailStep } from '../../schedule/result.ts';
import { lengthText, limitText, oneSize, sizeText } from '../format.ts';
import { ruleName, type Words } from '../words/words.ts';
import type { Desk } from './desk.ts';
import { make, modelText } from './element.ts';
import { factTexts } from './facts.ts';
import { capital, shown } from './names.ts';
import { clauseText } from './reason.ts';

/** The trail as an argument: what governs and why, the first demand that the next smaller size fails, then everything. */
export function argument(desk: Desk, pipe: ResultPipe): HTMLElement {
  const { building, words } = desk;
  if (pipe.trail.length === 0) return make('p', { class: 'quiet' }, words.pipe.noTrail);
  const governing = pipe.trail.filter(({ governs }) => governs);
  return make(
    'section',
    { class: 'argument' },
    make('h3', {}, words.pipe.why(sizeText(words, pipe.required))),
    make('ol', { class: 'steps' }, ...governing.map((step) => demand(desk, step))),
    ...whyNotSmaller(words, pipe, nextSmallerOf(pipe, building.data.sizes)),
    make(
      'details',
      {},
      make('summary', {}, `${words.pipe.demands} (${pipe.trail.length})`),
      make('ol', { class: 'steps' }, ...pipe.trail.map((step) => demand(desk, step))),
    ),
  );
}

function whyNotSmaller(
  words: Words,
  { required, provisional }: ResultPipe,
  next: NextSmaller | null,
): readonly HTMLElement[] {
  if (next === null)
    return required?.most == null || provisional ? [] : [make('p', { class: 'quiet' }, words.pipe.smallest)];
  const { size, fails } = next;
  const rule = ruleName(words, fails);
  const limit = fails.smaller?.size.dn === size.dn ? fails.smaller.limit : null;
  const holds = limit === null ? '' : `${held(words, oneSize(words, size), limit, fails)}. `;
  const asks = fails.asks === null ? words.pipe.noRoom(rule) : words.pipe.fails(rule, oneSize(words, fails.asks));
  return [
    make('h3', {}, words.pipe.whyNot(oneSize(words, size))),
    make('p', {}, `${holds}${asks} `, make('span', { class: 'clause' }, clauseText(words, fails))),
  ];
}

function held(words: Words, size: string, limit: number | string, fails: TrailStep): string {
  const counts = limitCounts(fails);
  if (counts === 'm' && typeof limit === 'number') return words.pipe.reaches(size, lengthText(words, limit));
  return words.pipe.holds(size, `${limitText(words, limit)}${counts === 'l/s' ? ' l/s' : ''}`);
}

function demand(desk: Desk, step: TrailStep): HTMLElement {
  const { building, words } = desk;
  const facts = factTexts(building, words, step.facts);
  return make(
    'li',
    { class: step.governs ? 'step governs' : 'step' },
    make(
      'div',
      { class: 'step-head' },
      make('span', { class: 'step-rule' }, capital(ruleName(words, step))),
      make('span', { class: 'step-size' }, oneSize(words, step.asks, words.pipe.noSize)),
    ),
    facts.length > 0 &&
      make(
        'ul',
        { class: 'step-facts' },
        ...facts.map(({ label, value }) => make('li', {}, `${label} `, make('b', {}, modelText(shown(value))))),
      ),
    make(
      'div',
      { class: 'step-clause' },
      clauseText(words, step),
      step.trust === 'memory' && make('span', { class: 'trust' }, ` · ${words.pipe.fromMemory}`),
    ),
  );
}
