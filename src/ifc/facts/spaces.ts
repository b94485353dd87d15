import type { Space, SpaceId, StoreyId } from '../../model/model.ts';
import { boundsOf } from '../solids/bounds.ts';
import { identity } from '../solids/frame.ts';
import { readShape } from '../solids/product-shape.ts';
import type { Solids } from '../solids/solids.ts';
import type { Source } from './source.ts';

export interface Spaces {
  /** In order of STEP ids. */
  readonly spaces: readonly Space[];
  /** null for -1. */
  readonly idOf: (record: number) => SpaceId | null;
}

/** `first`: id of this file's first space. */
export function spacesOf(
  { file, index, reader, placements, spatial }: Source,
  solids: Solids,
  storeyOf: (record: number) => StoreyId | null,
  first: number,
): Spaces {
  const cursor = reader.cursor();
  const ids = new Map<number, SpaceId>();
  const spaces = Array.from(spatial.spaces, (record, k): Space => {
    const globalId = cursor.at(index.args[record]!).unique() ?? '';
    const name = cursor.skip(1).text();
    const placement = reader.follow(cursor.skip(2).id(), record);
    const definition = reader.follow(cursor.id(), record);
    const longName = cursor.text();
    const world = placement < 0 ? identity : placements.world(placement);
    const box = world === null ? null : boundsOf(readShape(reader, solids, definition).body, world);
    const id = (first + k) as SpaceId;
    ids.set(record, id);
    return { id, file, globalId, name, longName, storey: storeyOf(record), box };
  });
  return { spaces, idOf: (record) => ids.get(record) ?? null };
}
