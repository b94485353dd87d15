import { has, num, type SentenceFacts } from './sentence-facts.ts';

const word = ({ facts }: SentenceFacts, key: string): string => String(facts[key] ?? '?').replaceAll('-', ' ');
const units = (given: SentenceFacts, key: string): string => `${given.number(num(given, key))} ${given.unit}`;

/** By the fact that a condition is known by: what is broken, and after a semicolon what would satisfy it. */
const texts: Readonly<Record<string, (given: SentenceFacts) => string>> = {
  outsideGroup: (f) =>
    `${num(f, 'outsideGroup')} of its fixtures (${word(f, 'kinds')}) belong to no bathroom group; give them vents of their own, or circuit vent the row`,
  bathroomGroupsMost: (f) =>
    `it takes the fixtures of ${num(f, 'bathroomGroups')} bathroom groups, at most ${num(f, 'bathroomGroupsMost')} may share it; vent the others by themselves`,
  dryVentApart: () => 'its dry vent stands on no drain of its own fixtures; let it be the vent of one of them',
  emergencyVent: () => 'its dry vent is that of an emergency floor drain; let it be that of another fixture',
  dryVentOf: (f) =>
    `its dry vent stands on the drain of a ${word(f, 'dryVentOf')}; let it be that of a lavatory, a bath, a shower or a bidet`,
  closetDrops: () => 'the water closet with the dry vent drops into it; let its drain join level',
  closetAbove: () => 'the upper of its two fixtures is a water closet; let that be the lower one',
  drops: (f) =>
    `${num(f, 'drops')} of its drains drop before they reach it, which would empty the traps; run them level, or give each its own vent`,
  circuitLeast: (f) =>
    `${num(f, 'circuitTraps')} fixture joins it, at least ${num(f, 'circuitLeast')} must; give it a vent of its own`,
  circuitMost: (f) =>
    `${num(f, 'circuitTraps')} fixtures breathe through one circuit vent, at most ${num(f, 'circuitMost')} may; divide them into groups with a vent each`,
  furtherVents: () => 'another vent stands among its fixtures; divide them into groups with a circuit vent each',
  ventDry: (f) => `${num(f, 'fixturesOnVent')} fixtures drain into its vent; the vent must stay dry`,
  slopeMost: (f) =>
    `it falls ${f.slope(num(f, 'slope'))}, at most ${f.slope(num(f, 'slopeMost'))} where it vents; lay it flatter`,
  othersElsewhere: (f) =>
    `${num(f, 'othersElsewhere')} fixtures of another storey drain into the branch; lead them to the stack by themselves`,
  barred: (f) => `${word(f, 'barredKinds')} (${num(f, 'barred')}) may not drain into it; vent them in another way`,
  dropMostM: (f) =>
    `a fixture drops ${f.length(num(f, 'dropM'))} to it, at most ${f.length(num(f, 'dropMostM'))}; vent it by itself`,
  armMostM: (f) =>
    `a fixture drain runs ${f.length(num(f, 'armM'))} to it, at most ${f.length(num(f, 'armMostM'))}; move it nearer, or vent it by itself`,
  toStackMostM: (f) =>
    `a ${f.facts.closet === true ? 'water closet' : 'fixture'} is ${f.length(num(f, 'toStackM'))} from the stack, at most ${f.length(num(f, 'toStackMostM'))}; give it a vent`,
  wetFixturesMost: (f) =>
    `it vents ${num(f, 'wetFixtures')} fixtures, at most ${num(f, 'wetFixturesMost')} may be; vent the others by themselves`,
  wetUnitsMost: (f) =>
    `a fixture of ${units(f, 'wetUnits')} drains into it, at most ${f.number(num(f, 'wetUnitsMost'))}; let that be the lowest, or vent it by itself`,
  wetLengthMostM: (f) =>
    `its wet part is ${f.length(num(f, 'wetLengthM'))} long, at most ${f.length(num(f, 'wetLengthMostM'))}; vent what lies below by itself`,
  approval: () => 'the code allows it only where structure forbids other vents and the authority approves',
};

/** A condition that a reading breaks, in words; null where it is none of these. */
export function conditionText(given: SentenceFacts): string | null {
  const key = Object.keys(texts).find((one) => has(given, one));
  return key === undefined ? null : texts[key]!(given);
}
