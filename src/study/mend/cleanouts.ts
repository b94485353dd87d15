import type { Finding } from '../../findings/finding.ts';
import type { ElementId } from '../../model/model.ts';
import type { Battery } from '../../roles/roles.ts';
import type { NominalSize } from '../../units/nominal-size.ts';
import type { Outcome } from '../../verdicts/outcome.ts';
import { unchanged } from '../changed-piping.ts';
import { rowOf } from '../row.ts';
import { rowCleanouts } from '../row-cleanouts.ts';
import { lineOf } from './places.ts';

/** A cleanout that a plan adds, or makes larger. */
export interface NewCleanout {
  /** That it is set into: of a battery the first pipe of its line. */
  readonly pipe: ElementId;
  /** null: nothing says how large. */
  readonly size: NominalSize | null;
  readonly place: string;
  readonly clause: string;
}

/**
 * Cleanouts of batteries whose reading changes: those that they need now and did not need before. `line`: the place of
 * the building that the battery stands at.
 */
export function newCleanouts(first: Outcome, last: Outcome): (NewCleanout & { readonly line: string })[] {
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
      (one): ReturnType<typeof newCleanouts> => {
        const at = needed.indexOf(one.place);
        if (at >= 0) needed.splice(at, 1);
        const { size, place, clause } = one;
        return at >= 0 ? [] : [{ pipe: line[0]!, size, place, clause, line: lineOf(last, trap.fixture) }];
      },
    );
  });
}

/**
 * Cleanouts that the building as it would be still lacks, and those that are too small for their pipes: nothing else hangs
 * on them, so each is settled by itself. A model that draws none has left them to another drawing, and none are proposed.
 */
export function lackingCleanouts({
  findings,
  network,
  pipes,
  code,
}: Outcome): { cleanout: NewCleanout; why: Finding }[] {
  return findings.flatMap((why) => {
    const { code: what, about, facts, clause = '' } = why;
    if (facts.what === 'none drawn' || (what !== 'cleanout-missing' && what !== 'cleanout-too-small')) return [];
    const place = what === 'cleanout-too-small' ? 'too small' : String(facts.what);
    // One finding may name many pipes of one kind, each of which needs its own; along a run one is set at a time.
    const each = typeof facts.pipes === 'number' && place !== 'spacing' ? about : about.slice(0, 1);
    return (each as readonly ElementId[]).map((pipe) => {
      const served = (network.pipesOf.get(pipe) ?? []).flatMap((one) => pipes[one]!.required?.most ?? []);
      const largest = served.length === 0 ? null : served.reduce(code.series.larger);
      const asked = largest === null ? null : (code.cleanouts?.sizeFor(largest) ?? largest);
      const size = place === 'too small' ? (facts.least as NominalSize) : asked;
      return { cleanout: { pipe, size, place, clause }, why };
    });
  });
}
