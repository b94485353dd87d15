import type { Building } from '../building.ts';
import type { PageState } from '../state.ts';
import type { LabelWish } from './labels.ts';
import type { Piping } from './piping.ts';
import { lengthOf, type Point, pointAlong } from './polylines.ts';
import type { Way } from './route.ts';

/** The words on the picture come from the page's language, not from here. */
export interface LabelText {
  pipe(section: number): string;
  step(section: number): string;
  stopped(): string;
  measure(distances: { readonly length: number; readonly plan: number; readonly rise: number }): string;
}

const shortestLabelled = 0.25;

/** What deserves words, most important first: the step being followed, the chosen pipe, undersized runs, long pipes. */
export function labelWishes(
  building: Building,
  state: PageState,
  piping: Piping,
  way: Way | null,
  text: LabelText,
  inside: (at: Point) => boolean,
): readonly LabelWish[] {
  const wishes: LabelWish[] = [];
  const middle = (section: number): Point | null => {
    const line = piping.polylines[section];
    return line == null ? null : pointAlong(line.points, 0.5);
  };
  if (way !== null && state.follow !== null) {
    const step = Math.min(state.follow.step, way.sections.length - 1);
    const at = way.points[step]?.at(-1);
    if (at !== undefined) {
      const atEnd = step === way.sections.length - 1;
      wishes.push({
        at,
        text: atEnd && !way.whole ? text.stopped() : text.step(way.sections[step]!),
        tone: atEnd && !way.whole ? 'undersized' : 'way',
      });
    }
    return wishes;
  }
  const add = (section: number, tone: LabelWish['tone']): void => {
    const at = middle(section);
    if (at !== null && inside(at) && piping.visible[section] === 1) wishes.push({ at, text: text.pipe(section), tone });
  };
  const chosen = state.chosen?.is === 'pipe' ? (building.sectionsOf[state.chosen.row] ?? []) : [];
  for (const section of chosen) add(section, 'chosen');
  if (!state.labels) return wishes;
  const rest: { section: number; length: number }[] = [];
  for (let section = 0; section < building.sectionCount; section++) {
    if (chosen.includes(section) || building.state(section) === undefined) continue;
    const line = piping.polylines[section];
    const length = line == null ? 0 : lengthOf(line.points);
    if (length > shortestLabelled || building.state(section)?.verdict === 'undersized') rest.push({ section, length });
  }
  const weight = ({ section, length }: { section: number; length: number }): number =>
    length + (building.state(section)?.verdict === 'undersized' ? 1e6 : 0);
  rest.sort((a, b) => weight(b) - weight(a) || a.section - b.section);
  for (const { section } of rest)
    add(section, building.state(section)?.verdict === 'undersized' ? 'undersized' : 'plain');
  return wishes;
}
