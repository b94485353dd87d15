import type { FixtureDetail, FixtureKind } from '../../model/identity.ts';
import type { FactTest, FixtureKinds } from '../../tables/fixture-kinds.ts';
import type { FixtureRow, FixtureRows, OpenDetail } from '../fixture-row.ts';

type Value = OpenDetail['choices'][number];
type RowsFor = FixtureRows['rowsFor'];

/**
 * What would tell apart the rows that a fixture of known kind may be: each detail that nobody says, with the values that
 * leave the fewest of these rows.
 */
export function openDetails({ entries }: FixtureKinds, rowsFor: RowsFor): FixtureRows['openDetails'] {
  const probes = new Map<FixtureKind, ReadonlyMap<string, readonly Value[]>>();
  return (kind, detail) => {
    const now = signsOf(rowsFor(kind, detail));
    if (now.size < 2) return [];
    const known = probes.get(kind) ?? valuesOf(entries, kind);
    probes.set(kind, known);
    const facts: Readonly<Record<string, unknown>> = { ...detail };
    return [...known].flatMap(([field, values]): OpenDetail[] =>
      isKnown(facts[field])
        ? []
        : asked(
            field,
            values.map((value) => [value, rowsFor(kind, { ...detail, [field]: value } as FixtureDetail)]),
            now,
          ),
    );
  };
}

const isKnown = (fact: unknown): boolean => fact !== null && fact !== undefined;

/** Rows as far as they differ in what they ask: nobody need tell apart what counts alike. */
export const signsOf = (rows: readonly FixtureRow[]): ReadonlySet<string> =>
  new Set(
    rows.map(({ leastTrap, largestTrap, closet, siphonic, loadAt }) =>
      [leastTrap, largestTrap, closet, siphonic, loadAt(leastTrap).load, loadAt(largestTrap).load].join(),
    ),
  );

const isWithin = (a: ReadonlySet<string>, b: ReadonlySet<string>): boolean =>
  a.size < b.size && [...a].every((sign) => b.has(sign));

function asked(
  field: string,
  told: readonly (readonly [Value, readonly FixtureRow[]])[],
  now: ReadonlySet<string>,
): OpenDetail[] {
  const narrower = told
    .map(([value, rows]) => ({ value, signs: signsOf(rows) }))
    .filter(({ signs }) => signs.size > 0 && isWithin(signs, now));
  const narrowest = narrower.filter(({ signs }) => !narrower.some((other) => isWithin(other.signs, signs)));
  return narrowest.length === 0 ? [] : [{ field, choices: narrowest.map(({ value }) => value) }];
}

/** Every value of every detail that the rows of a kind are told by, in the order of the table. */
function valuesOf(entries: FixtureKinds['entries'], kind: FixtureKind): ReadonlyMap<string, readonly Value[]> {
  const found = new Map<string, Set<Value>>();
  for (const { kind: own, where, unless, more } of entries) {
    if (own !== kind) continue;
    for (const [field, test] of [...where, ...unless]) {
      // Of the building, not of a fixture.
      if (field === 'use') continue;
      const values = found.get(field) ?? new Set<Value>();
      for (const value of valuesIn(test)) values.add(value);
      found.set(field, values);
    }
    if (more !== null) found.set(more.fact, new Set([...(found.get(more.fact) ?? []), more.beyond, more.beyond + 1]));
  }
  return new Map([...found].map(([field, values]) => [field, [...values]]));
}

function valuesIn(test: FactTest): readonly Value[] {
  if (typeof test === 'string') return [test];
  if (typeof test === 'boolean') return [true, false];
  if ('least' in test) return [Math.max(1, Math.ceil(test.least) - 1), test.least];
  return test;
}
