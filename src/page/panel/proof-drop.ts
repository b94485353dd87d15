import { sha256 } from '../../deliver/sha256.ts';
import { InputError } from '../../findings/input-error.ts';
import { modelOf, type OpenedFile, openFiles } from '../../ifc/open.ts';
import { withoutOurLines } from '../../ifc/write/append-sets.ts';
import { joined } from '../joined.ts';
import { type ModelDifference, modelDifference, type Row } from '../model-difference.ts';
import type { Desk } from './desk.ts';
import { make } from './element.ts';
import { fixtureName, pipeName, shown } from './names.ts';

/** Tells whether an IFC file is the one this page was made from, and if not what differs. The file is read here and goes nowhere. */
export function proofDrop(desk: Desk): HTMLElement {
  const { building, words, announce } = desk;
  const answer = make('div', { class: 'proof-answer', role: 'status' });
  const models = building.result.models ?? [building.result.model];
  const say = (kind: string, text: string, ...lines: readonly string[]): void => {
    answer.className = `proof-answer ${kind}`;
    answer.replaceChildren(
      make('p', {}, text),
      ...(lines.length === 0 ? [] : [make('ul', {}, ...lines.map((line) => make('li', {}, line)))]),
    );
  };
  const check = async (file: File): Promise<void> => {
    const name = shown(file.name);
    say('', words.proof.reading);
    try {
      const bytes = new Uint8Array(await file.arrayBuffer());
      // A word before the work: a large file takes seconds.
      await new Promise((done) => requestAnimationFrame(() => setTimeout(done)));
      const [opened] = openFiles([{ name: file.name, bytes }], () => '');
      if (opened === undefined) throw new Error('no file was opened');
      const hash = await modelHash(opened);
      if (models.some((model) => model.sha256 === hash)) say('same', words.proof.same(name));
      else
        say('other', words.proof.other(name), ...differenceLines(desk, modelDifference(building, modelOf([opened]))));
    } catch (error) {
      if (!(error instanceof InputError)) throw error;
      say('other', words.proof.other(name), words.proof.unread);
    }
    announce(answer.textContent ?? '');
  };
  const input = make('input', {
    type: 'file',
    id: 'proof',
    accept: '.ifc,.ifczip,.gz,.zip',
    onchange: () => {
      const file = input.files?.[0];
      if (file !== undefined) void check(file);
    },
  });
  return make(
    'section',
    {
      class: 'proof',
      ondragover: (event: DragEvent) => event.preventDefault(),
      ondrop: (event: DragEvent) => {
        event.preventDefault();
        // Elsewhere on a page that checks models it would be checked.
        event.stopPropagation();
        const file = event.dataTransfer?.files[0];
        if (file !== undefined) void check(file);
      },
    },
    make('h3', {}, make('label', { for: 'proof' }, words.proof.title)),
    make('p', { class: 'quiet' }, words.proof.hint),
    input,
    answer,
  );
}

const mostNames = 6;

function differenceLines({ building, words }: Desk, { missing, moved, resized, elements }: ModelDifference): string[] {
  const names = (rows: readonly Row[]): string => {
    const some = rows
      .slice(0, mostNames)
      .map(({ is, row }) => (is === 'pipe' ? pipeName : fixtureName)(building, words, row))
      .join(', ');
    return rows.length > mostNames ? `${some} …` : some;
  };
  const line = (rows: readonly Row[] | null, say: (count: number, names: string) => string): string[] =>
    rows === null || rows.length === 0 ? [] : [say(rows.length, names(rows))];
  const lines = [
    ...line(missing, words.proof.missing),
    ...line(moved, words.proof.moved),
    ...line(resized, words.proof.resized),
    ...(elements.here === elements.page ? [] : [words.proof.elements(elements.here, elements.page)]),
  ];
  return lines.length > 0 ? lines : [words.proof.alike];
}

/** As the program takes it: over the unpacked bytes without what an earlier run of ours wrote into them. */
async function modelHash({ index }: OpenedFile): Promise<string> {
  const whole = joined(withoutOurLines(index, sha256));
  // A page opened from disk is not everywhere trusted with the browser's own digest.
  const digest =
    crypto.subtle === undefined ? sha256(whole) : new Uint8Array(await crypto.subtle.digest('SHA-256', whole));
  return [...digest].map((byte) => byte.toString(16).padStart(2, '0')).join('');
}
