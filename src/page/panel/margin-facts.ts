import { decimal, lengthText, oneSize } from '../format.ts';
import { planWords } from '../words/plan-words.ts';
import { countedKind } from '../words/words.ts';
import type { Desk } from './desk.ts';

/** What a pipe still takes before its size changes: load, and length of a vent. Empty where neither decides. */
export function marginFacts({ building, words }: Desk, row: number): string[] {
  const margin = building.margin(row);
  if (margin === undefined) return [];
  const own = planWords[words.language];
  const unit = words.unit(building.result.code.unit);
  const { load, drawn, length, next } = margin;
  const text = (units: number): string => `${decimal(words, units, 2)} ${unit}`;
  const then = next?.size == null ? null : oneSize(words, next.size);
  return [
    ...(drawn !== null && drawn < 0
      ? [own.tooMuch(text(-drawn))]
      : load === null
        ? []
        : [load === 0 ? own.takesNothing(then) : own.takesLoad(text(load), then)]),
    ...(length === null ? [] : [own.takesLength(lengthText(words, length))]),
  ];
}

/** What a row still takes, in units and in fixtures of its own kinds; null where nobody asked or no load decides. */
export function rowTakes({ building, words }: Desk, battery: string): string | null {
  const margin = building.data.margins.batteries.find(({ id }) => id === battery);
  if (margin === undefined || margin.load === null) return null;
  const own = planWords[words.language];
  const more = margin.more.filter(({ count }) => count > 0).map(({ kind, count }) => countedKind(words, kind, count));
  const unit = words.unit(building.result.code.unit);
  return own.rowTakes(`${decimal(words, margin.load, 2)} ${unit}`, more.join(` ${own.or} `));
}
