import type { Building } from '../building.ts';
import { decimal, lengthText, placeIn, slopeText } from '../format.ts';
import { named, phrase, type Words } from '../words/words.ts';
import { nameOfId } from './names.ts';

type Facts = Readonly<Record<string, unknown>>;

export interface FactText {
  readonly label: string;
  readonly value: string;
}

/** The numbers behind a demand, each with its own words, in the order of the trail: `load`, `14 FU`. What is null, false or empty says nothing. */
export function factTexts(building: Building, words: Words, facts: Facts): FactText[] {
  return Object.entries(facts)
    .filter(
      ([, value]) =>
        value !== null && value !== undefined && value !== false && !(Array.isArray(value) && value.length === 0),
    )
    .map(([key, value]) => factText(building, words, key, value));
}

/** The same in one line of text. */
export const factsLine = (building: Building, words: Words, facts: Facts): string =>
  factTexts(building, words, facts)
    .map(({ label, value }) => `${label} ${value}`)
    .join(', ');

function factText(building: Building, words: Words, key: string, value: unknown): FactText {
  const parts = key.split(/(?=[A-Z])/).map((part) => part.toLowerCase());
  const unit = parts.at(-1) ?? '';
  const whole = Object.hasOwn(words.factWords, key) ? words.factWords[key] : undefined;
  const label = (names: readonly string[]): string =>
    whole ?? names.map((name) => named(words.factWords, name)).join(' ');
  if (value === true) return { label: label(parts), value: words.yes };
  if (typeof value !== 'number') return { label: label(parts), value: otherText(building, words, value) };
  const measured = measure(building, words, unit, value);
  if (measured === null) return { label: label(parts), value: decimal(words, value, 4) };
  return { label: label(parts.length > 1 ? parts.slice(0, -1) : parts), value: measured };
}

/** The unit stands in the last word of a fact's name. */
function measure(building: Building, words: Words, unit: string, value: number): string | null {
  switch (unit) {
    case 'units':
      return `${decimal(words, value, 2)} ${words.shortUnit(building.result.code.unit)}`;
    case 'm':
      return lengthText(words, value);
    case 'mm':
      return `${decimal(words, value, 1)} mm`;
    case 'deg':
      return `${decimal(words, value, 1)}°`;
    case 'share':
      return `${decimal(words, value * 100, 0)} %`;
    case 'slope':
      return slopeText(words, value);
    case 'lps':
      return `${decimal(words, value, 2)} l/s`;
    default:
      return null;
  }
}

const mostListed = 4;

function otherText(building: Building, words: Words, value: unknown): string {
  if (Array.isArray(value)) {
    const texts = value.slice(0, mostListed).map((entry) => otherText(building, words, entry));
    return texts.join(', ') + (value.length > mostListed ? ` … (${value.length})` : '');
  }
  if (typeof value !== 'string') return String(JSON.stringify(value));
  return nameOfId(building, words, /^up to | in\b/.test(value) ? placeIn(words, value) : phrase(words, value));
}
