import { readFileSync } from 'node:fs';

/** As `package.json` states it; found from `dist/cli/` and from `src/cli/` alike. */
export function programVersion(): string {
  const text = readFileSync(new URL('../../package.json', import.meta.url), 'utf8');
  const { version } = JSON.parse(text) as { readonly version: string };
  return version;
}
