import type { Carried } from '../codes/way.ts';
import type { PipeId } from '../network/network.ts';
import type { Loads } from './loads.ts';

/** What passes a pipe, as far as a flow is reckoned from it. */
export function carriedBy({ pipes }: Pick<Loads, 'pipes'>, pipe: PipeId): Carried {
  const { load, largest, steady, statedUses, closets, counts, from, to } = pipes[pipe]!;
  return { load, largest, steady, statedUses, closets, counts, fixtures: to - from };
}
