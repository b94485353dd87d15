import type { Desk } from './desk.ts';
import { make, modelText } from './element.ts';
import { opener } from './finding-list.ts';
import { findingSentence } from './finding-sentence.ts';

/** What was found about one pipe or fixture; null where nothing was. */
export function findingsAbout(desk: Desk, globalId: string): HTMLElement | null {
  const findings = desk.building.findingsAbout.get(globalId) ?? [];
  if (findings.length === 0) return null;
  return make(
    'section',
    {},
    make('h3', {}, desk.words.pipe.about),
    make(
      'ul',
      { class: 'finding-rows' },
      ...findings.map((finding) => {
        const open = opener(desk, finding);
        const text = modelText(findingSentence(desk, finding));
        return make(
          'li',
          {},
          open === null
            ? make('span', { class: 'finding-row' }, text)
            : make('button', { type: 'button', class: 'finding-row', onclick: open }, text),
        );
      }),
    ),
  );
}
