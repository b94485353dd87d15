// Builds dist/ from src/: types and modules by tsc, then the schemas and whatever the page needs beside them.
import { spawnSync } from 'node:child_process';
import { chmodSync, copyFileSync, existsSync, mkdirSync, readdirSync, renameSync, rmSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { build } from 'esbuild';
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

// The command line in few files, each part loaded when its verb runs: a third of the time to start went into finding
// and reading hundreds of small ones. The library stays module by module.
const cli = join(dist, 'cli');
const bundled = await build({
  entryPoints: [join(src, 'cli/main.ts')],
  outdir: cli,
  chunkNames: 'part-[hash]',
  bundle: true,
  splitting: true,
  packages: 'external',
  platform: 'node',
  format: 'esm',
  target: 'node20',
  logLevel: 'error',
}).then(
  () => true,
  () => false,
);
const main = join(cli, 'main.js');
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
process.exitCode = types.status === 0 && page && bundled ? 0 : 1;
