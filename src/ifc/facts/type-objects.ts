import type { Reader } from '../reader.ts';
import { typeClasses } from './class-table.ts';
import type { PropertySets, Reading } from './property-sets.ts';

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

/** Type objects of one file and their occurrences. */
export class Types {
  /** Records of the occurrences that have a type of a distribution class. */
  readonly distributionOccurrences: readonly number[];
  private readonly reader: Reader;
  private readonly sets: PropertySets;
  private readonly typeOf = new Map<number, number>();
  /** Sets that relations give to a type, by its record. Holds every type that has occurrences. */
  private readonly added = new Map<number, number[]>();
  private readonly facts = new Map<number, TypeFacts>();

  constructor(reader: Reader, sets: PropertySets) {
    this.reader = reader;
    this.sets = sets;
    const distribution: number[] = [];
    this.distributionOccurrences = distribution;
    const cursor = reader.cursor();
    const relations = reader.all('IFCRELDEFINESBYTYPE');
    for (let k = 0; k < relations.length; k++) {
      const record = relations[k]!;
      const occurrences = cursor.at(reader.args[record]!).skip(4).ids();
      const type = reader.follow(cursor.id(), record);
      if (type < 0) continue;
      if (!this.added.has(type)) this.added.set(type, []);
      const isDistribution = typeClasses.has(reader.type(type));
      for (let j = 0; j < occurrences.length; j++) {
        const occurrence = reader.follow(occurrences[j]!, record);
        if (occurrence < 0) continue;
        this.typeOf.set(occurrence, type);
        if (isDistribution) distribution.push(occurrence);
      }
    }
  }

  /** Record of an occurrence's type; -1 for none. */
  recordOf(occurrence: number): number {
    return this.typeOf.get(occurrence) ?? -1;
  }

  /** Type object of an occurrence; null for none. */
  of(occurrence: number): TypeFacts | null {
    const record = this.recordOf(occurrence);
    if (record < 0) return null;
    const known = this.facts.get(record);
    if (known !== undefined) return known;
    const facts = this.read(record);
    this.facts.set(record, facts);
    return facts;
  }

  /** True for a type object that has occurrences. */
  has(record: number): boolean {
    return this.added.has(record);
  }

  /** Adds a set that a relation gives to a type object. */
  addSet(record: number, set: number): void {
    this.added.get(record)?.push(set);
  }

  private read(record: number): TypeFacts {
    const { reader, sets } = this;
    const cursor = reader.open(record).skip(2);
    const name = cursor.text();
    const description = cursor.text();
    const own = cursor.skip(1).ids();
    const elementType = cursor.skip(2).text();
    const word = cursor.more ? cursor.enumeration() : null;
    const readings: Reading[] = [];
    for (const id of own) readings.push(...sets.read(reader.follow(id, record)));
    for (const set of this.added.get(record) ?? []) readings.push(...sets.read(set));
    return {
      record,
      className: typeClasses.get(reader.type(record))?.name ?? reader.type(record),
      name: name ?? elementType,
      description,
      predefinedType: word === 'NOTDEFINED' ? null : word,
      readings,
    };
  }
}
