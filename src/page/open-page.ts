import type { Building } from './building.ts';
import { themes } from './colours.ts';
import { linkOf, stateFromLink } from './link.ts';
import type { Desk } from './panel/desk.ts';
import { make } from './panel/element.ts';
import { keysOn } from './panel/keys.ts';
import { fixtureName, pipeName } from './panel/names.ts';
import { shell } from './panel/shell.ts';
import { type Language, type PageState, storeOf } from './state.ts';
import { wordsIn } from './words/words.ts';

/** Opens the page on a building inside `host`. A change of language builds the page's words anew, with the same state. */
export function openPage(host: HTMLElement, building: Building): void {
  const store = storeOf({ ...firstState(building), ...stateFromLink(building, location.hash) });
  const live = make('div', { class: 'offscreen', role: 'status', 'aria-live': 'polite' });
  let close = (): void => undefined;

  const build = (language: Language): void => {
    close();
    document.documentElement.lang = language;
    const words = wordsIn(language);
    const desk: Desk = {
      building,
      store,
      words,
      scene: null,
      theme: () => themes[store.state.theme],
      announce(text) {
        live.textContent = text;
      },
      choosePipe(row, frame) {
        store.set({ chosen: { is: 'pipe', row } });
        desk.scene?.framePipes(frame ?? [row]);
        desk.announce(
          `${pipeName(building, words, row)}: ${words.verdict[building.result.pipes[row]?.verdict ?? 'unknown']}`,
        );
      },
      chooseFixture(row) {
        store.set({ chosen: { is: 'fixture', row } });
        desk.scene?.frameFixture(row);
        desk.announce(fixtureName(building, words, row));
      },
    };
    const parts = shell(desk);
    host.replaceChildren(...parts.roots, live);
    parts.start();
    const offKeys = keysOn(desk, parts);
    close = () => {
      offKeys();
      parts.dispose();
    };
  };

  store.watch((now, before) => {
    document.documentElement.dataset.theme = now.theme;
    if (now.language !== before.language) build(now.language);
    const link = linkOf(building, now);
    if (link !== linkOf(building, before))
      history.replaceState(null, '', link === '' ? location.pathname + location.search : link);
  });
  window.addEventListener('hashchange', () => store.set(stateFromLink(building, location.hash)));
  document.documentElement.dataset.theme = store.state.theme;
  build(store.state.language);
}

function firstState(building: Building): PageState {
  const { result, scene, risers } = building.data;
  return {
    view: risers.length > 0 && !scene.pipes.points.some((points) => points > 1) ? 'riser' : 'model',
    chosen: null,
    colourBy:
      result.pipes.some(({ verdict }) => verdict !== 'unknown') || result.pipes.length === 0 ? 'verdict' : 'role',
    hidden: new Set(),
    storey: null,
    isolated: null,
    follow: null,
    labels: true,
    context: true,
    measuring: false,
    tab: 'findings',
    search: '',
    findingFilter: null,
    findingsBy: 'cause',
    pipesBy: 'verdict',
    language: /^fr\b/i.test(navigator.language) ? 'fr' : 'en',
    theme: window.matchMedia('(prefers-color-scheme: dark)').matches ? 'dark' : 'light',
    riser: 0,
  };
}
