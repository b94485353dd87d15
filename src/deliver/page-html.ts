import { base64 } from './base64.ts';
import type { PageData } from './page-data.ts';
import { packPage } from './page-pack.ts';
import { sha256 } from './sha256.ts';

/** Script and style of the page as the build made them; both go into the file whole. */
export interface PageBundle {
  readonly js: string;
  readonly css: string;
}

/**
 * One HTML file that needs nothing else: no server, no network, no second file. Its policy lets only this very
 * script and style run and nothing be fetched; the model's words travel packed, so none of them is ever markup.
 */
export function pageHtml(data: PageData, { js, css }: PageBundle): string {
  if (/<\/script/i.test(js) || /<\/style/i.test(css)) throw new Error('the page bundle would close its own tag');
  const hash = (text: string): string => `'sha256-${base64(sha256(text))}'`;
  const policy = [
    "default-src 'none'",
    `script-src ${hash(js)}`,
    `style-src ${hash(css)}`,
    'img-src data: blob:',
    "base-uri 'none'",
    "form-action 'none'",
  ].join('; ');
  const { model, models } = data.result;
  const title = escaped(`${(models ?? [model]).map(({ file }) => file).join(', ')} · Drainwright`);
  return `<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta http-equiv="Content-Security-Policy" content="${policy}">
<meta name="viewport" content="width=device-width, initial-scale=1">
<meta name="referrer" content="no-referrer">
<meta name="color-scheme" content="light dark">
<title>${title}</title>
<style>${css}</style>
</head>
<body>
<noscript><p>This page draws the model with a script of its own. Allow scripts for this file to see it; nothing is sent anywhere.</p></noscript>
<div id="page"></div>
<script type="text/plain" id="page-data">${base64(packPage(data))}</script>
<script>${js}</script>
</body>
</html>
`;
}

/** The only words of the model outside the packed data are in the title. */
const escaped = (text: string): string =>
  text.slice(0, 200).replace(/[&<>"']/g, (character) => `&#${character.charCodeAt(0)};`);
