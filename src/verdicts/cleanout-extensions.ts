import type { Identity } from '../model/identity.ts';
import type { Network, PipeId } from '../network/network.ts';
import type { Paths } from '../paths/paths.ts';

/** Dry pipes that lead from a drain to cleanouts alone: what stands at each of their loose ends. */
export function cleanoutExtensions(
  network: Network,
  identities: readonly Identity[],
  { pieces }: Paths,
): ReadonlySet<PipeId> {
  const isCleanout = (element: number): boolean => identities[element]!.part === 'cleanout';
  return new Set(
    pieces.flatMap(({ pipes, feet, mouths }): readonly PipeId[] => {
      const atFoot = new Set(feet);
      const ends = pipes
        .flatMap((pipe) => network.pipes[pipe]!.ends)
        .filter((joint) => network.joints[joint]!.pipes.length === 1 && !atFoot.has(joint));
      const leadsToCleanouts = ends.every((joint) => network.joints[joint]!.elements.some(isCleanout));
      return mouths.length === 0 && feet.length > 0 && ends.length > 0 && leadsToCleanouts ? pipes : [];
    }),
  );
}
