import type { PageState } from '../state.ts';
import { copyText } from './chips.ts';
import type { Desk } from './desk.ts';
import { make, modelText } from './element.ts';
import { shown } from './names.ts';

/** The top line: which file, which code, which view, and what concerns the page as a whole. */
export function header(desk: Desk): { readonly root: HTMLElement; show(state: PageState): void } {
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
      make('h1', {}, modelText((result.models ?? [result.model]).map(({ file }) => shown(file)).join(', '))),
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
