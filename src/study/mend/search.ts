import type { ElementId } from '../../model/model.ts';
import type { Outcome } from '../../verdicts/outcome.ts';
import { bestFirst, type Complete, openErrors, type Task } from './best-first.ts';
import type { Item } from './change.ts';
import { newCleanouts } from './cleanouts.ts';
import type { Costs } from './costs.ts';
import { ownPipes } from './places.ts';
import { costElsewhere, firstSizes } from './resize.ts';
import { settleSizes } from './settle-sizes.ts';
import { type Budget, lookAt, rootState, type State, stateAfter } from './state.ts';

export interface Found extends Complete {
  /** Runs of the stages that were made. */
  readonly runs: number;
  /** No plan of the known changes costs less. */
  readonly least: number;
  /** Every combination that could cost less was tried. */
  readonly exact: boolean;
  /** Errors that no known change settles, by key. */
  readonly unsettled: ReadonlySet<string>;
}

const tiny = 1e-6;

/**
 * The cheapest combination of changes after which no error is left that a known change settles. First every place of
 * the building by itself: what it costs at least, and its cheapest plan; these together are a plan, and the cheapest one
 * where they share no pipe. Where they do, a search over all of them goes on from there. `mostRuns` of the stages are made.
 */
export function search(first: Outcome, costs: Costs, mostRuns: number): Found {
  const searching = new Searching(first, costs, { left: mostRuns });
  const found = searching.run();
  return { ...found, runs: mostRuns - searching.budget.left, unsettled: searching.unsettled };
}

class Searching {
  readonly budget: Budget;
  readonly #costs: Costs;
  readonly #root: State;
  readonly #sizes: Task['first'];
  /** Errors that no known change settles, by key. */
  readonly unsettled = new Set<string>();
  /** A place got no plan for want of runs. */
  #gaveUp = false;

  constructor(first: Outcome, costs: Costs, budget: Budget) {
    this.budget = budget;
    this.#costs = costs;
    this.#root = rootState(first);
    this.#sizes = firstSizes(first);
  }

  run(): Omit<Found, 'runs' | 'unsettled'> {
    const begun = this.#begun();
    const { plans, least, own } = this.#eachPlace(begun);
    const known = this.#together(begun, plans);
    // What open air and the tops of stacks ask for comes first and bears on all places: their costs are not apart.
    const bounds = begun.made.length === 0 ? least : new Map<string, number>();
    const elsewhere = begun.made.length === 0 ? costElsewhere(begun.outcome!, this.#sizes, own, this.#costs) : 0;
    const sum = [...bounds.values()].reduce((all, one) => all + one, elsewhere);
    if (known !== null && known.cost <= sum + tiny) return { ...known, least: known.cost, exact: !this.#gaveUp };
    const task: Task = { ...this.#task(this.#root), least: bounds, elsewhere, known };
    const searched = bestFirst(task);
    const best = searched.best ?? this.#nothing();
    const exact = searched.exact && !this.#gaveUp;
    return { ...best, least: exact ? best.cost : searched.least, exact };
  }

  #task = (root: State): Omit<Task, 'least' | 'elsewhere' | 'known'> => ({
    root,
    first: this.#sizes,
    costs: this.#costs,
    left: this.unsettled,
    ours: () => true,
    counted: null,
    budget: this.budget,
    besides: (outcome) => this.#cleanouts(outcome, () => true),
  });

  #cleanouts = (outcome: Outcome, at: (line: string) => boolean): number =>
    newCleanouts(this.#root.outcome!, outcome).filter(({ line }) => at(line)).length * this.#costs.weights.cleanout;

  /** Past what bears on all places: the cheapest option of each, one after the other. */
  #begun(): State {
    let state = this.#root;
    for (;;) {
      const { outcome, must } = this.#look(state);
      const item = must.find(({ tier }) => tier < 3);
      const option = item === undefined ? undefined : cheapest(item);
      if (item === undefined || option === undefined || this.budget.left <= 0) return { ...state, outcome };
      state = stateAfter(state, outcome, item, option, this.#sizes, this.#costs);
    }
  }

  /** What is wrong; an error that no change is known for is let be from here on. */
  #look(state: State): ReturnType<typeof lookAt> {
    const looked = lookAt(state, this.#costs, this.unsettled, this.budget);
    for (const { key, options } of looked.must) if (options.length === 0) this.unsettled.add(key);
    return { ...looked, must: looked.must.filter(({ options }) => options.length > 0) };
  }

  #eachPlace(begun: State): { plans: Complete[]; least: Map<string, number>; own: Set<ElementId> } {
    const { outcome, must, may } = this.#look(begun);
    const items = [...must, ...may];
    const known = new Set(items.map(({ key }) => key));
    const places = [...new Set(items.map(({ place }) => place))];
    const plans: Complete[] = [];
    const least = new Map<string, number>();
    const all = new Set<ElementId>();
    places.forEach((place, at) => {
      const own = items.filter((item) => item.place === place);
      const pinned = own.flatMap(({ options }) => options.flatMap(({ pins }) => pins.map(([element]) => element)));
      const counted = new Set([...ownPipes(outcome, place), ...pinned]);
      for (const element of counted) all.add(element);
      // Each place has its share of what is left, so that one hard one does not starve the others.
      const share: Budget = { left: Math.ceil(this.budget.left / (places.length - at + 1)) };
      const before = share.left;
      const searched = bestFirst({
        ...this.#task({ ...begun, cost: 0, spent: new Map() }),
        costs: onlyFor(this.#costs, counted),
        ours: (item) => item.place === place || !known.has(item.key),
        counted,
        besides: (after) => this.#cleanouts(after, (line) => line === place),
        least: new Map(),
        elsewhere: 0,
        budget: share,
        known: null,
      });
      this.budget.left -= before - share.left;
      least.set(place, searched.best === null ? 0 : searched.least);
      if (searched.best !== null) plans.push(searched.best);
      // No combination of what is known settles these, or none was found in time: the other places still get their plan.
      else this.#gaveUp ||= !searched.exact;
      if (searched.best === null) for (const { key, mayStay } of own) if (!mayStay) this.unsettled.add(key);
    });
    return { plans, least, own: all };
  }

  /** The plans of all places in one building: each change is found again, since the piping has changed meanwhile. */
  #together(begun: State, plans: readonly Complete[]): Complete | null {
    let state = begun;
    let outcome = begun.outcome!;
    const steps = plans.flatMap(({ state: planned }) => planned.made.slice(begun.made.length));
    for (const step of steps) {
      const looked = this.#look(state);
      outcome = looked.outcome;
      const items = [...looked.must, ...looked.may];
      const same = items.flatMap((item) =>
        item.options.filter(({ key }) => key === step.option.key).map((option) => ({ item, option })),
      )[0];
      const item = items.find(({ key }) => key === step.item);
      const option = item === undefined ? undefined : cheapest(item);
      const chosen = same ?? (item === undefined || option === undefined ? undefined : { item, option });
      state = { ...state, outcome };
      if (chosen !== undefined)
        state = stateAfter(state, outcome, chosen.item, chosen.option, this.#sizes, this.#costs);
    }
    const looked = this.#look(state);
    if (looked.must.length > 0) return null;
    const settled = settleSizes(state.piping, looked.outcome, this.#sizes, state.pins, this.#costs);
    this.budget.left -= settled.runs;
    if (openErrors(settled.outcome, this.unsettled).length > 0) return null;
    const cost = state.cost + settled.cost + this.#cleanouts(settled.outcome, () => true);
    return { state: { ...state, outcome: looked.outcome }, settled, cost };
  }

  /** No plan was found: larger pipe alone, and the errors that are left. */
  #nothing(): Complete {
    const settled = settleSizes(this.#root.piping, this.#root.outcome!, this.#sizes, new Map(), this.#costs);
    this.budget.left -= settled.runs;
    return { state: this.#root, settled, cost: settled.cost };
  }
}

const cheapest = ({ options }: Item) => [...options].sort((a, b) => a.cost - b.cost || (a.key < b.key ? -1 : 1))[0];

/** Costs of a search in one place: sizes of other pipes are free. */
const onlyFor = (costs: Costs, counted: ReadonlySet<ElementId>): Costs => ({
  ...costs,
  resize: (pipe, from, to) => (counted.has(pipe) ? costs.resize(pipe, from, to) : 0),
});
