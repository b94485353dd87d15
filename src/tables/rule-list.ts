import { InputError } from '../findings/input-error.ts';
import { show } from './printed-value.ts';
import { at, fieldsOf, listAt, oneOf, textAt } from './read-json.ts';
import { trustWords } from './read-table.ts';
import type { Trust } from './table.ts';

/** A rule of the code as a trail names it: where it stands and how its sense is known. */
export interface RuleEntry {
  readonly id: string;
  readonly title: string;
  readonly clause: string;
  readonly trust: Trust;
  readonly note: string | null;
  /** What of it is not checked, since a model does not tell it; null where nothing is left out. */
  readonly unchecked: string | null;
}

export function readRules(json: unknown, where: string): ReadonlyMap<string, RuleEntry> {
  const file = fieldsOf(json, where, ['rules'], ['note']);
  const rules = new Map<string, RuleEntry>();
  for (const [index, entry] of listAt(file.rules, at(where, 'rules')).entries()) {
    const place = `${where}: rules[${index}]`;
    const fields = fieldsOf(entry, place, ['id', 'title', 'clause', 'trust'], ['note', 'unchecked']);
    const text = (key: string): string => textAt(fields[key], at(place, key));
    const id = text('id');
    if (rules.has(id)) throw new InputError(at(place, 'id'), `${show(id)} stands twice`);
    rules.set(id, {
      id,
      title: text('title'),
      clause: text('clause'),
      trust: oneOf(fields.trust, at(place, 'trust'), trustWords),
      note: fields.note === undefined ? null : text('note'),
      unchecked: fields.unchecked === undefined ? null : text('unchecked'),
    });
  }
  return rules;
}
