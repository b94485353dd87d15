import type { Building } from '../building.ts';
import type { PageState, Tab } from '../state.ts';
import { planWords } from '../words/plan-words.ts';
import { batteryList } from './battery-list.ts';
import type { Desk } from './desk.ts';
import { make } from './element.ts';
import { findingList } from './finding-list.ts';
import { modelCard } from './model-card.ts';
import { pipeList } from './pipe-list.ts';
import { planList } from './plan-list.ts';
import { questionList } from './question-list.ts';

const tabs: readonly Tab[] = ['findings', 'mend', 'questions', 'batteries', 'pipes', 'model'];

/** The plan has its tab where there is one. */
const tabsOf = ({ plan }: Building): readonly Tab[] => tabs.filter((tab) => tab !== 'mend' || plan !== null);

export function tabBar({ building, store, words }: Desk): HTMLElement {
  const { result } = building;
  const counts: Readonly<Record<Tab, number | null>> = {
    findings: result.findings.length,
    mend: building.plan?.plan.changes.length ?? null,
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
        const own = tabsOf(building);
        const at = own.indexOf(store.state.tab);
        store.set(toTab(own[(at + move + own.length) % own.length] ?? 'findings', store.state));
      },
    },
    ...tabsOf(building).map((tab) =>
      make(
        'button',
        {
          type: 'button',
          role: 'tab',
          id: `tab-${tab}`,
          'aria-selected': String(store.state.tab === tab),
          'aria-controls': 'tab-panel',
          tabindex: store.state.tab === tab ? 0 : -1,
          onclick: () => store.set(toTab(tab, store.state)),
        },
        tab === 'mend' ? planWords[words.language].tab : words.tabs[tab],
        counts[tab] !== null && make('span', { class: 'chip-count' }, String(counts[tab])),
      ),
    ),
  );
  return bar;
}

/** The plan is read with its changes lit in the picture. */
function toTab(tab: Tab, { colourBy }: PageState): Partial<PageState> {
  if (tab === 'mend') return { tab, colourBy: 'change', hidden: new Set() };
  return colourBy === 'change' ? { tab, colourBy: 'verdict', hidden: new Set() } : { tab };
}

export function tabPanel(desk: Desk, tab: Tab): HTMLElement {
  const content = {
    findings: findingList,
    mend: planList,
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
