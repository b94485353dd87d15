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
  const { args } = reader;
  const cursor = reader.cursor();
  const body: Piece[] = [];
  const others: Piece[] = [];
  const box: Piece[] = [];
  let axis: readonly Vec3[] | null = null;
  for (const id of cursor.at(args[definition]!).skip(2).ids()) {
    const record = reader.follow(id, definition);
    if (record < 0) continue;
    const name = cursor.at(args[record]!).skip(1).text() ?? '';
    if (name === 'Body') gather(solids, cursor.skip(1).ids(), reader, record, body);
    else if (name === 'Axis')
      axis ??= longestCurve(
        solids,
        cursor
          .skip(1)
          .ids()
          .map((item) => reader.follow(item, record)),
      );
    else if (name === 'Box') gather(solids, cursor.skip(1).ids(), reader, record, box);
    else if (!notTheBody.has(name)) gather(solids, cursor.skip(1).ids(), reader, record, others);
  }
  return { body: body.length > 0 ? body : others, axis, box };
}

function gather(solids: Solids, items: readonly number[], reader: Reader, from: number, into: Piece[]): void {
  for (const id of items) for (const piece of solids.pieces(reader.follow(id, from))) into.push(piece);
}

function longestCurve(solids: Solids, items: readonly number[]): Vec3[] | null {
  let longest: Vec3[] | null = null;
  for (const item of items) {
    const points = solids.curves.points(item);
    if (points !== null && points.length > (longest?.length ?? 1)) longest = points;
  }
  return longest;
}
