import type { Reader } from '../reader.ts';
import type { PortLinks } from './ports.ts';
import type { PropertySets, Reading } from './property-sets.ts';
import { eachRelation } from './relations.ts';
import type { Types } from './type-objects.ts';

/** Properties by the things that have them. Sets of a type are given to the type on the way. */
export interface PropertyReadings {
  /** By place in the list of element records. */
  readonly ofElement: (place: number) => readonly Reading[];
  /** Of the ports that a product owns. */
  readonly ofPorts: (record: number) => readonly { readonly port: string; readonly reading: Reading }[];
  readonly wallCommon: (record: number) => ReadonlyMap<string, string | number | boolean> | null;
}

const none: readonly Reading[] = [];
const noPorts: readonly { readonly port: string; readonly reading: Reading }[] = [];

export function propertyReadings(
  reader: Reader,
  sets: PropertySets,
  types: Types,
  elements: Uint32Array,
  ports: PortLinks,
  walls: readonly number[],
): PropertyReadings {
  const { index, follow, type } = reader;
  /** 0: nobody of ours; k + 1: element at place k; `aWall`: a wall. */
  const places = new Uint32Array(index.count);
  const aWall = 0xffffffff;
  for (const record of walls) places[record] = aWall;
  for (const [k, record] of elements.entries()) places[record] = k + 1;
  const own: (Reading[] | undefined)[] = Array(elements.length);
  const common = new Map<number, ReadonlyMap<string, string | number | boolean>>();
  const byOwner = new Map<number, { readonly port: string; readonly reading: Reading }[]>();

  const give = (thing: number, set: number): void => {
    const place = places[thing]!;
    if (place === aWall) {
      const values = sets.named(set, 'Pset_WallCommon');
      if (values !== null) common.set(thing, values);
    } else if (place > 0) {
      const readings = sets.read(set);
      if (readings.length > 0) own[place - 1] = own[place - 1]?.concat(readings) ?? [...readings];
    } else if (types.addSet(thing, set)) {
      if (type(thing) === 'IFCWALLTYPE') give(thing, set);
    } else {
      const port = ports.placeOf(thing);
      const owner = port < 0 ? -1 : ports.ownerOf[port]!;
      const readings = owner < 0 ? none : sets.read(set);
      if (readings.length === 0) return;
      const name = reader.cursor().at(index.args[thing]!).skip(2).text() ?? `#${index.ids[thing]}`;
      byOwner.set(owner, [...(byOwner.get(owner) ?? []), ...readings.map((reading) => ({ port: name, reading }))]);
    }
  };
  for (const relation of ['IFCRELDEFINESBYPROPERTIES', 'IFCRELOVERRIDESPROPERTIES']) {
    eachRelation(reader, relation, (cursor, record) => {
      const things = cursor.ids();
      let setIds: number[] | null = null;
      for (const id of things) {
        const thing = follow(id, record);
        if (thing < 0) continue;
        setIds ??= cursor.ids();
        for (const setId of setIds) {
          const set = follow(setId, record);
          if (set >= 0) give(thing, set);
        }
      }
    });
  }
  return {
    ofElement: (place) => own[place] ?? none,
    ofPorts: (record) => byOwner.get(record) ?? noPorts,
    wallCommon: (record) => common.get(record) ?? null,
  };
}
