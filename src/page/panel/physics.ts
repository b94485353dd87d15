import { hydraulicsText } from '../../schedule/hydraulics-text.ts';
import type { ResultPipe } from '../../schedule/result.ts';
import { frenchPhysics } from '../words/french-physics.ts';
import type { Desk } from './desk.ts';
import { make } from './element.ts';

/** Water in the pipe by physics, as information beside the code's size; nothing for vents. */
export function physics({ words }: Desk, { hydraulics }: ResultPipe): HTMLElement | null {
  if (hydraulics === undefined) return null;
  const told = words.language === 'fr' ? frenchPhysics(words, hydraulics) : hydraulicsText({ hydraulics });
  return make('section', {}, make('h3', {}, words.pipe.physics), make('p', { class: 'quiet' }, told.join(' ')));
}
