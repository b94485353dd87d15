// Bundles src/page for the browser: one script and one style sheet in dist/page, which `view` puts into the file it writes.
import { mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { build } from 'esbuild';

/** Writes `dist/page/bundle.js` and `bundle.css`; returns their texts. */
export async function buildPage({ root, dist }) {
  const bundled = await bundlePage(root);
  mkdirSync(join(dist, 'page'), { recursive: true });
  writeFileSync(join(dist, 'page/bundle.js'), bundled.js);
  writeFileSync(join(dist, 'page/bundle.css'), bundled.css);
  return bundled;
}

/** The same without writing. Deterministic: equal sources give equal bytes. */
export async function bundlePage(root) {
  const options = {
    bundle: true,
    minify: true,
    write: false,
    target: 'es2022',
    legalComments: 'none',
    charset: 'utf8',
  };
  const [script, style] = await Promise.all([
    build({ ...options, entryPoints: [join(root, 'src/page/main.ts')], format: 'iife', platform: 'browser' }),
    build({ ...options, entryPoints: [join(root, 'src/page/style.css')] }),
  ]);
  const licence = readFileSync(join(root, 'node_modules/three/LICENSE'), 'utf8').trim();
  const js = `/* Contains three.js.\n${licence}\n*/\n${script.outputFiles[0].text}`;
  return { js, css: style.outputFiles[0].text };
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
  const root = fileURLToPath(new URL('../..', import.meta.url));
  await buildPage({ root, dist: join(root, 'dist') });
}
