import { directionDegrees } from '../units/uncertainty.ts';

const limit = Math.cos(((45 + directionDegrees) * Math.PI) / 180);

/**
 * Nominally vertical: at 45 degrees or less to the vertical; an angle within its uncertainty of the limit holds.
 * `rise` over the whole `length`, metres, or the upward part of a unit direction.
 */
export const isVertical = (rise: number, length = 1): boolean => Math.abs(rise) / length >= limit;
