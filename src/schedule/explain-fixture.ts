import { elementNames } from './element-names.ts';
import { decimal, lengthText, loadText, slopeText } from './number-text.ts';
import type { Result, ResultFixture } from './result.ts';
import { shownText } from './shown-text.ts';
import { listed, plainWords } from './trade-words.ts';

/** The story of one fixture: what it is taken for and why, its load, its trap and arm, the way of its water and air. */
export function explainFixture(result: Result, fixture: ResultFixture): string[] {
  const names = elementNames(result);
  return [
    identity(fixture, names.of(fixture.globalId)),
    fixture.row === null
      ? `No row of the code's fixture table could be told; its load is ${loadText(fixture.load, result.code.unit)}.`
      : `The code counts it as "${shownText(fixture.row)}": ${loadText(fixture.load, result.code.unit)}.`,
    trapText(fixture),
    ...armText(fixture),
    way('Its water runs', fixture.waterPath ?? [], 'Its water reaches no sewer.', names.short),
    ventText(fixture),
    ...(fixture.airPath === undefined || fixture.airPath.length === 0
      ? []
      : [way('Its air comes', fixture.airPath, '', names.short)]),
    ...result.findings.filter(({ about }) => about[0] === fixture.globalId).map(({ sentence }) => shownText(sentence)),
  ];
}

function identity({ globalId, kind, detail, storey, evidence }: ResultFixture, name: string): string {
  const facts = [detail.style, detail.flush === null ? null : `flush ${detail.flush}`].filter((fact) => fact !== null);
  const what = kind === null ? 'a fixture of unknown kind' : `a ${plainWords(kind)}`;
  const more = facts.length === 0 ? '' : ` (${facts.map(shownText).join(', ')})`;
  const where = storey === null ? '' : `, on ${shownText(storey)}`;
  return `${name} (GlobalId ${globalId}) is ${what}${more}${where}; known by: ${shownText(evidence)}.`;
}

function trapText({ trapSize, trap }: ResultFixture): string {
  const size = trapSize === null ? 'Its trap size is unknown' : `Its trap is ${trapSize.label}`;
  const at = trap.at === null ? '' : `, at ${trap.at.map((metres) => decimal(metres, 2)).join(', ')} m`;
  return `${size}: ${shownText(trap.how)}${at}.`;
}

function armText({ trapArm }: ResultFixture): string[] {
  if (trapArm === null) return [];
  const { length, fall, slope, turn, limit } = trapArm;
  const parts = [
    ...(length === null
      ? []
      : [`${lengthText(length)} long${limit === null ? '' : ` of ${lengthText(limit)} allowed`}`]),
    ...(fall === null ? [] : [`falls ${lengthText(fall)}${slope === null ? '' : `, ${slopeText(slope)}`}`]),
    ...(turn === null ? [] : [`turns ${decimal(turn, 0)}°`]),
  ];
  return parts.length === 0 ? [] : [`Its trap arm is ${listed(parts)}.`];
}

function ventText({ ventedBy }: ResultFixture): string {
  const { how, rule } = ventedBy;
  if (how === 'unvented') return 'No vent reaches its trap.';
  if (how === 'free') return `It needs no vent${rule === undefined ? '' : ` (${shownText(rule)})`}.`;
  return `Its trap is vented by ${plainWords(how)}${rule === undefined ? '' : ` (${shownText(rule)})`}.`;
}

function way(start: string, path: readonly string[], none: string, nameOf: (globalId: string) => string): string {
  if (path.length === 0) return none;
  const shown =
    path.length <= mostSteps
      ? path.map(nameOf)
      : [...path.slice(0, mostSteps - 2).map(nameOf), '…', nameOf(path.at(-1) ?? '')];
  return `${start} through ${shown.join(', ')}.`;
}
const mostSteps = 16;
