import type { Building } from './building.ts';
import { themes } from './colours.ts';
import { linkOf, stateFromLink } from './link.ts';
import type { Desk } from './panel/desk.ts';
import { make } from './panel/element.ts';
import { keysOn } from './panel/keys.ts';
import { fixtureName, pipeName } from './panel/names.ts';
import { shell } from './panel/shell.ts';
import type { Side } from './plan-side.ts';
import type { Eye } from './scene/orbit.ts';
import { type Chosen, type Language, type PageState, storeOf } from './state.ts';
import { wordsIn } from './words/languages.ts';

export interface PageAround {
  readonly language?: Language;
  /** A line above the page, made anew for each language. */
  readonly bar?: (language: Language) => HTMLElement;
  readonly whatIf?: (language: Language, chosen: Chosen) => HTMLElement;
  /** Asked where the reader wants the other building of a plan; told what is to be kept. */
  readonly showSide?: (side: Side, kept: Kept) => void;
  readonly kept?: Kept;
}

/** What stays as it is where one building takes the place of another. */
export interface Kept {
  readonly state: Partial<PageState>;
  readonly eye: Eye | null;
}

/**
 * Opens the page on a building inside `host`. A change of language builds the page's words anew, with the same state.
 * Returns what closes it.
 */
export function openPage(
  host: HTMLElement,
  building: Building,
  { language, bar, whatIf, showSide, kept }: PageAround = {},
): () => void {
  const first = language === undefined ? firstState(building) : { ...firstState(building), language };
  const store = storeOf({ ...first, ...kept?.state, ...stateFromLink(building, location.hash) });
  const live = make('div', { class: 'offscreen', role: 'status', 'aria-live': 'polite' });
  let close = (): void => undefined;

  const build = (language: Language, eye: Eye | null = null): void => {
    close();
    document.documentElement.lang = language;
    const words = wordsIn(language);
    const desk: Desk = {
      building,
      store,
      words,
      scene: null,
      ...(whatIf === undefined ? {} : { whatIf: (chosen: Chosen) => whatIf(language, chosen) }),
      theme: () => themes[store.state.theme],
      showSide: (side) => showSide?.(side, { state: store.state, eye: desk.scene?.eye ?? null }),
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
    host.replaceChildren(...(bar === undefined ? [] : [bar(language)]), ...parts.roots, live);
    parts.start();
    if (eye !== null) desk.scene?.setEye(eye);
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
    if (link !== linkOf(building, before)) setLink(link);
  });
  const followLink = (): void => store.set(stateFromLink(building, location.hash));
  window.addEventListener('hashchange', followLink);
  document.documentElement.dataset.theme = store.state.theme;
  build(store.state.language, kept?.eye ?? null);
  if (kept !== undefined) setLink(linkOf(building, store.state));
  return () => {
    window.removeEventListener('hashchange', followLink);
    close();
  };
}

const setLink = (link: string): void =>
  history.replaceState(null, '', link === '' ? location.pathname + location.search : link);

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
    unfolded: false,
  };
}
