import { InputError } from '../findings/input-error.ts';
import type { NominalSize, SizeSeries } from '../units/nominal-size.ts';
import { loadOf } from '../units/quantity.ts';
import { checkOrder } from './check-order.ts';
import { type ColumnUnit, columnUnits, dimensionOf, isColumnUnit } from './column-unit.ts';
import { convert, show, sizeIn, slopeRun } from './printed-value.ts';
import { at, fieldsOf, listAt, numberAt, objectAt, oneOf, textAt, textsAt } from './read-json.ts';
import type { Amount, Cell, Column, LoadAtTrap, Row, Table, TableOrigin, Trust, Word } from './table.ts';

export const trustWords: readonly Trust[] = ['published', 'cross-checked', 'memory'];

const required = ['source', 'trust', 'title', 'columns', 'key', 'rows'];
const optional = ['rising', 'falling', 'across', 'within', 'notes'];

/**
 * One printed table from its file: every row and cell checked against the columns that the file itself states.
 * `where` is the file as a person would look for it, `id` what rules and trails call the table.
 */
export function readTable(json: unknown, id: string, where: string, series: SizeSeries): Table {
  const file = fieldsOf(json, where, required, optional);
  const origin = readOrigin(file.source, at(where, 'source'));
  const trust = oneOf(file.trust, at(where, 'trust'), trustWords);
  const columns = readColumns(file.columns, at(where, 'columns'), series);
  const named = (value: unknown, name: string): readonly string[] =>
    (value === undefined ? [] : typeof value === 'string' ? [value] : textsAt(value, at(where, name))).map((column) => {
      if (columns.some(({ id: known }) => known === column)) return column;
      throw new InputError(at(where, name), `names ${show(column)}, which is no column of this table`);
    });
  const key = named(file.key, 'key');
  const context: Context = { id, clause: origin.at, trust, columns, key, series };
  const rows = listAt(file.rows, at(where, 'rows')).map((row, index) =>
    readRow(row, `${where}: rows[${index}]`, context),
  );
  if (rows.length === 0) throw new InputError(at(where, 'rows'), 'is empty, expected at least one row');
  const twice = rows.find((row, index) => rows.findIndex(({ name }) => name === row.name) !== index);
  if (twice !== undefined) throw new InputError(at(where, 'rows'), `has two rows for ${show(twice.name)}`);
  checkOrder(rows, columns, where, series, {
    rising: named(file.rising, 'rising'),
    falling: named(file.falling, 'falling'),
    across: file.across === undefined ? null : oneOf<'rising'>(file.across, at(where, 'across'), ['rising']),
    within: named(file.within, 'within'),
  });
  return {
    id,
    title: textAt(file.title, at(where, 'title')),
    clause: origin.at,
    trust,
    origin,
    columns,
    rows,
    sizes: sizesOf(rows, columns, series),
    key,
    notes: file.notes === undefined ? [] : textsAt(file.notes, at(where, 'notes')),
  };
}

export function readOrigin(value: unknown, where: string): TableOrigin {
  const fields = fieldsOf(value, where, ['document', 'edition', 'at'], ['page', 'seen', 'url']);
  const text = (key: string): string => textAt(fields[key], at(where, key));
  return {
    document: text('document'),
    edition: text('edition'),
    at: text('at'),
    ...(fields.page === undefined ? {} : { page: numberAt(fields.page, at(where, 'page')) }),
    ...(fields.seen === undefined ? {} : { seen: text('seen') }),
    ...(fields.url === undefined ? {} : { url: text('url') }),
  };
}

interface Context {
  readonly id: string;
  readonly clause: string;
  readonly trust: Trust;
  readonly columns: readonly Column[];
  readonly key: readonly string[];
  readonly series: SizeSeries;
}

function readColumns(value: unknown, where: string, series: SizeSeries): readonly Column[] {
  const columns = Object.entries(objectAt(value, where)).map(([id, spec]): Column => {
    const place = at(where, id);
    const fields = typeof spec === 'string' ? { unit: spec } : fieldsOf(spec, place, ['unit'], ['title']);
    const unit = textAt(fields.unit, place);
    if (id === 'trust' || id === 'note') throw new InputError(place, 'is a word of every row, not a column');
    if (!isColumnUnit(unit)) throw new InputError(place, `unit ${show(unit)}, expected ${columnUnits().join(', ')}`);
    const run = slopeRun(id);
    return {
      id: sizeIn(series, id) ?? id,
      unit,
      dimension: dimensionOf(unit),
      title: 'title' in fields ? textAt(fields.title, place) : id,
      size: sizeIn(series, id) ?? null,
      slope: run === undefined ? null : 1 / run,
    };
  });
  const heads = columns.flatMap(({ size, slope }) => (size === null ? (slope ?? []) : series.rank(size)));
  if (heads.some((head, index) => index > 0 && head <= (heads[index - 1] ?? 0)))
    throw new InputError(where, 'sizes or slopes at the head of columns do not rise from left to right');
  return columns;
}

interface ReadCell {
  readonly cell: Cell;
  readonly printed: unknown;
  readonly note: string | null;
  readonly byTrap: readonly LoadAtTrap[];
}

function readRow(value: unknown, where: string, table: Context): Row {
  const ids = table.columns.map(({ id }) => id);
  const fields = fieldsOf(value, where, ids, ['trust', 'note']);
  const trust = fields.trust === undefined ? table.trust : oneOf(fields.trust, at(where, 'trust'), trustWords);
  const name = rowName(fields, where, table);
  const cells = new Map<string, ReadCell>();
  const texts = new Map<string, string | null>();
  for (const column of table.columns) {
    const place = at(where, column.id);
    if (column.dimension === 'key' || column.dimension === 'text')
      texts.set(column.id, fields[column.id] === null ? null : textAt(fields[column.id], place));
    else cells.set(column.id, readCell(fields[column.id], place, column, { ...table, trust, row: name }));
  }
  const own = (column: string): ReadCell => {
    const found = cells.get(column);
    if (found === undefined) throw new Error(`table ${table.id} has no column ${column}`);
    return found;
  };
  return {
    name,
    note: fields.note === undefined ? null : textAt(fields.note, at(where, 'note')),
    cell: (column) => own(column).cell,
    amount: (column) => own(column).cell as Cell<Amount>,
    size: (column) => own(column).cell as Cell<NominalSize | Word | null>,
    text: (column) => {
      const text = texts.get(column);
      if (text === undefined) throw new Error(`table ${table.id} has no text column ${column}`);
      return text;
    },
    byTrap: (column) => own(column).byTrap,
    printed: (column) => texts.get(column) ?? cells.get(column)?.printed ?? null,
    noteOf: (column) => cells.get(column)?.note ?? null,
  };
}

function readCell(value: unknown, where: string, column: Column, row: Context & { readonly row: string }): ReadCell {
  const wrapped = typeof value === 'object' && value !== null && 'value' in value;
  const fields = wrapped ? fieldsOf(value, where, ['value'], ['trust', 'note']) : { value };
  const trust = 'trust' in fields ? oneOf(fields.trust, at(where, 'trust'), trustWords) : row.trust;
  const note = 'note' in fields ? textAt(fields.note, at(where, 'note')) : null;
  const place = { table: row.id, row: row.row, column: column.id, clause: row.clause };
  const printed = fields.value;
  if (column.dimension === 'load-by-trap' && typeof printed === 'object' && printed !== null) {
    const byTrap = Object.entries(objectAt(printed, where)).map(([label, load]): LoadAtTrap => {
      const trap = sizeIn(row.series, label);
      if (trap === undefined) throw new InputError(at(where, label), "is no size of the code's series");
      return { trap, load: { value: loadOf(numberAt(load, at(where, label))), trust, place } };
    });
    const first = byTrap[0];
    if (first === undefined) throw new InputError(where, 'is empty, expected a load for each trap');
    if (
      byTrap.some(({ trap }, index) => index > 0 && row.series.rank(trap) <= row.series.rank(byTrap[index - 1]!.trap))
    )
      throw new InputError(where, 'traps do not rise');
    return { cell: first.load, printed, note, byTrap };
  }
  const unit: ColumnUnit = column.dimension === 'load-by-trap' ? 'fu' : column.unit;
  const converted = convert(printed, unit, row.series);
  if ('wrong' in converted) throw new InputError(where, converted.wrong);
  return { cell: { value: converted.value, trust, place }, printed, note, byTrap: [] };
}

/** `3 in`, `3 in, up to 21`: what a finger on the printed page would follow. */
function rowName(fields: Readonly<Record<string, unknown>>, where: string, table: Context): string {
  const parts = table.key.map((id) => {
    const column = table.columns.find((one) => one.id === id);
    const printed = fields[id];
    const value = typeof printed === 'object' && printed !== null && 'value' in printed ? printed.value : printed;
    if (value === null || value === undefined)
      throw new InputError(at(where, id), 'is empty, and the row is named by it');
    if (column?.dimension === 'load' || column?.dimension === 'flow') return `up to ${String(value)}`;
    if (column?.dimension === 'size') return sizeIn(table.series, String(value)) ?? String(value);
    return String(value);
  });
  if (parts.length === 0) throw new InputError(where, 'the table states no key to name its rows by');
  return parts.join(', ');
}

function sizesOf(rows: readonly Row[], columns: readonly Column[], series: SizeSeries): readonly NominalSize[] {
  const heads = columns.flatMap(({ size }) => size ?? []);
  const first = columns.find(({ dimension }) => dimension === 'size')?.id;
  const listed = first === undefined ? [] : rows.map((row) => row.size(first).value);
  const found =
    heads.length > 0 ? heads : listed.filter((size): size is NominalSize => size !== null && series.has(size));
  return [...new Set(found)].sort((a, b) => series.rank(a) - series.rank(b));
}
