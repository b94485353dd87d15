import type { CleanoutRules } from '../codes/cleanouts.ts';
import type { PipeId } from '../network/network.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import type { Attempt } from './attempt.ts';
import type { Row } from './row.ts';

/** A cleanout that a row's piping needs. */
export interface RowCleanout {
  readonly size: NominalSize;
  /** Of the pipe it serves. */
  readonly pipe: NominalSize;
  readonly place: string;
  readonly rule: string;
  readonly clause: string;
}

/** An upright pipe has room for a cleanout from this length on, metres. */
const leastDrop = 0.3;

/**
 * Cleanouts of the row's line, from upstream: in the drop that leads to it; at the head of its branch, unless the one
 * above is large enough for it; and again where one reaches no farther. None where the code has no table of places.
 */
export function rowCleanouts(row: Row, { piping, outcome }: Pick<Attempt, 'piping' | 'outcome'>): RowCleanout[] {
  const rules = outcome.code.cleanouts;
  if (rules === null) return [];
  const { rank } = outcome.code.series;
  const { stream } = outcome.paths;
  const line = linePieces(row, { piping, outcome });
  const takesTrap = new Set(row.battery.facts.traps.filter(({ place }) => place > 0).map(({ joins }) => joins));
  const found: RowCleanout[] = [];
  let served: NominalSize | null = null;
  let reached = 0;
  const add = (place: string, pipe: NominalSize): void => {
    const size = rules.sizeFor(pipe);
    const { rule, clause } = placeNamed(rules, place);
    found.push({ size, pipe, place, rule, clause });
    served = size;
    reached = 0;
  };
  const isVertical = (pipe: PipeId): boolean => outcome.paths.vertical[pipe] === true;
  const drop = line.filter(isVertical).reduce((sum, pipe) => sum + stream.span(pipe), 0);
  for (const pipe of line) {
    const size = outcome.pipes[pipe]!.required?.most ?? null;
    if (size === null) continue;
    const needs = rules.sizeFor(size);
    const covered = served !== null && rank(served) >= rank(needs);
    const head = takesTrap.has(stream.up(pipe)) || outcome.shown.roles.uses[pipe]!.role !== 'fixture-drain';
    if (isVertical(pipe)) {
      if (served === null && drop >= leastDrop) add('drop', size);
    } else if (!covered && head && !found.some(({ place }) => place === 'branch head') && hasBegun(pipe)) {
      add('branch head', size);
    }
    reached += stream.span(pipe);
    const reach = rules.reach(size);
    if (served !== null && reach !== null && reached > reach) add('along a branch', size);
  }
  return found;

  /** Above the first of the row's own joints the drop's cleanout serves, whatever the size. */
  function hasBegun(pipe: PipeId): boolean {
    return served === null || takesTrap.has(stream.up(pipe));
  }
}

function placeNamed({ places }: CleanoutRules, place: string): { rule: string; clause: string } {
  const found = places.find((one) => one.place === place);
  if (found === undefined) throw new Error(`the code has no cleanout place ${place}`);
  return found;
}

/** The row's line as it is cut now, in the order of its water. */
function linePieces({ battery }: Row, { piping, outcome }: Pick<Attempt, 'piping' | 'outcome'>): PipeId[] {
  const line = new Set<PipeId | null>(battery.facts.line);
  return outcome.paths.inFlowOrder.filter((pipe) => {
    const from = piping.origin[pipe] ?? null;
    return from !== null && line.has(from);
  });
}
