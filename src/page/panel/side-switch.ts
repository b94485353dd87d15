import type { Side } from '../plan-side.ts';
import { planWords } from '../words/plan-words.ts';
import type { Desk } from './desk.ts';
import { make } from './element.ts';

const sides: readonly Side[] = ['before', 'after'];

/** The building as modelled or as mended, each with its errors; null where the page holds no plan. */
export function sideSwitch(desk: Desk): HTMLElement | null {
  const { building, words } = desk;
  const { plan } = building;
  if (plan === null || plan.plan.changes.length === 0) return null;
  const own = planWords[words.language];
  return make(
    'div',
    { class: 'side-switch', role: 'group', 'aria-label': own.sides },
    ...sides.map((side) =>
      make(
        'button',
        {
          type: 'button',
          class: 'tool',
          'data-side': side,
          'aria-pressed': String(plan.side === side),
          onclick: () => desk.showSide(side),
        },
        own.side[side],
        make('span', { class: 'chip-count' }, own.errors(plan.errors[side])),
      ),
    ),
  );
}
