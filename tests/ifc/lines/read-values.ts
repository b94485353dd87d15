import type { Cursor } from '../../../src/ifc/lines/cursor.ts';

/**
 * A record's arguments in full, one form for all readers: null for `$`, `['#', id]`, `['s', text]`, `['e', word]`,
 * numbers, lists, and `['t', class, value]` for typed values. Derived values (`*`) are left out.
 */
export type Value = null | number | string | readonly Value[];

export function readValues(cursor: Cursor): Value[] {
  const values: Value[] = [];
  while (cursor.more) {
    const first = String.fromCharCode(cursor.next());
    if (first === '*') cursor.skip(1);
    else values.push(readValue(cursor, first));
  }
  return values;
}

function readValue(cursor: Cursor, first: string): Value {
  if (first === '$') {
    cursor.skip(1);
    return null;
  }
  if (first === '#') return ['#', cursor.id()];
  if (first === "'") return ['s', cursor.text()];
  if (first === '.') return ['e', cursor.enumeration()];
  if (first === '"') {
    const from = cursor.offset;
    cursor.skip(1);
    return ['b', String.fromCharCode(...cursor.bytes.subarray(from + 1, cursor.bytes.indexOf(34, from + 1)))];
  }
  if (first === '(') {
    const inside = cursor.firstOfList();
    return inside === null ? [] : readValues(inside);
  }
  const type = cursor.typeName();
  if (type === null) return cursor.number();
  const within = String.fromCharCode(cursor.firstByteWithin());
  if (within === '(') return ['t', type, cursor.numbers([])];
  if (within === "'" || within === '.') return ['t', type, readValue(cursor, within)];
  return ['t', type, cursor.number()];
}
