import { make } from '../panel/element.ts';
import { shown } from '../panel/names.ts';
import type { Language } from '../state.ts';
import { deskWords } from '../words/desk-words.ts';
import { chosenFiles, type Dropped } from './dropped.ts';
import type { DeskOwn } from './messages.ts';

export interface OwnActions {
  /** An answers file or a folder of tables was chosen. */
  give(dropped: Dropped): void;
  leaveOut(part: keyof DeskOwn): void;
}

/** What counts beside the model: an answers file, local tables; how to give them, and how to leave them out again. */
export function ownBar(language: Language, own: DeskOwn, actions: OwnActions): HTMLElement {
  const words = deskWords[language].own;
  const part = (which: keyof DeskOwn): HTMLElement => {
    const given = own[which];
    if (given !== null)
      return make(
        'span',
        { class: 'own-given', id: `own-${which}` },
        `${words.given[which]} `,
        make('bdi', {}, shown(given.name)),
        make(
          'button',
          {
            type: 'button',
            class: 'own-out',
            'aria-label': words.leaveOut(shown(given.name)),
            onclick: () => actions.leaveOut(which),
          },
          '×',
        ),
      );
    const input = make('input', {
      type: 'file',
      id: `give-${which}`,
      class: 'offscreen',
      ...(which === 'answers' ? { accept: '.json' } : { webkitdirectory: true }),
      onchange: () => {
        const files = [...(input.files ?? [])];
        input.value = '';
        if (files.length > 0) actions.give(chosenFiles(files));
      },
    });
    return make('span', {}, input, make('label', { class: 'tool own-give', for: input.id }, words.give[which]));
  };
  return make('span', { class: 'own' }, part('answers'), part('tables'));
}
