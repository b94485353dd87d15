import type { Cursor } from '../lines/cursor.ts';
import type { Reader } from '../reader.ts';
import type { PortLinks } from './ports.ts';
import type { PropertySets, Reading } from './property-sets.ts';
import type { Types } from './type-objects.ts';

const none: readonly Reading[] = [];
const noPorts: readonly PortReading[] = [];

export interface PortReading {
  readonly port: string;
  readonly reading: Reading;
}

type Values = ReadonlyMap<string, string | number | boolean>;

/** Place of a wall: of walls only one set is read. */
export const aWall = 0xffffffff;

/** Properties by the things that have them. Sets of a type are given to the type on the way. */
export class PropertyReadings {
  private readonly reader: Reader;
  private readonly sets: PropertySets;
  private readonly types: Types;
  private readonly ports: PortLinks;
  /** By record. 0: nobody of ours; k + 1: element at place k; `aWall`: a wall. */
  private readonly places: Uint32Array;
  private readonly own: (readonly Reading[] | undefined)[];
  private readonly common = new Map<number, Values>();
  private readonly byOwner = new Map<number, PortReading[]>();

  /** `places` by record, 0 for nobody of ours; see the field. */
  constructor(
    reader: Reader,
    sets: PropertySets,
    types: Types,
    elements: number,
    places: Uint32Array,
    ports: PortLinks,
  ) {
    this.reader = reader;
    this.sets = sets;
    this.types = types;
    this.ports = ports;
    this.places = places;
    this.own = Array<readonly Reading[] | undefined>(elements).fill(undefined);
    this.relate('IFCRELDEFINESBYPROPERTIES');
    this.relate('IFCRELOVERRIDESPROPERTIES');
  }

  /** By place in the list of element records. */
  ofElement(place: number): readonly Reading[] {
    return this.own[place] ?? none;
  }

  /** Of the ports that a product owns. */
  ofPorts(record: number): readonly PortReading[] {
    return this.byOwner.get(record) ?? noPorts;
  }

  /** Values of the common set of a wall or a wall's type; null for none. */
  wallCommon(record: number): Values | null {
    return this.common.get(record) ?? null;
  }

  private relate(relation: string): void {
    const { reader } = this;
    const cursor = reader.cursor();
    const relations = reader.all(relation);
    for (let k = 0; k < relations.length; k++) {
      const record = relations[k]!;
      const things = cursor.at(reader.args[record]!).skip(4).ids();
      this.give(things, cursor, record);
    }
  }

  private give(things: readonly number[], cursor: Cursor, record: number): void {
    const { reader } = this;
    let sets: readonly number[] | null = null;
    for (let j = 0; j < things.length; j++) {
      const thing = reader.follow(things[j]!, record);
      // Of most relations nobody of ours is part: then the set's reference is not even read.
      if (thing < 0 || !this.isOurs(thing)) continue;
      sets ??= cursor.ids();
      for (let i = 0; i < sets.length; i++) {
        const set = reader.follow(sets[i]!, record);
        if (set >= 0) this.giveOne(thing, set);
      }
    }
  }

  private isOurs(thing: number): boolean {
    return this.places[thing] !== 0 || this.types.has(thing) || this.ports.placeOf(thing) >= 0;
  }

  private giveOne(thing: number, set: number): void {
    const place = this.places[thing]!;
    if (place === aWall) this.giveWall(thing, set);
    else if (place > 0) {
      const readings = this.sets.read(set);
      if (readings.length === 0) return;
      const before = this.own[place - 1];
      this.own[place - 1] = before === undefined ? readings : before.concat(readings);
    } else if (this.types.has(thing)) {
      this.types.addSet(thing, set);
      if (this.reader.type(thing) === 'IFCWALLTYPE') this.giveWall(thing, set);
    } else this.givePort(thing, set);
  }

  private giveWall(thing: number, set: number): void {
    const values = this.sets.named(set, 'Pset_WallCommon');
    if (values !== null) this.common.set(thing, values);
  }

  private givePort(thing: number, set: number): void {
    const { reader, ports } = this;
    const place = ports.placeOf(thing);
    const owner = place < 0 ? -1 : ports.ownerOf[place]!;
    const readings = owner < 0 ? none : this.sets.read(set);
    if (readings.length === 0) return;
    const port = reader.open(thing).skip(2).text() ?? `#${reader.index.ids[thing]}`;
    const list = this.byOwner.get(owner) ?? [];
    for (const reading of readings) list.push({ port, reading });
    this.byOwner.set(owner, list);
  }
}
