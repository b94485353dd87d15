import { readdirSync, readFileSync, statSync } from 'node:fs';
import { join, relative, sep } from 'node:path';
import { fileURLToPath } from 'node:url';
import { InputError } from '../findings/input-error.ts';
import { jsonOf } from '../tables/read-json.ts';
import type { TableSource } from '../tables/table-source.ts';
import { reasonOf } from './system-errors.ts';

/** The tables that come with the program: `tables/` of the package, seen from `dist/cli/` and from `src/cli/` alike. */
export const ownTables = (): TableSource => tablesIn(fileURLToPath(new URL('../../tables', import.meta.url)), 'tables');

/** Table files of a folder of the user's, laid out as ours are: `npc/branch.json`. */
export function localTables(folder: string): TableSource {
  const source = tablesIn(folder, folder);
  if (source.list().length === 0)
    throw new InputError(folder, 'holds no table files; expected such as npc/branch.json');
  return source;
}

function tablesIn(folder: string, name: string): TableSource {
  let paths: readonly string[] | null = null;
  return {
    name,
    list: () => {
      paths ??= jsonFilesIn(folder, name);
      return paths;
    },
    read: (path) => jsonOf(readTableFile(join(folder, path), `${name}/${path}`), `${name}/${path}`),
  };
}

function jsonFilesIn(folder: string, name: string): readonly string[] {
  try {
    if (!statSync(folder).isDirectory())
      throw new InputError(name, 'is no folder; --tables takes a folder of table files');
    return readdirSync(folder, { recursive: true, encoding: 'utf8' })
      .filter((path) => path.endsWith('.json'))
      .map((path) => relative('.', path).split(sep).join('/'))
      .sort();
  } catch (error) {
    if (error instanceof InputError) throw error;
    throw new InputError(name, `cannot be read: ${reasonOf(error)}`, { cause: error });
  }
}

function readTableFile(path: string, where: string): string {
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(readFileSync(path));
  } catch (error) {
    if (error instanceof TypeError) throw new InputError(where, 'is not UTF-8 text', { cause: error });
    throw new InputError(where, `cannot be read: ${reasonOf(error)}`, { cause: error });
  }
}
