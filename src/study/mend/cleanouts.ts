import type { Finding } from '../../findings/finding.ts';
import type { ElementId } from '../../model/model.ts';
import type { Battery } from '../../roles/roles.ts';
import type { NominalSize } from '../../units/nominal-size.ts';
import type { Outcome } from '../../verdicts/outcome.ts';
import { unchanged } from '../changed-piping.ts';
import { rowOf } from '../row.ts';
import { rowCleanouts } from '../row-cleanouts.ts';
import { lineOf } from './places.ts';

/** A cleanout that a battery needs once it is read another way. */
export interface NewCleanout {
  /** First pipe of the battery's line. */
  readonly pipe: ElementId;
  readonly size: NominalSize;
  readonly place: string;
  readonly clause: string;
  /** Place of the building that the battery stands at. */
  readonly line: string;
}

/** Cleanouts of batteries whose reading changes: those that they need now and did not need before. */
export function newCleanouts(first: Outcome, last: Outcome): NewCleanout[] {
  const elementsOf = ({ paths }: Outcome, { facts }: Battery): ElementId[] =>
    facts.traps.map(({ fixture }) => paths.fixtures[fixture]!.element);
  const before = first.shown.roles.batteries.map((battery) => ({
    battery,
    fixtures: new Set(elementsOf(first, battery)),
  }));
  return last.shown.roles.batteries.flatMap((battery) => {
    const fixtures = elementsOf(last, battery);
    const known = before.find((one) => fixtures.some((fixture) => one.fixtures.has(fixture)))?.battery;
    if (known === undefined || known.reading === battery.reading) return [];
    const needed = rowCleanouts(rowOf(first, known), { piping: unchanged(first), outcome: first }).map(
      ({ place }) => place,
    );
    const line = battery.facts.line.flatMap((pipe) => last.network.pipes[pipe]!.element ?? []);
    const trap = battery.facts.traps[0];
    if (line[0] === undefined || trap === undefined) return [];
    return rowCleanouts(rowOf(last, battery), { piping: unchanged(last), outcome: last }).flatMap(
      (one): NewCleanout[] => {
        const at = needed.indexOf(one.place);
        if (at >= 0) needed.splice(at, 1);
        const { size, place, clause } = one;
        return at >= 0 ? [] : [{ pipe: line[0]!, size, place, clause, line: lineOf(last, trap.fixture) }];
      },
    );
  });
}

/** The finding that a new cleanout would otherwise be. */
export const cleanoutWhy = ({ pipe, clause, place }: NewCleanout): Finding => ({
  code: 'cleanout-missing',
  severity: 'warning',
  about: [pipe],
  facts: { place },
  clause,
});
