import type { Finding } from '../../findings/finding.ts';
import type { ElementId } from '../../model/model.ts';
import { type Piping, runNetwork } from '../../pipeline.ts';
import type { NominalSize } from '../../units/nominal-size.ts';
import type { Outcome } from '../../verdicts/outcome.ts';
import { withSize, withTrap } from '../edits.ts';
import type { Costs } from './costs.ts';
import { bySizeAlone } from './items.ts';
import { type FirstSizes, resize } from './resize.ts';

/** A building whose pipes have the cheapest sizes that do, and the proof: the run of the stages on it. */
export interface Settled {
  readonly piping: Piping;
  readonly outcome: Outcome;
  readonly sizes: ReadonlyMap<ElementId, NominalSize>;
  readonly cost: number;
  readonly runs: number;
}

/** A new size may ask for another one, through what it drains or airs: so many rounds are made. */
const mostRounds = 6;

/**
 * The sizes that a piping needs, carried into it and run again until nothing asks for more. Where smaller pipe would
 * bring up other faults, none becomes smaller.
 */
export function settleSizes(
  piping: Piping,
  outcome: Outcome,
  first: FirstSizes,
  pins: ReadonlyMap<ElementId, NominalSize>,
  costs: Costs,
): Settled {
  const free = settle(piping, outcome, first, pins, costs, false);
  if (!bringsUpMore(outcome, free.outcome)) return free;
  const grown = settle(piping, outcome, first, pins, costs, true);
  const runs = free.runs + grown.runs;
  return bringsUpMore(outcome, grown.outcome) ? { ...free, runs } : { ...grown, runs };
}

function settle(
  piping: Piping,
  outcome: Outcome,
  first: FirstSizes,
  pins: ReadonlyMap<ElementId, NominalSize>,
  costs: Costs,
  grow: boolean,
): Settled {
  let settled: Settled = { piping, outcome, sizes: new Map(), cost: 0, runs: 0 };
  const least = new Map(pins);
  for (let round = 0; round < mostRounds; round++) {
    const { sizes, cost } = resize(settled.outcome, first, least, costs, grow);
    if (round > 0 && alike(sizes, settled.sizes)) break;
    if (sizes.size === 0 && round === 0) break;
    const changed = withSizes(piping, outcome, sizes);
    settled = { piping: changed, outcome: runNetwork(changed), sizes, cost, runs: settled.runs + 1 };
    pinReductions(settled.outcome, least);
    if (!settled.outcome.findings.some(({ code }) => bySizeAlone.has(code))) break;
  }
  return settled;
}

/** The sizes said; a trap that was read off its pipe keeps its own. */
export function withSizes(piping: Piping, { network, paths, shown }: Outcome, sizes: Settled['sizes']): Piping {
  let changed = piping;
  for (const [element, size] of sizes) changed = withSize(changed, element, size);
  for (const { id, element, water } of paths.fixtures) {
    const { trap, trapFrom } = shown.loads.fixtures[id]!;
    const begins = water[paths.traps[id]!.after];
    const pipe = begins === undefined ? null : network.pipes[begins]!.element;
    if (trapFrom === 'pipe' && pipe !== null && sizes.has(pipe)) changed = withTrap(changed, element, trap);
  }
  return changed;
}

/** Drains that join in more ways than a tree has: what is still smaller than its inflow must be as large. */
function pinReductions({ findings, code }: Outcome, least: Map<ElementId, NominalSize>): void {
  for (const { code: what, about, facts } of findings) {
    if (what !== 'smaller-downstream' || typeof facts.upstream !== 'string' || !code.series.has(facts.upstream))
      continue;
    const element = about[0] as ElementId;
    const known = least.get(element);
    const size = facts.upstream as NominalSize;
    least.set(element, known === undefined ? size : code.series.larger(known, size));
  }
}

const alike = (a: Settled['sizes'], b: Settled['sizes']): boolean =>
  a.size === b.size && [...a].every(([element, size]) => b.get(element) === size);

function bringsUpMore(before: Outcome, after: Outcome): boolean {
  const faults = ({ findings }: Outcome): Finding[] =>
    findings.filter(({ severity, code }) => severity === 'error' && !bySizeAlone.has(code));
  return faults(after).length > faults(before).length;
}
