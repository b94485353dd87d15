import type { ElementId, Port, PortId } from '../../model/model.ts';
import type { Reader } from '../reader.ts';
import type { Placements } from '../solids/placements.ts';
import { typeClasses } from './class-table.ts';
import { eachRelation } from './relations.ts';

/** How a file's ports hang together, before anything is said about each of them. Ports are counted by place. */
export interface PortLinks {
  /** Records in order of STEP ids; ports that only a type object has are left out. */
  readonly records: Uint32Array;
  /** Record of the product that has the port at a place; -1 for none. */
  readonly ownerOf: Int32Array;
  /** Place of a port by its record; -1 for records that are no port. */
  readonly placeOf: (record: number) => number;
  /** Ports of a product by its record. */
  readonly countOf: (record: number) => number;
  /** Pairs of places, in order of their relations. */
  readonly pairs: readonly Pair[];
}

export interface Pair {
  readonly relation: number;
  readonly a: number;
  readonly b: number;
  /** Record of the realizing element; -1 for none. */
  readonly element: number;
}

export function portLinks(reader: Reader): PortLinks {
  const { index, follow, type } = reader;
  const all = reader.all('IFCDISTRIBUTIONPORT');
  const placeIn = (records: Uint32Array): Int32Array => {
    const places = new Int32Array(records.length === 0 ? 0 : index.count).fill(-1);
    for (let k = 0; k < records.length; k++) places[records[k]!] = k;
    return places;
  };
  let places = placeIn(all);
  let ownerOf = new Int32Array(all.length).fill(-1);
  const ofTypes = new Set<number>();
  const own = (port: number, owner: number): void => {
    const place = port < 0 || owner < 0 ? -1 : (places[port] ?? -1);
    if (place < 0) return;
    if (typeClasses.has(type(owner))) ofTypes.add(port);
    else if (ownerOf[place]! < 0) ownerOf[place] = owner;
  };
  if (all.length > 0) {
    for (const relation of ['IFCRELNESTS', 'IFCRELAGGREGATES']) {
      eachRelation(reader, relation, (at, record) => {
        const whole = follow(at.id(), record);
        for (const id of at.ids()) own(follow(id, record), whole);
      });
    }
    eachRelation(reader, 'IFCRELCONNECTSPORTTOELEMENT', (at, record) => {
      const port = follow(at.id(), record);
      own(port, follow(at.id(), record));
    });
  }
  const isTypesOnly = (record: number): boolean => ofTypes.has(record) && ownerOf[places[record]!]! < 0;
  const records = ofTypes.size === 0 ? all : all.filter((record) => !isTypesOnly(record));
  if (records.length < all.length) {
    ownerOf = Int32Array.from(records, (record) => ownerOf[places[record]!]!);
    places = placeIn(records);
  }
  const counts = new Map<number, number>();
  for (const owner of ownerOf) if (owner >= 0) counts.set(owner, (counts.get(owner) ?? 0) + 1);

  const pairs: Pair[] = [];
  const placeOf = (record: number): number => (record < 0 ? -1 : (places[record] ?? -1));
  eachRelation(reader, 'IFCRELCONNECTSPORTS', (at, record) => {
    const a = placeOf(follow(at.id(), record));
    const b = placeOf(follow(at.id(), record));
    const element = at.more ? follow(at.id(), record) : -1;
    if (a >= 0 && b >= 0 && a !== b) pairs.push({ relation: record, a, b, element });
  });
  return { records, ownerOf, placeOf, countOf: (record) => counts.get(record) ?? 0, pairs };
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

/**
 * The ports themselves. `elementOf` gives the element of a product's record. A realizing element is a third party as a
 * rule (a gasket, a weld); where it is a piece of piping without ports (`isPiping`), it lies between the two ports of
 * its joint, and gets an end for each of them, with the relation's own id.
 */
export function readPorts(
  reader: Reader,
  placements: Placements,
  links: PortLinks,
  first: number,
  elementOf: (record: number) => ElementId | null,
  isPiping: (record: number) => boolean,
): { readonly ports: readonly Port[]; readonly portsOf: (element: ElementId) => readonly PortId[] } {
  const { index, follow } = reader;
  const { records, ownerOf, pairs } = links;
  const between = pairs.filter(({ element }) => element >= 0 && isPiping(element) && links.countOf(element) === 0);
  const ends = between.flatMap((pair) => [
    { pair, to: pair.a },
    { pair, to: pair.b },
  ]);
  const idOfPlace = numbered(
    index.ids,
    records,
    ends.map(({ pair }) => index.ids[pair.relation]!),
    first,
  );
  const connected: PortId[][] = Array(records.length + ends.length);
  const join = (a: number, b: number): void => {
    for (const [from, to] of [
      [a, b],
      [b, a],
    ] as const) {
      const list = connected[from];
      if (list === undefined) connected[from] = [idOfPlace[to]! as PortId];
      else if (!list.includes(idOfPlace[to]! as PortId)) list.push(idOfPlace[to]! as PortId);
    }
  };
  const threaded = new Set(between);
  for (const pair of pairs) if (!threaded.has(pair)) join(pair.a, pair.b);
  for (const [k, { to }] of ends.entries()) join(records.length + k, to);

  const ports: Port[] = Array(records.length + ends.length);
  const byElement = new Map<ElementId, PortId[]>();
  const give = (owner: ElementId | null, id: PortId): void => {
    if (owner === null) return;
    const list = byElement.get(owner);
    if (list === undefined) byElement.set(owner, [id]);
    else list.push(id);
  };
  const cursor = reader.cursor();
  for (let place = 0; place < records.length; place++) {
    const record = records[place]!;
    const globalId = cursor.at(index.args[record]!).unique() ?? '';
    const name = cursor.skip(1).text();
    const placement = cursor.skip(2).id();
    const direction = directions[cursor.skip(1).enumeration() ?? ''] ?? 'unknown';
    const at = placements.worldOrigin(follow(placement, record));
    const id = idOfPlace[place]! as PortId;
    const owner = ownerOf[place]! < 0 ? null : elementOf(ownerOf[place]!);
    const stepId = index.ids[record]!;
    ports[id - first] = { id, stepId, globalId, owner, at, direction, connected: connected[place] ?? noPorts, name };
  }
  ends.forEach(({ pair, to }, k) => {
    const place = records.length + k;
    const id = idOfPlace[place]! as PortId;
    const { at, direction } = ports[idOfPlace[to]! - first]!;
    const globalId = cursor.at(index.args[pair.relation]!).unique() ?? '';
    const owner = elementOf(pair.element);
    const stepId = index.ids[pair.relation]!;
    const list = connected[place] ?? noPorts;
    ports[id - first] = {
      id,
      stepId,
      globalId,
      owner,
      at,
      direction: opposite[direction],
      connected: list,
      name: null,
    };
  });
  for (const { owner, id } of ports) give(owner, id);
  return { ports, portsOf: (element) => byElement.get(element) ?? noPorts };
}

/** Ids by place (ports, then ends of realizing elements) in order of STEP ids. */
function numbered(ids: Uint32Array, records: Uint32Array, ends: readonly number[], first: number): Uint32Array {
  const order = Array.from({ length: records.length + ends.length }, (_, place) => place);
  if (ends.length > 0) {
    const stepOf = (place: number): number =>
      place < records.length ? ids[records[place]!]! : ends[place - records.length]!;
    order.sort((a, b) => stepOf(a) - stepOf(b) || a - b);
  }
  const numbers = new Uint32Array(order.length);
  order.forEach((place, k) => {
    numbers[place] = first + k;
  });
  return numbers;
}
