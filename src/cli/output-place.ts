import { lstat, realpath, stat } from 'node:fs/promises';
import { basename, dirname, join, resolve } from 'node:path';
import { InputError } from '../findings/input-error.ts';
import { type FileIdentity, identityOf, isSameFile } from './read-input.ts';
import { reasonOf, systemCode } from './system-errors.ts';

export interface OutputPlace {
  /** Where the file goes, symbolic links followed. */
  readonly path: string;
  /** Permissions of the file that is replaced; null for a new one. */
  readonly mode: number | null;
}

/**
 * Where an output may go. Refused (exit 2): an input, under this or any other name, unless `inPlace`; and `-`.
 * Refused (exit 3): a folder, a device, a link that leads nowhere, a folder that is not there.
 */
export async function outputPlace(
  out: string,
  inputs: readonly { readonly identity: FileIdentity | null }[],
  inPlace: boolean,
): Promise<OutputPlace> {
  if (out === '-' || out === '')
    throw new InputError(out, 'a file name is needed: the output is written whole or not at all', { exit: 2 });
  const path = await followed(out);
  const found = await statOf(path, out);
  if (found === null) return { path, mode: null };
  if (found.isDirectory()) throw new InputError(out, 'cannot be written: it is a folder');
  if (!found.isFile()) throw new InputError(out, 'cannot be written: it is a pipe, socket or device');
  if (!inPlace && inputs.some(({ identity }) => isSameFile(identity, identityOf(found))))
    throw new InputError(out, 'is the input itself; give another name, or --in-place to replace it', { exit: 2 });
  return { path, mode: Number(found.mode & 0o777n) };
}

async function followed(out: string): Promise<string> {
  try {
    return await realpath(out);
  } catch (error) {
    if (systemCode(error) !== 'ENOENT')
      throw new InputError(out, `cannot be written: ${reasonOf(error)}`, { cause: error });
  }
  const link = await lstat(out).catch(() => null);
  if (link !== null) throw new InputError(out, 'cannot be written: it is a symbolic link that leads nowhere');
  try {
    const folder = await realpath(dirname(resolve(out)));
    return join(folder, basename(resolve(out)));
  } catch (error) {
    const why = systemCode(error) === 'ENOENT' ? `there is no folder ${dirname(out)}` : reasonOf(error);
    throw new InputError(out, `cannot be written: ${why}`, { cause: error });
  }
}

async function statOf(path: string, out: string) {
  try {
    return await stat(path, { bigint: true });
  } catch (error) {
    if (systemCode(error) === 'ENOENT') return null;
    throw new InputError(out, `cannot be written: ${reasonOf(error)}`, { cause: error });
  }
}
