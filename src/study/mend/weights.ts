import { InputError } from '../../findings/input-error.ts';

/** What a change costs, in points of effort that only compare plans with each other. All are printed with a plan. */
export interface Weights {
  /** A metre of pipe, one size step larger or smaller. */
  readonly sizeStep: number;
  /** A metre of new vent. */
  readonly newVent: number;
  /** Each end of a new vent: a fitting cut into a pipe. */
  readonly ventJoint: number;
  /** A way of its own through the roof. */
  readonly throughRoof: number;
  /** A metre of changed or new pipe inside a wall. */
  readonly openedWall: number;
  /** A battery read another way: paper, no pipe. */
  readonly reading: number;
  /** A metre of pipe laid to another fall. */
  readonly relaying: number;
  /** A trap set elsewhere. */
  readonly trap: number;
  readonly cleanout: number;
}

/** Common practice, no source: a plan is as good as the weights, so that a user can set his own. */
export const standardWeights: Weights = {
  sizeStep: 1,
  newVent: 1,
  ventJoint: 1,
  throughRoof: 4,
  openedWall: 2,
  reading: 0.5,
  relaying: 1.5,
  trap: 1,
  cleanout: 1,
};

/** A weights file: a JSON object with any of the names above. What is not there stays as it is. */
export function readWeights(value: unknown, where: string): Weights {
  const names = Object.keys(standardWeights);
  const expected = `a JSON object with any of ${names.join(', ')}, each a number from 0 on`;
  if (typeof value !== 'object' || value === null || Array.isArray(value))
    throw new InputError(where, `is no weights file; expected ${expected}`);
  for (const [name, weight] of Object.entries(value)) {
    if (!names.includes(name)) throw new InputError(`${where}: /${name}`, `is no weight; expected ${expected}`);
    if (typeof weight !== 'number' || !Number.isFinite(weight) || weight < 0)
      throw new InputError(`${where}: /${name}`, `is ${JSON.stringify(weight)}; expected a number from 0 on`);
  }
  return { ...standardWeights, ...(value as Partial<Weights>) };
}
