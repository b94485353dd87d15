import type { Family } from '../tables/open-family.ts';
import type { Amount, Row, Table } from '../tables/table.ts';
import type { NominalSize, SizeSeries } from '../units/nominal-size.ts';

/** Where a code wants cleanouts, how large, and how far one reaches. */
export interface CleanoutRules {
  readonly places: readonly CleanoutPlace[];
  /** Least cleanout of a pipe. */
  sizeFor(pipe: NominalSize): NominalSize;
  /** Metres of pipe that one reaches when rodded one way; null: no limit, or unread. */
  reach(pipe: NominalSize): number | null;
}

export interface CleanoutPlace {
  /** `drop`, `branch head`, `along a branch`, … */
  readonly place: string;
  readonly where: string;
  readonly rule: string;
  readonly clause: string;
}

/** Row of a table whose rows go from one size to another. */
const rowBetween =
  (table: Table, series: SizeSeries) =>
  (pipe: NominalSize): Row | undefined => {
    const rank = (size: string): number => series.rank(size as NominalSize);
    return table.rows.find((row) => {
      const [from, to] = [row.size('from').value, row.size('to').value];
      if (from === null || !series.has(from) || rank(from) > rank(pipe)) return false;
      return to === 'NL' || (to !== null && series.has(to) && rank(pipe) <= rank(to));
    });
  };

/** Least cleanout of a pipe by such a table; its own size where the table prints none. */
export const cleanoutSize = (table: Table, series: SizeSeries): ((pipe: NominalSize) => NominalSize) => {
  const rowOf = rowBetween(table, series);
  return (pipe) => {
    const size = rowOf(pipe)?.size('cleanout').value ?? null;
    return size !== null && series.has(size) ? (size as NominalSize) : pipe;
  };
};

/** From the family's tables of places and sizes; null where it has none of places. */
export function cleanoutRules({ tables, series, rule }: Family): CleanoutRules | null {
  const named = (id: string) => tables.find((table) => table.id === id || table.id === `${id} (local)`);
  const [places, sizes] = [named('cleanout-places'), named('cleanouts')];
  if (places === undefined || sizes === undefined) return null;
  const rowOf = rowBetween(sizes, series);
  return {
    places: places.rows.map((row) => {
      const id = row.text('rule') ?? '';
      return { place: row.name, where: row.text('where') ?? '', rule: id, clause: rule(id).clause };
    }),
    sizeFor: cleanoutSize(sizes, series),
    reach: (pipe) => {
      const reach: Amount = rowOf(pipe)?.amount('oneWay').value ?? null;
      return typeof reach === 'number' ? reach : null;
    },
  };
}
