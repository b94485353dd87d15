import type { PlumbingCode } from '../codes/plumbing-code.ts';
import type { PipeId } from '../network/network.ts';
import type { Paths } from '../paths/paths.ts';
import type { Stack } from '../roles/find-stacks.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import type { Run } from './outcome.ts';

/** A storey's tie to the vent stack: its narrowest pipe, and the branch by which the storey drains into the stack. */
export interface StoreyTie {
  readonly vent: NominalSize;
  readonly branch: NominalSize;
}

/**
 * By stack: for every storey that drains into it the widest vent from that storey's drains to the stack's vent stack,
 * as drawn, else as required; null where a storey has none. Stacks without a vent stack are not in the map.
 */
export function storeyTies(
  paths: Paths,
  code: PlumbingCode,
  { roles, loads, sizes }: Run,
): Map<number, (StoreyTie | null)[]> {
  const { rank } = code.series;
  const stackOf = new Map<PipeId, Stack>(roles.stacks.flatMap((stack) => stack.pipes.map((pipe) => [pipe, stack])));
  const sizeOf = (pipe: PipeId): NominalSize | null => loads.modelled[pipe]!.size ?? sizes[pipe]!.size;
  const best = new Map<number, Map<number, StoreyTie>>();
  for (const { path, traps } of roles.feet) {
    const arrives = path.findIndex((pipe) => roles.uses[pipe]!.role === 'vent-stack');
    if (arrives <= 0) continue;
    const serves = roles.uses[path[arrives]!]!.vent?.serves ?? null;
    const vent = narrowest(path.slice(0, arrives).map(sizeOf), rank);
    if (serves === null || vent === null) continue;
    for (const fixture of traps) {
      const { water } = paths.fixtures[fixture]!;
      const at = water.findIndex((pipe) => stackOf.get(pipe)?.id === serves);
      const branch = at <= 0 ? null : sizeOf(water[at - 1]!);
      if (branch === null) continue;
      const storeys = best.get(serves) ?? new Map<number, StoreyTie>();
      const storey = roles.floors.of(paths.fixtures[fixture]!);
      const known = storeys.get(storey);
      if (known === undefined || rank(known.vent) < rank(vent)) storeys.set(storey, { vent, branch });
      best.set(serves, storeys);
    }
  }
  return new Map(
    roles.stacks.flatMap((stack) => {
      const ties = best.get(stack.id);
      return ties === undefined ? [] : [[stack.id, stack.served.map((storey) => ties.get(storey) ?? null)] as const];
    }),
  );
}

function narrowest(sizes: readonly (NominalSize | null)[], rank: (size: NominalSize) => number): NominalSize | null {
  let found: NominalSize | null = null;
  for (const size of sizes) {
    if (size === null) return null;
    if (found === null || rank(size) < rank(found)) found = size;
  }
  return found;
}
