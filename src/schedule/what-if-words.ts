import type { Reading } from '../codes/reading.ts';
import { InputError } from '../findings/input-error.ts';
import type { FixtureDetail, FixtureKind } from '../model/identity.ts';
import { fixtureKinds } from '../model/identity-words.ts';
import type { ElementId } from '../model/model.ts';
import { slopeOfText } from '../model/slope-value.ts';
import type { Edit } from '../study/what-if.ts';
import { sizeIn } from '../tables/printed-value.ts';
import type { Outcome } from '../verdicts/outcome.ts';
import type { Found } from './find-in-result.ts';
import { slopeText } from './number-text.ts';
import { resultIndex } from './result-index.ts';
import { shownText } from './shown-text.ts';
import { counted, plainWords } from './trade-words.ts';

/** An edit, and in what words it was read. */
export interface Asked {
  readonly edit: Edit;
  readonly words: string;
}

/** What `--if` takes; each is said of the pipe or fixture that is explained. Several stand with `;` between them. */
export const whatIfWords =
  'size 3 in | slope 1:50 | reading circuit-vent | kind urinal stall | add 2 floor-drain | code npc-2015';

const readings: readonly Reading[] = ['wet-vent', 'circuit-vent', 'individual-vent'];

export function readWhatIf(text: string, found: Found, outcome: Outcome): Asked[] {
  const parts = text.split(';').map((part) => part.trim());
  if (parts.some((part) => part === '')) throw refused(text, 'says nothing');
  return parts.map((part) => readPart(part, found, outcome));
}

function readPart(part: string, found: Found, outcome: Outcome): Asked {
  const [word = '', ...rest] = part.split(/\s+/);
  const said = rest.join(' ');
  const element = elementOf(found, outcome);
  const pipe = (): ElementId => {
    if (found.kind !== 'pipe')
      throw refused(part, `is said of a pipe, and ${shownText(found.fixture.name ?? 'this')} is a fixture`);
    return element;
  };
  switch (word) {
    case 'size': {
      const size = sizeIn(outcome.code.series, said);
      if (size === undefined) throw refused(part, `names no size of ${outcome.code.id}`);
      return { edit: { edit: 'size', pipe: pipe(), size }, words: `it is ${size}` };
    }
    case 'slope': {
      const slope = slopeOfText(said, 'ratio');
      if (slope === null || slope === 0) throw refused(part, 'names no fall');
      return { edit: { edit: 'slope', pipe: pipe(), slope }, words: `it falls ${slopeText(slope)}` };
    }
    case 'reading': {
      const reading = readings.find((one) => one === said || plainWords(one) === said || one === `${said}-vent`);
      if (reading === undefined) throw refused(part, `names no reading; expected ${readings.join(', ')}`);
      return {
        edit: { edit: 'reading', fixture: fixtureOf(found, outcome, part), reading },
        words: `its battery is read as ${plainWords(reading)}`,
      };
    }
    case 'kind': {
      if (found.kind !== 'fixture') throw refused(part, 'is said of a fixture');
      const { kind, detail, words } = fixtureWords(part, rest);
      return { edit: { edit: 'kind', fixture: element, kind, detail }, words: `it is a ${plainWords(kind)}${words}` };
    }
    case 'add': {
      const count = /^\d{1,3}$/.test(rest[0] ?? '') ? Number(rest[0]) : 1;
      const { kind, detail, words } = fixtureWords(part, /^\d+$/.test(rest[0] ?? '') ? rest.slice(1) : rest);
      if (count < 1) throw refused(part, 'adds nothing');
      return {
        edit: { edit: 'add', pipe: pipe(), kind, detail, count },
        words: `${counted(count, `more ${plainWords(kind)}`)}${words} ${count === 1 ? 'drains' : 'drain'} into it`,
      };
    }
    case 'code':
      if (said === '') throw refused(part, 'names no code');
      return { edit: { edit: 'code', code: said }, words: `the code is ${shownText(said)}` };
    default:
      throw refused(part, 'is not understood');
  }
}

const refused = (text: string, why: string): InputError =>
  new InputError(`--if ${shownText(text)}`, `${why}; it takes ${whatIfWords}`, { exit: 2 });

function elementOf(found: Found, outcome: Outcome): ElementId {
  const index = resultIndex(outcome);
  const { globalId } = found.kind === 'pipe' ? found.pipe : found.fixture;
  const element = outcome.model.elements.find(({ id }) => index.idOf(id) === globalId);
  if (element === undefined) throw new Error(`no element ${globalId}`);
  return element.id;
}

/** A fixture itself; of a pipe the first of the battery that it belongs to. */
function fixtureOf(found: Found, outcome: Outcome, part: string): ElementId {
  const element = elementOf(found, outcome);
  if (found.kind === 'fixture') return element;
  const { shown, network, paths } = outcome;
  for (const section of network.pipesOf.get(element) ?? []) {
    const trap = shown.roles.uses[section]!.battery?.facts.traps[0];
    if (trap !== undefined) return paths.fixtures[trap.fixture]!.element;
  }
  throw refused(part, 'is said of a battery, and this pipe belongs to none');
}

const flushes: readonly string[] = ['tank', 'valve'];
const styles: Readonly<Record<string, string>> = {
  stall: 'stall',
  washout: 'wall-washout',
  siphon: 'wall-other',
  wall: 'wall',
  pedestal: 'pedestal',
};

/** A kind, then details: a flush, a style, `emergency`. */
function fixtureWords(
  part: string,
  words: readonly string[],
): { kind: FixtureKind; detail: Partial<FixtureDetail>; words: string } {
  const [name = '', ...details] = words;
  const kind = fixtureKinds.find((one) => one === name.toLowerCase() || plural(one) === name.toLowerCase());
  if (kind === undefined) throw refused(part, `names no fixture; expected ${fixtureKinds.join(', ')}`);
  let detail: Partial<FixtureDetail> = {};
  for (const word of details) {
    const style = styles[word];
    if (flushes.includes(word)) detail = { ...detail, flush: word === 'tank' ? 'tank' : 'valve' };
    else if (style !== undefined) detail = { ...detail, style };
    else if (word === 'emergency') detail = { ...detail, emergency: true };
    else
      throw refused(
        part,
        `has a detail ${shownText(word)} that is not known; expected ${[...flushes, ...Object.keys(styles)].join(', ')}, emergency`,
      );
  }
  return { kind, detail, words: details.length === 0 ? '' : ` (${details.join(', ')})` };
}

const plural = (kind: string): string => (kind.endsWith('y') ? `${kind.slice(0, -1)}ies` : `${kind}s`);
