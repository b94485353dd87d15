import { InputError } from '../findings/input-error.ts';
import { show } from './printed-value.ts';

export type JsonObject = Readonly<Record<string, unknown>>;

/** What a text of JSON holds; `where` is the path of its file. */
export function jsonOf(text: string, where: string): unknown {
  try {
    return JSON.parse(text);
  } catch (error) {
    const why = error instanceof Error ? error.message : String(error);
    throw new InputError(where, `is not JSON: ${why}`, { cause: error });
  }
}

/** An object with all the required keys and none beyond the optional ones; anything else is refused at its place. */
export function fieldsOf(
  value: unknown,
  where: string,
  required: readonly string[],
  optional: readonly string[] = [],
): JsonObject {
  const fields = objectAt(value, where);
  for (const key of required) if (!Object.hasOwn(fields, key)) throw new InputError(at(where, key), 'missing');
  const known = [...required, ...optional];
  for (const key of Object.keys(fields))
    if (!known.includes(key)) throw new InputError(at(where, key), `unknown key; expected ${known.join(', ')}`);
  return fields;
}

export function objectAt(value: unknown, where: string): JsonObject {
  if (typeof value !== 'object' || value === null || Array.isArray(value))
    throw new InputError(where, `is ${kindOf(value)}, expected an object`);
  return value as JsonObject;
}

export function listAt(value: unknown, where: string): readonly unknown[] {
  if (!Array.isArray(value)) throw new InputError(where, `is ${kindOf(value)}, expected a list`);
  return value;
}

export function textAt(value: unknown, where: string): string {
  if (typeof value !== 'string' || value.trim() === '') throw new InputError(where, `is ${show(value)}, expected text`);
  return value;
}

export function numberAt(value: unknown, where: string): number {
  if (typeof value !== 'number' || !Number.isFinite(value))
    throw new InputError(where, `is ${show(value)}, expected a number`);
  return value;
}

export const textsAt = (value: unknown, where: string): readonly string[] =>
  listAt(value, where).map((entry, index) => textAt(entry, `${where}[${index}]`));

export function oneOf<T extends string>(value: unknown, where: string, words: readonly T[]): T {
  const found = words.find((word) => word === value);
  if (found === undefined) throw new InputError(where, `is ${show(value)}, expected ${words.join(', ')}`);
  return found;
}

/** `file.json: rows[3]` and `load` make `file.json: rows[3].load`; a bare file takes a colon. */
export const at = (where: string, key: string): string =>
  where.includes(': ') ? `${where}.${key}` : `${where}: ${key}`;

const kindOf = (value: unknown): string =>
  value === undefined ? 'missing' : value === null ? 'null' : Array.isArray(value) ? 'a list' : `a ${typeof value}`;
