import { InputError } from '../../findings/input-error.ts';
import { show } from '../../tables/printed-value.ts';
import { at, fieldsOf, jsonOf, numberAt } from '../../tables/read-json.ts';

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

const format = 'drainwright-weights';

/** Weights from the text of a weights file. What it does not say stays as it is; what is wrong is named at its place. */
export function readWeights(text: string, where: string): Weights {
  const names = Object.keys(standardWeights);
  const { format: said, version, ...own } = fieldsOf(jsonOf(text, where), where, ['format', 'version'], names);
  if (said !== format) throw new InputError(at(where, 'format'), `is ${show(said)}, expected "${format}"`);
  if (version !== 1) throw new InputError(at(where, 'version'), `is ${show(version)}, expected 1`);
  const given = Object.entries(own).map(([name, value]): [string, number] => {
    const weight = numberAt(value, at(where, name));
    if (weight < 0) throw new InputError(at(where, name), `is ${weight}, expected 0 or more`);
    return [name, weight];
  });
  return { ...standardWeights, ...Object.fromEntries(given) };
}
