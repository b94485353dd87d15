import type { ElementId } from '../../model/model.ts';
import { type Piping, runNetwork } from '../../pipeline.ts';
import type { NominalSize } from '../../units/nominal-size.ts';
import type { Outcome } from '../../verdicts/outcome.ts';
import { pipingOf } from '../piping-of.ts';
import type { Item, Option } from './change.ts';
import type { Costs } from './costs.ts';
import { bySizeAlone, itemsOf, keyOf } from './items.ts';
import { type FirstSizes, firstSizes } from './resize.ts';
import { sceneOf } from './scene.ts';
import { type Settled, settleSizes, withSizes } from './settle-sizes.ts';
import { StateQueue } from './state-queue.ts';

/** A building some changes into a plan. */
export interface State {
  readonly piping: Piping;
  readonly options: readonly Option[];
  readonly pins: ReadonlyMap<ElementId, NominalSize>;
  /** Undersized pipes that larger pipe shall settle, by item. */
  readonly stay: ReadonlySet<string>;
  /** Of the changes made, without sizes. */
  readonly cost: number;
  /** No plan that goes on from here costs less. */
  readonly bound: number;
  /** Known where the piping is that of another state. */
  readonly outcome: Outcome | null;
  /** Its pipes have their new sizes already: sizing brought up what more has to be changed. */
  readonly sized: boolean;
}

export interface Found {
  readonly options: readonly Option[];
  readonly settled: Settled;
  readonly cost: number;
  /** Engine runs that were made. */
  readonly runs: number;
  /** No plan of the known changes costs less. */
  readonly least: number;
  /** Every combination that could cost less was tried. */
  readonly exact: boolean;
  /** Errors that no known change settles, by key. */
  readonly left: ReadonlySet<string>;
}

const tiny = 1e-9;

/**
 * The cheapest combination of changes after which no error is left that a known change can settle. Best first: the state
 * with the lowest bound is looked at next, its first item is settled in every way there is, and a plan is the cheapest
 * when no state is left that could cost less. `mostRuns` of the stages are made; past them the best plan found counts,
 * and it says so.
 */
export function search(first: Outcome, costs: Costs, mostRuns: number): Found {
  const sizes = firstSizes(first);
  const root: State = {
    piping: pipingOf(first),
    options: [],
    pins: new Map(),
    stay: new Set(),
    cost: 0,
    bound: 0,
    outcome: first,
    sized: false,
  };
  const left = new Set(
    itemsOf(sceneOf(first, costs))
      .filter(({ options, mayStay }) => options.length === 0 && !mayStay)
      .map(({ key }) => key),
  );
  const searching = new Searching(sizes, costs, left, mostRuns);
  searching.dive(root);
  return searching.run(root);
}

class Searching {
  readonly #sizes: FirstSizes;
  readonly #costs: Costs;
  readonly #left: ReadonlySet<string>;
  readonly #most: number;
  readonly #queue = new StateQueue();
  readonly #seen = new Set<string>();
  #runs = 0;
  #best: { options: readonly Option[]; settled: Settled; cost: number } | null = null;

  constructor(sizes: FirstSizes, costs: Costs, left: ReadonlySet<string>, most: number) {
    this.#sizes = sizes;
    this.#costs = costs;
    this.#left = left;
    this.#most = most;
  }

  /** A first plan: the cheapest option of the first item, again and again. It bounds the search. */
  dive(root: State): void {
    let state: State | undefined = root;
    for (let depth = 0; state !== undefined && depth < this.#most; depth++) {
      const looked = this.#look(state);
      const item: Item | undefined = looked.must[0];
      if (looked.dead) return;
      if (item === undefined) {
        this.#complete(state, looked.outcome);
        return;
      }
      const cheapest = [...item.options].sort((a, b) => a.cost - b.cost)[0];
      state = cheapest === undefined ? undefined : this.#after(state, looked.outcome, cheapest, 0);
    }
  }

  run(root: State): Found {
    this.#queue.push(root);
    let least = 0;
    let exact = true;
    for (let state = this.#queue.pop(); state !== null; state = this.#queue.pop()) {
      least = Math.max(least, Math.min(state.bound, this.#best?.cost ?? Number.POSITIVE_INFINITY));
      if (this.#best !== null && state.bound >= this.#best.cost - tiny) break;
      if (this.#runs >= this.#most) {
        exact = false;
        break;
      }
      this.#expand(state);
    }
    const best = this.#best;
    if (best === null) return this.#nothing(root);
    return { ...best, runs: this.#runs, least: exact ? best.cost : least, exact, left: this.#left };
  }

  #nothing(root: State): Found {
    const settled = settleSizes(root.piping, root.outcome!, this.#sizes, root.pins, this.#costs);
    this.#runs += settled.runs;
    const { cost } = settled;
    return { options: [], settled, cost, runs: this.#runs, least: 0, exact: false, left: this.#left };
  }

  #expand(state: State): void {
    const { outcome, must, may, dead, ahead } = this.#look(state);
    if (dead) return;
    const bound = Math.max(state.bound, state.cost + this.#pinCost(state.pins) + ahead);
    if (this.#best !== null && bound >= this.#best.cost - tiny) return;
    const item = must[0];
    if (item !== undefined) {
      for (const option of item.options) this.#push(this.#after(state, outcome, option, bound));
      return;
    }
    if (state.stay.size === 0 || state.outcome === null) this.#complete(state, outcome);
    const open = may[0];
    if (open === undefined) return;
    for (const option of open.options) this.#push(this.#after(state, outcome, option, bound));
    // The same building, with these pipes left to their sizes: nothing is run again.
    this.#queue.push({ ...state, bound, outcome, stay: new Set([...state.stay, open.key]) });
  }

  #look(state: State): { outcome: Outcome; must: Item[]; may: Item[]; dead: boolean; ahead: number } {
    const outcome = state.outcome ?? runNetwork(state.piping);
    if (state.outcome === null) this.#runs++;
    const items = itemsOf(sceneOf(outcome, this.#costs));
    const used = new Set(state.options.map(({ key }) => key));
    const must = items
      .filter(({ key, mayStay }) => !mayStay && !this.#left.has(key))
      .map((item) => ({ ...item, options: item.options.filter(({ key }) => !used.has(key)) }));
    const may = items.filter(({ key, mayStay }) => mayStay && !state.stay.has(key));
    const ahead = costAhead(must, (option) => this.#leastOf(state, option));
    return { outcome, must, may, dead: must.some(({ options }) => options.length === 0), ahead };
  }

  #after(state: State, outcome: Outcome, option: Option, bound: number): State {
    const pins = new Map(state.pins);
    const { rank } = state.piping.code.series;
    for (const [element, size] of option.pins) {
      const known = pins.get(element);
      if (known === undefined || rank(size) > rank(known)) pins.set(element, size);
    }
    const changed = option.change === null ? state.piping : option.change.apply(state.piping);
    const cost = state.cost + (option.change === null ? 0 : option.cost);
    return {
      piping: option.pins.length === 0 ? changed : withSizes(changed, outcome, new Map(option.pins)),
      options: [...state.options, option],
      pins,
      stay: state.stay,
      cost,
      bound: Math.max(bound, cost + this.#pinCost(pins)),
      outcome: null,
      sized: state.sized,
    };
  }

  /** What an option adds at least to the cost of a state: sizes that are pinned already count once. */
  #leastOf({ pins }: State, { change, cost, pins: own }: Option): number {
    if (change !== null) return cost;
    const known = own.reduce((sum, [element]) => {
      const [size, drawn] = [pins.get(element), this.#sizes.get(element)];
      return size === undefined || drawn === undefined ? sum : sum + this.#costs.resize(element, drawn, size);
    }, 0);
    return Math.max(0, cost - known);
  }

  /** One set of changes is looked at once, in whatever order they were made. */
  #push(state: State): void {
    const key = [...state.options.map((option) => option.key).sort(), '|', ...[...state.stay].sort()].join('\n');
    if (this.#seen.has(key) || (this.#best !== null && state.bound >= this.#best.cost - tiny)) return;
    this.#seen.add(key);
    this.#queue.push(state);
  }

  #complete(state: State, outcome: Outcome): void {
    const settled = settleSizes(state.piping, outcome, this.#sizes, state.pins, this.#costs);
    this.#runs += settled.runs;
    const open = settled.outcome.findings.filter(
      (finding) => finding.severity === 'error' && !this.#left.has(keyOf(settled, finding)),
    );
    const cost = state.cost + settled.cost;
    if (open.some(({ code }) => !bySizeAlone.has(code)) && !state.sized)
      this.#queue.push({ ...state, piping: settled.piping, outcome: settled.outcome, sized: true });
    if (open.length > 0 || (this.#best !== null && cost >= this.#best.cost - tiny)) return;
    this.#best = { options: state.options, settled, cost };
  }

  #pinCost(pins: State['pins']): number {
    let sum = 0;
    for (const [element, size] of pins) {
      const drawn = this.#sizes.get(element);
      if (drawn !== undefined) sum += this.#costs.resize(element, drawn, size);
    }
    return sum;
  }
}

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
