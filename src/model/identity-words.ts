import type { FixtureKind, Part } from './identity.ts';

/** Every fixture kind, in the order in which people are offered them. */
export const fixtureKinds = [
  'water-closet',
  'urinal',
  'lavatory',
  'sink',
  'kitchen-sink',
  'mop-sink',
  'laundry-tray',
  'shower',
  'bathtub',
  'bidet',
  'floor-drain',
  'clothes-washer',
  'dishwasher',
  'drinking-fountain',
  'garbage-grinder',
  'wash-fountain',
  'macerating-toilet',
  'clinical-sink',
  'dental-unit',
  'other-fixture',
] as const satisfies readonly FixtureKind[];

export const parts = [
  'pipe',
  'fitting',
  'fixture',
  'trap',
  'cleanout',
  'vent-terminal',
  'air-admittance-valve',
  'chamber',
  'sewer-connection',
  'valve',
  'tank',
  'not-drainage',
  'unknown-terminal',
] as const satisfies readonly Part[];

/** Parts that the answers file may name in place of a fixture kind. */
export const answerableParts = ['cleanout', 'trap', 'vent-terminal', 'air-admittance-valve', 'not-drainage'] as const;
