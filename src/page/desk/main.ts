import { fromBase64 } from '../../deliver/base64.ts';
import type { DeskParts } from '../../deliver/desk-html.ts';
import { openDesk } from './open-desk.ts';

/** Unpacks tables and worker from the file and opens the empty page. */
async function start(): Promise<void> {
  const host = document.getElementById('page');
  const packed = document.getElementById('desk-parts')?.textContent;
  if (host === null || packed == null) throw new Error('the page holds no tables');
  const plain = new Blob([fromBase64(packed)]).stream().pipeThrough(new DecompressionStream('deflate-raw'));
  openDesk(host, (await new Response(plain).json()) as DeskParts);
  document.documentElement.dataset.ready = 'yes';
}

start().catch((reason: unknown) => {
  const host = document.getElementById('page') ?? document.body;
  const note = document.createElement('p');
  note.className = 'broken';
  note.textContent = `This file is damaged and cannot be used (${reason instanceof Error ? reason.message : String(reason)}). Make it anew with: drainwright desk -o DESK.html`;
  host.replaceChildren(note);
  document.documentElement.dataset.ready = 'no';
});
