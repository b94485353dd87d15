import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { join, relative, resolve } from 'node:path';
import { gunzipSync } from 'node:zlib';

const root = resolve(import.meta.dirname, '../..');
/** Open models made by others stand beside the project where they are at hand; the project's own samples always do. */
const folders = [resolve(root, '../shared/models'), resolve(root, 'sample-models')];

export interface ModelFile {
  /** Path below its folder: `road-drainage-2/DrainageSystem-2.ifc`. */
  readonly name: string;
  readonly read: () => Uint8Array;
}

export const hasOpenModels = existsSync(folders[0]!);

/** Every model at hand, open ones first, each folder in order of names. */
export const modelFiles: readonly ModelFile[] = folders.flatMap((folder) => {
  if (!existsSync(folder)) return [];
  const found = readdirSync(folder, { recursive: true, encoding: 'utf8' }).filter((name) =>
    /\.ifc(\.gz)?$/i.test(name),
  );
  return found.sort().map((name) => ({ name: relative('.', name), read: () => plain(join(folder, name)) }));
});

if (!hasOpenModels)
  console.warn('The open models (../shared/models) are not at hand: tests that read them are skipped.');

export function openModel(name: string): Uint8Array {
  return plain(join(folders[0]!, name));
}

function plain(path: string): Uint8Array {
  const bytes = readFileSync(path);
  return new Uint8Array(path.endsWith('.gz') ? gunzipSync(bytes) : bytes);
}
