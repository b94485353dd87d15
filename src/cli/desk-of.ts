import { deskHtml } from '../deliver/desk-html.ts';
import { standardCode } from '../schedule/code-book.ts';
import { codesOf, openCode } from '../tables/open-family.ts';
import { builtPart } from './page-of.ts';
import { programVersion } from './program-version.ts';
import { ownTables } from './tables-on-disk.ts';

/** The empty page as the bytes of one HTML file, with our tables in it. */
export function deskOf(): Uint8Array {
  const source = ownTables();
  const codes = codesOf(source).map((id) => {
    const { code, title, edition } = openCode(source, id);
    return { id: code, title, edition };
  });
  const parts = {
    version: programVersion(),
    tables: Object.fromEntries(source.list().map((path) => [path, source.read(path)])),
    codes,
    standard: standardCode,
    worker: builtPart('desk-worker.js'),
  };
  const html = deskHtml(parts, { js: builtPart('desk-bundle.js'), css: builtPart('desk-bundle.css') });
  return new TextEncoder().encode(html);
}
