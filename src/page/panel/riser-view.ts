import type { Desk } from './desk.ts';
import { make } from './element.ts';

export function riserView({ words }: Desk): HTMLElement {
  return make('div', { class: 'riser' }, make('p', { class: 'quiet' }, words.riser.none));
}
