import { decimal, lengthText, slopeText, unitsText } from './number-text.ts';

/**
 * The numbers behind a demand or a broken condition, read from the unit that each fact's name carries:
 * `{loadUnits: 14, limitUnits: 12}` gives `load 14 fixture units, limit 12 fixture units`.
 * What is null, false or empty says nothing and is left out. `nameOf` turns a GlobalId into what people call the thing.
 */
export function factsText(
  facts: Readonly<Record<string, unknown>>,
  unit: string,
  nameOf: (globalId: string) => string,
): string {
  return Object.entries(facts)
    .filter(([, value]) => value !== null && value !== undefined && value !== false)
    .filter(([, value]) => !(Array.isArray(value) && value.length === 0))
    .map(([key, value]) => factText(key, value, unit, nameOf))
    .join(', ');
}

function factText(key: string, value: unknown, unit: string, nameOf: (globalId: string) => string): string {
  const words = key.split(/(?=[A-Z])/).map((word) => word.toLowerCase());
  const last = words.at(-1) ?? '';
  if (value === true) return words.join(' ');
  if (typeof value !== 'number') return `${words.join(' ')} ${textOf(value, nameOf)}`;
  const thing = words.length > 1 && last in measures ? words.slice(0, -1).join(' ') : words.join(' ');
  const measure = measures[last];
  if (measure !== undefined) return `${thing} ${measure(value, unit)}`;
  return `${thing} ${decimal(value, 4)}`;
}

/** By the last word of a fact's name. */
const measures: Readonly<Record<string, (value: number, unit: string) => string>> = {
  units: unitsText,
  m: lengthText,
  mm: (value) => `${decimal(value, 1)} mm`,
  deg: (value) => `${decimal(value, 1)}°`,
  share: (value) => `${decimal(value * 100, 0)} %`,
  slope: slopeText,
  lps: (value) => `${decimal(value, 2)} l/s`,
};

function textOf(value: unknown, nameOf: (globalId: string) => string): string {
  if (Array.isArray(value)) {
    const shown = value.slice(0, mostListed).map((entry) => textOf(entry, nameOf));
    return shown.join(' and ') + (value.length > mostListed ? ` and ${value.length - mostListed} more` : '');
  }
  return typeof value === 'string' ? nameOf(value) : JSON.stringify(value);
}
const mostListed = 4;
