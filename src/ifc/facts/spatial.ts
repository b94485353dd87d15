import type { Reader } from '../reader.ts';
import type { Placements } from '../solids/placements.ts';
import { eachRelation } from './relations.ts';

export interface StoreyRecord {
  readonly record: number;
  readonly globalId: string;
  readonly name: string | null;
  readonly elevation: number;
}

/** Where things stand in the building: containers, wholes and storeys. */
export interface Spatial {
  /** In order of STEP ids. */
  readonly storeys: readonly StoreyRecord[];
  readonly spaces: Uint32Array;
  /** The thing that a record is a part of (IfcRelAggregates, IfcRelNests); -1 for none. */
  readonly wholeOf: (record: number) => number;
  /** Storey that a product or space belongs to, through its container and its wholes; -1 for none. */
  readonly storeyOf: (record: number) => number;
  /** Space that a product is contained in, directly or with its whole; -1 for none. */
  readonly spaceOf: (record: number) => number;
}

const deepestTree = 50;

export function spatialOf(reader: Reader, placements: Placements): Spatial {
  const { index, follow, type, all } = reader;
  const containers = new Uint32Array(index.count);
  const wholes = new Uint32Array(index.count);

  // A product may be referenced in further storeys; the one that contains it comes first.
  for (const relation of ['IFCRELCONTAINEDINSPATIALSTRUCTURE', 'IFCRELREFERENCEDINSPATIALSTRUCTURE']) {
    eachRelation(reader, relation, (cursor, record) => {
      const products = cursor.ids();
      const structure = follow(cursor.id(), record);
      if (structure < 0) return;
      for (const id of products) {
        const product = follow(id, record);
        if (product >= 0 && containers[product] === 0) containers[product] = structure + 1;
      }
    });
  }
  for (const relation of ['IFCRELAGGREGATES', 'IFCRELDECOMPOSES']) {
    eachRelation(reader, relation, (cursor, record) => {
      const whole = follow(cursor.id(), record);
      if (whole < 0) return;
      for (const id of cursor.ids()) {
        const part = follow(id, record);
        if (part >= 0 && wholes[part] === 0) wholes[part] = whole + 1;
      }
    });
  }

  /** Climbs containers and wholes from a record until one of that class comes; -1 when none does. */
  const climb = (record: number, wanted: string): number => {
    let at = record;
    for (let depth = 0; at >= 0 && depth < deepestTree; depth++) {
      if (type(at) === wanted) return at;
      const container = containers[at]! - 1;
      at = container >= 0 ? container : wholes[at]! - 1;
    }
    return -1;
  };
  return {
    storeys: storeyRecords(reader, placements, all('IFCBUILDINGSTOREY')),
    spaces: all('IFCSPACE'),
    wholeOf: (record) => wholes[record]! - 1,
    storeyOf: (record) => climb(record, 'IFCBUILDINGSTOREY'),
    spaceOf: (record) => climb(record, 'IFCSPACE'),
  };
}

function storeyRecords(reader: Reader, placements: Placements, records: Uint32Array): StoreyRecord[] {
  const cursor = reader.cursor();
  const found = Array.from(records, (record) => {
    const globalId = cursor.at(reader.index.args[record]!).unique() ?? '';
    const name = cursor.skip(1).text();
    const placement = reader.follow(cursor.skip(2).id(), record);
    const stated = cursor.skip(3).number();
    const placed = placements.worldOrigin(placement)?.[2] ?? null;
    return { record, globalId, name, placed, stated: stated === null ? null : stated * placements.metres };
  });
  // Some programs put every storey's placement at the same height and say the rest in the elevation alone.
  const differ = (values: readonly (number | null)[]): boolean => new Set(values).size > 1;
  const isFlat =
    found.length > 1 && !differ(found.map(({ placed }) => placed)) && differ(found.map(({ stated }) => stated));
  return found.map(({ record, globalId, name, placed, stated }) => {
    const elevation = isFlat ? (stated ?? placed) : (placed ?? stated);
    return { record, globalId, name, elevation: elevation ?? 0 };
  });
}
