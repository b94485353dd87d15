import { InputError } from '../findings/input-error.ts';
import { show, sizeIn } from '../tables/printed-value.ts';
import { at, fieldsOf, jsonOf, numberAt, objectAt, textAt } from '../tables/read-json.ts';
import type { SizeSeries } from '../units/nominal-size.ts';
import type { WeighAlternative, WeighCosts, WeighFitting } from './weigh.ts';

/** What the user pays for a metre of pipe, a fitting, a cleanout, a hole: by size label, in one currency. */
export interface Prices {
  readonly currency: string;
  readonly pipes: ReadonlyMap<string, number>;
  readonly fittings: ReadonlyMap<WeighFitting['kind'], ReadonlyMap<string, number>>;
  readonly cleanouts: ReadonlyMap<string, number>;
  readonly floorHoles: ReadonlyMap<string, number>;
}

const format = 'drainwright-prices';
const kinds: readonly WeighFitting['kind'][] = ['bend', 'junction', 'double-junction', 'reducer', 'coupling'];

/** Prices from the text of a price file. `where` is its path; whatever is wrong is named at its place. */
export function readPrices(text: string, where: string, series: SizeSeries): Prices {
  const optional = ['pipes', 'fittings', 'cleanouts', 'floorHoles'];
  const file = fieldsOf(jsonOf(text, where), where, ['format', 'version', 'currency'], optional);
  if (file.format !== format)
    throw new InputError(at(where, 'format'), `is ${show(file.format)}, expected "${format}"`);
  if (file.version !== 1) throw new InputError(at(where, 'version'), `is ${show(file.version)}, expected 1`);
  const bySize = (value: unknown, place: string): ReadonlyMap<string, number> =>
    new Map(
      Object.entries(value === undefined ? {} : objectAt(value, place)).map(([key, entry]): [string, number] => {
        const label = sizeIn(series, key);
        if (label === undefined) throw new InputError(at(place, key), 'is no size of the code');
        const price = numberAt(entry, at(place, key));
        if (price < 0) throw new InputError(at(place, key), `is ${price}, expected a price of 0 or more`);
        return [label, price];
      }),
    );
  const fittings = fieldsOf(file.fittings ?? {}, at(where, 'fittings'), [], kinds);
  return {
    currency: textAt(file.currency, at(where, 'currency')),
    pipes: bySize(file.pipes, at(where, 'pipes')),
    fittings: new Map(kinds.map((kind) => [kind, bySize(fittings[kind], at(at(where, 'fittings'), kind))])),
    cleanouts: bySize(file.cleanouts, at(where, 'cleanouts')),
    floorHoles: bySize(file.floorHoles, at(where, 'floorHoles')),
  };
}

/** Every quantity with a price times that price; the others are named. */
export function costsOf(
  { pipes, fittings, cleanouts, floorHoles }: Pick<WeighAlternative, 'pipes' | 'fittings' | 'cleanouts' | 'floorHoles'>,
  prices: Prices,
): WeighCosts {
  const lines: WeighCosts['lines'][number][] = [];
  const unpriced = new Set<string>();
  const add = (
    what: string,
    size: string | null,
    quantity: number,
    unit: 'm' | 'piece',
    list: ReadonlyMap<string, number> | undefined,
  ): void => {
    const price = size === null ? undefined : list?.get(size);
    if (price === undefined) {
      if (quantity > 0) unpriced.add(`${what} ${size ?? 'of unknown size'}`);
      return;
    }
    lines.push({ what, size, quantity, unit, price, cost: cents(quantity * price) });
  };
  const bySize = new Map<string | null, number>();
  for (const { size, length } of pipes) {
    const label = size?.label ?? null;
    bySize.set(label, (bySize.get(label) ?? 0) + length);
  }
  for (const [size, length] of bySize) add('pipe', size, Math.round(length * 1000) / 1000, 'm', prices.pipes);
  const byKind = new Map<string, { kind: WeighFitting['kind']; size: string; count: number }>();
  for (const { kind, size, count } of fittings) {
    const key = `${kind} ${size.label}`;
    byKind.set(key, { kind, size: size.label, count: (byKind.get(key)?.count ?? 0) + count });
  }
  for (const { kind, size, count } of byKind.values())
    add(kind.replaceAll('-', ' '), size, count, 'piece', prices.fittings.get(kind));
  const rods = new Map<string, number>();
  for (const { size } of cleanouts) rods.set(size.label, (rods.get(size.label) ?? 0) + 1);
  for (const [size, count] of rods) add('cleanout', size, count, 'piece', prices.cleanouts);
  for (const { size, count } of floorHoles)
    add('hole through a floor', size?.label ?? null, count, 'piece', prices.floorHoles);
  return { total: cents(lines.reduce((sum, { cost }) => sum + cost, 0)), lines, unpriced: [...unpriced] };
}

const cents = (amount: number): number => Math.round(amount * 100) / 100;
