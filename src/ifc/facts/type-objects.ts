import type { Reader } from '../reader.ts';
import { typeClasses } from './class-table.ts';
import type { PropertySets, Reading } from './property-sets.ts';
import { eachRelation } from './relations.ts';

/** A type object, as far as its occurrences take over what it says. */
export interface TypeFacts {
  readonly record: number;
  /** In the schema's spelling; upper case for classes that are no distribution types. */
  readonly className: string;
  readonly name: string | null;
  readonly description: string | null;
  /** Upper case; null for NOTDEFINED and `$`. */
  readonly predefinedType: string | null;
  readonly readings: readonly Reading[];
}

export interface Types {
  /** Type object of an occurrence; null for none. */
  readonly of: (record: number) => TypeFacts | null;
  /** Records of the occurrences that have a type of a distribution class. */
  readonly distributionOccurrences: () => readonly number[];
  /** Adds a set that a relation gives to a type object; false where the record is none. */
  readonly addSet: (record: number, set: number) => boolean;
}

export function typesOf(reader: Reader, sets: PropertySets): Types {
  const { index, follow, type } = reader;
  const typeOf = new Uint32Array(index.count);
  const added = new Map<number, number[]>();
  const facts = new Map<number, TypeFacts>();
  const distribution: number[] = [];
  eachRelation(reader, 'IFCRELDEFINESBYTYPE', (cursor, record) => {
    const occurrences = cursor.ids();
    const typeRecord = follow(cursor.id(), record);
    if (typeRecord < 0) return;
    if (!added.has(typeRecord)) added.set(typeRecord, []);
    const isDistribution = typeClasses.has(type(typeRecord));
    for (const id of occurrences) {
      const occurrence = follow(id, record);
      if (occurrence < 0) continue;
      typeOf[occurrence] = typeRecord + 1;
      if (isDistribution) distribution.push(occurrence);
    }
  });

  const read = (record: number): TypeFacts => {
    const cursor = reader.cursor().at(index.args[record]!).skip(2);
    const name = cursor.text();
    const description = cursor.text();
    const own = cursor.skip(1).ids();
    const elementType = cursor.skip(2).text();
    const word = cursor.more ? cursor.enumeration() : null;
    const readings: Reading[] = [];
    for (const id of own) readings.push(...sets.read(follow(id, record)));
    for (const set of added.get(record) ?? []) readings.push(...sets.read(set));
    return {
      record,
      className: typeClasses.get(type(record))?.name ?? type(record),
      name: name ?? elementType,
      description,
      predefinedType: word === 'NOTDEFINED' ? null : word,
      readings,
    };
  };
  return {
    of: (record) => {
      const typeRecord = typeOf[record]! - 1;
      if (typeRecord < 0) return null;
      const known = facts.get(typeRecord) ?? read(typeRecord);
      facts.set(typeRecord, known);
      return known;
    },
    distributionOccurrences: () => distribution,
    addSet: (record, set) => {
      const list = added.get(record);
      list?.push(set);
      return list !== undefined;
    },
  };
}
