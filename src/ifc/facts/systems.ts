import type { System, SystemId } from '../../model/model.ts';
import type { Reader } from '../reader.ts';

const classes = ['IFCSYSTEM', 'IFCDISTRIBUTIONSYSTEM', 'IFCDISTRIBUTIONCIRCUIT', 'IFCELECTRICALCIRCUIT'];
const deepestNest = 20;
const noSystems: readonly SystemId[] = [];

/** Systems of one file and what is in them. */
export class Systems {
  readonly systems: readonly System[];
  private readonly reader: Reader;
  private readonly first: number;
  private readonly records: readonly number[];
  private readonly idOf: ReadonlyMap<number, SystemId>;
  /** Systems by the record of their member, in order of the relations. */
  private readonly direct = new Map<number, SystemId[]>();
  /** Lists that members share, by their text: most members of a file are in the same few systems. */
  private readonly lists = new Map<string, readonly SystemId[]>();

  /** `first`: id of this file's first system. */
  constructor(reader: Reader, file: number, first: number) {
    this.reader = reader;
    this.first = first;
    this.records = reader.allOf(classes);
    this.systems = this.records.map((record, k) => systemOf(reader, record, file, (first + k) as SystemId));
    this.idOf = new Map(this.records.map((record, k) => [record, (first + k) as SystemId]));
    if (this.records.length === 0) return;
    this.assign('IFCRELASSIGNSTOGROUP');
    this.assign('IFCRELASSIGNSTOGROUPBYFACTOR');
    // A system may be a part of another one: by assignment, or as a whole and its parts.
    if (this.records.length > 1) for (const relation of ['IFCRELAGGREGATES', 'IFCRELNESTS']) this.nest(relation);
  }

  has(record: number): boolean {
    return this.direct.has(record);
  }

  /** Systems of a product, ids rising, those that its systems are part of included; none for most records. */
  of(record: number): readonly SystemId[] {
    const own = this.direct.get(record);
    if (own === undefined) return noSystems;
    const key = own.length === 1 ? String(own[0]) : own.join();
    const known = this.lists.get(key);
    if (known !== undefined) return known;
    const all = new Set(own);
    for (let depth = 0, layer: readonly SystemId[] = own; layer.length > 0 && depth < deepestNest; depth++) {
      layer = layer
        .flatMap((one) => this.direct.get(this.records[one - this.first]!) ?? [])
        .filter((one) => !all.has(one));
      for (const system of layer) all.add(system);
    }
    const list = [...all].sort((a, b) => a - b);
    this.lists.set(key, list);
    return list;
  }

  private assign(relation: string): void {
    const { reader } = this;
    const cursor = reader.cursor();
    const relations = reader.all(relation);
    for (let k = 0; k < relations.length; k++) {
      const record = relations[k]!;
      const members = cursor.at(reader.args[record]!).skip(4).ids();
      const system = this.idOf.get(reader.follow(cursor.skip(1).id(), record));
      if (system === undefined) continue;
      for (let j = 0; j < members.length; j++) this.add(reader.follow(members[j]!, record), system);
    }
  }

  private nest(relation: string): void {
    const { reader } = this;
    const cursor = reader.cursor();
    const relations = reader.all(relation);
    for (let k = 0; k < relations.length; k++) {
      const record = relations[k]!;
      const whole = this.idOf.get(reader.follow(cursor.at(reader.args[record]!).skip(4).id(), record));
      if (whole === undefined) continue;
      for (const id of cursor.ids()) {
        const part = reader.follow(id, record);
        if (this.idOf.has(part)) this.add(part, whole);
      }
    }
  }

  private add(member: number, system: SystemId): void {
    if (member < 0) return;
    const list = this.direct.get(member);
    if (list === undefined) this.direct.set(member, [system]);
    else if (!list.includes(system)) list.push(system);
  }
}

function systemOf(reader: Reader, record: number, file: number, id: SystemId): System {
  const cursor = reader.open(record);
  const globalId = cursor.unique() ?? '';
  const name = cursor.skip(1).text();
  const objectType = cursor.skip(1).text();
  const longName = cursor.more ? cursor.text() : null;
  const word = cursor.more ? cursor.enumeration() : null;
  const stepId = reader.index.ids[record]!;
  return {
    id,
    file,
    stepId,
    globalId,
    name,
    longName,
    objectType,
    predefinedType: word === 'NOTDEFINED' ? null : word,
  };
}
