import { InputError } from '../findings/input-error.ts';
import type { NominalSize, SizeSeries } from '../units/nominal-size.ts';
import { show, sizeIn } from './printed-value.ts';
import { at, fieldsOf, type JsonObject, listAt, numberAt, objectAt, textAt, textsAt } from './read-json.ts';
import type { Table } from './table.ts';

/** A word or a yes-no that must be met, one of several words, or a count from the first to the last, both included. */
export type FactTest = string | boolean | readonly string[] | { readonly least: number; readonly most: number };

/** Which of our fixture kinds a row of the printed fixture table stands for. */
export interface KindEntry {
  /** Rows of the fixture table; several when print gives one fixture a row for each trap. */
  readonly rows: readonly string[];
  readonly kind: string;
  /** What the fixture must not be known to miss: `{flush: 'tank'}`. */
  readonly where: ReadonlyMap<string, FactTest>;
  /** What it must not be known to be: `{style: ['barber', 'dental']}`. */
  readonly unless: ReadonlyMap<string, FactTest>;
  /** The row stands only for a fixture known to be so: a lavatory is a barber's only when the model says it. */
  readonly onlyIfSaid: boolean;
  /** Table that gives the load by trap size, where the row itself has none or the trap is past its largest. */
  readonly loadFrom: string | null;
  /** Trap of the fixture as it is made, where the printed row says no size. */
  readonly usualTrap: NominalSize | null;
  /** A row that is added for each one of a counted fact beyond so many: further shower heads. */
  readonly more: { readonly fact: string; readonly beyond: number; readonly row: string } | null;
}

export interface FixtureKinds {
  /** Table that the rows stand in. */
  readonly table: string;
  /** In the order of the printed table where it matters to nobody else. */
  readonly entries: readonly KindEntry[];
  /** Table that gives a fixture outside the list its load, by trap size; null where the code has none. */
  readonly unlisted: string | null;
}

export function readKinds(json: unknown, where: string, tables: readonly Table[], series: SizeSeries): FixtureKinds {
  const file = fieldsOf(json, where, ['table', 'unlisted', 'kinds'], ['note']);
  const tableOrNull = (value: unknown, place: string): string | null => {
    if (value === null || value === undefined) return null;
    const id = textAt(value, place);
    if (tables.some((one) => one.id === id || one.id === `${id} (local)`)) return id;
    throw new InputError(place, `${show(id)} is no table of the family`);
  };
  const name = textAt(file.table, at(where, 'table'));
  tableOrNull(name, at(where, 'table'));
  const table = tables.find(({ id }) => id === name || id === `${name} (local)`);
  const known = new Set(table?.rows.map(({ name: row }) => row));
  const entries = listAt(file.kinds, at(where, 'kinds')).map((entry, index): KindEntry => {
    const place = `${where}: kinds[${index}]`;
    const fields = fieldsOf(
      entry,
      place,
      ['rows', 'kind'],
      ['where', 'unless', 'onlyIfSaid', 'loadFrom', 'usualTrap', 'more', 'note'],
    );
    const rows = textsAt(fields.rows, at(place, 'rows'));
    for (const row of rows)
      if (!known.has(row)) throw new InputError(at(place, 'rows'), `${show(row)} is no row of ${name}`);
    return {
      rows,
      kind: textAt(fields.kind, at(place, 'kind')),
      where: readTests(fields.where, at(place, 'where')),
      unless: readTests(fields.unless, at(place, 'unless')),
      onlyIfSaid: fields.onlyIfSaid === true,
      loadFrom: tableOrNull(fields.loadFrom, at(place, 'loadFrom')),
      usualTrap: readTrap(fields.usualTrap, at(place, 'usualTrap'), series),
      more: readMore(fields.more, at(place, 'more'), known),
    };
  });
  return { table: name, entries, unlisted: tableOrNull(file.unlisted, at(where, 'unlisted')) };
}

function readTrap(value: unknown, where: string, series: SizeSeries): NominalSize | null {
  if (value === undefined) return null;
  const size = sizeIn(series, textAt(value, where));
  if (size === undefined) throw new InputError(where, `is ${show(value)}, expected a size of the code's series`);
  return size;
}

function readMore(value: unknown, where: string, known: ReadonlySet<string>): KindEntry['more'] {
  if (value === undefined) return null;
  const fields = fieldsOf(value, where, ['fact', 'beyond', 'row']);
  const row = textAt(fields.row, at(where, 'row'));
  if (!known.has(row)) throw new InputError(at(where, 'row'), `${show(row)} is no row of the fixture table`);
  return { fact: textAt(fields.fact, at(where, 'fact')), beyond: numberAt(fields.beyond, at(where, 'beyond')), row };
}

function readTests(value: unknown, where: string): ReadonlyMap<string, FactTest> {
  const tests: JsonObject = value === undefined ? {} : objectAt(value, where);
  return new Map(Object.keys(tests).map((fact) => [fact, readTest(tests[fact], at(where, fact))]));
}

function readTest(test: unknown, where: string): FactTest {
  if (typeof test === 'string' || typeof test === 'boolean') return test;
  const list = listAt(test, where);
  if (list.every((word) => typeof word === 'string') && list.length > 0) return textsAt(list, where);
  const [least, most] = list;
  if (list.length !== 2 || typeof least !== 'number' || (typeof most !== 'number' && most !== null))
    throw new InputError(
      where,
      `is ${show(test)}, expected words or [least, most], most being null where there is no end`,
    );
  return { least, most: most ?? Number.POSITIVE_INFINITY };
}
