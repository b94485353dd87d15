import { boxAround } from '../geometry/box.ts';
import { boxGrid } from '../geometry/box-grid.ts';
import { stretchesInside } from '../geometry/prism.ts';
import { isVertical } from '../geometry/vertical.ts';
import type { Model } from '../model/model.ts';
import type { Pipe } from '../network/network.ts';
import type { WallRules } from '../tables/wall-rules.ts';
import { wallBodies } from './wall-bodies.ts';
import type { WallBody } from './wall-body.ts';

/** A stretch of a pipe inside a wall. */
export interface InWall {
  readonly body: WallBody;
  /** Upright between studs, along the wall through them, or across it from face to face. */
  readonly run: 'upright' | 'along' | 'across';
  /** Metres. */
  readonly length: number;
}

type FindWalls = (pipe: Pick<Pipe, 'points'>) => readonly InWall[];

const known = new WeakMap<Model['walls'], WeakMap<WallRules, FindWalls>>();

/** The same for all networks of a building: a study asks it again and again. */
export function inWallsOf(model: Model, rules: WallRules): FindWalls {
  const byRules = known.get(model.walls) ?? new WeakMap<WallRules, FindWalls>();
  known.set(model.walls, byRules);
  const find = byRules.get(rules) ?? inWalls(wallBodies(model, rules));
  byRules.set(rules, find);
  return find;
}

/** Finds the walls that a pipe runs in, by the order of walls; stretches of one kind in one wall are one. */
export function inWalls(bodies: readonly WallBody[]): FindWalls {
  const grid = boxGrid(bodies.map(({ wall }) => wall.box));
  return ({ points }) => {
    const box = points === null ? null : boxAround(points);
    if (points === null || box === null) return [];
    const near: number[] = [];
    grid.touching(box, (wall) => near.push(wall));
    return near.sort((a, b) => a - b).flatMap((wall) => stretchesIn(points, bodies[wall]!));
  };
}

function stretchesIn(points: NonNullable<Pipe['points']>, body: WallBody): InWall[] {
  const lengths = new Map<InWall['run'], number>();
  for (const { from, to, direction } of stretchesInside(points, body.prism)) {
    const [x, y, z] = direction;
    const along = Math.abs(x * body.along[0] + y * body.along[1]);
    const run = isVertical(z) ? 'upright' : along >= Math.hypot(x, y) * alongFrom ? 'along' : 'across';
    lengths.set(run, (lengths.get(run) ?? 0) + to - from);
  }
  return [...lengths].filter(([, length]) => length >= least).map(([run, length]) => ({ body, run, length }));
}

/** Within 20 degrees of the wall's length; what stands more askew crosses it. */
const alongFrom = Math.cos((20 * Math.PI) / 180);
/** What reaches less far into a wall, metres, does not lie in it. */
const least = 0.05;
