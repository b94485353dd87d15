import type { ElementId } from '../../model/model.ts';
import type { PipeId } from '../../network/network.ts';
import type { NominalSize } from '../../units/nominal-size.ts';
import type { Outcome } from '../../verdicts/outcome.ts';
import type { Costs } from './costs.ts';

/** Sizes of the first model by element; null: none that can be read. What a new size is counted from. */
export type FirstSizes = ReadonlyMap<ElementId, NominalSize>;

export const firstSizes = ({ network, shown }: Outcome): FirstSizes =>
  new Map(
    [...network.pipesOf].flatMap(([element, [section]]): [ElementId, NominalSize][] => {
      const size = section === undefined ? null : shown.loads.modelled[section]!.size;
      return size === null ? [] : [[element, size]];
    }),
  );

export interface Resizing {
  /** Pipes whose size changes, by element. */
  readonly sizes: ReadonlyMap<ElementId, NominalSize>;
  readonly cost: number;
}

/**
 * The cheapest sizes at which every pipe is at least what it needs and no drain is smaller than one that flows into it.
 * The drains form trees, so that the least cost is found exactly: for each pipe and size the least cost of all upstream
 * of it. `pins` are sizes that pipes must have at least. With `grow`, no pipe becomes smaller.
 */
export function resize(
  outcome: Outcome,
  first: FirstSizes,
  pins: ReadonlyMap<ElementId, NominalSize>,
  costs: Costs,
  grow: boolean,
): Resizing {
  const { code } = outcome;
  const { rank, sizes } = code.series;
  const offered = sizes.flatMap(({ label }, at) => (code.omitSizes.has(label) ? [] : [at]));
  const nodes = new Map<ElementId, Node>();
  for (const [element, size] of first) {
    const needs = needsOf(outcome, element, pins);
    if (needs === null) continue;
    const drawn = rank(size);
    // What nothing asks of stays as it is drawn; so does what is no error as long as something is open. What is an error
    // is made large enough for the heaviest that it may be.
    const [from, to] = [needs.least, needs.most].map((asked) => (asked === null ? drawn : rank(asked)));
    const asked = drawn < from! ? to! : Math.min(drawn, to!);
    const least = needs.pin === null ? asked : Math.max(asked, rank(needs.pin));
    const floor = grow ? Math.max(least, drawn) : least;
    nodes.set(element, { element, drawn, least: floor, drain: needs.drain, below: null });
  }
  const upstream = joinNodes(outcome, nodes);
  const chosen = new Map<ElementId, number>();
  const top = Math.max(0, ...[...nodes.values()].map(({ drawn, least }) => Math.max(drawn, least)));
  const ranks = [
    ...new Set([...offered.filter((at) => at <= top), ...[...nodes.values()].map(({ drawn }) => drawn)]),
  ].sort((a, b) => a - b);
  const costAt = ({ element, drawn }: Node, at: number): number =>
    at === drawn ? 0 : costs.resize(element, first.get(element)!, sizes[at]!.label);
  const best = new Map<ElementId, readonly Choice[]>();
  const order = inFlow(nodes, upstream);
  for (const node of order) best.set(node.element, choicesOf(node));
  for (const node of order.reverse()) {
    const most = node.below === null ? Number.POSITIVE_INFINITY : chosen.get(node.below.element)!;
    const choice = best.get(node.element)!.findLast(({ at }) => at <= most);
    chosen.set(node.element, choice?.pick ?? Math.max(node.least, node.drawn));
  }
  const changed = new Map<ElementId, NominalSize>();
  let cost = 0;
  for (const [element, node] of nodes) {
    const at = chosen.get(element)!;
    if (at === node.drawn) continue;
    changed.set(element, sizes[at]!.label);
    cost += costAt(node, at);
  }
  return { sizes: changed, cost };

  /** By rank, smallest first: the cheapest size up to that rank, and what it costs with everything upstream. */
  function choicesOf(node: Node): Choice[] {
    const choices: Choice[] = [];
    for (const at of ranks) {
      if (!node.drain && at !== Math.max(node.drawn, node.least)) continue;
      if (at < node.least) continue;
      const children = (upstream.get(node.element) ?? []).map(({ element }) =>
        best.get(element)!.findLast((choice) => choice.at <= at),
      );
      if (children.some((child) => child === undefined)) continue;
      const sum = costAt(node, at) + children.reduce((total, child) => total + child!.cost, 0);
      const before = choices.at(-1);
      const better =
        before === undefined ||
        sum < before.cost - 1e-9 ||
        (sum <= before.cost + 1e-9 && Math.abs(at - node.drawn) < Math.abs(before.pick - node.drawn));
      choices.push(better ? { at, pick: at, cost: sum } : { ...before, at });
    }
    return choices;
  }
}

interface Node {
  readonly element: ElementId;
  readonly drawn: number;
  readonly least: number;
  /** Water of more than itself may join: no drain that flows in may be larger. */
  readonly drain: boolean;
  below: Node | null;
}

interface Choice {
  /** The size may be up to this rank. */
  readonly at: number;
  readonly pick: number;
  readonly cost: number;
}

/** Sizes that a pipe needs at its lightest and its heaviest, null: nothing asks; and what it must have besides. */
interface Needs {
  readonly least: NominalSize | null;
  readonly most: NominalSize | null;
  readonly pin: NominalSize | null;
  readonly drain: boolean;
}

/** What a pipe needs, over its sections; null where it is no longer there. */
function needsOf(
  { network, pipes, shown, code }: Outcome,
  element: ElementId,
  pins: ReadonlyMap<ElementId, NominalSize>,
): Needs | null {
  const sections = network.pipesOf.get(element);
  if (sections === undefined || sections.length === 0) return null;
  const largest = (end: 'least' | 'most'): NominalSize | null => {
    const all = sections.flatMap((section) => {
      const { required } = pipes[section]!;
      return required?.[end] ?? required?.least ?? [];
    });
    return all.length === 0 ? null : all.reduce(code.series.larger);
  };
  return {
    least: largest('least'),
    most: largest('most'),
    pin: pins.get(element) ?? null,
    drain: sections.some((section) => shown.roles.uses[section]!.drain !== null),
  };
}

/** Who flows into whom, by the pipes that a drawn reduction is told of: upstream nodes of each. */
function joinNodes({ network, shown }: Outcome, nodes: Map<ElementId, Node>): Map<ElementId, Node[]> {
  const upstream = new Map<ElementId, Node[]>();
  const elementOf = (pipe: PipeId): ElementId | null => network.pipes[pipe]!.element;
  for (const { pipe, drain, inflows } of shown.roles.uses) {
    const own = elementOf(pipe);
    const node = own === null ? undefined : nodes.get(own);
    if (drain === null || node === undefined) continue;
    for (const inflow of inflows) {
      const from = elementOf(inflow);
      const child = from === null ? undefined : nodes.get(from);
      if (child === undefined || child === node || child.below !== null || leadsTo(node, child)) continue;
      child.below = node;
      upstream.set(node.element, [...(upstream.get(node.element) ?? []), child]);
    }
  }
  return upstream;
}

function leadsTo(from: Node, to: Node): boolean {
  for (let node: Node | null = from; node !== null; node = node.below) if (node === to) return true;
  return false;
}

/** Upstream nodes before those they flow into. */
function inFlow(nodes: ReadonlyMap<ElementId, Node>, upstream: ReadonlyMap<ElementId, readonly Node[]>): Node[] {
  const order: Node[] = [];
  const stack = [...nodes.values()].filter(({ below }) => below === null);
  for (let node = stack.pop(); node !== undefined; node = stack.pop()) {
    order.push(node);
    stack.push(...(upstream.get(node.element) ?? []));
  }
  return order.reverse();
}

/**
 * What drains of no place cost at least, whatever is changed in the places: their own demands, which hang on what
 * drains through them, not those that the sizes of other pipes make.
 */
export function costElsewhere(
  { network, paths, shown, code }: Outcome,
  first: FirstSizes,
  places: ReadonlySet<ElementId>,
  costs: Costs,
): number {
  const { rank } = code.series;
  let sum = 0;
  for (const [element, drawn] of first) {
    if (places.has(element)) continue;
    const asks = (network.pipesOf.get(element) ?? [])
      .filter((section) => paths.wet[section])
      .flatMap((section) => shown.sizes[section]!.trail)
      .flatMap(({ asks: size, facts }) => (size === null || facts.fromPipe !== undefined ? [] : [size]));
    const least = asks.reduce((a, b) => code.series.larger(a, b), drawn);
    if (rank(least) > rank(drawn)) sum += costs.resize(element, drawn, least);
  }
  return sum;
}
