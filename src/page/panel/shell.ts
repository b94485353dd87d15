import { markChosen, riserOf, riserView } from '../riser/riser-view.ts';
import { sceneView } from '../scene/scene-view.ts';
import type { PageState } from '../state.ts';
import type { Desk } from './desk.ts';
import { make } from './element.ts';
import { fixtureCard } from './fixture-card.ts';
import { followDock } from './follow-dock.ts';
import { header } from './header.ts';
import { legend } from './legend.ts';
import { labelWords, tipText } from './picture-words.ts';
import { pipeCard } from './pipe-card.ts';
import { pipeList } from './pipe-list.ts';
import { summary } from './summary.ts';
import { tabBar, tabPanel } from './tabs.ts';
import { toolbar } from './toolbar.ts';

export interface Shell {
  readonly roots: readonly HTMLElement[];
  readonly search: HTMLInputElement;
  /** Once the roots stand in the document. */
  start(): void;
  dispose(): void;
}

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
        ...(desk.whatIf === undefined ? [] : [desk.whatIf(chosen)]),
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
    if (changed('chosen', 'search', 'tab', 'findingFilter', 'findingsBy', 'pipesBy', 'isolated')) {
      const focused = before !== null && body.contains(document.activeElement);
      showPanel(now);
      if (changed('chosen', 'tab', 'search')) body.scrollTop = 0;
      // The button that was pressed is gone: whoever works by keyboard goes on at the title of what it opened.
      if (focused && changed('chosen'))
        (body.querySelector<HTMLElement>('#card-title') ?? body).focus({ preventScroll: true });
      else if (focused) {
        const again = changed('tab')
          ? '[role=tab][aria-selected=true]'
          : changed('findingsBy')
            ? '#findings-by'
            : changed('pipesBy')
              ? '#pipes-by'
              : '.chip[aria-pressed=true]';
        body.querySelector<HTMLElement>(again)?.focus({ preventScroll: true });
      }
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
      if (changed('view', 'riser', 'unfolded')) refocus(riserHost, () => riserHost.replaceChildren(riserView(desk)));
      const other = changed('view', 'chosen') ? riserOf(desk) : null;
      if (other !== null) store.set(other);
      else markChosen(desk, riserHost);
    }
    canvas.classList.toggle('measuring', now.measuring);
  };

  return {
    roots: [skip, top.root, make('div', { class: 'desk' }, panel, stage)],
    search,
    start() {
      show(store.state, null);
      const drawn = building.data.scene.pipes.points.some((points) => points > 1);
      if (!drawn) {
        const walls = building.data.scene.fabric.kind.length > 0;
        note.textContent =
          building.result.pipes.length > 0 ? words.page.noShapes : walls ? '' : words.page.nothingToDraw;
        note.hidden = note.textContent === '';
      }
      try {
        desk.scene = sceneView(building, store, {
          canvas,
          labelLayer,
          tip,
          tipText: (hit) => tipText(desk, hit),
          covered: () => (dockHost.firstElementChild as HTMLElement | null)?.offsetHeight ?? 0,
          labelText: labelWords(desk),
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
