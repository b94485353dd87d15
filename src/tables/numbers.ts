import { InputError } from '../findings/input-error.ts';
import type { NominalSize, SizeSeries } from '../units/nominal-size.ts';
import { type ColumnUnit, columnUnits, type Dimension, dimensionOf, isColumnUnit } from './column-unit.ts';
import { convert, show } from './printed-value.ts';
import { at, fieldsOf, listAt, oneOf, textAt } from './read-json.ts';
import { readOrigin, trustWords } from './read-table.ts';
import type { Cell, TableOrigin } from './table.ts';

/** A number that stands alone in a clause, outside every table. */
export interface LoneNumber {
  readonly id: string;
  /** Rule that reads it, such as `NPC-R15`. */
  readonly rule: string;
  readonly what: string;
  readonly unit: ColumnUnit;
  readonly printed: unknown;
  readonly cell: Cell;
  readonly note: string | null;
}

export interface LoneNumbers {
  readonly origin: TableOrigin;
  /** In the order of the file, which is that of the rules. */
  readonly all: readonly LoneNumber[];
  /** A figure in the core's unit of that dimension. A number the file has not, or in another dimension, throws. */
  number(id: string, dimension: Dimension): Cell<number>;
  size(id: string): Cell<NominalSize>;
}

export function readNumbers(json: unknown, table: string, where: string, series: SizeSeries): LoneNumbers {
  const file = fieldsOf(json, where, ['source', 'trust', 'numbers']);
  const origin = readOrigin(file.source, at(where, 'source'));
  const trust = oneOf(file.trust, at(where, 'trust'), trustWords);
  const byId = new Map<string, LoneNumber>();
  for (const [index, entry] of listAt(file.numbers, at(where, 'numbers')).entries()) {
    const place = `${where}: numbers[${index}]`;
    const fields = fieldsOf(entry, place, ['id', 'rule', 'clause', 'what', 'value', 'unit'], ['trust', 'note']);
    const text = (key: string): string => textAt(fields[key], at(place, key));
    const id = text('id');
    const unit = text('unit');
    if (byId.has(id)) throw new InputError(at(place, 'id'), `${show(id)} stands twice`);
    if (!isColumnUnit(unit))
      throw new InputError(at(place, 'unit'), `is ${show(unit)}, expected ${columnUnits().join(', ')}`);
    const converted = convert(fields.value, unit, series);
    if ('wrong' in converted) throw new InputError(at(place, 'value'), converted.wrong);
    byId.set(id, {
      id,
      rule: text('rule'),
      what: text('what'),
      unit,
      printed: fields.value,
      cell: {
        value: converted.value,
        trust: fields.trust === undefined ? trust : oneOf(fields.trust, at(place, 'trust'), trustWords),
        place: { table, row: id, column: 'value', clause: text('clause') },
      },
      note: fields.note === undefined ? null : text('note'),
    });
  }
  const own = (id: string, dimension: Dimension): LoneNumber => {
    const found = byId.get(id);
    if (found === undefined) throw new Error(`${where} has no number ${id}`);
    if (dimensionOf(found.unit) === dimension) return found;
    throw new InputError(where, `${id} is in ${found.unit}, expected a ${dimension}`);
  };
  return {
    origin,
    all: [...byId.values()],
    number: (id, dimension) => {
      const { cell } = own(id, dimension);
      if (typeof cell.value !== 'number')
        throw new InputError(where, `${id} is ${show(cell.value)}, expected a number`);
      return cell as Cell<number>;
    },
    size: (id) => {
      const { cell } = own(id, 'size');
      if (cell.value === null || !series.has(String(cell.value)))
        throw new InputError(where, `${id} is ${show(cell.value)}, expected a size`);
      return cell as Cell<NominalSize>;
    },
  };
}
