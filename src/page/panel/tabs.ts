import type { Tab } from '../state.ts';
import { batteryList } from './battery-list.ts';
import type { Desk } from './desk.ts';
import { make } from './element.ts';
import { findingList } from './finding-list.ts';
import { modelCard } from './model-card.ts';
import { pipeList } from './pipe-list.ts';
import { questionList } from './question-list.ts';

const tabs: readonly Tab[] = ['findings', 'questions', 'batteries', 'pipes', 'model'];

export function tabBar({ building, store, words }: Desk): HTMLElement {
  const { result } = building;
  const counts: Readonly<Record<Tab, number | null>> = {
    findings: result.findings.length,
    questions: building.data.questions.length,
    batteries: result.batteries.length,
    pipes: result.pipes.length,
    model: null,
  };
  const bar = make(
    'div',
    {
      class: 'tabs',
      role: 'tablist',
      'aria-label': words.page.panel,
      onkeydown: (event: KeyboardEvent) => {
        const move = { ArrowRight: 1, ArrowLeft: -1 }[event.key];
        if (move === undefined) return;
        event.preventDefault();
        const at = tabs.indexOf(store.state.tab);
        store.set({ tab: tabs[(at + move + tabs.length) % tabs.length] ?? 'findings' });
      },
    },
    ...tabs.map((tab) =>
      make(
        'button',
        {
          type: 'button',
          role: 'tab',
          id: `tab-${tab}`,
          'aria-selected': String(store.state.tab === tab),
          'aria-controls': 'tab-panel',
          tabindex: store.state.tab === tab ? 0 : -1,
          onclick: () => store.set({ tab }),
        },
        words.tabs[tab],
        counts[tab] !== null && make('span', { class: 'chip-count' }, String(counts[tab])),
      ),
    ),
  );
  return bar;
}

export function tabPanel(desk: Desk, tab: Tab): HTMLElement {
  const content = {
    findings: findingList,
    questions: questionList,
    batteries: batteryList,
    model: modelCard,
    pipes: (d: Desk) => pipeList(d, ''),
  }[tab];
  return make(
    'div',
    { role: 'tabpanel', id: 'tab-panel', 'aria-labelledby': `tab-${tab}`, class: 'tab-panel' },
    content(desk),
  );
}
