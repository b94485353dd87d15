/** Ways to vent a row that may be drawn in place of one another. */
export type SharedReading = 'wet-vent' | 'circuit-vent' | 'individual-vent';

/** Those, and what only some codes know: each has its conditions in the code's own module. */
export type Reading =
  | SharedReading
  | 'common-vent'
  | 'waste-stack-vent'
  | 'combination-waste-and-vent'
  | 'single-stack'
  | 'ventilated-branch';

/** Written as a record so that a reading that is added cannot be forgotten. */
const known: Readonly<Record<Reading, true>> = {
  'wet-vent': true,
  'circuit-vent': true,
  'individual-vent': true,
  'common-vent': true,
  'waste-stack-vent': true,
  'combination-waste-and-vent': true,
  'single-stack': true,
  'ventilated-branch': true,
};

export const isReading = (word: string | null | undefined): word is Reading =>
  word !== null && word !== undefined && Object.hasOwn(known, word);
