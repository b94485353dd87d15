import { type Finding, finding } from '../../findings/finding.ts';
import type { RuleEntry } from '../../tables/rule-list.ts';
import { coordinateMetres } from '../../units/uncertainty.ts';
import type { Check, CheckedStack } from '../check.ts';

/** No level drain joins too soon below the foot of a stack, metres; null: the code sets that stack no distance. */
export const nearFoot = (
  { id, clause }: RuleEntry,
  leastOf: (stack: CheckedStack) => number | null,
  inOffsets: (offset: CheckedStack['offsets'][number], stack: CheckedStack) => number | null = () => null,
): Check => ({
  id,
  run: ({ stacks }) =>
    stacks.flatMap((stack): Finding[] => [
      ...tooNear(stack.firstBelow, leastOf(stack), stack.elements, false, clause),
      ...stack.offsets.flatMap((offset) =>
        tooNear(offset.firstJoin, inOffsets(offset, stack), offset.elements, true, clause),
      ),
    ]),
});

/** Yoke vents that join their vent stack nearer to the floor below than this, metres. */
export const yokesTooLow = (
  yokeTops: CheckedStack['yokeTops'],
  least: number,
  { clause }: Pick<RuleEntry, 'clause'>,
): Finding[] =>
  yokeTops
    .filter(({ overFloor }) => overFloor !== null && overFloor < least - coordinateMetres)
    .map(({ elements, overFloor }) =>
      finding('yoke-vent-misplaced', elements, { heightM: overFloor, leastM: least }, clause),
    );

function tooNear(
  join: CheckedStack['firstBelow'],
  least: number | null,
  elements: CheckedStack['elements'],
  offset: boolean,
  clause: string,
): Finding[] {
  if (join === null || least === null || join.distance >= least - coordinateMetres) return [];
  const branch = join.element === null ? [] : [join.element];
  return [
    finding(
      'branch-near-foot',
      [...branch, ...elements],
      { distanceM: join.distance, leastM: least, ...(offset ? { offset } : {}) },
      clause,
    ),
  ];
}
