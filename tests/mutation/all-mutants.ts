import { readdirSync } from 'node:fs';
import { join } from 'node:path';
import { type Mutant, mutantsOf } from './mutants-of.ts';

/** Folders whose code decides a role, a load, a size or a verdict. */
export const mutatedFolders = ['src/codes', 'src/loads', 'src/roles', 'src/sizes', 'src/verdicts'];

/** Files of a folder and all in it, by name. */
export const filesUnder = (folder: string, ending: string): string[] =>
  readdirSync(folder, { recursive: true, encoding: 'utf8' })
    .filter((name) => name.endsWith(ending))
    .map((name) => join(folder, name))
    .sort();

/** Every mutant of those folders, its number its place in the list, and their sources with the mutants in them. */
export function allMutants(read: (file: string) => string): {
  readonly mutants: readonly Mutant[];
  readonly texts: ReadonlyMap<string, string>;
} {
  const mutants: Mutant[] = [];
  const texts = new Map<string, string>();
  for (const file of mutatedFolders.flatMap((folder) => filesUnder(folder, '.ts'))) {
    const made = mutantsOf(file, read(file), mutants.length);
    mutants.push(...made.mutants);
    texts.set(file, made.text);
  }
  return { mutants, texts };
}
