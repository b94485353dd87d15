import { sha256 } from '../../deliver/sha256.ts';
import { unpack } from '../../ifc/container.ts';
import { indexLines } from '../../ifc/lines/index-lines.ts';
import { withoutOurLines } from '../../ifc/write/append-sets.ts';
import type { Desk } from './desk.ts';
import { make } from './element.ts';
import { shown } from './names.ts';

/** Tells whether an IFC file is the one this page was made from. The file is read here and goes nowhere. */
export function proofDrop({ building, words, announce }: Desk): HTMLElement {
  const answer = make('p', { class: 'proof-answer', role: 'status' });
  const hashes = (building.result.models ?? [building.result.model]).map((model) => model.sha256);
  const check = async (file: File): Promise<void> => {
    answer.textContent = words.model.proofReading;
    answer.className = 'proof-answer';
    let same = false;
    try {
      same = hashes.includes(await modelHash(file.name, new Uint8Array(await file.arrayBuffer())));
    } catch {
      // What cannot be unpacked or read as STEP is not the file either.
    }
    answer.className = `proof-answer ${same ? 'same' : 'other'}`;
    answer.textContent = same ? words.model.proofSame(shown(file.name)) : words.model.proofOther(shown(file.name));
    announce(answer.textContent);
  };
  const input = make('input', {
    type: 'file',
    id: 'proof',
    accept: '.ifc',
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
    make('h3', {}, make('label', { for: 'proof' }, words.model.proof)),
    make('p', { class: 'quiet' }, words.model.proofHint),
    input,
    answer,
  );
}

/** As the program takes it: over the unpacked bytes without what an earlier run of ours wrote into them. */
export async function modelHash(name: string, bytes: Uint8Array): Promise<string> {
  const pieces = withoutOurLines(indexLines(unpack(name, bytes).bytes), sha256);
  const whole = new Uint8Array(pieces.reduce((sum, piece) => sum + piece.length, 0));
  let at = 0;
  for (const piece of pieces) {
    whole.set(piece, at);
    at += piece.length;
  }
  // A page opened from disk is not everywhere trusted with the browser's own digest.
  const digest =
    crypto.subtle === undefined ? sha256(whole) : new Uint8Array(await crypto.subtle.digest('SHA-256', whole));
  return [...digest].map((byte) => byte.toString(16).padStart(2, '0')).join('');
}
