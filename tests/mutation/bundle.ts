import { readFileSync } from 'node:fs';
import { dirname, relative, resolve } from 'node:path';
import { build, type Plugin } from 'esbuild';

/** One test file with all it imports, as the text of a function body; sources by path where they stand changed. */
export async function bundle(testFile: string, changed: ReadonlyMap<string, string>): Promise<string> {
  const root = resolve('.');
  const plugin: Plugin = {
    name: 'mutants',
    setup: ({ onLoad }) => {
      onLoad({ filter: /\.ts$/ }, ({ path }) => {
        const text = changed.get(relative(root, path)) ?? readFileSync(path, 'utf8');
        const contents = text
          .replaceAll('import.meta.dirname', JSON.stringify(dirname(path)))
          .replaceAll('import.meta.url', JSON.stringify(`file://${path}`));
        return { contents, loader: 'ts' };
      });
    },
  };
  const { outputFiles } = await build({
    entryPoints: [testFile],
    bundle: true,
    write: false,
    platform: 'node',
    format: 'cjs',
    target: 'node20',
    packages: 'external',
    logLevel: 'error',
    plugins: [plugin],
  });
  return outputFiles![0]!.text;
}
