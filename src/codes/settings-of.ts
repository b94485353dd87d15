import type { Settings } from '../model/answers.ts';
import type { Family } from '../tables/open-family.ts';

/** What of the user's settings a code knows, where the same answers serve two codes. Sizes it has not are left out. */
export function settingsOf(family: Family, settings: Settings): Settings {
  const known = new Set(family.settings.map(({ id }) => id));
  return Object.fromEntries(
    Object.entries(settings)
      .filter(([id]) => known.has(id))
      .map(([id, value]): [string, Settings[string]] => [
        id,
        id === 'omitSizes' && Array.isArray(value) ? value.filter((size) => family.series.has(size)) : value,
      ]),
  );
}
