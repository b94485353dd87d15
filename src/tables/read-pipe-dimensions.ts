import { InputError } from '../findings/input-error.ts';
import type { DimensionRow, DimensionSeries, PipeDimensions } from './pipe-dimensions.ts';
import { show } from './printed-value.ts';
import { at, fieldsOf, listAt, numberAt, oneOf, textAt } from './read-json.ts';
import { trustWords } from './read-table.ts';
import { placeOf, type TableSource } from './table-source.ts';

const path = 'shared/pipe-dimensions.json';
const millimetres = { in: 25.4, mm: 1 } as const;

/** Every series of `tables/shared/pipe-dimensions.json`, in its order; diameters in millimetres. */
export function readPipeDimensions(source: TableSource): PipeDimensions {
  const where = placeOf(source, path);
  const file = fieldsOf(source.read(path), where, ['series'], ['note']);
  const series = listAt(file.series, at(where, 'series')).map((entry, index) =>
    readSeries(entry, `${where}: series[${index}]`),
  );
  const twice = series.find(({ id }, index) => series.findIndex((one) => one.id === id) !== index);
  if (twice !== undefined) throw new InputError(at(where, 'series'), `${show(twice.id)} stands twice`);
  return series;
}

const required = ['id', 'title', 'standard', 'region', 'unit', 'trust', 'fittingTrust', 'seen', 'rows'];

function readSeries(entry: unknown, place: string): DimensionSeries {
  const fields = fieldsOf(entry, place, required, ['url', 'note']);
  const text = (key: string): string => textAt(fields[key], at(place, key));
  const trust = oneOf(fields.trust, at(place, 'trust'), trustWords);
  const unit = millimetres[oneOf<'in' | 'mm'>(fields.unit, at(place, 'unit'), ['in', 'mm'])];
  let last = 0;
  const rows = listAt(fields.rows, at(place, 'rows')).map((value, index): DimensionRow => {
    const spot = `${place}.rows[${index}]`;
    const row = fieldsOf(value, spot, ['size', 'dn', 'outer', 'inner', 'fitting'], ['trust']);
    const length = (key: string): number => numberAt(row[key], at(spot, key)) * unit;
    const lengthOrNull = (key: string): number | null => (row[key] === null ? null : length(key));
    const [outerMm, innerMm, fittingMm] = [length('outer'), lengthOrNull('inner'), lengthOrNull('fitting')];
    if (outerMm <= last) throw new InputError(at(spot, 'outer'), 'outside diameters do not rise');
    last = outerMm;
    if (innerMm !== null && innerMm >= outerMm)
      throw new InputError(at(spot, 'inner'), 'is not below the outside diameter');
    if (fittingMm !== null && fittingMm <= outerMm)
      throw new InputError(at(spot, 'fitting'), 'is not above the outside diameter');
    return {
      size: textAt(row.size, at(spot, 'size')),
      dn: numberAt(row.dn, at(spot, 'dn')),
      outerMm,
      innerMm,
      fittingMm,
      trust: row.trust === undefined ? trust : oneOf(row.trust, at(spot, 'trust'), trustWords),
    };
  });
  return {
    id: text('id'),
    title: text('title'),
    standard: text('standard'),
    region: oneOf(fields.region, at(place, 'region'), ['north-america', 'europe'] as const),
    seen: text('seen'),
    fittingTrust: oneOf(fields.fittingTrust, at(place, 'fittingTrust'), trustWords),
    rows,
  };
}
