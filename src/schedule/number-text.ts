import type { LoadRange, SizeRange } from './result.ts';

/** At most `decimals` places, none that are zero: `2.4`, `12`, `0.9`. */
export function decimal(value: number, decimals: number): string {
  const text = value.toFixed(decimals);
  const short = text.includes('.') ? text.replace(/\.?0+$/, '') : text;
  return short === '-0' ? '0' : short;
}

/** `14 fixture units`; `12 to 16 fixture units` where the model leaves it open. */
export function loadText({ least, most }: LoadRange, unit: string): string {
  return least === most ? unitsText(most, unit) : `${decimal(least, 2)} to ${decimal(most, 2)} ${unit}`;
}

/** `1 fixture unit`, `14 fixture units`, `0.8 l/s`. */
export const unitsText = (value: number, unit: string): string =>
  `${decimal(value, 2)} ${value === 1 && !unit.includes('/') ? unit.replace(/units$/, 'unit') : unit}`;

/** Metres as a person reads them: millimetres below one metre, kilometres where no building is so long. */
export function lengthText(metres: number): string {
  if (Math.abs(metres) >= 10_000) return `${decimal(metres / 1000, 1)} km`;
  return Math.abs(metres) < 1 ? `${decimal(metres * 1000, 0)} mm` : `${decimal(metres, 2)} m`;
}

/** `2 % (1:50)`; `level` for zero. */
export function slopeText(slope: number): string {
  return slope === 0 ? 'level' : `${decimal(slope * 100, 2)} % (1:${decimal(1 / Math.abs(slope), 0)})`;
}

/** `4 in`; `2 in to 3 in` where the model leaves it open; null: no size of the tables holds it. */
export function sizeText(range: SizeRange | null): string {
  if (range === null) return 'not sized';
  const least = range.least?.label ?? null;
  const most = range.most?.label ?? null;
  if (most === null) return least === null ? 'no size of the table' : `${least} or more`;
  return least === null || least === most ? most : `${least} to ${most}`;
}

/** A limit of a table as it is printed, the three words of the tables in plain ones; null: nobody could read it. */
export function limitText(limit: number | string | null): string {
  if (limit === null) return 'an unread figure';
  if (typeof limit === 'number') return decimal(limit, 2);
  return limit === 'NP' ? 'nothing: it is not permitted' : limit;
}
