// Builds dist/ from src/: types and modules by tsc, then the schemas and whatever the page needs beside them.
import { spawnSync } from 'node:child_process';
import { chmodSync, copyFileSync, existsSync, mkdirSync, readdirSync, rmSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';

const root = fileURLToPath(new URL('..', import.meta.url));
const src = join(root, 'src');
const dist = join(root, process.argv[2] ?? 'dist');

rmSync(dist, { recursive: true, force: true });
const tsc = join(root, 'node_modules/typescript/bin/tsc');
const types = spawnSync(process.execPath, [tsc, '-p', join(src, 'tsconfig.build.json'), '--outDir', dist], {
  stdio: 'inherit',
});

for (const name of readdirSync(src, { recursive: true, encoding: 'utf8' })) {
  if (!name.endsWith('.schema.json')) continue;
  mkdirSync(dirname(join(dist, name)), { recursive: true });
  copyFileSync(join(src, name), join(dist, name));
}

// The page is one script for the browser; its own folder knows how it is bundled.
const page = join(root, 'scripts/build-page.mjs');
if (existsSync(page)) await (await import(pathToFileURL(page).href)).buildPage({ root, dist });

const main = join(dist, 'cli/main.js');
if (existsSync(main)) chmodSync(main, 0o755);
process.exitCode = types.status ?? 1;
