import type { Cursor } from '../lines/cursor.ts';

/** A property's value as the file states it: numbers in the file's own units. */
export interface StatedValue {
  readonly value: string | number | boolean;
  readonly measure: 'length' | 'angle' | 'number' | 'text' | 'flag';
}

const lengthTypes = new Set(['IFCLENGTHMEASURE', 'IFCPOSITIVELENGTHMEASURE', 'IFCNONNEGATIVELENGTHMEASURE']);
const angleTypes = new Set(['IFCPLANEANGLEMEASURE', 'IFCPOSITIVEPLANEANGLEMEASURE']);

/** Reads the value that stands next: typed or bare, alone or first of a list. null for `$`, `.U.` and empty texts. */
export function statedValue(cursor: Cursor): StatedValue | null {
  const first = cursor.next();
  if (first === 40) {
    const inside = cursor.firstOfList();
    return inside === null ? null : statedValue(inside);
  }
  const type = cursor.typeName();
  const kind = type === null ? first : cursor.firstByteWithin();
  if (kind === 39) {
    const text = cursor.text()?.trim() ?? '';
    return text === '' ? null : { value: text, measure: 'text' };
  }
  if (kind === 46) {
    const word = cursor.enumeration();
    if (word === 'T' || word === 'F') return { value: word === 'T', measure: 'flag' };
    return word === null || word === 'U' ? null : { value: word, measure: 'text' };
  }
  const value = cursor.number();
  if (value === null) return null;
  const isLength = type !== null && lengthTypes.has(type);
  return { value, measure: isLength ? 'length' : type !== null && angleTypes.has(type) ? 'angle' : 'number' };
}
