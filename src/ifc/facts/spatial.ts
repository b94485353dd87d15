import type { Cursor } from '../lines/cursor.ts';
import type { Reader } from '../reader.ts';
import type { Placements } from '../solids/placements.ts';

export interface StoreyRecord {
  readonly record: number;
  readonly globalId: string;
  readonly name: string | null;
  readonly elevation: number;
}

const deepestTree = 50;

/** Where things stand in the building: containers, wholes and storeys. */
export class Spatial {
  /** In order of STEP ids. */
  readonly storeys: readonly StoreyRecord[];
  readonly spaces: Uint32Array;
  private readonly reader: Reader;
  /** Record of the container, and of the whole, by record. */
  private readonly containers = new Map<number, number>();
  private readonly wholes = new Map<number, number>();

  constructor(reader: Reader, placements: Placements) {
    this.reader = reader;
    // A product may be referenced in further storeys; the one that contains it comes first.
    this.contain('IFCRELCONTAINEDINSPATIALSTRUCTURE');
    this.contain('IFCRELREFERENCEDINSPATIALSTRUCTURE');
    this.aggregate('IFCRELAGGREGATES');
    this.aggregate('IFCRELDECOMPOSES');
    this.storeys = storeyRecords(reader, placements, reader.all('IFCBUILDINGSTOREY'));
    this.spaces = reader.all('IFCSPACE');
  }

  /** The thing that a record is a part of; -1 for none. */
  wholeOf(record: number): number {
    return this.wholes.get(record) ?? -1;
  }

  /** Storey that a product or space belongs to, through its container and its wholes; -1 for none. */
  storeyOf(record: number): number {
    return this.climb(record, 'IFCBUILDINGSTOREY');
  }

  /** Space that a product is contained in, directly or with its whole; -1 for none. */
  spaceOf(record: number): number {
    return this.climb(record, 'IFCSPACE');
  }

  private climb(record: number, wanted: string): number {
    let at = record;
    for (let depth = 0; at >= 0 && depth < deepestTree; depth++) {
      if (this.reader.type(at) === wanted) return at;
      at = this.containers.get(at) ?? this.wholes.get(at) ?? -1;
    }
    return -1;
  }

  private contain(relation: string): void {
    const { reader } = this;
    const cursor = reader.cursor();
    const relations = reader.all(relation);
    for (let k = 0; k < relations.length; k++) {
      const record = relations[k]!;
      const products = cursor.at(reader.args[record]!).skip(4).ids();
      const structure = reader.follow(cursor.id(), record);
      if (structure >= 0) this.give(this.containers, products, structure, record);
    }
  }

  private aggregate(relation: string): void {
    const { reader } = this;
    const cursor: Cursor = reader.cursor();
    const relations = reader.all(relation);
    for (let k = 0; k < relations.length; k++) {
      const record = relations[k]!;
      const whole = reader.follow(cursor.at(reader.args[record]!).skip(4).id(), record);
      if (whole >= 0) this.give(this.wholes, cursor.ids(), whole, record);
    }
  }

  private give(to: Map<number, number>, things: readonly number[], owner: number, from: number): void {
    for (let k = 0; k < things.length; k++) {
      const thing = this.reader.follow(things[k]!, from);
      if (thing >= 0 && !to.has(thing)) to.set(thing, owner);
    }
  }
}

function storeyRecords(reader: Reader, placements: Placements, records: Uint32Array): StoreyRecord[] {
  const found = Array.from(records, (record) => {
    const cursor = reader.open(record);
    const globalId = cursor.unique() ?? '';
    const name = cursor.skip(1).text();
    const placement = reader.follow(cursor.skip(2).id(), record);
    const stated = cursor.skip(3).number();
    const placed = placements.worldOrigin(placement)?.[2] ?? null;
    return { record, globalId, name, placed, stated: stated === null ? null : stated * placements.metres };
  });
  // Some programs put every storey's placement at the same height and say the rest in the elevation alone.
  const differ = (values: readonly (number | null)[]): boolean => new Set(values).size > 1;
  const isFlat = !differ(found.map(({ placed }) => placed)) && differ(found.map(({ stated }) => stated));
  return found.map(({ record, globalId, name, placed, stated }) => {
    const elevation = isFlat ? (stated ?? placed) : (placed ?? stated);
    return { record, globalId, name, elevation: elevation ?? 0 };
  });
}
