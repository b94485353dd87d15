import { InputError } from '../findings/input-error.ts';
import type { Settings } from '../model/answers.ts';
import type { Family } from '../tables/open-family.ts';
import type { SettingEntry, SettingValue } from '../tables/settings-file.ts';

/** Every setting of a code with its value: the user's, else the standard one. Absent: off. */
export type CodeSettings = Readonly<Record<string, SettingValue>>;

/** What the user set, checked against the code's own list, with the standard values filled in. */
export function codeSettings(family: Family, settings: Settings, where: string): CodeSettings {
  const known = new Map(family.settings.map((entry) => [entry.id, entry]));
  const chosen: [string, SettingValue][] = family.settings.flatMap(({ id, standard }) =>
    standard === null ? [] : [[id, standard]],
  );
  for (const [id, value] of Object.entries(settings)) {
    const entry = known.get(id);
    if (entry === undefined) {
      throw new InputError(
        `${where}: /settings/${id}`,
        `is no setting of ${family.code}; expected one of ${[...known.keys()].join(', ')}`,
      );
    }
    chosen.push([id, checked(entry, value, `${where}: /settings/${id}`, family)]);
  }
  return Object.freeze(Object.fromEntries(chosen));
}

function checked(entry: SettingEntry, value: unknown, where: string, family: Family): SettingValue {
  const refuse = (expected: string): never => {
    throw new InputError(where, `is ${JSON.stringify(value)}, expected ${expected}`);
  };
  switch (entry.kind) {
    case 'choice':
      return entry.values.includes(value as string | number)
        ? (value as SettingValue)
        : refuse(`one of ${entry.values.join(', ')}`);
    case 'yes-no':
      return typeof value === 'boolean' ? value : refuse('true or false');
    case 'number':
      if (typeof value !== 'number' || !Number.isFinite(value)) return refuse('a number');
      if ((entry.least !== null && value < entry.least) || (entry.most !== null && value > entry.most)) {
        return refuse(`${entry.least ?? 'any'} to ${entry.most ?? 'any'} ${entry.unit ?? ''}`.trim());
      }
      return value;
    case 'sizes':
      if (!Array.isArray(value)) return refuse('a list of sizes');
      for (const size of value)
        if (typeof size !== 'string' || !family.series.has(size))
          refuse(`sizes of ${family.series.sizes.map(({ label }) => label).join(', ')}`);
      return value as readonly string[];
  }
}
