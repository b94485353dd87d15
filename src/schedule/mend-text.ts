import { elementNames } from './element-names.ts';
import { groupedChanges } from './grouped-changes.ts';
import type { MendChange, MendResult } from './mend.ts';
import { decimal } from './number-text.ts';
import type { Result } from './result.ts';
import { shownText, unbroken } from './shown-text.ts';
import { blank, heading, paragraph, type TextLine } from './text-line.ts';
import { counted, plainWords, tally } from './trade-words.ts';

/** The plan for a person: what to change in which order and why, what it costs by the weights, and the proof. */
export function mendText(plan: MendResult, result: Result): TextLine[] {
  const { changes, before, after, search, cost, model, code } = plan;
  const names = elementNames(result);
  const head = `${shownText(model.file)}, ${code.id}: ${counted(before.errors, 'error')}`;
  if (before.errors === 0) return [...heading(`${head}, nothing to mend.`), ...caution(plan)];
  const what =
    changes.length === 0
      ? 'no change is known that mends them'
      : `${counted(changes.length, 'change')}, ${decimal(cost, 1)} points`;
  return [
    ...heading(`${head}; ${what}.`),
    ...groupedChanges(changes).flatMap((group, place) => changeText(group, place + 1, names.short)),
    blank,
    ...proofText(plan),
    ...paragraph(search.sentence, '', search.exact ? 'plain' : 'warning'),
    ...paragraph(weightsText(plan), '', 'quiet'),
    ...after.findings.flatMap(({ sentence }) => paragraph(shownText(sentence), '  - ', 'error')),
    ...caution(plan),
  ];
}

const caution = ({ caution: words }: MendResult): TextLine[] => paragraph(shownText(words), '', 'quiet');

const mostNamed = 8;

function changeText(group: readonly MendChange[], place: number, nameOf: (globalId: string) => string): TextLine[] {
  const first = group[0]!;
  const cost = group.reduce((sum, one) => sum + one.cost, 0);
  const named = group.flatMap(({ about, kind }) => (kind === 'size' ? about : [])).map((id) => unbroken(nameOf(id)));
  const more = named.length - mostNamed;
  const lead = `${place}. `.padStart(6);
  const points = `${decimal(cost, 1)} points`;
  if (first.kind === 'size') {
    const what = group.length === 1 ? named[0]! : counted(group.length, 'pipe');
    return [
      ...paragraph(`${what} from ${first.from} to ${first.to} (${points})`, lead),
      ...paragraph(shownText(first.why), '      ', 'quiet'),
      ...(group.length === 1
        ? []
        : paragraph(named.slice(0, mostNamed).join(', ') + (more > 0 ? ` and ${more} more` : ''), '      ', 'quiet')),
    ];
  }
  return [
    ...paragraph(`${titleOf(first, nameOf)} (${points})`, lead),
    ...paragraph(shownText(first.why), '      ', 'quiet'),
  ];
}

function titleOf(change: MendChange, nameOf: (globalId: string) => string): string {
  const { kind, about, from, to } = change;
  const at = about[0] === undefined ? '' : nameOf(about[0]);
  switch (kind) {
    case 'vent':
      return `New ${to}, from ${at}`;
    case 'moved-vent':
      return `${at} moved: ${to}, from ${about[1] === undefined ? 'its new place' : nameOf(about[1])}`;
    case 'extended-vent':
      return `${at} goes on: ${to}`;
    case 'reading':
      return `The row of ${counted(about.length, 'fixture')} from ${at} on is read as ${to} instead of ${from}`;
    case 'slope':
      return `${about.map(nameOf).slice(0, mostNamed).join(', ')}${from === null ? '' : `, now ${from},`} laid to ${to}`;
    case 'trap':
      return `${at} set ${to}, now ${from}`;
    case 'cleanout':
      return `New ${to} at ${at}`;
    case 'size':
      return `${at} from ${from} to ${to}`;
  }
}

function proofText({ before, after, search }: MendResult): TextLine[] {
  const rest =
    after.errors === 0
      ? 'The changed building was run through all stages: no error is left.'
      : `The changed building was run through all stages: ${after.errors} of ${counted(before.errors, 'error')} ${after.errors === 1 ? 'is' : 'are'} left (${tally(
          after.findings.map(({ code }) => plainWords(code)),
        )
          .map(([code, count]) => `${count} ${code}`)
          .join(
            ', ',
          )})${search.exact ? `; no change that the program knows settles ${after.errors === 1 ? 'it' : 'them'}` : ''}.`;
  return paragraph(rest, '', after.errors === 0 ? 'good' : 'error');
}

const weightNames: Readonly<Record<keyof MendResult['weights'], string>> = {
  sizeStep: 'a metre of pipe one size step larger or smaller',
  newVent: 'a metre of new vent',
  ventJoint: 'each end of it',
  throughRoof: 'a way through the roof',
  openedWall: 'a metre inside a wall',
  reading: 'a row read another way',
  relaying: 'a metre laid to another fall',
  trap: 'a trap set elsewhere',
  cleanout: 'a cleanout',
};

/** Points by the weights, which only compare plans with each other. */
function weightsText({ weights }: MendResult): string {
  const each = (Object.keys(weightNames) as (keyof MendResult['weights'])[]).map(
    (name) => `${weightNames[name]} ${decimal(weights[name], 2)}`,
  );
  return `Points: ${each.join(', ')}; --weights sets them.`;
}
