import type { Vec3 } from '../../geometry/vector.ts';
import type { Reader } from '../reader.ts';
import type { Placements } from '../solids/placements.ts';
import { typeClasses } from './class-table.ts';
import { eachRelation } from './relations.ts';

/** A port as the file has it; its place among all ports comes later. */
export interface PortRecord {
  /** -1 for an end of a pipe that realizes a joint and has no port of its own. */
  readonly record: number;
  readonly stepId: number;
  readonly globalId: string;
  readonly name: string | null;
  readonly at: Vec3 | null;
  readonly direction: 'source' | 'sink' | 'both' | 'unknown';
  /** Record of the product that has the port; -1 for none. */
  owner: number;
  readonly connected: PortRecord[];
}

export interface Ports {
  /** In order of STEP ids; ports of type objects are left out. */
  readonly ports: readonly PortRecord[];
  readonly of: (record: number) => PortRecord | undefined;
  /** Ports of a product, in order of STEP ids. */
  readonly ownedBy: ReadonlyMap<number, readonly PortRecord[]>;
  /** Joints whose realizing element is given: that element, and the two ports. */
  readonly realized: readonly Realized[];
}

export interface Realized {
  readonly relation: number;
  readonly element: number;
  readonly a: PortRecord;
  readonly b: PortRecord;
}

const directions: Readonly<Record<string, PortRecord['direction']>> = {
  SOURCE: 'source',
  SINK: 'sink',
  SOURCEANDSINK: 'both',
};

export function portsOf(reader: Reader, placements: Placements): Ports {
  const { index, follow, type } = reader;
  const cursor = reader.cursor();
  const byRecord = new Map<number, PortRecord>();
  for (const record of reader.all('IFCDISTRIBUTIONPORT')) {
    const globalId = cursor.at(index.args[record]!).text() ?? '';
    const name = cursor.skip(1).text();
    const placement = cursor.skip(2).id();
    const direction = directions[cursor.skip(1).enumeration() ?? ''] ?? 'unknown';
    const at = placements.worldOrigin(follow(placement, record));
    byRecord.set(record, {
      record,
      stepId: index.ids[record]!,
      globalId,
      name,
      at,
      direction,
      owner: -1,
      connected: [],
    });
  }
  const ofTypes = new Set<number>();
  const own = (port: number, owner: number): void => {
    const known = byRecord.get(port);
    if (known === undefined || owner < 0) return;
    if (typeClasses.has(type(owner))) ofTypes.add(port);
    else if (known.owner < 0) known.owner = owner;
  };
  if (byRecord.size > 0) {
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
  const realized: Realized[] = [];
  eachRelation(reader, 'IFCRELCONNECTSPORTS', (at, record) => {
    const a = byRecord.get(follow(at.id(), record));
    const b = byRecord.get(follow(at.id(), record));
    const element = at.more ? follow(at.id(), record) : -1;
    if (a === undefined || b === undefined || a === b) return;
    if (element >= 0) realized.push({ relation: record, element, a, b });
    join(a, b);
  });
  for (const port of ofTypes) if ((byRecord.get(port)?.owner ?? -1) < 0) byRecord.delete(port);
  const ports = [...byRecord.values()];
  const ownedBy = new Map<number, PortRecord[]>();
  for (const port of ports) {
    if (port.owner < 0) continue;
    const list = ownedBy.get(port.owner);
    if (list === undefined) ownedBy.set(port.owner, [port]);
    else list.push(port);
  }
  return { ports, of: (record) => byRecord.get(record), ownedBy, realized };
}

function join(a: PortRecord, b: PortRecord): void {
  if (!a.connected.includes(b)) a.connected.push(b);
  if (!b.connected.includes(a)) b.connected.push(a);
}

/**
 * A realizing element is a third party as a rule (a gasket, a weld). Where it is a piece of piping without ports, it
 * lies between the two: each gets an end of it. Returns the ends.
 */
export function threadThrough(reader: Reader, { relation, element, a, b }: Realized): readonly PortRecord[] {
  const { index } = reader;
  const globalId = reader.cursor().at(index.args[relation]!).text() ?? '';
  a.connected.splice(a.connected.indexOf(b), 1);
  b.connected.splice(b.connected.indexOf(a), 1);
  const end = (towards: PortRecord): PortRecord => ({
    record: -1,
    stepId: index.ids[relation]!,
    globalId,
    name: null,
    at: towards.at,
    direction: towards.direction === 'source' ? 'sink' : towards.direction === 'sink' ? 'source' : towards.direction,
    owner: element,
    connected: [towards],
  });
  const ends = [end(a), end(b)] as const;
  a.connected.push(ends[0]);
  b.connected.push(ends[1]);
  return ends;
}
