import type { Building } from '../building.ts';
import { decimal, lengthText, slopeText } from '../format.ts';
import { named, type Words } from '../words/words.ts';
import { nameOfId } from './names.ts';

type Facts = Readonly<Record<string, unknown>>;

/** The numbers behind a demand, each with its own words, in the order of the trail: `load 14 fixture units`. */
export function factTexts(building: Building, words: Words, facts: Facts): string[] {
  return Object.entries(facts)
    .filter(([, value]) => value !== null && value !== undefined && !(Array.isArray(value) && value.length === 0))
    .map(([key, value]) => factText(building, words, key, value));
}

function factText(building: Building, words: Words, key: string, value: unknown): string {
  const parts = key.split(/(?=[A-Z])/).map((part) => part.toLowerCase());
  const unit = parts.at(-1) ?? '';
  const say = (names: readonly string[]): string => names.map((name) => named(words.factWords, name)).join(' ');
  if (typeof value === 'boolean')
    return `${say(parts)} : ${value ? words.yes : words.no}`.replace(' :', words.language === 'fr' ? ' :' : ':');
  if (typeof value !== 'number') return `${say(parts)} ${otherText(building, words, value)}`;
  const measured = measure(building, words, unit, value);
  if (measured === null) return `${say(parts)} ${decimal(words, value, 4)}`;
  return `${say(parts.length > 1 ? parts.slice(0, -1) : parts)} ${measured}`;
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
  return typeof value === 'string' ? nameOfId(building, words, value) : String(JSON.stringify(value));
}
