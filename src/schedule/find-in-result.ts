import { InputError } from '../findings/input-error.ts';
import { elementNames } from './element-names.ts';
import type { Result, ResultElement, ResultFixture, ResultPipe } from './result.ts';
import { shownText } from './shown-text.ts';
import { plainWords } from './trade-words.ts';

export type Found =
  | { readonly kind: 'pipe'; readonly pipe: ResultPipe }
  | { readonly kind: 'fixture'; readonly fixture: ResultFixture };

/**
 * The one pipe or fixture that `what` means: a GlobalId, `#` and a STEP id, a name, or a bare STEP id, in this order;
 * a name is compared as written, then without regard to case. Nothing and several are InputErrors (exit 2) that list
 * what was near or found.
 */
export function findInResult(result: Result, what: string): Found {
  const rows: Found[] = [
    ...result.pipes.map((pipe): Found => ({ kind: 'pipe', pipe })),
    ...result.fixtures.map((fixture): Found => ({ kind: 'fixture', fixture })),
  ];
  const wanted = what.trim();
  const stepId = /^#?(\d+)$/.exec(wanted)?.[1];
  const tests: readonly ((row: ResultPipe | ResultFixture) => boolean)[] = [
    ({ globalId }) => globalId === wanted,
    (row) => wanted.startsWith('#') && row.stepId === Number(stepId),
    ({ name }) => name !== null && folded(name) === folded(wanted),
    ({ name }) => name !== null && folded(name).toLowerCase() === folded(wanted).toLowerCase(),
    (row) => stepId !== undefined && row.stepId === Number(stepId),
  ];
  for (const test of tests) {
    const hits = rows.filter((row) => test(thing(row)));
    const [first] = hits;
    if (first !== undefined && hits.length === 1) return first;
    if (hits.length > 1)
      throw new InputError(shownText(what), `is the name of ${hits.length} things; say which:${list(result, hits)}`, {
        exit: 2,
      });
  }
  throw new InputError(shownText(what), notFound(result, rows, wanted, stepId), { exit: 2 });
}

const thing = (row: Found): ResultPipe | ResultFixture => (row.kind === 'pipe' ? row.pipe : row.fixture);
const folded = (name: string): string => name.normalize('NFC').replace(/\s+/gu, ' ').trim();

function notFound(result: Result, rows: readonly Found[], wanted: string, stepId: string | undefined): string {
  const element = result.elements.find(({ globalId, stepId: id }) => globalId === wanted || id === Number(stepId));
  if (element !== undefined) return otherUse(element);
  const near = rows.filter((row) =>
    folded(thing(row).name ?? '')
      .toLowerCase()
      .includes(wanted.toLowerCase()),
  );
  const hint = near.length === 0 ? '' : ` Names that contain it:${list(result, near)}`;
  return `no pipe or fixture has this GlobalId, STEP id (#123) or name.${hint}`;
}

function otherUse({ class: ifcClass, use, reason }: ResultElement): string {
  const why = reason === undefined ? '' : ` (${shownText(reason)})`;
  return `is an ${ifcClass} and counts as ${plainWords(use)}${why}; only pipes and fixtures of the drainage have a story`;
}

function list(result: Result, hits: readonly Found[]): string {
  const names = elementNames(result);
  const lines = hits.slice(0, mostListed).map((row) => {
    const { globalId, storey } = thing(row);
    const what =
      row.kind === 'pipe' ? plainWords(row.pipe.role) : plainWords(row.fixture.kind ?? 'unidentified fixture');
    return `\n  ${globalId}  ${names.of(globalId)}, ${what}${storey === null ? '' : `, ${shownText(storey)}`}`;
  });
  return lines.join('') + (hits.length > mostListed ? `\n  and ${hits.length - mostListed} more` : '');
}

const mostListed = 20;
