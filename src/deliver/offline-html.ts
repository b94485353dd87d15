import { base64 } from './base64.ts';
import { htmlHead } from './html-head.ts';
import { sha256 } from './sha256.ts';

/** Script and style of a page as the build made them; both go into the file whole. */
export interface PageBundle {
  readonly js: string;
  readonly css: string;
}

export interface OfflineHtml extends PageBundle {
  readonly title: string;
  /** Shown where scripts are off. */
  readonly noScript: string;
  /** What the script unpacks: id of its block, and bytes. */
  readonly data: { readonly id: string; readonly bytes: Uint8Array };
  /** What the policy allows beyond this very script, this style and images of its own. */
  readonly allow?: readonly string[];
}

/**
 * One HTML file that needs nothing else: no server, no network, no second file. Its policy lets only this very
 * script and style run and nothing be fetched; the data travels packed, so no word in it is ever markup.
 */
export function offlineHtml({ title, noScript, js, css, data, allow = [] }: OfflineHtml): string {
  if (/<\/script/i.test(js) || /<\/style/i.test(css)) throw new Error('the page bundle would close its own tag');
  const policy = [
    "default-src 'none'",
    `script-src ${hashSource(js)}`,
    `style-src ${hashSource(css)}`,
    'img-src data: blob:',
    ...allow,
    "base-uri 'none'",
    "form-action 'none'",
  ].join('; ');
  return `${htmlHead({ policy, title: `<title>${escaped(title)}</title>`, style: css, darkAndLight: true })}
<body>
<noscript><p>${noScript}</p></noscript>
<div id="page"></div>
<script type="text/plain" id="${data.id}">${base64(data.bytes)}</script>
<script>${js}</script>
</body>
</html>
`;
}

/** What lets this very text run, or style, and no other. */
export const hashSource = (text: string): string => `'sha256-${base64(sha256(text))}'`;

/** The only words from outside that stand beside the packed data are in the title. */
const escaped = (text: string): string =>
  text.slice(0, 200).replace(/[&<>"']/g, (character) => `&#${character.charCodeAt(0)};`);
