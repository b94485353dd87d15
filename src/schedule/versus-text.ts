import { demandText } from './demand-text.ts';
import { elementNames } from './element-names.ts';
import { sizeText } from './number-text.ts';
import type { Result } from './result.ts';
import { shownText, unbroken } from './shown-text.ts';
import { blank, heading, paragraph, type TextLine } from './text-line.ts';
import { counted, listed, plainWords, sentence } from './trade-words.ts';
import type { VersusPipe, VersusResult, VersusSide } from './versus-result.ts';

/** Two codes over one model: what differs, alike pipes together, most first, and each code's reason in full. */
export function versusText(result: VersusResult, first: Result): TextLine[] {
  const { code, versus, counts, pipes, onlyFor, model } = result;
  const names = elementNames(first);
  const groups = groupsOf(pipes);
  const shown = groups.slice(0, mostGroups);
  const rest = groups.length - shown.length;
  return [
    ...heading(`${shownText(model.file)}: ${title(code)} against ${title(versus)}`),
    ...paragraph(
      pipes.length === 0
        ? `All ${counted(counts.pipes, 'pipe')} have the same required size and verdict under both.`
        : `Of ${counted(counts.pipes, 'pipe')} ${counts.alike} come out alike, ${counts.required} need another size, ` +
            `${counts.verdict} have another verdict. Errors: ${counts.errors.code} under ${code.id}, ${counts.errors.versus} under ${versus.id}.`,
    ),
    ...onlySet(onlyFor.code, code.id),
    ...onlySet(onlyFor.versus, versus.id),
    ...shown.flatMap((group, place) => groupText(group, place + 1)),
    ...(rest === 0
      ? []
      : paragraph(`and ${counted(rest, 'smaller group')}; --json lists every pipe`, '      ', 'quiet')),
    blank,
    ...paragraph(shownText(result.caution), '', 'quiet'),
  ];

  function groupText([some, ...others]: readonly VersusPipe[], place: number): TextLine[] {
    if (some === undefined) return [];
    const group = [some, ...others];
    const named = group.slice(0, mostPipes).map(({ globalId }) => unbroken(names.of(globalId)));
    const more = group.length - named.length;
    const roles = [...new Set([some.from.role, some.to.role])].map(plainWords).join(' / ');
    return [
      blank,
      ...paragraph(
        `${roles}, ${counted(group.length, 'pipe')}: ${changeText(some)}`,
        `${place}. `.padStart(6),
        'warning',
      ),
      ...because(code.id, some.from, code.unit),
      ...because(versus.id, some.to, versus.unit),
      ...paragraph(named.join(', ') + (more > 0 ? ` and ${more} more` : ''), '      ', 'quiet'),
    ];
  }

  function because(id: string, { because: step, required, reason, at }: VersusSide, unit: string): TextLine[] {
    const where = at === undefined ? '' : `, at ${names.of(at)}`;
    const why = step === null ? (reason ?? 'no rule asks for a size') : demandText(step, unit, names.short);
    return paragraph(sentence(`${id} ${sizeText(required)}${where}: ${shownText(why)}`), '      ');
  }
}

const mostGroups = 16;
const mostPipes = 8;

const title = ({ title: name, edition, id }: Result['code']): string => `${name} ${edition} (${id})`;

const onlySet = (settings: readonly string[], id: string): TextLine[] =>
  settings.length === 0
    ? []
    : paragraph(
        `${listed(settings.map(shownText))} ${settings.length === 1 ? 'counts' : 'count'} for ${id} alone: the other code does not know it.`,
        '  ',
        'quiet',
      );

/** `3 in becomes 4 in; agrees becomes undersized`. */
function changeText({ what, from, to }: VersusPipe): string {
  const parts = [
    ...(what.includes('required')
      ? [`${sizeText(from.required)} becomes ${sizeText(to.required)}`]
      : [sizeText(from.required)]),
    ...(what.includes('verdict') ? [`${verdicts[from.verdict]} becomes ${verdicts[to.verdict]}`] : []),
  ];
  return parts.join('; ');
}

const verdicts = {
  undersized: 'undersized',
  agrees: 'as required',
  oversized: 'oversized',
  unknown: 'no verdict',
} as const;

/** Pipes of the same roles, sizes, verdicts and rules are told together: most first, then as they stand. */
function groupsOf(pipes: readonly VersusPipe[]): VersusPipe[][] {
  const groups = new Map<string, VersusPipe[]>();
  const sideKey = ({ role, required, verdict, because }: VersusSide): unknown[] => [
    role,
    required?.least?.label,
    required?.most?.label,
    verdict,
    because?.rule,
    because?.row,
  ];
  for (const pipe of pipes) {
    const key = JSON.stringify([...sideKey(pipe.from), ...sideKey(pipe.to)]);
    const known = groups.get(key);
    if (known === undefined) groups.set(key, [pipe]);
    else known.push(pipe);
  }
  return [...groups.values()].sort((a, b) => b.length - a.length);
}
