import { metresInName, type PropertyMeaning, propertyMeaning } from '../../model/witness.ts';
import type { Cursor } from '../lines/cursor.ts';
import { NameTable, type Remembered } from '../lines/name-table.ts';
import { decodeText } from '../lines/text.ts';
import type { Reader } from '../reader.ts';
import { type StatedValue, statedValue } from './property-value.ts';
import type { Units } from './units.ts';

/** One property or quantity that bears on drainage, its lengths in metres and angles in radians. */
export interface Reading {
  readonly set: string;
  readonly name: string;
  readonly meaning: PropertyMeaning;
  readonly value: string | number | boolean;
  readonly measure: 'length' | 'angle' | 'number' | 'text' | 'flag';
  /** True where the unit of a length or number is said: by a measure, a unit or the name. */
  readonly hasUnit: boolean;
  readonly isQuantity: boolean;
}

const ownPrefix = 'Drainwright_';
const none: readonly Reading[] = [];
const deepestComplex = 10;
/** Readings of one set that are kept: complex properties of complex properties can grow without end. */
const mostReadings = 2000;

interface NameSays {
  readonly meaning: PropertyMeaning | null;
  readonly metres: number | null;
}

/** Property sets and element quantities of one file. */
export class PropertySets {
  private readonly reader: Reader;
  private readonly units: Units;
  private readonly names: NameTable<NameSays>;
  private readonly cursor: Cursor;
  private readonly inner: Cursor;
  /** The set read last: one relation often gives it to many things, one after the other. */
  private last = -1;
  /** Readings of one set are gathered here first, so that the list kept is as long as it must be. */
  private readonly gathered: Reading[] = [];
  private lastReadings = none;

  constructor(reader: Reader, units: Units) {
    this.reader = reader;
    this.units = units;
    this.cursor = reader.cursor();
    this.inner = reader.cursor();
    const { bytes } = reader.index;
    this.names = new NameTable<NameSays>(bytes, (from, to) => {
      const name = decodeText(bytes, from, to, reader.watch).trim();
      return { name, meaning: { meaning: propertyMeaning(name), metres: metresInName(name) }, isOdd: false };
    });
  }

  /** What a set says of drainage, in its own order. Our own sets say nothing. */
  read(record: number): readonly Reading[] {
    const kind = this.reader.type(record);
    if (kind !== 'IFCPROPERTYSET' && kind !== 'IFCELEMENTQUANTITY') return none;
    if (record === this.last) return this.lastReadings;
    const { cursor, reader } = this;
    const ids = cursor
      .at(reader.args[record]!)
      .skip(kind === 'IFCPROPERTYSET' ? 4 : 5)
      .ids();
    const found = this.gathered;
    found.length = 0;
    let set: string | null = null;
    for (let k = 0; k < ids.length; k++) {
      const property = reader.follow(ids[k]!, record);
      if (property < 0) continue;
      const named = this.nameOf(property);
      if (named === null || (named.meaning.meaning === null && reader.type(property) !== 'IFCCOMPLEXPROPERTY'))
        continue;
      // The set's own name is wanted only where one of its properties is.
      if (set === null) {
        set = cursor.at(reader.args[record]!).skip(2).text() ?? '';
        if (set.startsWith(ownPrefix)) break;
      }
      this.property(property, named, set, 0, found);
    }
    const result = found.length === 0 ? none : found.slice();
    this.last = record;
    this.lastReadings = result;
    return result;
  }

  /** Values of one set by property name, whatever they mean; null unless the set has this name. */
  named(record: number, set: string): ReadonlyMap<string, string | number | boolean> | null {
    const { cursor, inner, reader } = this;
    if (reader.type(record) !== 'IFCPROPERTYSET') return null;
    if (cursor.at(reader.args[record]!).skip(2).text() !== set) return null;
    const values = new Map<string, string | number | boolean>();
    for (const id of cursor.skip(1).ids()) {
      const property = reader.follow(id, record);
      if (reader.type(property) !== 'IFCPROPERTYSINGLEVALUE') continue;
      const name = inner.at(reader.args[property]!).text();
      const stated = statedValue(inner.skip(1));
      if (name !== null && stated !== null) values.set(name, stated.value);
    }
    return values;
  }

  private property(record: number, named: Remembered<NameSays>, set: string, depth: number, into: Reading[]): void {
    const { inner, reader } = this;
    const kind = reader.type(record);
    if (into.length >= mostReadings) return;
    if (kind === 'IFCCOMPLEXPROPERTY') {
      if (depth >= deepestComplex) return;
      for (const id of reader.open(record).skip(3).ids()) {
        const part = reader.follow(id, record);
        const partName = part < 0 ? null : this.nameOf(part);
        if (partName !== null) this.property(part, partName, set, depth + 1, into);
      }
      return;
    }
    const { name } = named;
    const { meaning, metres } = named.meaning;
    if (meaning === null) return;
    const stated = statedIn(inner.at(reader.args[record]!), kind);
    if (stated === null) return;
    const { value, measure, unit, isQuantity } = stated;
    if (typeof value !== 'number') {
      // A text that repeats the property's name is a template's placeholder.
      if (value !== name) into.push(readingOf(set, name, meaning, value, measure, false, isQuantity));
      return;
    }
    const ownUnit = metres ?? (unit === 0 ? null : this.unitFactor(unit, record, 'LENGTHUNIT'));
    if (measure === 'length' || (measure === 'number' && ownUnit !== null)) {
      const length = value * (ownUnit ?? this.units.length.metres);
      into.push(readingOf(set, name, meaning, length, 'length', true, isQuantity));
    } else {
      const factor = measure === 'angle' ? this.radians(unit, record) : 1;
      into.push(readingOf(set, name, meaning, value * factor, measure, false, isQuantity));
    }
  }

  /** Name of a property, always its first argument, with what it says; null where there is none. */
  private nameOf(record: number): Remembered<NameSays> | null {
    const { bytes } = this.cursor;
    let open = this.reader.args[record]! + 1;
    while (bytes[open]! <= 32) open++;
    return bytes[open] === 39 ? this.names.quoted(open) : null;
  }

  private unitFactor(id: number, from: number, quantity: string): number | null {
    const unit = this.units.read(this.reader.follow(id, from));
    return unit !== null && unit.quantity === quantity ? unit.factor : null;
  }

  private radians(unit: number, from: number): number {
    return (unit === 0 ? null : this.unitFactor(unit, from, 'PLANEANGLEUNIT')) ?? this.units.radians;
  }
}

const readingOf = (
  set: string,
  name: string,
  meaning: PropertyMeaning,
  value: string | number | boolean,
  measure: Reading['measure'],
  hasUnit: boolean,
  isQuantity: boolean,
): Reading => ({ set, name, meaning, value, measure, hasUnit, isQuantity });

interface StatedProperty {
  readonly value: string | number | boolean;
  readonly measure: StatedValue['measure'];
  /** STEP id of the property's own unit; 0 for none. */
  readonly unit: number;
  readonly isQuantity: boolean;
}

/** Value and unit of a property or quantity of any kind; the first value of a list. */
function statedIn(cursor: Cursor, kind: string): StatedProperty | null {
  switch (kind) {
    case 'IFCPROPERTYSINGLEVALUE':
    case 'IFCPROPERTYLISTVALUE': {
      const stated = statedValue(cursor.skip(2));
      return stated === null ? null : withUnit(stated, cursor.id());
    }
    case 'IFCPROPERTYENUMERATEDVALUE': {
      const stated = statedValue(cursor.skip(2));
      return stated === null ? null : withUnit(stated, 0);
    }
    case 'IFCPROPERTYBOUNDEDVALUE': {
      const upper = statedValue(cursor.skip(2));
      const lower = statedValue(cursor);
      const unit = cursor.id();
      const setPoint = cursor.more ? statedValue(cursor) : null;
      // Two bounds that differ are no value.
      const stated = setPoint ?? (upper !== null && upper.value === lower?.value ? upper : null);
      return stated === null ? null : withUnit(stated, unit);
    }
    case 'IFCQUANTITYLENGTH': {
      const unit = cursor.skip(2).id();
      const value = cursor.number();
      return value === null ? null : { value, measure: 'length', unit, isQuantity: true };
    }
    case 'IFCQUANTITYNUMBER':
    case 'IFCQUANTITYCOUNT': {
      const value = cursor.skip(3).number();
      return value === null ? null : { value, measure: 'number', unit: 0, isQuantity: true };
    }
    default:
      return null;
  }
}

const withUnit = ({ value, measure }: StatedValue, unit: number): StatedProperty => ({
  value,
  measure,
  unit,
  isQuantity: false,
});
