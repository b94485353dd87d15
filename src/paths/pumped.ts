import type { Identity } from '../model/identity.ts';
import type { PipeId } from '../network/network.ts';
import type { Water } from './water.ts';

/** Drains of macerating toilets down to where other water joins: pumped, so that they may climb. */
export function pumpedPipes(identities: readonly Identity[], { fixtures }: Water): ReadonlySet<PipeId> {
  const isPumped = ({ element }: Water['fixtures'][number]): boolean =>
    identities[element]?.kind === 'macerating-toilet';
  const pumped = new Set(fixtures.filter(isPumped).flatMap(({ water }) => water));
  if (pumped.size === 0) return pumped;
  for (const fixture of fixtures) if (!isPumped(fixture)) for (const pipe of fixture.water) pumped.delete(pipe);
  return pumped;
}
