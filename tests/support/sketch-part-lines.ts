import type { PipeSize } from './pipe-sizes.ts';
import type { PartWord, SketchFitting, SketchFixture } from './sketch.ts';
import { type FixtureWord, fixtureWords } from './sketch-fixtures.ts';
import type { Cursor } from './sketch-tokens.ts';

/** Short words beside the fixture kinds' own. */
const alias: Readonly<Record<string, string>> = { closet: 'water-closet' };
const partWords: readonly string[] = [
  'trap',
  'cleanout',
  'terminal',
  'admittance-valve',
  'sewer',
  'manhole',
  'sump',
  'interceptor',
  'cap',
  'backwater-valve',
  'roof-drain',
] satisfies PartWord[];

/** `wall` says no more than that it hangs there; `washout` and `siphon` hang there too. */
const urinalStyles: readonly string[] = ['stall', 'washout', 'siphon', 'wall', 'pedestal'];

const fixtureWord = (keyword: string): FixtureWord | undefined => fixtureWords[alias[keyword] ?? keyword];

export const isPartWord = (keyword: string | undefined): boolean =>
  keyword !== undefined && (partWords.includes(keyword) || fixtureWord(keyword) !== undefined);

/** `urinal U1 at 0.4 0.2 0.5, stall, trap 2 in, back north`: the details after the place, parted by commas. */
export function readFixture(cursor: Cursor, keyword: string, name: string): SketchFixture | null {
  const word = fixtureWord(keyword);
  if (word === undefined) return null;
  let flush: 'tank' | 'valve' | null = null;
  let style: string | null = null;
  let heads: number | null = null;
  let emergency = false;
  let untrapped = false;
  let trap: PipeSize | null = null;
  let rim = word.rim;
  let back: SketchFixture['back'] = 'north';
  let titled: string | null = null;
  let reading: string | null = null;
  while (cursor.took(',')) {
    const detail = cursor.take('detail');
    if (detail === 'tank' || detail === 'valve') flush = detail;
    else if (urinalStyles.includes(detail)) style = detail;
    else if (detail === 'style') style = cursor.text('style');
    else if (detail === 'heads') heads = cursor.number('number of heads');
    else if (detail === 'emergency') emergency = true;
    else if (detail === 'untrapped') untrapped = true;
    else if (detail === 'trap') trap = cursor.size('trap size');
    else if (detail === 'rim') rim = cursor.number('rim over the floor');
    else if (detail === 'named') titled = cursor.text('type name');
    else if (detail === 'reading') reading = cursor.take('wet-vent, circuit-vent or individual-vent');
    else if (detail === 'back') {
      const side = cursor.take('north, south, east or west');
      if (side !== 'north' && side !== 'south' && side !== 'east' && side !== 'west')
        return cursor.fail(`"${side}" is no side`);
      back = side;
    } else cursor.fail(`"${detail}" is no detail of a fixture`);
  }
  const details = { flush, style, heads, emergency, untrapped };
  return { is: 'fixture', name, word, details, trap, rim, back, titled, reading, line: cursor.line };
}

/** `cleanout CO1 from J4 up 0.3, 3 in`; without a size it takes that of its pipes. */
export function readFitting(cursor: Cursor, keyword: string, name: string): SketchFitting {
  let size: PipeSize | null = null;
  let titled: string | null = null;
  while (cursor.took(',')) {
    if (cursor.took('named')) titled = cursor.text('name');
    else size = cursor.size('size');
  }
  return { is: keyword as PartWord, name, size, titled, line: cursor.line };
}
