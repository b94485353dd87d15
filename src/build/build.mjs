// Builds dist/ from src/: types and modules by tsc, then the schemas and whatever the page needs beside them.
import { spawnSync } from 'node:child_process';
import { chmodSync, copyFileSync, existsSync, mkdirSync, readdirSync, renameSync, rmSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { buildPage } from './build-page.mjs';

const root = fileURLToPath(new URL('../..', import.meta.url));
const src = join(root, 'src');
const target = join(root, 'dist');
// Built beside and then moved: whoever runs the program meanwhile has the old one or the new one, never a part.
const dist = join(root, `dist.${process.pid}.tmp`);

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

// The page is one script for the browser; its own file knows how it is bundled.
const page = await buildPage({ root, dist }).then(
  () => true,
  (error) => {
    console.error(error);
    return false;
  },
);

const main = join(dist, 'cli/main.js');
if (existsSync(main)) chmodSync(main, 0o755);

// The empty page is published ready made.
if (page && existsSync(main))
  spawnSync(process.execPath, [main, 'desk', '-o', join(dist, 'desk.html')], {
    stdio: ['ignore', 'ignore', 'inherit'],
  });

const old = `${target}.${process.pid}.old.tmp`;
if (existsSync(target)) renameSync(target, old);
renameSync(dist, target);
rmSync(old, { recursive: true, force: true });
process.exitCode = types.status === 0 && page ? 0 : 1;
