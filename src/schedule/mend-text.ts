import { elementNames } from './element-names.ts';
import type { MendResult } from './mend.ts';
import { decimal } from './number-text.ts';
import { type PlanStepText, planSteps } from './plan-steps.ts';
import type { Result } from './result.ts';
import { shownText, unbroken } from './shown-text.ts';
import { blank, heading, paragraph, type TextLine } from './text-line.ts';
import { counted, plainWords, tally } from './trade-words.ts';

/** The plan for a person: what to change in which order and why, what it costs by the weights, and the proof. */
export function mendText(plan: MendResult, result: Result): TextLine[] {
  const { changes, before, after, search, cost, model, code } = plan;
  const names = elementNames(result);
  const head = `${shownText(model.file)}, ${code.id}: ${counted(before.errors, 'error')}`;
  if (before.errors === 0 && changes.length === 0) return [...heading(`${head}, nothing to mend.`), ...caution(plan)];
  const what =
    changes.length === 0
      ? 'no change is known that mends them'
      : `${counted(changes.length, 'change')}, ${decimal(cost, 1)} points`;
  return [
    ...heading(`${head}; ${what}.`),
    ...planSteps(changes, names.short).flatMap((step, place) => stepText(step, place + 1)),
    blank,
    ...paragraph(proofSentence(plan), '', after.errors === 0 ? 'good' : 'error'),
    ...paragraph(search.sentence, '', search.exact ? 'plain' : 'warning'),
    ...paragraph(weightsSentence(plan), '', 'quiet'),
    ...leftText(plan),
    ...caution(plan),
  ];
}

const caution = ({ caution: words }: MendResult): TextLine[] => paragraph(shownText(words), '', 'quiet');

const mostNamed = 8;

function stepText({ title, why, cost, pipes }: PlanStepText, place: number): TextLine[] {
  const named = pipes.slice(0, mostNamed).map(unbroken).join(', ');
  const more = pipes.length - mostNamed;
  return [
    ...paragraph(`${title} (${decimal(cost, 1)} points)`, `${place}. `.padStart(6)),
    ...paragraph(shownText(why), '      ', 'quiet'),
    ...(pipes.length === 0 ? [] : paragraph(named + (more > 0 ? ` and ${more} more` : ''), '      ', 'quiet')),
  ];
}

const mostLeft = 12;

/** Errors that are left, by kind, each kind with what a person has to do about it. */
function leftText({ after }: MendResult): TextLine[] {
  return after.advice.flatMap(({ code, sentence }) => {
    const own = after.findings.filter((finding) => finding.code === code);
    const more = own.length - mostLeft;
    return [
      ...own.slice(0, mostLeft).flatMap((finding) => paragraph(shownText(finding.sentence), '  - ', 'error')),
      ...(more > 0 ? paragraph(`and ${more} more ${plainWords(code)}`, '    ', 'quiet') : []),
      ...paragraph(`For you: ${sentence}`, '    ', 'warning'),
    ];
  });
}

/** What the run of all stages on the changed building says. */
export function proofSentence({ before, after, search }: MendResult): string {
  if (after.errors === 0) return 'The changed building was run through all stages: no error is left.';
  const kinds = tally(after.findings.map(({ code }) => plainWords(code))).map(([code, count]) => `${count} ${code}`);
  const one = after.errors === 1;
  const unknown = search.hopeless ? `; no change that the program knows settles ${one ? 'it' : 'them'}` : '';
  const left = `${after.errors} of ${counted(before.errors, 'error')} ${one ? 'is' : 'are'} left (${kinds.join(', ')})`;
  return `The changed building was run through all stages: ${left}${unknown}.`;
}

/** What each weight is about. */
export const weightNames: Readonly<Record<keyof MendResult['weights'], string>> = {
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
export function weightsSentence({ weights }: MendResult): string {
  const each = (Object.keys(weightNames) as (keyof MendResult['weights'])[]).map(
    (name) => `${weightNames[name]} ${decimal(weights[name], 2)}`,
  );
  return `Points: ${each.join(', ')}; --weights sets them.`;
}
