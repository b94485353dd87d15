import { decimal } from './number-text.ts';
import type { ResultFinding } from './result.ts';
import { shownText } from './shown-text.ts';
import { blank, heading, paragraph, type TextLine } from './text-line.ts';
import { counted } from './trade-words.ts';

const mostGroups = 6;

/** Pipes that their walls do not take, by wall, size and what is in the way; nothing where all fit. */
export function wallFitText(findings: readonly ResultFinding[]): TextLine[] {
  const groups = new Map<string, ResultFinding[]>();
  for (const found of findings) {
    if (found.code !== 'fit-in-wall') continue;
    const { wall, what, required, cavityMm, stud } = found.facts;
    const key = JSON.stringify([wall, what, required, cavityMm, stud]);
    groups.set(key, [...(groups.get(key) ?? []), found]);
  }
  if (groups.size === 0) return [];
  const all = [...groups.values()].reduce((sum, { length }) => sum + length, 0);
  const sorted = [...groups.values()].sort((a, b) => b.length - a.length);
  return [
    blank,
    ...heading(`Not in the wall as modelled: ${counted(all, 'pipe')}`),
    ...sorted.slice(0, mostGroups).flatMap((group) => paragraph(groupText(group), '  - ', 'warning')),
    ...(sorted.length > mostGroups ? paragraph(`and ${sorted.length - mostGroups} more`, '    ', 'quiet') : []),
  ];
}

/** `Urinal wall: 6 pipes of 3 in, fittings 100.6 mm wide in 89 mm; studs of 38 × 140 take them`. */
function groupText(group: readonly ResultFinding[]): string {
  const { facts } = group[0]!;
  const mm = (key: string): string => `${decimal(Number(facts[key] ?? 0), 1)} mm`;
  const laid = typeof facts.made === 'string' ? `, laid as ${facts.made}` : '';
  const pipes = `${counted(group.length, 'pipe')} of ${String(facts.required)}${laid}`;
  const why =
    facts.what === 'hole'
      ? `through its studs a hole of ${mm('holeMm')}, at most ${mm('holeMostMm')} in ${mm('cavityMm')}${facts.loadBearing === null ? ' if it bears load' : ''}`
      : `${facts.what === 'fitting' ? 'fittings ' : ''}${mm('needsMm')} wide in ${mm('cavityMm')}`;
  const takes =
    typeof facts.stud === 'string'
      ? `studs of ${facts.stud} take ${group.length === 1 ? 'it' : 'them'}`
      : lightText(facts);
  return `${shownText(String(facts.wall ?? 'A wall'))}: ${pipes}: ${why}; ${takes}.`;
}

const lightText = (facts: ResultFinding['facts']): string =>
  typeof facts.studIfNotLoadbearing === 'string'
    ? `studs of ${facts.studIfNotLoadbearing} do if it bears no load`
    : facts.holeMm === undefined
      ? 'no usual stud does'
      : 'no usual stud may be bored so wide';
