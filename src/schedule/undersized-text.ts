import { type ElementNames, elementNames } from './element-names.ts';
import { decimal, lengthText, loadText, sizeText } from './number-text.ts';
import type { Result, ResultFinding, ResultPipe, TrailStep } from './result.ts';
import { unbroken } from './shown-text.ts';
import { blank, heading, paragraph, type TextLine } from './text-line.ts';
import { counted, plainWords } from './trade-words.ts';

/** Undersized pipes that share a cause, both sizes, the clause and the load that decided. */
export interface UndersizedGroup {
  readonly cause: string;
  readonly pipes: readonly ResultPipe[];
  readonly governing: TrailStep | null;
  readonly battery: string | null;
}

/** Groups of the undersized pipes: most pipes first, then by the first pipe's place in the result. */
export function undersizedGroups({ findings, pipes }: Result): UndersizedGroup[] {
  const byId = new Map(pipes.map((pipe) => [pipe.globalId, pipe]));
  const groups = new Map<
    string,
    { cause: string; pipes: ResultPipe[]; governing: TrailStep | null; battery: string | null }
  >();
  for (const finding of findings) {
    const pipe = byId.get(finding.about[0] ?? '');
    if (finding.code !== 'undersized' || pipe === undefined) continue;
    const cause = causeOf(finding);
    const governing = pipe.trail.find(({ governs }) => governs) ?? null;
    const battery = pipe.battery ?? null;
    const load = pipe.ventLoad ?? (battery === null ? pipe.load : null);
    const key = JSON.stringify([cause, pipe.modelled?.label, pipe.required, governing?.clause, battery, load]);
    const group = groups.get(key);
    if (group === undefined) groups.set(key, { cause, pipes: [pipe], governing, battery });
    else group.pipes.push(pipe);
  }
  return [...groups.values()].sort((a, b) => b.pipes.length - a.pipes.length);
}

/** The undersized pipes grouped by cause: modelled size, required size, load, clause, and which pipes they are. */
export function undersizedText(result: Result): TextLine[] {
  const groups = undersizedGroups(result);
  if (groups.length === 0) return [];
  const names = elementNames(result);
  const pipes = groups.reduce((sum, group) => sum + group.pipes.length, 0);
  const shown = groups.slice(0, mostGroups);
  return [
    blank,
    ...heading(`Undersized: ${pipes} of ${counted(result.counts.pipes, 'pipe')}, by cause`),
    ...shown.flatMap((group, place) => groupText(group, place + 1, result.code.unit, names)),
    ...(groups.length === shown.length
      ? []
      : paragraph(`and ${groups.length - shown.length} smaller groups; --json lists every pipe`, '      ', 'quiet')),
  ];
}

const mostGroups = 12;
const mostPipes = 8;

function groupText(group: UndersizedGroup, place: number, unit: string, names: ElementNames): TextLine[] {
  const { cause, pipes, governing, battery } = group;
  const first = pipes[0];
  if (first === undefined) return [];
  const sizes = `Drawn ${first.modelled?.label ?? '?'}, needs ${sizeText(first.required)}`;
  const whose = battery === null ? '' : ` of battery ${battery}`;
  const named = pipes.slice(0, mostPipes).map(({ globalId }) => unbroken(names.of(globalId)));
  const more = pipes.length - named.length;
  return [
    ...paragraph(
      `${sizes}: ${counted(pipes.length, plainWords(first.role))}${whose}`,
      `  ${place}. `.padStart(6),
      'error',
    ),
    ...paragraph(`${capital(plainWords(cause))}: ${reasonText(first, governing, unit, names)}`, '      '),
    ...paragraph(named.join(', ') + (more > 0 ? ` and ${more} more` : ''), '      ', 'quiet'),
  ];
}

/** The load and the length that chose the row, and where it is printed. */
function reasonText(pipe: ResultPipe, step: TrailStep | null, unit: string, names: ElementNames): string {
  const parts = [loadText(pipe.ventLoad ?? pipe.load, unit)];
  if (pipe.developedLength !== undefined) parts.push(`${lengthText(pipe.developedLength)} developed length`);
  if (step !== null) {
    const limit = step.facts.limitUnits;
    if (typeof limit === 'number' && step.asks !== null) parts.push(`${step.asks.label} holds ${decimal(limit, 2)}`);
    const upstream = step.facts.upstream;
    if (typeof upstream === 'string') parts.push(`after ${names.of(upstream)}`);
    parts.push(step.table === null ? step.clause : `${step.clause}, Table ${step.table.replace(/^Table /, '')}`);
  }
  return parts.join('; ') + (pipe.provisional ? '; provisional' : '');
}

const causeOf = ({ facts }: ResultFinding): string => (typeof facts.cause === 'string' ? facts.cause : 'too small');
const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);
