import { metresInName, type PropertyMeaning, propertyMeaning } from '../../model/witness.ts';
import type { Cursor } from '../lines/cursor.ts';
import { nameTable } from '../lines/name-table.ts';
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

export interface PropertySets {
  /** What a property set or element quantity says of drainage, in its own order. Our own sets say nothing. */
  readonly read: (record: number) => readonly Reading[];
  /** Values of one set by property name, whatever they mean; null unless the set has this name. */
  readonly named: (record: number, set: string) => ReadonlyMap<string, string | number | boolean> | null;
}

const ownPrefix = 'Drainwright_';
const none: readonly Reading[] = [];
const deepestComplex = 10;

interface Named {
  readonly meaning: PropertyMeaning | null;
  readonly metres: number | null;
}

export function propertySetsOf(reader: Reader, units: Units): PropertySets {
  const { index, follow, type } = reader;
  const { args, bytes } = index;
  const metres = units.length.metres;
  const names = nameTable<Named>(bytes, (from, to) => {
    const name = decodeText(bytes, from, to, reader.watch).trim();
    return { name, meaning: { meaning: propertyMeaning(name), metres: metresInName(name) } };
  });
  const cursor = reader.cursor();
  const inner = reader.cursor();
  const readings = new Map<number, readonly Reading[]>();

  /** Name and meaning of a property, whose name is always its first argument; null where nothing is of use. */
  const nameOf = (record: number) => {
    let open = args[record]! + 1;
    while (bytes[open]! <= 32) open++;
    if (bytes[open] !== 39) return null;
    let end = open + 1;
    while (end < bytes.length && (bytes[end] !== 39 || bytes[end + 1] === 39)) end += bytes[end] === 39 ? 2 : 1;
    return names.at(open + 1, end);
  };
  const unitFactor = (id: number, from: number): number | null => {
    if (id === 0) return null;
    const unit = units.read(follow(id, from));
    return unit !== null && unit.quantity === 'LENGTHUNIT' ? unit.factor : null;
  };
  const angleFactor = (id: number, from: number): number => {
    const unit = id === 0 ? null : units.read(follow(id, from));
    return unit !== null && unit.quantity === 'PLANEANGLEUNIT' ? unit.factor : units.radians;
  };
  const property = (record: number, set: string, depth: number, into: Reading[]): void => {
    const named = nameOf(record);
    if (named === null) return;
    const kind = type(record);
    if (kind === 'IFCCOMPLEXPROPERTY' && depth < deepestComplex) {
      for (const id of reader.cursor().at(args[record]!).skip(3).ids()) {
        const part = follow(id, record);
        if (part >= 0) property(part, set, depth + 1, into);
      }
      return;
    }
    const { name, meaning } = named;
    if (meaning.meaning === null) return;
    const stated = statedIn(inner.at(args[record]!), kind);
    if (stated === null) return;
    const { value, measure, unit, isQuantity } = stated;
    if (typeof value === 'string' && value === name) return; // a template's placeholder
    const bears = meaning.meaning;
    if (typeof value !== 'number') {
      into.push({ set, name, meaning: bears, value, measure, hasUnit: false, isQuantity });
      return;
    }
    const ownUnit = meaning.metres ?? (unit === 0 ? null : unitFactor(unit, record));
    if (measure === 'length' || (measure === 'number' && ownUnit !== null)) {
      const length = value * (ownUnit ?? metres);
      into.push({ set, name, meaning: bears, value: length, measure: 'length', hasUnit: true, isQuantity });
    } else {
      const number = measure === 'angle' ? value * angleFactor(unit, record) : value;
      into.push({ set, name, meaning: bears, value: number, measure, hasUnit: false, isQuantity });
    }
  };
  const read = (record: number): readonly Reading[] => {
    const known = readings.get(record);
    if (known !== undefined) return known;
    const kind = type(record);
    if (kind !== 'IFCPROPERTYSET' && kind !== 'IFCELEMENTQUANTITY') return none;
    const ids = cursor
      .at(args[record]!)
      .skip(kind === 'IFCPROPERTYSET' ? 4 : 5)
      .ids();
    const found: Reading[] = [];
    let set: string | null = null;
    for (const id of ids) {
      const one = follow(id, record);
      if (one < 0) continue;
      // The set's own name is wanted only where one of its properties is.
      const named = nameOf(one);
      if (named === null || (named.meaning.meaning === null && type(one) !== 'IFCCOMPLEXPROPERTY')) continue;
      set ??= cursor.at(args[record]!).skip(2).text() ?? '';
      if (set.startsWith(ownPrefix)) break;
      property(one, set, 0, found);
    }
    const result = found.length === 0 ? none : found;
    readings.set(record, result);
    return result;
  };
  const named = (record: number, set: string): ReadonlyMap<string, string | number | boolean> | null => {
    if (type(record) !== 'IFCPROPERTYSET') return null;
    if (cursor.at(args[record]!).skip(2).text() !== set) return null;
    const values = new Map<string, string | number | boolean>();
    for (const id of cursor.skip(1).ids()) {
      const one = follow(id, record);
      if (type(one) !== 'IFCPROPERTYSINGLEVALUE') continue;
      const name = inner.at(args[one]!).text();
      const stated = statedValue(inner.skip(1));
      if (name !== null && stated !== null) values.set(name, stated.value);
    }
    return values;
  };
  return { read, named };
}

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
