// Bundles src/page for the browser into dist/page: script and style that `view` puts into the file it writes, and those of `desk`.
import { mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { build } from 'esbuild';

const options = {
  bundle: true,
  minify: true,
  write: false,
  target: 'es2022',
  legalComments: 'none',
  charset: 'utf8',
};

/** Writes `bundle.js` and `bundle.css`, `desk-bundle.js` and `desk-bundle.css`, and `desk-worker.js` into `dist/page`. */
export async function buildPage({ root, dist }) {
  const [page, desk] = await Promise.all([bundlePage(root), bundleDesk(root)]);
  const folder = join(dist, 'page');
  mkdirSync(folder, { recursive: true });
  writeFileSync(join(folder, 'bundle.js'), page.js);
  writeFileSync(join(folder, 'bundle.css'), page.css);
  writeFileSync(join(folder, 'desk-bundle.js'), desk.js);
  writeFileSync(join(folder, 'desk-bundle.css'), desk.css);
  writeFileSync(join(folder, 'desk-worker.js'), desk.worker);
}

/** Script and style of the page. Deterministic: equal sources give equal bytes. */
export const bundlePage = (root) => bundlePair(root, 'main.ts', 'style.css');

/** Script and style of the empty page, and the script of the worker that it starts. */
export async function bundleDesk(root) {
  const [pair, worker] = await Promise.all([
    bundlePair(root, 'desk/main.ts', 'desk.css'),
    scriptOf(root, 'desk/worker.ts'),
  ]);
  return { ...pair, worker };
}

async function bundlePair(root, script, style) {
  const [js, css] = await Promise.all([
    scriptOf(root, script),
    build({ ...options, entryPoints: [join(root, 'src/page', style)] }),
  ]);
  const licence = readFileSync(join(root, 'node_modules/three/LICENSE'), 'utf8').trim();
  return { js: `/* Contains three.js.\n${licence}\n*/\n${js}`, css: css.outputFiles[0].text };
}

async function scriptOf(root, script) {
  const entryPoints = [join(root, 'src/page', script)];
  const built = await build({ ...options, entryPoints, format: 'iife', platform: 'browser' });
  return built.outputFiles[0].text;
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
  const root = fileURLToPath(new URL('../..', import.meta.url));
  await buildPage({ root, dist: join(root, 'dist') });
}
