import type { ElementId, Port, PortId } from '../../model/model.ts';
import type { Reader } from '../reader.ts';
import type { Placements } from '../solids/placements.ts';
import { typeClasses } from './class-table.ts';

/** A joint of two ports, by their places. */
export interface Pair {
  readonly relation: number;
  readonly a: number;
  readonly b: number;
  /** Record of the realizing element; -1 for none. */
  readonly element: number;
}

/** How a file's ports hang together, before anything is said about each of them. Ports are counted by place. */
export class PortLinks {
  /** Records in order of STEP ids; ports that only a type object has are left out. */
  readonly records: Uint32Array;
  /** Record of the product that has the port at a place; -1 for none. */
  readonly ownerOf: Int32Array;
  /** In order of their relations. */
  readonly pairs: readonly Pair[];
  private readonly reader: Reader;
  /** Place + 1 by record; 0 for records that are no port. */
  private readonly places: Uint32Array;
  private readonly counts = new Map<number, number>();
  private readonly ofTypes = new Set<number>();

  constructor(reader: Reader) {
    this.reader = reader;
    const all = reader.all('IFCDISTRIBUTIONPORT');
    this.places = new Uint32Array(all.length === 0 ? 0 : reader.index.count);
    this.number(all);
    this.ownerOf = new Int32Array(all.length).fill(-1);
    this.records = all;
    if (all.length > 0) {
      this.own('IFCRELNESTS', true);
      this.own('IFCRELAGGREGATES', true);
      this.own('IFCRELCONNECTSPORTTOELEMENT', false);
    }
    if (this.ofTypes.size > 0) {
      this.records = all.filter((record, k) => !this.ofTypes.has(record) || this.ownerOf[k]! >= 0);
      this.ownerOf = Int32Array.from(this.records, (record) => this.ownerOf[this.placeOf(record)]!);
      this.places.fill(0);
      this.number(this.records);
    }
    for (let k = 0; k < this.ownerOf.length; k++) {
      const owner = this.ownerOf[k]!;
      if (owner >= 0) this.counts.set(owner, (this.counts.get(owner) ?? 0) + 1);
    }
    this.pairs = all.length === 0 ? [] : this.readPairs();
  }

  /** -1 for records that are no port. */
  placeOf(record: number): number {
    return record < 0 ? -1 : (this.places[record] ?? 0) - 1;
  }

  /** Ports of a product by its record. */
  countOf(record: number): number {
    return this.counts.get(record) ?? 0;
  }

  private number(records: Uint32Array): void {
    for (let k = 0; k < records.length; k++) this.places[records[k]!] = k + 1;
  }

  /** Reads one kind of relation between ports and their owners. */
  private own(relation: string, isOwnerFirst: boolean): void {
    const { reader } = this;
    const cursor = reader.cursor();
    const relations = reader.all(relation);
    for (let k = 0; k < relations.length; k++) {
      const record = relations[k]!;
      cursor.at(reader.args[record]!).skip(4);
      if (isOwnerFirst) {
        const owner = reader.follow(cursor.id(), record);
        const parts = cursor.ids();
        for (let j = 0; j < parts.length; j++) this.give(reader.follow(parts[j]!, record), owner);
      } else {
        const port = reader.follow(cursor.id(), record);
        this.give(port, reader.follow(cursor.id(), record));
      }
    }
  }

  private give(port: number, owner: number): void {
    const place = this.placeOf(port);
    if (place < 0 || owner < 0) return;
    if (typeClasses.has(this.reader.type(owner))) this.ofTypes.add(port);
    else if (this.ownerOf[place]! < 0) this.ownerOf[place] = owner;
  }

  private readPairs(): Pair[] {
    const { reader } = this;
    const cursor = reader.cursor();
    const relations = reader.all('IFCRELCONNECTSPORTS');
    const pairs: Pair[] = [];
    for (let k = 0; k < relations.length; k++) {
      const relation = relations[k]!;
      cursor.at(reader.args[relation]!).skip(4);
      const a = this.placeOf(reader.follow(cursor.id(), relation));
      const b = this.placeOf(reader.follow(cursor.id(), relation));
      const element = cursor.more ? reader.follow(cursor.id(), relation) : -1;
      if (a >= 0 && b >= 0 && a !== b) pairs.push({ relation, a, b, element });
    }
    return pairs;
  }
}

const directions: Readonly<Record<string, Port['direction']>> = {
  SOURCE: 'source',
  SINK: 'sink',
  SOURCEANDSINK: 'both',
};
const opposite: Readonly<Record<Port['direction'], Port['direction']>> = {
  source: 'sink',
  sink: 'source',
  both: 'both',
  unknown: 'unknown',
};
const noPorts: readonly PortId[] = [];

/** What is known of products when ports are read. */
export interface PortOwners {
  /** Element of a product's record; null for products that are none. */
  elementAt(record: number): ElementId | null;
  isPiping(record: number): boolean;
}

/**
 * The ports themselves, in order of STEP ids. A realizing element is a third party as a rule (a gasket, a weld); where
 * it is a piece of piping without ports, it lies between the two ports of its joint, and gets an end for each of them
 * under the relation's own id.
 */
export function readPorts(
  reader: Reader,
  placements: Placements,
  links: PortLinks,
  first: number,
  owners: PortOwners,
): Port[] {
  const { index } = reader;
  const { records, ownerOf, pairs } = links;
  const isBetween = ({ element }: Pair): boolean =>
    element >= 0 && links.countOf(element) === 0 && owners.isPiping(element);
  const between = new Set(pairs.filter(isBetween));
  const ends = [...between].flatMap((pair) => [
    { pair, to: pair.a },
    { pair, to: pair.b },
  ]);
  const total = records.length + ends.length;
  const idOf = numbered(
    index.ids,
    records,
    ends.map(({ pair }) => index.ids[pair.relation]!),
    first,
  );
  const connected: (PortId[] | undefined)[] = Array(total).fill(undefined);
  for (let k = 0; k < pairs.length; k++) {
    const pair = pairs[k]!;
    if (between.size === 0 || !between.has(pair)) join(connected, idOf, pair.a, pair.b);
  }
  for (const [k, { to }] of ends.entries()) join(connected, idOf, records.length + k, to);

  const ports: Port[] = Array(total);
  const cursor = reader.cursor();
  for (let place = 0; place < records.length; place++) {
    const record = records[place]!;
    const globalId = cursor.at(reader.args[record]!).unique() ?? '';
    const name = cursor.skip(1).text();
    const placement = cursor.skip(2).id();
    const direction = directions[cursor.skip(1).enumeration() ?? ''] ?? 'unknown';
    const at = placements.worldOrigin(reader.follow(placement, record));
    const id = idOf[place]! as PortId;
    const owner = ownerOf[place]! < 0 ? null : owners.elementAt(ownerOf[place]!);
    const stepId = index.ids[record]!;
    ports[id - first] = { id, stepId, globalId, owner, at, direction, connected: connected[place] ?? noPorts, name };
  }
  for (const [k, { pair, to }] of ends.entries()) {
    const id = idOf[records.length + k]! as PortId;
    const towards = ports[idOf[to]! - first]!;
    ports[id - first] = {
      id,
      stepId: index.ids[pair.relation]!,
      globalId: cursor.at(reader.args[pair.relation]!).unique() ?? '',
      owner: owners.elementAt(pair.element),
      at: towards.at,
      direction: opposite[towards.direction],
      connected: connected[records.length + k] ?? noPorts,
      name: null,
    };
  }
  return ports;
}

function join(connected: (PortId[] | undefined)[], idOf: Uint32Array, a: number, b: number): void {
  link(connected, a, idOf[b]! as PortId);
  link(connected, b, idOf[a]! as PortId);
}

function link(connected: (PortId[] | undefined)[], place: number, to: PortId): void {
  const list = connected[place];
  if (list === undefined) connected[place] = [to];
  else if (!list.includes(to)) list.push(to);
}

/** Ids by place (ports, then ends of realizing elements) in order of STEP ids. */
function numbered(ids: Uint32Array, records: Uint32Array, ends: readonly number[], first: number): Uint32Array {
  const numbers = new Uint32Array(records.length + ends.length);
  if (ends.length === 0) {
    for (let k = 0; k < numbers.length; k++) numbers[k] = first + k;
    return numbers;
  }
  const stepOf = (place: number): number =>
    place < records.length ? ids[records[place]!]! : ends[place - records.length]!;
  const order = Array.from(numbers, (_, place) => place).sort((a, b) => stepOf(a) - stepOf(b) || a - b);
  for (const [k, place] of order.entries()) numbers[place] = first + k;
  return numbers;
}
