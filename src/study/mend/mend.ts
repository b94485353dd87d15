import type { Facts, Finding } from '../../findings/finding.ts';
import type { ElementId } from '../../model/model.ts';
import { runNetwork } from '../../pipeline.ts';
import type { NominalSize } from '../../units/nominal-size.ts';
import type { Outcome } from '../../verdicts/outcome.ts';
import { withSize } from '../edits.ts';
import { pipingOf } from '../piping-of.ts';
import type { Change } from './change.ts';
import { lackingCleanouts, type NewCleanout, newCleanouts } from './cleanouts.ts';
import { costsOf } from './costs.ts';
import { keyOf } from './items.ts';
import { firstSizes } from './resize.ts';
import { search } from './search.ts';
import type { State } from './state.ts';
import type { Weights } from './weights.ts';

/** The least change after which no error is left that a known change settles, and the building as it would be. */
export interface Plan {
  readonly first: Outcome;
  /** The run of the stages on the changed building: the proof. */
  readonly last: Outcome;
  /** In the order in which they are made: vents, readings and falls, then sizes with the flow. */
  readonly steps: readonly PlanStep[];
  readonly cost: number;
  readonly weights: Weights;
  /** No other combination of the known changes costs less. */
  readonly exact: boolean;
  /** No combination costs less than this. */
  readonly least: number;
  /** Runs of the stages that were made. */
  readonly runs: number;
  /** Errors that are left, of the building as it would be. */
  readonly left: readonly Finding[];
  /** None of them is settled by a change that is known: a longer search would leave them too. */
  readonly hopeless: boolean;
}

export type PlanStep =
  | { readonly kind: 'change'; readonly change: Change; readonly why: Finding; readonly cost: number }
  | {
      readonly kind: 'cleanout';
      readonly cleanout: NewCleanout;
      /** null: a row that is read another way needs it. */
      readonly why: Finding | null;
      readonly cost: number;
    }
  | {
      readonly kind: 'size';
      readonly element: ElementId;
      readonly from: NominalSize;
      readonly to: NominalSize;
      /** The finding on this pipe; null: it follows from another change. */
      readonly why: Finding | null;
      /** The demand that governs it in the building as it would be. */
      readonly governs: { readonly rule: string; readonly clause: string; readonly facts: Facts } | null;
      readonly cost: number;
    };

/** Runs of the stages that a search makes at most. */
export const usualRuns = 600;

export function mend(first: Outcome, weights: Weights, mostRuns = usualRuns): Plan {
  const costs = costsOf(first, weights);
  const { state, settled, cost, runs, least, exact, unsettled } = search(first, costs, mostRuns);
  const last = settled === null ? first : withNewSizes(settled.outcome, state.made);
  const changes = state.made.flatMap(({ option: { change, why, cost: points } }): PlanStep[] =>
    change === null ? [] : [{ kind: 'change', change, why, cost: points }],
  );
  const lacking = lackingCleanouts(last).map((one): PlanStep => ({ kind: 'cleanout', ...one, cost: weights.cleanout }));
  const left = last.findings.filter(({ severity }) => severity === 'error');
  const besides = lacking.reduce((sum, one) => sum + one.cost, 0);
  return {
    first,
    last,
    steps: [
      ...changes,
      ...cleanoutSteps(first, last, weights),
      ...lacking,
      ...sizeSteps(first, last, settled?.sizes ?? new Map(), costs.resize),
    ],
    cost: cost + besides,
    weights,
    exact,
    least: least + besides,
    runs,
    left,
    hopeless: left.every((finding) => unsettled.has(keyOf({ outcome: last }, finding))),
  };
}

/** New vents drawn in the sizes that they need, so that the proof judges them as well. */
function withNewSizes(outcome: Outcome, made: State['made']): Outcome {
  const { network, shown, code } = outcome;
  const vents = made.flatMap(({ option: { change } }) => (change !== null && 'added' in change ? [change] : []));
  const added = vents.flatMap((vent) => vent.added.map((element) => ({ element, vent })));
  let piping = pipingOf(outcome);
  for (const { element, vent } of added) {
    const asked = (network.pipesOf.get(element) ?? []).flatMap((pipe) => shown.sizes[pipe]!.size ?? []);
    // A vent that goes on and that nothing asks of keeps the size that it has.
    const own = vent.kind !== 'extended-vent' ? [] : (network.pipesOf.get(vent.about[0]!) ?? []);
    const sizes = asked.length > 0 ? asked : own.flatMap((pipe) => shown.loads.modelled[pipe]!.size ?? []);
    if (sizes.length > 0) piping = withSize(piping, element, sizes.reduce(code.series.larger));
  }
  return added.length === 0 ? outcome : runNetwork(piping);
}

const cleanoutSteps = (first: Outcome, last: Outcome, { cleanout: cost }: Weights): PlanStep[] =>
  newCleanouts(first, last).map((cleanout) => ({ kind: 'cleanout', cleanout, why: null, cost }));

/** Drains with the flow, then vents toward the sky. */
function sizeSteps(
  first: Outcome,
  last: Outcome,
  sizes: ReadonlyMap<ElementId, NominalSize>,
  costOf: (element: ElementId, from: NominalSize, to: NominalSize) => number,
): PlanStep[] {
  const drawn = firstSizes(first);
  const place = new Map<ElementId, number>();
  last.paths.inFlowOrder.forEach((pipe, at) => {
    const { element } = last.network.pipes[pipe]!;
    if (element !== null) place.set(element, at);
  });
  const after = last.paths.inFlowOrder.length;
  const at = (element: ElementId): number => place.get(element) ?? after + element;
  return [...sizes]
    .sort(([a], [b]) => at(a) - at(b))
    .map(([element, to]): PlanStep => {
      const from = drawn.get(element)!;
      const why =
        first.findings.find(
          ({ code, about }) => about[0] === element && (code === 'undersized' || code === 'smaller-downstream'),
        ) ?? null;
      return {
        kind: 'size',
        element,
        from,
        to,
        why,
        governs: governsOf(last, element),
        cost: costOf(element, from, to),
      };
    });
}

function governsOf({ network, shown, code }: Outcome, element: ElementId) {
  const sections = network.pipesOf.get(element) ?? [];
  const largest = sections
    .map((section) => shown.sizes[section]!)
    .sort(
      (a, b) => (b.size === null ? -1 : code.series.rank(b.size)) - (a.size === null ? -1 : code.series.rank(a.size)),
    )[0];
  const step = largest?.governing[0];
  return step === undefined ? null : { rule: step.rule, clause: step.clause, facts: step.facts };
}

/** Errors of an outcome by what they are and where. */
export const errorsOf = (outcome: Outcome): string[] =>
  outcome.findings.filter(({ severity }) => severity === 'error').map((finding) => keyOf({ outcome }, finding));
