import type { DeskParts } from '../../deliver/desk-html.ts';
import { make } from '../panel/element.ts';
import type { Language } from '../state.ts';
import { deskWords } from '../words/desk-words.ts';
import { codeChooser } from './drop-view.ts';
import type { DeskOwn, SaveKind } from './messages.ts';
import { type OwnActions, ownBar } from './own-bar.ts';

export interface SaveActions extends OwnActions {
  save(what: SaveKind): void;
  another(): void;
  chooseCode(code: string): void;
  /** Leaves what was only supposed; null where nothing is. */
  readonly back: (() => void) | null;
  /** Looks for the least change that mends the model; null where nothing is wrong, or where it is on the page. */
  readonly mend: (() => void) | null;
}

/** The line above a page that was made here: check by another code, save, or take another model. */
export function saveBar(
  parts: DeskParts,
  language: Language,
  { code, own }: { readonly code: string; readonly own: DeskOwn },
  note: HTMLElement,
  actions: SaveActions,
): HTMLElement {
  const words = deskWords[language];
  const button = (label: string, press: () => void, id: string): HTMLElement =>
    make('button', { type: 'button', class: 'tool strong', id, onclick: press }, label);
  return make(
    'nav',
    { class: 'save-bar', 'aria-label': words.bar },
    button(words.another, actions.another, 'another'),
    codeChooser(parts, language, code, actions.chooseCode),
    ownBar(language, own, actions),
    note,
    actions.mend !== null && button(words.mend, actions.mend, 'mend'),
    actions.back !== null && button(words.whatIf.back, actions.back, 'back-to-model'),
    actions.back === null &&
      make(
        'div',
        { class: 'save-files', role: 'group', 'aria-label': words.saveAs },
        make('span', { class: 'save-as', 'aria-hidden': 'true' }, words.saveAs),
        ...(['ifc', 'bcf', 'csv', 'html', 'json', 'answers'] as const).map((what) =>
          button(words.save[what], () => actions.save(what), `save-${what}`),
        ),
      ),
  );
}
