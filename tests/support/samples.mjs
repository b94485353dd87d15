// Writes sample-models/*.ifc again from their .piping texts. The writer is TypeScript: bundled in memory, then run.
import { resolve } from 'node:path';
import { build } from 'esbuild';

const { outputFiles } = await build({
  entryPoints: ['tests/support/write-samples.ts'],
  bundle: true,
  write: false,
  platform: 'node',
  format: 'esm',
  // Code in memory has no folder of its own.
  define: { 'import.meta.dirname': JSON.stringify(resolve('tests/support')) },
});
await import(`data:text/javascript;base64,${Buffer.from(outputFiles[0].contents).toString('base64')}`);
