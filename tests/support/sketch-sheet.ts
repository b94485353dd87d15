import type { Vec3 } from '../../src/geometry/vector.ts';
import type { SketchFabric, SketchPart, SketchPipe, SketchSpace, SketchSystem, SketchWall } from './sketch.ts';
import { type NameOf, type Place, readPlace } from './sketch-places.ts';
import type { Cursor } from './sketch-tokens.ts';

/** What has been read so far. */
export interface Sheet {
  title: string;
  material: string;
  storey: number | null;
  readonly storeys: { name: string; elevation: number }[];
  readonly spaces: SketchSpace[];
  readonly walls: SketchWall[];
  readonly slabs: SketchFabric[];
  readonly roofs: SketchFabric[];
  readonly systems: SketchSystem[];
  readonly places: Map<string, Place>;
  readonly nodeStoreys: Map<string, number | null>;
  readonly bare: Set<string>;
  readonly missing: Set<string>;
  readonly pipes: (SketchPipe & { readonly line: number })[];
  readonly parts: SketchPart[];
}

/** A placed block: its names carry a prefix, its coordinates an origin. The sheet itself has neither. */
export interface Scope {
  readonly prefix: string;
  readonly origin: Vec3;
  readonly nameOf: NameOf;
}

/** Places the node if the line says where; a second place for one name is refused. */
export function putNode(
  sheet: Sheet,
  cursor: Cursor,
  scope: Scope,
  name: string,
  previous: string | null = null,
): void {
  const place = readPlace(cursor, scope.origin, scope.nameOf, previous);
  if (place === null) return;
  const before = sheet.places.get(name);
  if (before !== undefined) cursor.fail(`${name} was placed before, on line ${before.line}`);
  sheet.places.set(name, place);
  sheet.nodeStoreys.set(name, sheet.storey);
}
