import { shownText } from '../../schedule/shown-text.ts';
import type { Building } from '../building.ts';
import { kindName, type Words } from '../words/words.ts';

const longest = 120;

/** What people call a pipe or a fixture: its name, or its kind or role with its STEP id where it has none. */
export function pipeName(building: Building, words: Words, row: number): string {
  const pipe = building.result.pipes[row];
  const name = shown(pipe?.name);
  return name !== '' ? name : `${words.pipe.one} #${pipe?.stepId ?? '?'}`;
}

export function fixtureName(building: Building, words: Words, row: number): string {
  const fixture = building.result.fixtures[row];
  const name = shown(fixture?.name);
  return name !== '' ? name : `${capital(kindName(words, fixture?.kind ?? null))} #${fixture?.stepId ?? '?'}`;
}

/** By GlobalId; a text that is no GlobalId of a pipe or fixture stays as it is. */
export function nameOfId(building: Building, words: Words, id: string): string {
  const pipe = building.pipeAt.get(id);
  if (pipe !== undefined) return pipeName(building, words, pipe);
  const fixture = building.fixtureAt.get(id);
  if (fixture !== undefined) return fixtureName(building, words, fixture);
  const fitting = building.data.scene.fittings.find(({ globalId }) => globalId === id);
  if (fitting !== undefined) return shown(fitting.name) || fitting.class.replace(/^Ifc/, '');
  return shown(id);
}

/** A model's word on one line, steering characters written out, cut where it would fill the screen. */
export function shown(text: string | null | undefined): string {
  const plain = shownText(text ?? '');
  return plain.length > longest ? `${plain.slice(0, longest)}…` : plain;
}

/** `battery-1` of the result is battery 1 to people. */
export const batteryName = (id: string): string => id.replace(/^battery-/, '');

export const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);
