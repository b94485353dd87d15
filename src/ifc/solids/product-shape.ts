import type { Vec3 } from '../../geometry/vector.ts';
import type { Reader } from '../reader.ts';
import type { Piece } from './piece.ts';
import type { Solids } from './solids.ts';

/** What a product's representations give, in the product's own coordinates, metres. */
export interface ProductShape {
  readonly body: readonly Piece[];
  /** Points of its Axis representation; null where there is none that can be read. */
  readonly axis: readonly Vec3[] | null;
  /** A Box representation, for products without a body that can be read. */
  readonly box: readonly Piece[];
}

/** Representations that show where a product may be touched, written about or opened, not where it is. */
const notTheBody = new Set([
  'Axis',
  'Box',
  'FootPrint',
  'Plan',
  'Annotation',
  'Clearance',
  'CoG',
  'Profile',
  'Surface',
  'Lighting',
]);

export const noShape: ProductShape = { body: [], axis: null, box: [] };

/** Reads the IfcProductDefinitionShape of a product. */
export function readShape(reader: Reader, solids: Solids, definition: number): ProductShape {
  if (definition < 0) return noShape;
  const { index, follow } = reader;
  const cursor = reader.cursor();
  const representations = cursor.at(index.args[definition]!).skip(2).ids();
  const bodies: { readonly isBody: boolean; readonly record: number; readonly items: readonly number[] }[] = [];
  let axis: Vec3[] | null = null;
  const box: Piece[] = [];
  for (const id of representations) {
    const record = follow(id, definition);
    if (record < 0) continue;
    const name = cursor.at(index.args[record]!).skip(1).text() ?? '';
    const items = cursor.skip(1).ids();
    if (name === 'Axis')
      axis ??= longestCurve(
        solids,
        items.map((item) => follow(item, record)),
      );
    else if (name === 'Box') for (const item of items) box.push(...solids.pieces(follow(item, record)));
    else if (!notTheBody.has(name)) bodies.push({ isBody: name === 'Body', record, items });
  }
  const named = bodies.filter(({ isBody }) => isBody);
  const body: Piece[] = [];
  for (const { record, items } of named.length > 0 ? named : bodies) {
    for (const item of items) body.push(...solids.pieces(follow(item, record)));
  }
  return { body, axis, box };
}

function longestCurve(solids: Solids, items: readonly number[]): Vec3[] | null {
  let longest: Vec3[] | null = null;
  for (const item of items) {
    const points = solids.curves.points(item);
    if (points !== null && points.length > (longest?.length ?? 1)) longest = points;
  }
  return longest;
}
