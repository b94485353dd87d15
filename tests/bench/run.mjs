// Bundles one benchmark and runs it: `npm run bench` for all, `npm run bench -- reading` for one. Prints figures, judges none.

import { spawnSync } from 'node:child_process';
import { mkdirSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { build } from 'esbuild';

const here = fileURLToPath(new URL('.', import.meta.url));
const root = join(here, '../..');
const out = join(root, 'out/bench');
mkdirSync(out, { recursive: true });
const wanted = process.argv.slice(2);
const known = readdirSync(here).flatMap((name) => /^(.+)\.bench\.ts$/.exec(name)?.[1] ?? []);
for (const name of known.filter((one) => wanted.length === 0 || wanted.includes(one))) {
  const outfile = join(out, `${name}.mjs`);
  await build({
    entryPoints: [join(here, `${name}.bench.ts`)],
    outfile,
    bundle: true,
    platform: 'node',
    format: 'esm',
    target: 'node20',
    packages: 'external',
    logLevel: 'error',
  });
  const { status } = spawnSync(process.execPath, ['--expose-gc', outfile], { cwd: root, stdio: 'inherit' });
  if (status !== 0) process.exitCode = 1;
}
