import type { ElementId } from '../../model/model.ts';
import { type Piping, runNetwork } from '../../pipeline.ts';
import type { NominalSize } from '../../units/nominal-size.ts';
import type { Outcome } from '../../verdicts/outcome.ts';
import { pipingOf } from '../piping-of.ts';
import type { Item, Option } from './change.ts';
import type { Costs } from './costs.ts';
import { itemsOf } from './items.ts';
import type { FirstSizes } from './resize.ts';
import { sceneOf } from './scene.ts';
import { withSizes } from './settle-sizes.ts';

/** A building some changes into a plan. */
export interface State {
  readonly piping: Piping;
  /** In the order in which they were made, each with the item that it is to settle. */
  readonly made: readonly { readonly item: string; readonly option: Option }[];
  readonly pins: ReadonlyMap<ElementId, NominalSize>;
  /** Undersized pipes that larger pipe shall settle, by item. */
  readonly stay: ReadonlySet<string>;
  /** Of the changes made, without sizes. */
  readonly cost: number;
  /** What the changes of each place cost at least, with the sizes that they pin. */
  readonly spent: ReadonlyMap<string, number>;
  /** No plan that goes on from here costs less. */
  readonly bound: number;
  /** Known where the piping is that of another state. */
  readonly outcome: Outcome | null;
  /** Its pipes have their new sizes already: sizing brought up what more has to be changed. */
  readonly sized: boolean;
}

export const rootState = (first: Outcome): State => ({
  piping: pipingOf(first),
  made: [],
  pins: new Map(),
  stay: new Set(),
  cost: 0,
  spent: new Map(),
  bound: 0,
  outcome: first,
  sized: false,
});

/** Runs of the stages that may still be made; shared by all parts of one search. */
export interface Budget {
  left: number;
}

export interface Looked {
  readonly outcome: Outcome;
  /** Errors that no larger pipe settles, in a fixed order. */
  readonly must: readonly Item[];
  /** Undersized pipes that something else may settle too. */
  readonly may: readonly Item[];
}

/** What is wrong in a state, without the changes that it has had already. `left`: errors that are let be. */
export function lookAt(state: State, costs: Costs, left: ReadonlySet<string>, budget: Budget): Looked {
  const outcome = state.outcome ?? runNetwork(state.piping);
  if (state.outcome === null) budget.left--;
  const items = itemsOf(sceneOf(outcome, costs));
  const used = new Set(state.made.map(({ option }) => option.key));
  const must = items
    .filter(({ key, mayStay }) => !mayStay && !left.has(key))
    .map((item) => ({ ...item, options: item.options.filter(({ key }) => !used.has(key)) }));
  return { outcome, must, may: items.filter(({ key, mayStay }) => mayStay && !state.stay.has(key)) };
}

/** The state after one option of an item. */
export function stateAfter(
  state: State,
  outcome: Outcome,
  item: Item,
  option: Option,
  first: FirstSizes,
  costs: Costs,
): State {
  const pins = new Map(state.pins);
  const { larger } = state.piping.code.series;
  for (const [element, size] of option.pins) {
    const known = pins.get(element);
    pins.set(element, known === undefined ? size : larger(known, size));
  }
  const { change } = option;
  const changed = change === null ? state.piping : change.apply(state.piping);
  const least = leastOf(state, option, first, costs);
  return {
    piping: option.pins.length === 0 ? changed : withSizes(changed, outcome, new Map(option.pins)),
    made: [...state.made, { item: item.key, option }],
    pins,
    stay: state.stay,
    cost: state.cost + (change === null ? 0 : option.cost),
    spent: new Map([...state.spent, [item.place, (state.spent.get(item.place) ?? 0) + least]]),
    bound: state.bound,
    outcome: null,
    sized: state.sized,
  };
}

/** What an option adds at least to the cost of a state: of sizes what they go beyond those that are pinned already. */
export function leastOf({ pins }: State, { change, cost, pins: own }: Option, first: FirstSizes, costs: Costs): number {
  if (change !== null) return cost;
  return own.reduce((sum, [element, size]) => {
    const [known, drawn] = [pins.get(element), first.get(element)];
    if (drawn === undefined) return sum;
    const before = known === undefined ? 0 : costs.resize(element, drawn, known);
    return sum + Math.max(0, costs.resize(element, drawn, size) - before);
  }, 0);
}
