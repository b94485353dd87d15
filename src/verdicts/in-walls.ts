import { boxAround } from '../geometry/box.ts';
import { boxGrid } from '../geometry/box-grid.ts';
import { stretchesInside } from '../geometry/prism.ts';
import type { Network, Pipe } from '../network/network.ts';
import type { WallBody } from './wall-bodies.ts';

/** A stretch of a pipe inside a wall. */
export interface InWall {
  readonly body: WallBody;
  /** Upright between studs, along the wall through them, or across it from face to face. */
  readonly run: 'upright' | 'along' | 'across';
  /** Metres. */
  readonly length: number;
}

/** Finds the walls that a pipe runs in, by the order of walls; stretches of one kind in one wall are one. */
export function inWalls(bodies: readonly (WallBody | null)[]): (pipe: Pick<Pipe, 'points'>) => readonly InWall[] {
  const grid = boxGrid(bodies.map((body) => body?.wall.box ?? null));
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
    const run = Math.abs(z) >= uprightFrom ? 'upright' : along >= Math.hypot(x, y) * Math.SQRT1_2 ? 'along' : 'across';
    lengths.set(run, (lengths.get(run) ?? 0) + to - from);
  }
  return [...lengths].filter(([, length]) => length >= least).map(([run, length]) => ({ body, run, length }));
}

/** At 45 degrees to the vertical or less. */
const uprightFrom = Math.SQRT1_2 - 1e-9;
/** What reaches less far into a wall, metres, does not lie in it. */
const least = 0.05;

/** By pipe id. */
export const pipesInWalls = (network: Network, bodies: readonly (WallBody | null)[]): (readonly InWall[])[] => {
  const find = inWalls(bodies);
  return network.pipes.map(find);
};
