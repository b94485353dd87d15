import { InputError } from '../findings/input-error.ts';
import { show } from './printed-value.ts';
import { at, fieldsOf, listAt, numberAt, textAt, textsAt } from './read-json.ts';
import type { Table } from './table.ts';

/** What a person with the printed code should look at, most doubtful first. Empty lists: all of the table, no rule. */
export interface VerifyEntry {
  readonly order: number;
  readonly table: string | null;
  readonly rows: readonly string[];
  readonly columns: readonly string[];
  readonly rules: readonly string[];
  readonly numbers: readonly string[];
  readonly why: string;
}

/** Entries that speak of this edition; rows, columns, rules and numbers must exist, or the list would mislead. */
export function readVerifyList(
  json: unknown,
  where: string,
  edition: string,
  known: {
    readonly tables: readonly Table[];
    readonly rules: ReadonlySet<string>;
    readonly numbers: ReadonlySet<string>;
  },
): readonly VerifyEntry[] {
  const file = fieldsOf(json, where, ['checks'], ['note']);
  return listAt(file.checks, at(where, 'checks')).flatMap((entry, index) => {
    const place = `${where}: checks[${index}]`;
    const fields = fieldsOf(
      entry,
      place,
      ['order', 'why'],
      ['table', 'rows', 'columns', 'rules', 'numbers', 'editions'],
    );
    const texts = (key: string): readonly string[] =>
      fields[key] === undefined ? [] : textsAt(fields[key], at(place, key));
    const refuse = (key: string, names: readonly string[], exists: (name: string) => boolean): void => {
      const stranger = names.find((name) => !exists(name));
      if (stranger !== undefined) throw new InputError(at(place, key), `${show(stranger)} does not exist`);
    };
    const name = fields.table === undefined ? null : textAt(fields.table, at(place, 'table'));
    const table = known.tables.find(({ id }) => id === name || id === `${name} (local)`);
    if (name !== null && table === undefined) throw new InputError(at(place, 'table'), `${show(name)} does not exist`);
    // A local table may have other rows than ours; the list speaks of ours.
    const ours = table === undefined || table.id === name ? table : undefined;
    const [rows, columns, rules, numbers] = [texts('rows'), texts('columns'), texts('rules'), texts('numbers')];
    if (ours !== undefined) refuse('rows', rows, (row) => ours.rows.some((one) => one.name === row));
    if (ours !== undefined) refuse('columns', columns, (column) => ours.columns.some(({ id }) => id === column));
    refuse('rules', rules, (rule) => known.rules.has(rule));
    refuse('numbers', numbers, (number) => known.numbers.has(number));
    const editions = texts('editions');
    if (editions.length > 0 && !editions.includes(edition)) return [];
    const order = numberAt(fields.order, at(place, 'order'));
    return [{ order, table: name, rows, columns, rules, numbers, why: textAt(fields.why, at(place, 'why')) }];
  });
}
