import type { ElementId } from '../../model/model.ts';
import type { PipeId } from '../../network/network.ts';
import type { FixtureId } from '../../paths/paths.ts';
import type { Outcome } from '../../verdicts/outcome.ts';

/**
 * Places of a building that changes do not reach across: each branch up to the stack or building drain that it ends in,
 * and each pipe of a stack or building drain by itself. One vent serves traps of one branch.
 */
export const lineOf = (outcome: Outcome, fixture: FixtureId): string =>
  placeAlong(outcome, outcome.paths.fixtures[fixture]!.water[0] ?? null);

/** Place of a pipe's element. */
export const placeOf = (outcome: Outcome, element: number): string =>
  placeAlong(outcome, outcome.network.pipesOf.get(element as ElementId)?.[0] ?? null);

function placeAlong({ paths, shown, network }: Outcome, start: PipeId | null): string {
  if (start === null) return 'nowhere';
  let last = start;
  if (isTrunk(start, shown)) return `trunk ${network.pipes[start]!.element ?? start}`;
  for (let pipe = paths.next[start] ?? null; pipe !== null && !isTrunk(pipe, shown); pipe = paths.next[pipe] ?? null)
    last = pipe;
  return `line ${network.pipes[last]!.element ?? last}`;
}

function isTrunk(pipe: PipeId, { roles }: Outcome['shown']): boolean {
  const { drain } = roles.uses[pipe]!;
  return drain === 'stack' || drain === 'building-drain' || drain === 'building-sewer';
}

/** Pipes that belong to one place alone, by element: its drains, and vents that only they stand under. */
export function ownPipes(outcome: Outcome, place: string): ReadonlySet<ElementId> {
  const { network, paths, shown } = outcome;
  const { stream } = paths;
  const own = new Set<ElementId>();
  const foreign = new Set<ElementId>();
  const put = (pipe: PipeId, mine: boolean): void => {
    const { element } = network.pipes[pipe]!;
    if (element !== null) (mine ? own : foreign).add(element);
  };
  const places = network.pipes.map(({ id }) => (paths.wet[id] ? placeAlong(outcome, id) : null));
  for (const { id } of network.pipes) if (paths.wet[id]) put(id, places[id] === place);
  for (const { joint, path } of shown.roles.feet) {
    const out = stream.outflow[joint] ?? null;
    for (const pipe of path) put(pipe, out !== null && places[out] === place);
  }
  return new Set([...own].filter((element) => !foreign.has(element)));
}
