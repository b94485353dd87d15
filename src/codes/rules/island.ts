import type { CheckedVent } from '../check.ts';

/** A vent that comes down this far, metres, is led so on purpose: less is a sag or a fitting. Common practice, no source. */
export const islandDescent = 0.3;

/** The descent from which the vent of a trap is one led down again; the vents of stacks are none. */
export const islandDescentOf = ({ traps }: CheckedVent): number =>
  traps.length === 0 ? Number.POSITIVE_INFINITY : islandDescent;
