import type { Reader } from '../reader.ts';

/** A unit of the file in SI terms. */
export interface Unit {
  /** `LENGTHUNIT`, `PLANEANGLEUNIT` … */
  readonly quantity: string;
  /** `MILLIMETRE`, `FOOT`, `inch`: SI names with their prefix, others as the file names them. */
  readonly name: string;
  /** SI units (metres, radians) in one of these. */
  readonly factor: number;
}

export interface Units {
  /** Metres where the file names no length unit; `isStated` says which. */
  readonly length: { readonly name: string; readonly metres: number; readonly isStated: boolean };
  readonly radians: number;
  /** Unit of a record; null for kinds that carry no plain factor (derived, monetary) and for -1. */
  readonly read: (record: number) => Unit | null;
}

const prefixes: Readonly<Record<string, number>> = {
  EXA: 1e18,
  PETA: 1e15,
  TERA: 1e12,
  GIGA: 1e9,
  MEGA: 1e6,
  KILO: 1e3,
  HECTO: 1e2,
  DECA: 10,
  DECI: 0.1,
  CENTI: 0.01,
  MILLI: 1e-3,
  MICRO: 1e-6,
  NANO: 1e-9,
  PICO: 1e-12,
  FEMTO: 1e-15,
  ATTO: 1e-18,
};
/** Units that some files name without saying how long they are. */
const knownLengths: Readonly<Record<string, number>> = {
  METRE: 1,
  METER: 1,
  MILLIMETRE: 0.001,
  FOOT: 0.3048,
  FEET: 0.3048,
  INCH: 0.0254,
  YARD: 0.9144,
  MILE: 1609.344,
};
const deepestConversion = 10;

export function unitsOf(reader: Reader): Units {
  const read = (record: number, depth: number): Unit | null => {
    if (record < 0 || depth > deepestConversion) return null;
    const cursor = reader.open(record).skip(1);
    const quantity = cursor.enumeration() ?? '';
    switch (reader.type(record)) {
      case 'IFCSIUNIT': {
        const prefix = cursor.enumeration() ?? '';
        const name = cursor.enumeration() ?? '';
        return { quantity, name: prefix + name, factor: prefixes[prefix] ?? 1 };
      }
      case 'IFCCONVERSIONBASEDUNIT':
      case 'IFCCONVERSIONBASEDUNITWITHOFFSET': {
        const name = cursor.text() ?? '';
        const measure = reader.follow(cursor.id(), record);
        if (measure < 0) return named(quantity, name);
        const value = reader.open(measure);
        const factor = value.number();
        const base = read(reader.follow(value.id(), measure), depth + 1);
        return factor === null ? named(quantity, name) : sane(quantity, name, factor * (base?.factor ?? 1));
      }
      case 'IFCCONTEXTDEPENDENTUNIT':
        return named(quantity, cursor.text() ?? '');
      default:
        return null;
    }
  };
  const assigned = (): Unit[] => {
    const contexts = [...reader.all('IFCPROJECT'), ...reader.all('IFCPROJECTLIBRARY')];
    for (const context of contexts) {
      const assignment = reader.follow(reader.open(context).skip(8).id(), context);
      if (assignment >= 0) return unitsIn(assignment);
    }
    const [lone] = reader.all('IFCUNITASSIGNMENT');
    return lone === undefined ? [] : unitsIn(lone);
  };
  const unitsIn = (assignment: number): Unit[] =>
    reader
      .open(assignment)
      .ids()
      .map((id) => read(reader.follow(id, assignment), 0))
      .filter((unit) => unit !== null);

  const units = assigned();
  const length = units.find(({ quantity }) => quantity === 'LENGTHUNIT');
  const angle = units.find(({ quantity }) => quantity === 'PLANEANGLEUNIT');
  return {
    length: { name: length?.name ?? 'METRE', metres: length?.factor ?? 1, isStated: length !== undefined },
    radians: angle?.factor ?? 1,
    read: (record) => read(record, 0),
  };
}

/** Units longer or shorter than this, in metres or radians, are a slip of the pen. */
const longest = 1e7;
const shortest = 1e-12;

const sane = (quantity: string, name: string, factor: number): Unit | null =>
  factor > shortest && factor < longest ? { quantity, name, factor } : named(quantity, name);

function named(quantity: string, name: string): Unit | null {
  const factor = quantity === 'LENGTHUNIT' ? knownLengths[name.toUpperCase()] : undefined;
  return factor === undefined ? null : { quantity, name, factor };
}
