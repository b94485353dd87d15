import { type FixtureDetail, type FixtureKind, noDetail } from './identity.ts';

/** What holds of a fixture of this kind of which nothing more is said: a shower has one head, a floor drain is no emergency drain. */
export const usualDetail = (kind: FixtureKind | null): FixtureDetail => ({
  ...noDetail,
  heads: kind === 'shower' ? 1 : null,
  emergency: kind === 'floor-drain' ? false : null,
});
