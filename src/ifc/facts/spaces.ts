import type { Space, SpaceId } from '../../model/model.ts';
import { boundsOf, inWorld } from '../solids/bounds.ts';
import { identity } from '../solids/frame.ts';
import { readShape } from '../solids/product-shape.ts';
import type { Solids } from '../solids/solids.ts';
import type { JoinedStoreys } from './join-storeys.ts';
import type { Source } from './source.ts';

/** Spaces of one file, in order of STEP ids. */
export class Spaces {
  readonly spaces: readonly Space[];
  private readonly ids = new Map<number, SpaceId>();

  /** `first`: id of this file's first space. */
  constructor({ file, reader, placements, spatial }: Source, solids: Solids, storeys: JoinedStoreys, first: number) {
    this.spaces = Array.from(spatial.spaces, (record, k): Space => {
      const cursor = reader.open(record);
      const globalId = cursor.unique() ?? '';
      const name = cursor.skip(1).text();
      const placement = reader.follow(cursor.skip(2).id(), record);
      const definition = reader.follow(cursor.id(), record);
      const longName = cursor.text();
      const world = placement < 0 ? identity : placements.world(placement);
      const box = world === null ? null : boundsOf(inWorld(readShape(reader, solids, definition).body, world));
      const id = (first + k) as SpaceId;
      this.ids.set(record, id);
      const storey = spatial.storeyOf(record);
      return { id, file, globalId, name, longName, storey: storey < 0 ? null : storeys.idOf(file, storey), box };
    });
  }

  /** null for -1. */
  idOf(record: number): SpaceId | null {
    return this.ids.get(record) ?? null;
  }
}
