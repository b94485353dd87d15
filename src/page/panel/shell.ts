import { lengthText, oneSize, shortLoad, sizeText } from '../format.ts';
import { markChosen, riserOf, riserView } from '../riser/riser-view.ts';
import type { Hit } from '../scene/pick.ts';
import { sceneView } from '../scene/scene-view.ts';
import type { PageState, Tab } from '../state.ts';
import { named } from '../words/words.ts';
import { batteryList } from './battery-list.ts';
import { copyText } from './chips.ts';
import type { Desk } from './desk.ts';
import { make, modelText } from './element.ts';
import { findingList } from './finding-list.ts';
import { fixtureCard } from './fixture-card.ts';
import { followDock } from './follow-dock.ts';
import { legend } from './legend.ts';
import { modelCard } from './model-card.ts';
import { capital, fixtureName, pipeName, shown } from './names.ts';
import { pipeCard } from './pipe-card.ts';
import { pipeList } from './pipe-list.ts';
import { summary } from './summary.ts';
import { toolbar } from './toolbar.ts';

export interface Shell {
  readonly roots: readonly HTMLElement[];
  readonly search: HTMLInputElement;
  /** Once the roots stand in the document. */
  start(): void;
  dispose(): void;
}

const tabs: readonly Tab[] = ['findings', 'batteries', 'pipes', 'model'];

/** The frame of the page and what redraws in it when something is chosen. */
export function shell(desk: Desk): Shell {
  const { building, store, words } = desk;
  const canvas = make('canvas', {
    class: 'picture',
    tabindex: '0',
    role: 'application',
    'aria-label': words.page.picture,
  });
  const labelLayer = make('div', { class: 'labels', 'aria-hidden': 'true' });
  const tip = make('div', { class: 'tip', 'aria-hidden': 'true', hidden: true });
  const legendHost = make('div', { class: 'legend-host' });
  const toolHost = make('div', { class: 'tool-host' });
  const dockHost = make('div', { class: 'dock-host' });
  const note = make('p', { class: 'picture-note', hidden: true });
  const riserHost = make('div', { class: 'riser-host', hidden: true });
  const picture = make('div', { class: 'picture-host' }, canvas, labelLayer, tip, note);
  const stage = make(
    'main',
    { class: 'stage', 'aria-label': words.page.views },
    picture,
    toolHost,
    legendHost,
    dockHost,
    riserHost,
  );
  const search = make('input', {
    type: 'search',
    id: 'search',
    placeholder: words.search.hint,
    'aria-label': words.search.label,
    autocomplete: 'off',
    spellcheck: 'false',
    oninput: () => store.set({ search: search.value, chosen: null }),
  });
  const body = make('div', { class: 'panel-body', id: 'panel-body', tabindex: '-1' });
  const panel = make(
    'aside',
    { class: 'panel', 'aria-label': words.page.panel },
    make('div', { class: 'search' }, search),
    body,
  );
  const top = header(desk);
  const skip = make(
    'a',
    {
      class: 'skip',
      href: '#panel-body',
      onclick: (event: Event) => {
        event.preventDefault();
        body.focus();
      },
    },
    words.page.skip,
  );

  const showPanel = (state: PageState): void => {
    const { chosen } = state;
    if (chosen !== null) {
      body.replaceChildren(
        make(
          'button',
          { type: 'button', class: 'back', onclick: () => store.set({ chosen: null }) },
          `← ${words.page.back}`,
        ),
        chosen.is === 'pipe' ? pipeCard(desk, chosen.row) : fixtureCard(desk, chosen.row),
      );
      return;
    }
    if (state.search !== '') {
      body.replaceChildren(pipeList(desk, state.search));
      return;
    }
    body.replaceChildren(summary(desk), tabBar(desk), tabPanel(desk, state.tab));
  };

  let stopWatching = false;
  const show = (now: PageState, before: PageState | null): void => {
    const changed = (...keys: readonly (keyof PageState)[]): boolean =>
      before === null || keys.some((key) => now[key] !== before[key]);
    if (changed('chosen', 'search', 'tab', 'findingFilter', 'isolated')) {
      const focused = before !== null && body.contains(document.activeElement);
      showPanel(now);
      if (changed('chosen', 'tab', 'search')) body.scrollTop = 0;
      // The button that was pressed is gone: whoever works by keyboard goes on at the title of what it opened.
      if (focused && changed('chosen'))
        (body.querySelector<HTMLElement>('#card-title') ?? body).focus({ preventScroll: true });
      else if (focused && changed('tab', 'findingFilter'))
        body
          .querySelector<HTMLElement>(changed('tab') ? '[role=tab][aria-selected=true]' : '.chip[aria-pressed=true]')
          ?.focus({ preventScroll: true });
    }
    if (changed('search') && search.value !== now.search) search.value = now.search;
    if (changed('colourBy', 'hidden', 'theme')) refocus(legendHost, () => legendHost.replaceChildren(legend(desk)));
    if (changed('labels', 'context', 'measuring', 'isolated', 'storey'))
      refocus(toolHost, () => toolHost.replaceChildren(toolbar(desk)));
    if (changed('follow')) {
      const sliding = document.activeElement?.id === 'follow-step';
      dockHost.replaceChildren(...(now.follow === null ? [] : [followDock(desk, now.follow)]));
      if (sliding) dockHost.querySelector<HTMLElement>('#follow-step')?.focus();
    }
    if (changed('view', 'theme', 'language')) {
      riserHost.hidden = now.view !== 'riser';
      picture.hidden = legendHost.hidden = toolHost.hidden = now.view === 'riser';
      top.show(now);
    }
    if (now.view === 'riser') {
      if (changed('view', 'riser')) riserHost.replaceChildren(riserView(desk));
      const other = changed('view', 'chosen') ? riserOf(desk) : null;
      if (other !== null) store.set({ riser: other });
      else markChosen(desk, riserHost);
    }
    canvas.classList.toggle('measuring', now.measuring);
  };

  return {
    roots: [skip, top.root, make('div', { class: 'desk' }, panel, stage)],
    search,
    start() {
      show(store.state, null);
      const drawn = Array.from(
        { length: building.sectionCount },
        (_, section) => building.data.scene.pipes.points[section],
      ).some((points) => (points ?? 0) > 1);
      if (!drawn && building.result.pipes.length > 0) {
        note.textContent = words.page.noShapes;
        note.hidden = false;
      }
      try {
        desk.scene = sceneView(building, store, {
          canvas,
          labelLayer,
          tip,
          tipText: (hit) => tipText(desk, hit),
          covered: () => (dockHost.firstElementChild as HTMLElement | null)?.offsetHeight ?? 0,
          labelText: {
            pipe: (section) => labelText(desk, section),
            run: (section) => runText(desk, section),
            step: (section) => labelText(desk, section),
            stopped: () => `▲ ${words.follow.stopped}`,
            measure: ({ length, plan, rise }) =>
              words.tools.distances(lengthText(words, length), lengthText(words, plan), lengthText(words, rise)),
          },
        });
        // For the tests and for a look under the hood: what a frame costs.
        Object.assign(canvas, { stats: desk.scene.stats, scene: desk.scene });
      } catch {
        note.textContent = words.page.noPicture;
        note.hidden = false;
        canvas.hidden = true;
      }
      const { chosen } = store.state;
      if (chosen?.is === 'pipe') desk.scene?.framePipes([chosen.row]);
      if (chosen?.is === 'fixture') desk.scene?.frameFixture(chosen.row);
      store.watch((now, before) => {
        if (!stopWatching && now.language === before.language) show(now, before);
      });
    },
    dispose() {
      stopWatching = true;
      desk.scene?.dispose();
    },
  };
}

/** A part that is built anew keeps the reader's place in it. */
function refocus(host: HTMLElement, build: () => void): void {
  const controls = (): HTMLElement[] => [...host.querySelectorAll<HTMLElement>('button, select, input')];
  const place = controls().indexOf(document.activeElement as HTMLElement);
  build();
  if (place >= 0) controls()[place]?.focus({ preventScroll: true });
}

function header(desk: Desk): { readonly root: HTMLElement; show(state: PageState): void } {
  const { building, store, words } = desk;
  const { result } = building;
  const view = (value: PageState['view'], label: string): HTMLElement =>
    make(
      'button',
      { type: 'button', class: 'view', 'data-view': value, onclick: () => store.set({ view: value }) },
      label,
    );
  const views = [view('model', words.page.model), view('riser', words.page.riser)];
  const theme = make('button', {
    type: 'button',
    class: 'tool',
    onclick: () => store.set({ theme: store.state.theme === 'light' ? 'dark' : 'light' }),
  });
  const help = make(
    'dialog',
    { class: 'help', 'aria-labelledby': 'help-title' },
    make('h2', { id: 'help-title' }, words.page.keys),
    make(
      'dl',
      {},
      ...words.page.keyHelp.map(([keys, what]) =>
        make('div', {}, make('dt', {}, make('kbd', {}, keys)), make('dd', {}, what)),
      ),
    ),
    make('button', { type: 'button', class: 'button', onclick: () => help.close() }, words.page.close),
  );
  const copy: HTMLElement = make(
    'button',
    {
      type: 'button',
      class: 'tool',
      onclick: () => {
        copyText(location.href);
        copy.textContent = words.page.copied;
        desk.announce(words.page.copied);
        window.setTimeout(() => {
          copy.textContent = words.page.copyLink;
        }, 1500);
      },
    },
    words.page.copyLink,
  );
  const root = make(
    'header',
    { class: 'top' },
    make(
      'div',
      { class: 'title' },
      make('h1', {}, modelText(shown(result.model.file))),
      make(
        'p',
        {},
        `${words.codeTitle(result.code.id, result.code.title)} ${result.code.edition} `,
        make('span', { class: 'tag' }, result.code.id),
      ),
    ),
    make('nav', { class: 'views', 'aria-label': words.page.views }, ...views),
    make(
      'div',
      { class: 'top-tools' },
      copy,
      make(
        'button',
        {
          type: 'button',
          class: 'tool',
          lang: words.language === 'en' ? 'fr' : 'en',
          onclick: () => store.set({ language: words.language === 'en' ? 'fr' : 'en' }),
        },
        words.page.otherLanguage,
      ),
      theme,
      make(
        'button',
        { type: 'button', class: 'tool', 'aria-haspopup': 'dialog', onclick: () => help.showModal() },
        words.page.keys,
      ),
    ),
    help,
  );
  return {
    root,
    show(state) {
      for (const button of views) button.setAttribute('aria-pressed', String(button.dataset.view === state.view));
      theme.textContent = state.theme === 'light' ? words.page.dark : words.page.light;
    },
  };
}

function tabBar({ building, store, words }: Desk): HTMLElement {
  const { result } = building;
  const counts: Readonly<Record<Tab, number | null>> = {
    findings: result.findings.length,
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

function tabPanel(desk: Desk, tab: Tab): HTMLElement {
  const content = {
    findings: findingList,
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

function tipText({ building, words }: Desk, hit: Hit): string {
  if (hit.is === 'fixture') return fixtureName(building, words, hit.index);
  const row = building.data.scene.pipes.pipe[hit.index] ?? -1;
  if (row < 0) return '';
  const state = building.state(hit.index);
  return [
    pipeName(building, words, row),
    state === undefined ? '' : capital(named(words.roles, state.role)),
    oneSize(words, state?.modelled, ''),
  ]
    .filter((text) => text !== '')
    .join(' · ');
}

function labelText({ building, words }: Desk, section: number): string {
  const state = building.state(section);
  if (state === undefined) return '';
  const load = state.ventLoad !== undefined && state.load.most === 0 ? state.ventLoad : state.load;
  const drawn = oneSize(words, state.modelled);
  return `${drawn} · ${shortLoad(words, load, building.result.code.unit)}`;
}

function runText({ building, words }: Desk, section: number): string {
  const state = building.state(section);
  const drawn = oneSize(words, state?.modelled);
  return `▲ ${drawn} → ${sizeText(words, state?.required ?? null)}`;
}
