import type { PlanPoint } from '../geometry/plan-outline.ts';
import type { Model, Wall } from '../model/model.ts';
import type { LayerKind, WallRules } from '../tables/wall-rules.ts';
import { chasesBetween, spanOf } from './chases.ts';
import type { Cavity, WallBody } from './wall-body.ts';

/** Walls in the order of the model, those whose shape nobody can tell left out; then the chases between two of them. */
export function wallBodies({ walls }: Pick<Model, 'walls'>, rules: WallRules): WallBody[] {
  const bodies = walls.flatMap((wall) => bodyOf(wall, rules) ?? []);
  return [...bodies, ...chasesBetween(bodies)];
}

function bodyOf(wall: Wall, rules: WallRules): WallBody | null {
  const outline = outlineOf(wall);
  if (outline === null || wall.box === null) return null;
  const along = longestEdge(outline);
  const across = spanOf(outline, along, 'across');
  const thickness = across.to - across.from;
  const prism = { outline, low: wall.box.min[2], high: wall.box.max[2] };
  return { wall, prism, along, thickness, cavity: cavityOf(wall, thickness, rules) };
}

/** A wall of unknown outline is its box where that is as thin as its layers, or as a wall. */
function outlineOf({ outline, box, layers }: Wall): readonly PlanPoint[] | null {
  if (outline !== null && outline.length > 2) return outline.map(([x, y]): PlanPoint => [x, y]);
  if (box === null) return null;
  const { min, max } = box;
  const thin = Math.min(max[0] - min[0], max[1] - min[1]);
  const stated = layers.reduce((sum, { thickness }) => sum + thickness, 0);
  if (thin <= 0 || thin > (stated > 0 ? stated + skewAllowed : thickestWall)) return null;
  return [
    [min[0], min[1]],
    [max[0], min[1]],
    [max[0], max[1]],
    [min[0], max[1]],
  ];
}

/** A box grows beyond the layers of a wall that stands askew. Metres. */
const skewAllowed = 0.03;
const thickestWall = 0.5;

function longestEdge(outline: readonly PlanPoint[]): PlanPoint {
  let best: PlanPoint = [1, 0];
  let longest = 0;
  outline.forEach(([x, y], index) => {
    const [u, v] = outline[(index + 1) % outline.length]!;
    const length = Math.hypot(u - x, v - y);
    if (length <= longest + 1e-9) return;
    longest = length;
    best = [(u - x) / length, (v - y) / length];
  });
  return best;
}

/** The deepest run of framing and air between boards; without such words the thickest layer that is not solid. */
function cavityOf({ layers }: Wall, thickness: number, { layerOf, liningMm }: WallRules): Cavity | null {
  if (layers.length === 0) {
    const depthMm = thickness * 1000 - 2 * liningMm;
    return depthMm > 0 ? { depthMm, ground: 'thickness', framing: null } : null;
  }
  const told = layers.map(({ name, thickness: metres }) => ({
    kind: name === null ? null : layerOf(name),
    mm: metres * 1000,
  }));
  let best: Cavity | null = null;
  let run: { kind: LayerKind; mm: number }[] = [];
  const close = (): void => {
    const depthMm = run.reduce((sum, { mm }) => sum + mm, 0);
    const stud = run.find(({ kind }) => kind === 'framing' || kind === 'steel');
    // A layer of air is an installation space only where a pipe could lie in it.
    if (depthMm >= leastCavityMm && depthMm > (best?.depthMm ?? 0)) {
      const framing = stud === undefined ? null : stud.kind === 'steel' ? 'steel' : 'wood';
      best = { depthMm, ground: 'layers', framing };
    }
    run = [];
  };
  for (const { kind, mm } of told) {
    if (kind === 'framing' || kind === 'steel' || kind === 'air') run.push({ kind, mm });
    else close();
  }
  close();
  if (best !== null) return best;
  const open = told.filter(({ kind }) => kind === null).sort((a, b) => b.mm - a.mm)[0];
  const solid = told.filter(({ kind }) => kind === 'solid').sort((a, b) => b.mm - a.mm)[0];
  if (open === undefined || open.mm < leastCavityMm || (solid?.mm ?? 0) >= open.mm) return null;
  return { depthMm: open.mm, ground: 'layers', framing: null };
}

const leastCavityMm = 20;
