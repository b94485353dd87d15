import { fullStack } from './stack-flow.ts';

/** Most air, l/s, that a flow of water draws down a stack it fills to a share: the core falls as fast as the water round it. */
export const airDrawn = (water: number, share: number): number => (water * (1 - share)) / share;

/**
 * Longest vent, metres, that lets so much air through (l/s) for a pressure of one inch of water, half the seal of a 2 in
 * trap: Darcy. Bore in metres; `friction` is Darcy's factor.
 */
export function ventLength(bore: number, air: number, friction: number): number {
  const speed = air / 1000 / ((Math.PI / 4) * bore ** 2);
  return (inchOfWater * 2 * bore) / (friction * airDensity * speed ** 2);
}

/** Pascals; kg/m3 at room temperature. */
const inchOfWater = 249.1;
const airDensity = 1.201;

/**
 * Metres in the pattern behind the North American stack-vent tables: the fifth power of vent bore over stack size, and air
 * by how full the stack runs. Found by fitting the tables; it proves cells, it replaces none.
 */
export const patternLength = (ventBore: number, stackSize: number, share: number): number =>
  longestAtFullStack * (ventBore / stackSize) ** 5 * (airPattern(fullStack) / airPattern(share)) ** 2;

const airPattern = (share: number): number => (1 - share) * share ** (2 / 3);
const longestAtFullStack = 172;
