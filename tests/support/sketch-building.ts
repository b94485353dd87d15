import type { SketchFabric, SketchSpace, SketchWall } from './sketch.ts';
import type { Scope, Sheet } from './sketch-sheet.ts';
import type { Cursor } from './sketch-tokens.ts';

/** `space "Washroom" from 0 0 to 6 4 height 3`, on the storey above it. */
export function readSpace(cursor: Cursor, sheet: Sheet, scope: Scope): SketchSpace {
  const name = namedIn(cursor.text('name of the space'), scope);
  const { from, to } = readRectangle(cursor, scope);
  cursor.need('height');
  const floor = floorOf(cursor, sheet);
  return { name, storey: sheet.storey, min: [...from, floor], max: [...to, floor + cursor.number('height')] };
}

/** `slab "Ground slab" from -1 -1 to 9 6 top 0 thick 0.2`; a roof likewise. */
export function readFabric(cursor: Cursor, sheet: Sheet, scope: Scope): SketchFabric {
  const name = namedIn(cursor.text('name'), scope);
  const { from, to } = readRectangle(cursor, scope);
  cursor.need('top');
  const top = cursor.number('level of the top') + scope.origin[2];
  cursor.need('thick');
  return { name, storey: sheet.storey, min: [...from, top - cursor.number('thickness')], max: [...to, top] };
}

/** `wall "North wall" from 0 4 to 6 4 height 3 layers "gypsum board" 13 "stud" 140 "gypsum board" 13 external`: layers in mm. */
export function readWall(cursor: Cursor, sheet: Sheet, scope: Scope): SketchWall {
  const name = namedIn(cursor.text('name of the wall'), scope);
  const floor = floorOf(cursor, sheet);
  const { from, to } = readEnds(cursor, scope);
  cursor.need('height');
  const height = cursor.number('height');
  const layers: { name: string; thickness: number }[] = [];
  cursor.need('layers');
  while (cursor.peek()?.startsWith('"')) {
    const layer = cursor.text('name of the layer');
    layers.push({ name: layer, thickness: cursor.number('thickness in mm') / 1000 });
    cursor.took(',');
  }
  if (layers.length === 0) cursor.fail('a wall needs a layer such as "stud" 89');
  let loadBearing: boolean | null = null;
  let external: boolean | null = null;
  while (!cursor.done) {
    if (cursor.took('loadbearing')) loadBearing = true;
    else if (cursor.took('partition')) loadBearing = false;
    else if (cursor.took('external')) external = true;
    else if (cursor.took('internal')) external = false;
    else break;
  }
  return {
    name,
    storey: sheet.storey,
    from: [...from, floor],
    to: [...to, floor],
    height,
    layers,
    loadBearing,
    external,
  };
}

type Plan = readonly [number, number];

function readEnds(cursor: Cursor, scope: Scope): { from: Plan; to: Plan } {
  const point = (word: string): Plan => {
    cursor.need(word);
    const x = cursor.number('x') + scope.origin[0];
    cursor.took(',');
    return [x, cursor.number('y') + scope.origin[1]];
  };
  return { from: point('from'), to: point('to') };
}

function readRectangle(cursor: Cursor, scope: Scope): { from: Plan; to: Plan } {
  const { from, to } = readEnds(cursor, scope);
  if (to[0] <= from[0] || to[1] <= from[1]) cursor.fail('the second corner must lie north-east of the first');
  return { from, to };
}

const namedIn = (name: string, { prefix }: Scope): string => (prefix === '' ? name : `${prefix.slice(0, -1)} ${name}`);

function floorOf(cursor: Cursor, sheet: Sheet): number {
  const storey = sheet.storey === null ? undefined : sheet.storeys[sheet.storey];
  return storey?.elevation ?? cursor.fail('a storey line must stand above it');
}
