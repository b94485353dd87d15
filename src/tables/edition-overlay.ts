import { InputError } from '../findings/input-error.ts';
import type { SizeSeries } from '../units/nominal-size.ts';
import { show } from './printed-value.ts';
import { at, fieldsOf, type JsonObject, listAt, objectAt, textAt } from './read-json.ts';
import { readTable, trustWords } from './read-table.ts';

/**
 * `editions/<edition>.json`: what an edition, or a local set of tables, prints differently from the base, cell by cell
 * and nothing else. Tables by id, lone numbers and rules by their own ids; each change may carry trust and a note.
 */
export interface Overlay {
  readonly where: string;
  /** Laid by the user, not by an edition. */
  readonly local: boolean;
  readonly edition: string;
  readonly tables: JsonObject;
  readonly numbers: JsonObject;
  readonly rules: JsonObject;
  readonly words: JsonObject;
}

export function readOverlay(json: unknown, where: string, local: boolean): Overlay {
  const file = fieldsOf(json, where, ['edition'], ['note', 'tables', 'numbers', 'rules', 'words']);
  const part = (key: string): JsonObject => (file[key] === undefined ? {} : objectAt(file[key], at(where, key)));
  return {
    where,
    local,
    edition: textAt(file.edition, at(where, 'edition')),
    tables: part('tables'),
    numbers: part('numbers'),
    rules: part('rules'),
    words: part('words'),
  };
}

/** The table's file with the overlay's cells in place of its own; the same strict reading follows. */
export function overTable(json: unknown, id: string, where: string, series: SizeSeries, overlay: Overlay): JsonObject {
  const file = objectAt(json, where);
  const source: JsonObject = { ...objectAt(file.source, at(where, 'source')), edition: overlay.edition };
  const change = overlay.tables[id];
  if (change === undefined) return { ...file, source };
  const place = `${overlay.where}: tables.${id}`;
  const fields = fieldsOf(change, place, [], ['at', 'seen', 'trust', 'note', 'cells']);
  const table = readTable(file, id, where, series);
  const rows: JsonObject[] = listAt(file.rows, at(where, 'rows')).map((row, index) => ({
    ...objectAt(row, `${where}: rows[${index}]`),
  }));
  for (const [index, entry] of listAt(fields.cells ?? [], at(place, 'cells')).entries()) {
    const spot = `${place}.cells[${index}]`;
    const cell = fieldsOf(entry, spot, ['row', 'column', 'value'], ['trust', 'note']);
    const row = rows[table.rows.findIndex(({ name }) => name === cell.row)];
    if (row === undefined) throw new InputError(at(spot, 'row'), `${show(cell.row)} is no row of ${id}`);
    const column = textAt(cell.column, at(spot, 'column'));
    if (!table.columns.some((one) => one.id === column))
      throw new InputError(at(spot, 'column'), `${show(column)} is no column of ${id}`);
    Object.assign(row, { [column]: changedCell(cell, overlay) });
  }
  const trusted = fields.trust === undefined ? rows : rows.map((row) => withTrust(row, fields.trust));
  return {
    ...file,
    source: { ...source, ...taken(fields, ['at', 'seen']) },
    ...taken(fields, ['trust']),
    rows: trusted,
    notes: [...listAt(file.notes ?? [], at(where, 'notes')), ...(fields.note === undefined ? [] : [fields.note])],
  };
}

/** Entries of a list (`numbers` or `rules`), each changed by the overlay's entry of the same id. */
export function overList(json: unknown, list: 'numbers' | 'rules', where: string, overlay: Overlay): JsonObject {
  const file = objectAt(json, where);
  const changes = overlay[list];
  const entries = listAt(file[list], at(where, list)).map((entry, index) =>
    objectAt(entry, `${where}: ${list}[${index}]`),
  );
  for (const id of Object.keys(changes))
    if (!entries.some((entry) => entry.id === id))
      throw new InputError(`${overlay.where}: ${list}.${id}`, `is not in ${where}`);
  const allowed =
    list === 'numbers' ? ['value', 'clause', 'trust', 'note'] : ['clause', 'trust', 'note', 'title', 'unchecked'];
  const changed = entries.map((entry) => {
    const change = changes[String(entry.id)];
    const place = `${overlay.where}: ${list}.${String(entry.id)}`;
    return change === undefined ? entry : { ...entry, ...fieldsOf(change, place, [], allowed) };
  });
  return { ...file, [list]: changed };
}

/** A user who corrects a figure and says no more has read it in print. */
function changedCell(cell: JsonObject, { local }: Overlay): JsonObject {
  return { value: cell.value, ...(local ? { trust: 'published' } : {}), ...taken(cell, ['trust', 'note']) };
}

/** The whole table is known less well in this edition: what was trusted more comes down, what was less stays. */
function withTrust(row: JsonObject, trust: unknown): JsonObject {
  const own = row.trust ?? trust;
  const bare = Object.entries(row).map(([key, value]) => {
    const wrapped = typeof value === 'object' && value !== null && 'value' in value;
    const word = wrapped && 'trust' in value ? value.trust : own;
    return [key, wrapped ? { ...value, trust: lower(word, trust) } : value];
  });
  return { ...Object.fromEntries(bare), trust: lower(own, trust) };
}

const falling: readonly unknown[] = trustWords;
const lower = (a: unknown, b: unknown): unknown => (falling.indexOf(a) > falling.indexOf(b) ? a : b);

const taken = (fields: JsonObject, keys: readonly string[]): JsonObject =>
  Object.fromEntries(keys.flatMap((key) => (fields[key] === undefined ? [] : [[key, fields[key]]])));
