/**
 * How far apart things may stand and still be joined, all in metres. Drawn gaps follow the size of the pipe (a socket's
 * depth, a gasket, a rounding), so the reach does too.
 */
const leastReach = 0.01;
const shareOfDiameter = 0.25;
/** Beyond this nothing is joined unless the user allows more. */
export const largestReach = 0.05;

export interface Reach {
  /** Gap that an end of this outside diameter (0: unknown) may bridge. */
  ofEnd(outerDiameter: number): number;
  /** Gap between a fixture's body and the end that drains it: bodies are drawn less exactly than pipes. */
  readonly ofFixture: number;
  /** Gap between two bodies that touch. */
  readonly ofBodies: number;
}

/** What coordinates can tell, metres: a gap that exceeds its limit by less is held to keep it. */
const coordinateUncertainty = 0.001;

/** `maxGap`: the user's own limit, or null. `habit`: a gap that this model leaves at many of its ends, else 0. */
export function reachOf(maxGap: number | null, habit = 0): Reach {
  const most = (maxGap ?? largestReach) + coordinateUncertainty;
  return {
    ofEnd: (outerDiameter) =>
      maxGap !== null && maxGap > largestReach
        ? most
        : Math.min(most, Math.max(leastReach, habit, shareOfDiameter * outerDiameter) + coordinateUncertainty),
    ofFixture: most,
    ofBodies: Math.min(most, 0.005),
  };
}

/** Farther than this an open end is not compared with anything: nothing is near it. */
export const lookAround = 0.1;
/** Connected ports farther apart than this contradict the geometry; the relation still holds. */
export const farApart = 0.1;
/** Two branches whose places on a wall differ by less enter at one joint. */
export const samePlace = 0.01;
/** A spigot stands in a socket by up to one diameter, small pipes by up to this. */
export const leastSocket = 0.06;
/** Shorter pieces of axis are no pieces. */
export const noLength = 0.0005;
/** Two shapes whose corresponding points differ by less are one shape drawn twice. */
export const doubled = 0.005;
