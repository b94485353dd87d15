import { grown } from '../geometry/box.ts';
import { boxGrid } from '../geometry/box-grid.ts';
import type { PlanPoint } from '../geometry/plan-outline.ts';
import type { WallBody } from './wall-body.ts';

/** Two walls that stand side by side no farther apart than this, metres, have a chase between them, not a room. */
const widestChase = 0.6;
/** They run side by side for this long at least, metres. */
const shortestChase = 0.3;
/** Parallel within half a degree. */
const parallel = Math.cos((0.5 * Math.PI) / 180);

/** The room between walls that stand face to face, clear of studs: a wall of its own, named after both. */
export function chasesBetween(bodies: readonly WallBody[]): WallBody[] {
  const grid = boxGrid(bodies.map(({ wall }) => (wall.box === null ? null : grown(wall.box, widestChase))));
  return bodies.flatMap((body, index) => {
    const near: number[] = [];
    if (body.wall.box !== null) grid.touching(body.wall.box, (other) => near.push(other));
    return near
      .filter((other) => other > index)
      .sort((a, b) => a - b)
      .flatMap((other) => chaseBetween(body, bodies[other]!) ?? []);
  });
}

function chaseBetween(one: WallBody, two: WallBody): WallBody | null {
  const { along } = one;
  if (Math.abs(along[0] * two.along[0] + along[1] * two.along[1]) < parallel) return null;
  const [a, b] = [spanOf(one.prism.outline, along, 'across'), spanOf(two.prism.outline, along, 'across')];
  const [from, to] = a.to <= b.from ? [a.to, b.from] : [b.to, a.from];
  const [s, t] = [spanOf(one.prism.outline, along, 'along'), spanOf(two.prism.outline, along, 'along')];
  const [start, end] = [Math.max(s.from, t.from), Math.min(s.to, t.to)];
  const [low, high] = [Math.max(one.prism.low, two.prism.low), Math.min(one.prism.high, two.prism.high)];
  if (to - from < leastChase || to - from > widestChase || end - start < shortestChase || high <= low) return null;
  const corner = (along_: number, across: number): PlanPoint => [
    along[0] * along_ - along[1] * across,
    along[1] * along_ + along[0] * across,
  ];
  const outline = [corner(start, from), corner(end, from), corner(end, to), corner(start, to)];
  const xs = outline.map(([x]) => x);
  const ys = outline.map(([, y]) => y);
  return {
    wall: {
      ...one.wall,
      name: `the chase between ${one.wall.name ?? 'a wall'} and ${two.wall.name ?? 'another'}`,
      layers: [],
      loadBearing: false,
      outline: null,
      box: { min: [Math.min(...xs), Math.min(...ys), low], max: [Math.max(...xs), Math.max(...ys), high] },
    },
    prism: { outline, low, high },
    along,
    thickness: to - from,
    cavity: { depthMm: (to - from) * 1000, ground: 'layers', framing: null },
  };
}

/** What is narrower is a joint between walls, metres. */
const leastChase = 0.04;

/** Least and most of an outline along a direction in plan, or across it. */
export function spanOf(
  outline: readonly PlanPoint[],
  [dx, dy]: PlanPoint,
  which: 'along' | 'across',
): { readonly from: number; readonly to: number } {
  const values = outline.map(([x, y]) => (which === 'along' ? x * dx + y * dy : y * dx - x * dy));
  return { from: Math.min(...values), to: Math.max(...values) };
}
