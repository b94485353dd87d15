import { InputError } from '../findings/input-error.ts';
import { show } from './printed-value.ts';
import { at, fieldsOf, listAt, oneOf, textAt } from './read-json.ts';
import { trustWords } from './read-table.ts';
import type { Trust } from './table.ts';

export type SettingValue = string | number | boolean | readonly string[];

/** A choice that the code, a province or the designer leaves open, as the answers file may set it. */
export interface SettingEntry {
  readonly id: string;
  readonly what: string;
  readonly clause: string;
  readonly trust: Trust;
  /** `choice`: one of `values`; `sizes`: a list of sizes; `number`: in `unit`, between `least` and `most`. */
  readonly kind: 'choice' | 'sizes' | 'number' | 'yes-no';
  readonly values: readonly (string | number)[];
  readonly unit: string | null;
  readonly least: number | null;
  readonly most: number | null;
  /** null: off until the user sets it. */
  readonly standard: SettingValue | null;
  readonly note: string | null;
}

const kinds = ['choice', 'sizes', 'number', 'yes-no'] as const;

export function readSettings(json: unknown, where: string): readonly SettingEntry[] {
  const file = fieldsOf(json, where, ['settings'], ['note']);
  const seen = new Set<string>();
  return listAt(file.settings, at(where, 'settings')).map((entry, index): SettingEntry => {
    const place = `${where}: settings[${index}]`;
    const fields = fieldsOf(
      entry,
      place,
      ['id', 'what', 'clause', 'trust', 'kind', 'standard'],
      ['values', 'unit', 'least', 'most', 'note'],
    );
    const text = (key: string): string => textAt(fields[key], at(place, key));
    const bound = (key: string): number | null => (typeof fields[key] === 'number' ? fields[key] : null);
    const id = text('id');
    if (seen.has(id)) throw new InputError(at(place, 'id'), `${show(id)} stands twice`);
    seen.add(id);
    const values = fields.values === undefined ? [] : listAt(fields.values, at(place, 'values'));
    const kind = oneOf(fields.kind, at(place, 'kind'), kinds);
    if (kind === 'choice' && !values.includes(fields.standard) && fields.standard !== null)
      throw new InputError(at(place, 'standard'), `is ${show(fields.standard)}, expected one of its values or null`);
    return {
      id,
      what: text('what'),
      clause: text('clause'),
      trust: oneOf(fields.trust, at(place, 'trust'), trustWords),
      kind,
      values: values as readonly (string | number)[],
      unit: fields.unit === undefined ? null : text('unit'),
      least: bound('least'),
      most: bound('most'),
      standard: fields.standard as SettingValue | null,
      note: fields.note === undefined ? null : text('note'),
    };
  });
}
