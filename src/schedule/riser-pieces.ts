import type { PipeId } from '../network/network.ts';
import type { RiserSource } from './riser-source.ts';

export interface RiserPiece {
  readonly system: number | null;
  /** The pipe by which a part of a large system joins the rest; null for a whole system. */
  readonly stack: PipeId | null;
  readonly pipes: readonly PipeId[];
}

/** A drawing of more pipes than this is divided: nobody reads a riser of a thousand lines. */
const mostInOne = 420;
/** A part smaller than this stays with what it hangs on. */
const leastApart = 12;

/** What goes on one drawing: a connected piece of piping, or of a large one each branch of its main drain. */
export function riserPieces(source: RiserSource): readonly RiserPiece[] {
  const { network, paths } = source;
  const piece = connectedPieces(source);
  const byPiece = new Map<number, PipeId[]>();
  for (const { id } of network.pipes) {
    const list = byPiece.get(piece[id]!);
    if (list === undefined) byPiece.set(piece[id]!, [id]);
    else list.push(id);
  }
  const taken = new Set<number>();
  const pieces: RiserPiece[] = [];
  paths.systems.forEach(({ pipes }, system) => {
    const of = pipes[0] === undefined ? undefined : piece[pipes[0]];
    if (of === undefined || taken.has(of)) return;
    taken.add(of);
    pieces.push(...divided(source, system, byPiece.get(of) ?? []));
  });
  const withFixtures = new Set(
    paths.fixtures.flatMap(({ outlet }) => (network.joints[outlet]?.pipes ?? []).map((id) => piece[id]!)),
  );
  for (const [of, pipes] of byPiece)
    if (!taken.has(of) && withFixtures.has(of)) pieces.push({ system: null, stack: null, pipes });
  return pieces;
}

/** By pipe: the lowest pipe id that it hangs together with. */
function connectedPieces({ network }: RiserSource): readonly number[] {
  const piece = new Array<number>(network.pipes.length).fill(-1);
  for (const { id } of network.pipes) {
    if (piece[id] !== -1) continue;
    const waiting: PipeId[] = [id];
    piece[id] = id;
    while (waiting.length > 0)
      for (const end of network.pipes[waiting.pop()!]!.ends)
        for (const next of network.joints[end]!.pipes)
          if (piece[next] === -1) {
            piece[next] = id;
            waiting.push(next);
          }
  }
  return piece;
}

/**
 * A large system is divided where branches join its trunk: from the sewer upstream along the pipe that brings most
 * pipes with it. Vents go with the part that most of their feet stand on.
 */
function divided(source: RiserSource, system: number, pipes: readonly PipeId[]): readonly RiserPiece[] {
  if (pipes.length <= mostInOne) return [{ system, stack: null, pipes }];
  const { paths } = source;
  const wet = pipes.filter((id) => paths.wet[id] === true);
  const above = new Map<PipeId, PipeId[]>();
  const roots: PipeId[] = [];
  for (const id of wet) {
    const next = paths.next[id];
    if (next == null) roots.push(id);
    else above.set(next, [...(above.get(next) ?? []), id]);
  }
  const weight = new Map<PipeId, number>();
  for (const id of paths.inFlowOrder) {
    if (paths.wet[id] !== true) continue;
    weight.set(
      id,
      (above.get(id) ?? []).reduce((sum, child) => sum + (weight.get(child) ?? 1), 1),
    );
  }
  const part = new Map<PipeId, PipeId | null>();
  const heads: PipeId[] = [];
  const waiting: { id: PipeId; of: PipeId | null }[] = roots.map((id) => ({ id, of: null }));
  while (waiting.length > 0) {
    const { id, of } = waiting.pop()!;
    part.set(id, of);
    const heavy = (weight.get(id) ?? 0) > mostInOne;
    for (const child of above.get(id) ?? []) {
      const apart =
        of === null && heavy && (weight.get(child) ?? 0) <= mostInOne && (weight.get(child) ?? 0) >= leastApart;
      if (apart) heads.push(child);
      waiting.push({ id: child, of: apart ? child : of });
    }
  }
  spreadToVents(source, pipes, part);
  heads.sort((a, b) => a - b);
  return [null, ...heads].map((head) => ({
    system,
    stack: head,
    pipes: pipes.filter((id) => (part.get(id) ?? null) === head || (head !== null && id === paths.next[head])),
  }));
}

/** Each connected piece of dry pipes goes to the part that most of its feet touch, the first one on a tie. */
function spreadToVents(
  { network, paths }: RiserSource,
  pipes: readonly PipeId[],
  part: Map<PipeId, PipeId | null>,
): void {
  const inside = new Set(pipes);
  for (const { feet, pipes: dry } of paths.pieces) {
    const votes = new Map<PipeId | null, number>();
    for (const foot of feet)
      for (const id of touching(network.joints[foot]?.pipes ?? [], part)) votes.set(id, (votes.get(id) ?? 0) + 1);
    const best = [...votes].sort(([, a], [, b]) => b - a)[0]?.[0] ?? null;
    for (const id of dry) if (inside.has(id)) part.set(id, best);
  }
}

const touching = (pipes: readonly PipeId[], part: ReadonlyMap<PipeId, PipeId | null>): readonly (PipeId | null)[] =>
  pipes.flatMap((id) => (part.has(id) ? [part.get(id) ?? null] : []));
