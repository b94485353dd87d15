import { fromBase64 } from '../deliver/base64.ts';
import { unpackPage } from '../deliver/page-pack.ts';
import { openModel } from './open-model.ts';

/** Unpacks what stands in the file and opens the page on it. */
async function start(): Promise<void> {
  const host = document.getElementById('page');
  const packed = document.getElementById('page-data')?.textContent;
  if (host === null || packed == null) throw new Error('the page holds no data');
  const plain = new Blob([fromBase64(packed)]).stream().pipeThrough(new DecompressionStream('deflate-raw'));
  const data = unpackPage(new Uint8Array(await new Response(plain).arrayBuffer()));
  openModel(host, data);
  document.documentElement.dataset.ready = 'yes';
}

start().catch((reason: unknown) => {
  const host = document.getElementById('page') ?? document.body;
  const note = document.createElement('p');
  note.className = 'broken';
  note.textContent = `This file is damaged and cannot be shown (${reason instanceof Error ? reason.message : String(reason)}). Make it anew with: drainwright view MODEL -o PAGE.html`;
  host.replaceChildren(note);
  document.documentElement.dataset.ready = 'no';
});
