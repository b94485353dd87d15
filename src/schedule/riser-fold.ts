import type { Pipe, PipeId } from '../network/network.ts';
import type { PipeState, ResultFixture } from './result.ts';

/** Storeys that are alike: one is drawn, the others are named on it. Indices into the model's storeys. */
export interface RiserFold {
  readonly drawn: number;
  readonly alike: readonly number[];
}

export interface Folded {
  readonly folds: readonly RiserFold[];
  /** Pipes of the storeys that are not drawn. */
  readonly hidden: ReadonlySet<PipeId>;
}

/** A pipe of the drawing with what the result says of it; `storey` is null where nobody knows. */
export interface FoldPipe {
  readonly pipe: Pipe;
  readonly state: PipeState | null;
  readonly storey: number | null;
}

/** What runs through the storeys, by its role or since it serves several, is never folded away: there the alike storeys join. */
const through = new Set([
  'stack',
  'stack-vent',
  'vent-stack',
  'vent-header',
  'building-drain',
  'building-sewer',
  'yoke-vent',
  'offset-relief-vent',
  'unknown',
]);

/**
 * Storeys whose branches agree in every role, size, load, length, slope and verdict and whose fixtures are of the same
 * kinds; the lowest of them is drawn. Null where no two are alike. `fixtures` by storey.
 */
export function foldedStoreys(
  pipes: readonly FoldPipe[],
  fixtures: ReadonlyMap<number, readonly ResultFixture[]>,
): Folded | null {
  const storeyOf = new Map([...fixtures].flatMap(([storey, list]) => list.map(({ globalId }) => [globalId, storey])));
  const servesOne = ({ servesWater = [], servesAir = [] }: PipeState): boolean =>
    new Set([...servesWater, ...servesAir].map((id) => storeyOf.get(id))).size <= 1;
  const own = new Map<number, FoldPipe[]>();
  for (const one of pipes) {
    if (one.storey === null || one.state === null || through.has(one.state.role) || !servesOne(one.state)) continue;
    const list = own.get(one.storey);
    if (list === undefined) own.set(one.storey, [one]);
    else list.push(one);
  }
  const groups = new Map<string, number[]>();
  for (const storey of [...own.keys()].sort((a, b) => a - b)) {
    const kinds = (fixtures.get(storey) ?? []).map(({ kind, trapSize }) => `${kind} ${trapSize?.label}`);
    // A storey without fixtures has nothing that repeats.
    if (kinds.length === 0) continue;
    const looks = own.get(storey)!.map(({ state }) => look(state!));
    const key = JSON.stringify([looks.sort(), kinds.sort()]);
    groups.set(key, [...(groups.get(key) ?? []), storey]);
  }
  const folds = [...groups.values()].flatMap(([drawn, ...alike]) =>
    drawn === undefined || alike.length === 0 ? [] : [{ drawn, alike }],
  );
  if (folds.length === 0) return null;
  const away = new Set(folds.flatMap(({ alike }) => alike));
  const hidden = [...own].flatMap(([storey, list]) => (away.has(storey) ? list.map(({ pipe }) => pipe.id) : []));
  return { folds, hidden: withLinks(pipes, new Set(hidden)) };
}

/** Links inside fittings belong to no storey: those that hang on nothing any more go too. */
function withLinks(pipes: readonly FoldPipe[], hidden: Set<PipeId>): ReadonlySet<PipeId> {
  const links = pipes.filter(({ state }) => state === null);
  for (let before = -1; before !== hidden.size; ) {
    before = hidden.size;
    const held = new Map<number, number>();
    for (const { pipe } of pipes)
      if (!hidden.has(pipe.id)) for (const end of pipe.ends) held.set(end, (held.get(end) ?? 0) + 1);
    for (const { pipe } of links) if (pipe.ends.some((end) => held.get(end) === 1)) hidden.add(pipe.id);
  }
  return hidden;
}

/** Lengths within a centimetre and slopes within a thousandth are the same to whoever builds it. */
function look({ role, also, modelled, required, verdict, load, ventLoad, length, slope }: PipeState): string {
  const fall = slope?.value == null ? null : Math.round(slope.value * 1000);
  const sizes = [modelled?.label, required?.least?.label, required?.most?.label];
  return JSON.stringify([role, also, sizes, verdict, load, ventLoad, Math.round((length ?? 0) * 100), fall]);
}
