/** What coordinates can tell, named once: a limit that lies within it holds, and the margin is shown. */

/** Metres: a length, height or gap read from the model's coordinates. */
export const coordinateMetres = 0.001;
/** Degrees: the direction of one pipe. */
export const directionDegrees = 0.01;
/** Degrees: turns summed over the bends of an arm or branch. */
export const turnDegrees = 0.05;
