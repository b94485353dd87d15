import type { Building } from '../building.ts';
import type { PageState } from '../state.ts';
import type { LabelWish } from './labels.ts';
import type { Piping } from './piping.ts';
import { apart, lengthOf, type Point, pointAlong } from './polylines.ts';
import type { Way } from './route.ts';

/** The words on the picture come from the page's language, not from here. */
export interface LabelText {
  pipe(section: number): string;
  /** Drawn and needed size of an undersized run. */
  run(section: number): string;
  step(section: number): string;
  stopped(): string;
  measure(distances: { readonly length: number; readonly plan: number; readonly rise: number }): string;
}

/** What deserves words, most important first: the step being followed; the chosen pipe, undersized runs, long pipes. */
export function labelWishes(
  building: Building,
  state: PageState,
  piping: Piping,
  runs: readonly (readonly number[])[],
  way: Way | null,
  text: LabelText,
  inside: (at: Point) => boolean,
): readonly LabelWish[] {
  if (way !== null && state.follow !== null) return wayWish(way, state.follow.step, text);
  const wishes: LabelWish[] = [];
  const add = (section: number, words: string, tone: LabelWish['tone']): void => {
    const line = piping.polylines[section];
    if (line == null || piping.visible[section] === 0) return;
    const at = pointAlong(line.points, 0.5);
    const along = [line.points[0]!, line.points.at(-1)!] as const;
    if (inside(at)) wishes.push({ at, text: words, tone, ...(tone === 'plain' ? { along } : {}) });
  };
  const chosen = state.chosen?.is === 'pipe' ? (building.sectionsOf[state.chosen.row] ?? []) : [];
  for (const section of chosen) add(section, text.pipe(section), 'chosen');
  if (!state.labels) return wishes;
  for (const run of runs) {
    const shown = run.filter((section) => piping.visible[section] === 1 && !chosen.includes(section));
    const middle = nearestMiddle(piping, shown);
    if (middle !== null) add(middle, text.run(middle), 'undersized');
  }
  const rest: { section: number; length: number }[] = [];
  for (let section = 0; section < building.sectionCount; section++) {
    const line = piping.polylines[section];
    if (line == null || chosen.includes(section) || building.state(section) === undefined) continue;
    rest.push({ section, length: lengthOf(line.points) });
  }
  rest.sort((a, b) => b.length - a.length || a.section - b.section);
  for (const { section } of rest.slice(0, mostTried)) add(section, text.pipe(section), 'plain');
  return wishes;
}

/** Longest pipes first: what comes after so many is too short on the screen to bear words. */
const mostTried = 1500;

function wayWish(way: Way, asked: number, text: LabelText): readonly LabelWish[] {
  const step = Math.min(asked, way.sections.length - 1);
  const at = way.points[step]?.at(-1);
  if (at === undefined) return [];
  const stops = step === way.sections.length - 1 && !way.whole;
  return [{ at, text: stops ? text.stopped() : text.step(way.sections[step]!), tone: stops ? 'undersized' : 'way' }];
}

/** The section of a run that lies nearest to the middle of all of them. */
function nearestMiddle(piping: Piping, run: readonly number[]): number | null {
  const bounds = piping.bounds(run);
  if (bounds === null) return null;
  const half = (axis: 0 | 1 | 2): number => (bounds.min[axis] + bounds.max[axis]) / 2;
  const middle: Point = [half(0), half(1), half(2)];
  const gap = (section: number): number => {
    const line = piping.polylines[section];
    return line == null ? Number.POSITIVE_INFINITY : apart(pointAlong(line.points, 0.5), middle);
  };
  return run.reduce((best, section) => (gap(section) < gap(best) ? section : best), run[0] ?? 0);
}
