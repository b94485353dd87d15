import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { gunzipSync } from 'fflate';

export interface ModelFile {
  readonly name: string;
  readonly path: string;
  /** The IFC text, unpacked where it lies packed. */
  readonly read: () => Uint8Array;
}

const samples = resolve(import.meta.dirname, '../../sample-models');
const shared = resolve(import.meta.dirname, '../../../shared/models');

/** IFC files of sample-models/, by name; the open set in its worked/ has a test of its own. */
export const sampleModels = (): readonly ModelFile[] =>
  modelsIn(samples).filter(({ name }) => !name.startsWith('worked/'));

/** Models of other people that may lie beside a checkout; null where they do not, and a test has to say so. */
export const sharedModels = (): readonly ModelFile[] | null => (existsSync(shared) ? modelsIn(shared) : null);

function modelsIn(folder: string): ModelFile[] {
  if (!existsSync(folder)) return [];
  return readdirSync(folder, { recursive: true, encoding: 'utf8' })
    .filter((name) => /\.ifc(\.gz)?$/.test(name))
    .sort()
    .map((name) => {
      const path = join(folder, name);
      return {
        name,
        path,
        read: () => (name.endsWith('.gz') ? gunzipSync(readFileSync(path)) : new Uint8Array(readFileSync(path))),
      };
    });
}
