// Bundles the mutation runner and runs it: `npm run mutants`. It is TypeScript, as what it reads.
import { join, resolve } from 'node:path';
import { build } from 'esbuild';

const outfile = resolve('out/mutation/main.mjs');
await build({
  entryPoints: [join(import.meta.dirname, 'main.ts')],
  outfile,
  bundle: true,
  platform: 'node',
  format: 'esm',
  target: 'node20',
  packages: 'external',
  logLevel: 'error',
});
await import(outfile);
