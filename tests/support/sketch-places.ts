import { InputError } from '../../src/findings/input-error.ts';
import { add, planDistance, type Vec3 } from '../../src/geometry/vector.ts';
import type { Cursor } from './sketch-tokens.ts';

/** Where a node lies: at coordinates, or from another node by moves. */
export interface Place {
  readonly line: number;
  readonly from: string | null;
  readonly at: Vec3;
  readonly moves: readonly Move[];
}

/** `over` moves in plan onto another node; `to` sets the level; `fall` drops by a slope over the plan distance made. */
export type Move =
  | { readonly by: Vec3 }
  | { readonly over: string }
  | { readonly to: number }
  | { readonly fall: number };

const compass: Record<string, Vec3> = {
  east: [1, 0, 0],
  west: [-1, 0, 0],
  north: [0, 1, 0],
  south: [0, -1, 0],
  up: [0, 0, 1],
  down: [0, 0, -1],
};

export type NameOf = (name: string) => string;

/** `at 1 2 0.5`, then moves; or `from NODE` moves; or, inside a path, moves from `previous`. */
export function readPlace(cursor: Cursor, origin: Vec3, nameOf: NameOf, previous: string | null): Place | null {
  const line = cursor.line;
  if (cursor.took('at'))
    return { line, from: null, at: add(origin, readPoint(cursor)), moves: readMoves(cursor, origin, nameOf) };
  const from = cursor.took('from') ? nameOf(cursor.name('node to start from')) : previous;
  if (from === null) return null;
  return { line, from, at: [0, 0, 0], moves: readMoves(cursor, origin, nameOf) };
}

export function readPoint(cursor: Cursor): Vec3 {
  const x = cursor.number('x');
  cursor.took(',');
  const y = cursor.number('y');
  cursor.took(',');
  return [x, y, cursor.number('z')];
}

function readMoves(cursor: Cursor, origin: Vec3, nameOf: NameOf): readonly Move[] {
  const moves: Move[] = [];
  for (;;) {
    const next = cursor.peek() ?? '';
    const way = compass[next];
    if (way !== undefined) {
      cursor.take('move');
      const far = cursor.number(`metres ${next}`);
      moves.push({ by: [way[0] * far, way[1] * far, way[2] * far] });
    } else if (cursor.took('over')) moves.push({ over: nameOf(cursor.name('node to stand over or under')) });
    else if (cursor.took('to')) moves.push({ to: cursor.number('level') + origin[2] });
    else if (cursor.took('fall')) moves.push({ fall: cursor.slope('fall') });
    else if (cursor.took('rise')) moves.push({ fall: -cursor.slope('rise') });
    else return moves;
  }
}

/** World coordinates of every node, in the order of `places`. A node that hangs on itself or on nothing is refused. */
export function resolvePlaces(places: ReadonlyMap<string, Place>): ReadonlyMap<string, Vec3> {
  const found = new Map<string, Vec3>();
  const open = new Set<string>();
  const resolve = (name: string, line: number): Vec3 => {
    const known = found.get(name);
    if (known !== undefined) return known;
    const place = places.get(name);
    if (place === undefined) throw new InputError(`line ${line}`, `no line says where ${name} lies`);
    if (open.has(name)) throw new InputError(`line ${place.line}`, `${name} is placed from itself`);
    open.add(name);
    const start = place.from === null ? place.at : resolve(place.from, place.line);
    const at = place.moves.reduce(
      (point, move) => moved(point, move, start, (over) => resolve(over, place.line)),
      start,
    );
    open.delete(name);
    found.set(name, at);
    return at;
  };
  for (const [name, place] of places) resolve(name, place.line);
  return found;
}

function moved(point: Vec3, move: Move, start: Vec3, resolve: (name: string) => Vec3): Vec3 {
  if ('by' in move) return add(point, move.by);
  if ('to' in move) return [point[0], point[1], move.to];
  if ('fall' in move) return [point[0], point[1], point[2] - move.fall * planDistance(start, point)];
  const over = resolve(move.over);
  return [over[0], over[1], point[2]];
}
