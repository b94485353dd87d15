import { InputError } from '../findings/input-error.ts';
import type { Battery } from '../roles/roles.ts';
import type { Outcome } from '../verdicts/outcome.ts';
import type { Result } from './result.ts';

/** All batteries, or the one that is meant: by its id, its number, or the GlobalId or name of one of its fixtures. */
export function batteriesNamed({ shown }: Outcome, result: Result, what: string | undefined): readonly Battery[] {
  const { batteries } = shown.roles;
  if (what === undefined) return batteries;
  const names = new Map(result.fixtures.map(({ globalId, name }) => [globalId, name]));
  const found = batteries.filter((_, at) => {
    const { id, fixtures } = result.batteries[at]!;
    return (
      id === what ||
      `battery-${what}` === id ||
      fixtures.some((fixture) => fixture === what || names.get(fixture) === what)
    );
  });
  if (found.length === 1) return found;
  const known = result.batteries.map(({ id }) => id).join(', ');
  const has = known === '' ? 'the model has none' : `the model has ${known}`;
  throw new InputError(`battery ${what}`, found.length === 0 ? `is not there; ${has}` : `is several; ${has}`, {
    exit: 2,
  });
}
