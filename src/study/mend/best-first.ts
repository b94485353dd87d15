import type { ElementId } from '../../model/model.ts';
import type { Outcome } from '../../verdicts/outcome.ts';
import type { Item, Option } from './change.ts';
import type { Costs } from './costs.ts';
import { bySizeAlone, keyOf } from './items.ts';
import { type FirstSizes, resize } from './resize.ts';
import { type Settled, settleSizes } from './settle-sizes.ts';
import { type Budget, leastOf, lookAt, type State, stateAfter } from './state.ts';
import { StateQueue } from './state-queue.ts';

/** What a search is to settle, and what counts. */
export interface Task {
  readonly root: State;
  readonly first: FirstSizes;
  readonly costs: Costs;
  /** Errors that are let be, by key. */
  readonly left: ReadonlySet<string>;
  /** Items that are to be settled; all others are let be. */
  readonly ours: (item: Item) => boolean;
  /** Of a search in one place: pipes whose new sizes count. No run proves its plans. null: all count, and are proved. */
  readonly counted: ReadonlySet<ElementId> | null;
  /** What each place costs at least, where that is known. */
  readonly least: ReadonlyMap<string, number>;
  /** What pipes of no place cost at least. */
  readonly elsewhere: number;
  readonly budget: Budget;
  /** What a finished building costs besides its changes and sizes: cleanouts. */
  readonly besides: (outcome: Outcome) => number;
  /** A plan that is known. */
  readonly known: Complete | null;
}

export interface Complete {
  readonly state: State;
  /** null: not proved. */
  readonly settled: Settled | null;
  readonly cost: number;
}

export interface Searched {
  readonly best: Complete | null;
  /** No plan costs less. */
  readonly least: number;
  /** Every combination that could cost less was tried; without a plan: there is none. */
  readonly exact: boolean;
}

const tiny = 1e-9;

/**
 * The cheapest plan: the state with the lowest bound is looked at next, its first item is settled in every way there is,
 * and a plan is the cheapest once no state is left that could cost less.
 */
export function bestFirst(task: Task): Searched {
  return new BestFirst(task).run();
}

class BestFirst {
  readonly #task: Task;
  readonly #queue = new StateQueue();
  readonly #seen = new Set<string>();
  #best: Complete | null;

  constructor(task: Task) {
    this.#task = task;
    this.#best = task.known;
  }

  run(): Searched {
    this.#queue.push(this.#bounded(this.#task.root, 0));
    let least = 0;
    for (let state = this.#queue.pop(); state !== null; state = this.#queue.pop()) {
      least = Math.max(least, state.bound);
      if (this.#tooDear(state.bound)) return { best: this.#best, least: this.#best!.cost, exact: true };
      if (this.#task.budget.left <= 0) return { best: this.#best, least, exact: false };
      this.#expand(state);
    }
    return { best: this.#best, least: this.#best?.cost ?? least, exact: true };
  }

  #expand(state: State): void {
    const { costs, left, budget, ours, first } = this.#task;
    const { outcome, must: all, may } = lookAt(state, costs, left, budget);
    const must = all.filter(ours);
    if (must.some(({ options }) => options.length === 0)) return;
    const bounded = this.#bounded(
      state,
      costAhead(must, (option) => leastOf(state, option, first, costs)),
    );
    if (this.#tooDear(bounded.bound)) return;
    const [item] = must;
    if (item !== undefined) {
      this.#branch(bounded, outcome, item);
      return;
    }
    if (state.stay.size === 0 || state.outcome === null) this.#complete(state, outcome);
    const open = may.find(ours);
    if (open === undefined) return;
    this.#branch(bounded, outcome, open);
    // The same building, with these pipes left to their sizes: nothing is run again.
    this.#queue.push({ ...bounded, outcome, stay: new Set([...state.stay, open.key]) });
  }

  #branch(state: State, outcome: Outcome, item: Item): void {
    const { first, costs } = this.#task;
    for (const option of item.options)
      this.#push(this.#bounded(stateAfter(state, outcome, item, option, first, costs), 0));
  }

  /** One set of changes is looked at once, in whatever order they were made. */
  #push(state: State): void {
    const changes = state.made.map(({ option }) => option.key).sort();
    const key = [...changes, '|', ...[...state.stay].sort()].join('\n');
    if (this.#seen.has(key) || this.#tooDear(state.bound)) return;
    this.#seen.add(key);
    this.#queue.push(state);
  }

  #tooDear = (bound: number): boolean => this.#best !== null && bound >= this.#best.cost - tiny;

  #complete(state: State, outcome: Outcome): void {
    const { first, costs, left, counted, budget, besides } = this.#task;
    if (counted !== null) {
      const cost = state.cost + resize(outcome, first, state.pins, costs, false).cost + besides(outcome);
      if (this.#best === null || cost < this.#best.cost - tiny) this.#best = { state, settled: null, cost };
      return;
    }
    const settled = settleSizes(state.piping, outcome, first, state.pins, costs);
    budget.left -= settled.runs;
    const open = openErrors(settled.outcome, left);
    const cost = state.cost + settled.cost + besides(settled.outcome);
    if (open.some(({ code }) => !bySizeAlone.has(code)) && !state.sized)
      this.#queue.push({ ...state, piping: settled.piping, outcome: settled.outcome, sized: true });
    if (open.length === 0 && (this.#best === null || cost < this.#best.cost - tiny))
      this.#best = { state, settled, cost };
  }

  /** What a state has cost, with what it costs at least from here on: place by place where that is known. */
  #bounded(state: State, ahead: number): State {
    const { least, elsewhere } = this.#task;
    const { spent } = state;
    let sum = 0;
    for (const one of spent.values()) sum += one;
    let byPlace = 0;
    for (const place of new Set([...least.keys(), ...spent.keys()]))
      byPlace += Math.max(least.get(place) ?? 0, spent.get(place) ?? 0);
    return { ...state, bound: Math.max(state.bound, sum + ahead + elsewhere, byPlace + elsewhere) };
  }
}

/** Errors of a building but those that are let be. */
export const openErrors = (outcome: Outcome, left: ReadonlySet<string>) =>
  outcome.findings.filter(({ severity, ...finding }) => {
    return severity === 'error' && !left.has(keyOf({ outcome }, { severity, ...finding }));
  });

/** What the first items that are open cost at least: one change may settle all of one place, none those of two. */
export function costAhead(must: readonly Item[], least: (option: Option) => number): number {
  const tier = Math.min(...must.map((item) => item.tier));
  const places = new Map<string, number>();
  for (const { place, options, tier: own } of must) {
    if (own !== tier || options.length === 0) continue;
    places.set(place, Math.max(places.get(place) ?? 0, Math.min(...options.map(least))));
  }
  return [...places.values()].reduce((sum, one) => sum + one, 0);
}
