import type { System, SystemId } from '../../model/model.ts';
import type { Reader } from '../reader.ts';
import { eachRelation } from './relations.ts';

export interface Systems {
  readonly systems: readonly System[];
  /** Every product in a system, by its record: ids rising, the systems that theirs is part of included. */
  readonly membersOf: ReadonlyMap<number, readonly SystemId[]>;
}

const classes = ['IFCSYSTEM', 'IFCDISTRIBUTIONSYSTEM', 'IFCDISTRIBUTIONCIRCUIT', 'IFCELECTRICALCIRCUIT'];
const deepestNest = 20;

/** `first`: id of this file's first system. */
export function systemsOf(reader: Reader, file: number, first: number): Systems {
  const { index, follow } = reader;
  const records = classes.flatMap((name) => [...reader.all(name)]).sort((a, b) => index.ids[a]! - index.ids[b]!);
  const cursor = reader.cursor();
  const systems = records.map((record, k): System => {
    const globalId = cursor.at(index.args[record]!).unique() ?? '';
    const name = cursor.skip(1).text();
    const objectType = cursor.skip(1).text();
    const longName = cursor.more ? cursor.text() : null;
    const word = cursor.more ? cursor.enumeration() : null;
    const predefinedType = word === 'NOTDEFINED' ? null : word;
    const stepId = index.ids[record]!;
    return { id: (first + k) as SystemId, file, stepId, globalId, name, longName, objectType, predefinedType };
  });
  const idOf = new Map(records.map((record, k) => [record, (first + k) as SystemId]));

  const direct = new Map<number, SystemId[]>();
  const add = (product: number, system: SystemId): void => {
    const list = direct.get(product);
    if (list === undefined) direct.set(product, [system]);
    else if (!list.includes(system)) list.push(system);
  };
  for (const relation of ['IFCRELASSIGNSTOGROUP', 'IFCRELASSIGNSTOGROUPBYFACTOR']) {
    eachRelation(reader, relation, (at, record) => {
      const members = at.ids();
      const system = idOf.get(follow(at.skip(1).id(), record));
      if (system === undefined) return;
      for (const id of members) {
        const member = follow(id, record);
        if (member >= 0) add(member, system);
      }
    });
  }
  // A system may be a part of another one: by assignment (above), or as a whole and its parts.
  for (const relation of ['IFCRELAGGREGATES', 'IFCRELNESTS']) {
    if (records.length < 2) break;
    eachRelation(reader, relation, (at, record) => {
      const whole = idOf.get(follow(at.id(), record));
      if (whole === undefined) return;
      for (const id of at.ids()) if (idOf.has(follow(id, record))) add(follow(id, record), whole);
    });
  }
  const withParents = (own: readonly SystemId[]): SystemId[] => {
    const all = new Set(own);
    for (let depth = 0, layer = own; layer.length > 0 && depth < deepestNest; depth++) {
      layer = layer.flatMap((system) => direct.get(records[system - first]!) ?? []).filter((one) => !all.has(one));
      for (const system of layer) all.add(system);
    }
    return [...all].sort((a, b) => a - b);
  };
  const isNested = records.some((record) => direct.has(record));
  const membersOf = new Map<number, readonly SystemId[]>();
  for (const [product, own] of direct) {
    if (!idOf.has(product)) membersOf.set(product, isNested ? withParents(own) : own.sort((a, b) => a - b));
  }
  return { systems, membersOf };
}
