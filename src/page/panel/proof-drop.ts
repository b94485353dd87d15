import { sha256 } from '../../deliver/sha256.ts';
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
    const hash = await hashOf(withoutOurs(new Uint8Array(await file.arrayBuffer())));
    const same = hashes.includes(hash);
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

const begin = '/* Drainwright 1 begin */';
const end = '/* Drainwright 1 end */';

/** The hash is taken over the bytes without the block that `size` writes, line break after it included. */
export function withoutOurs(bytes: Uint8Array<ArrayBuffer>): Uint8Array<ArrayBuffer> {
  const from = find(bytes, begin, 0);
  const last = from < 0 ? -1 : find(bytes, end, from);
  if (last < 0) return bytes;
  let to = last + end.length;
  if (bytes[to] === 13) to++;
  if (bytes[to] === 10) to++;
  const rest = new Uint8Array(bytes.length - (to - from));
  rest.set(bytes.subarray(0, from));
  rest.set(bytes.subarray(to), from);
  return rest;
}

function find(bytes: Uint8Array, text: string, from: number): number {
  const wanted = new TextEncoder().encode(text);
  const first = wanted[0]!;
  for (let at = bytes.indexOf(first, from); at >= 0; at = bytes.indexOf(first, at + 1))
    if (wanted.every((byte, index) => bytes[at + index] === byte)) return at;
  return -1;
}

async function hashOf(bytes: Uint8Array<ArrayBuffer>): Promise<string> {
  const digest =
    crypto.subtle === undefined ? sha256(bytes) : new Uint8Array(await crypto.subtle.digest('SHA-256', bytes));
  return [...digest].map((byte) => byte.toString(16).padStart(2, '0')).join('');
}
