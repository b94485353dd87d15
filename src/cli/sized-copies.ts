import { mkdir, stat } from 'node:fs/promises';
import { basename, dirname, join, resolve } from 'node:path';
import { InputError } from '../findings/input-error.ts';
import { nameApart } from '../ifc/name-apart.ts';
import type { OpenedFile } from '../ifc/open.ts';
import type { WrittenFile } from '../schedule/size-text.ts';
import { outputPlace } from './output-place.ts';
import type { InputFile } from './read-input.ts';
import type { ModelRun } from './run-model.ts';
import { reasonOf } from './system-errors.ts';
import { writeNew } from './write-new.ts';

/** Where the copies go, before anything is sized: a file for one model, a folder for several, or over the inputs. */
export interface CopyPlan {
  /** Path of each file's copy as people read it, in the order of the files. */
  readonly paths: readonly string[];
  /** To be made where it is not there; null: the copies go beside other files. */
  readonly folder: string | null;
  readonly inputs: readonly InputFile[];
  readonly inPlace: boolean;
}

/** Refuses what could not be written later: InputErrors as of `outputPlace`, and one file for several models. */
export async function planCopies(
  paths: readonly string[],
  inputs: readonly InputFile[],
  { out, inPlace = false }: { readonly out?: string; readonly inPlace?: boolean },
): Promise<CopyPlan> {
  if (out === undefined || paths.length === 1) {
    const plan = { paths: out === undefined ? paths : [out], folder: null, inputs, inPlace };
    for (const path of plan.paths) await outputPlace(path, inputs, inPlace);
    return plan;
  }
  const copies = copyNames(inputs).map((name) => join(out, name));
  if (await isFolder(out)) for (const path of copies) await outputPlace(path, inputs, inPlace);
  return { paths: copies, folder: out, inputs, inPlace };
}

/** Each file that owns something of the drainage, written as its own copy; all of them where none does. */
export async function writeCopies(
  run: ModelRun<CopyPlan>,
  bytesOf: (file: OpenedFile, out: string) => readonly Uint8Array[],
): Promise<WrittenFile[]> {
  const { paths, folder, inputs, inPlace } = run.place;
  const owners = run.files.filter(({ name }) => owns(run, name));
  const wanted = owners.length === 0 ? run.files : owners;
  // All of them are made before the first is written.
  const copies = wanted.map((file) => {
    const path = paths[run.files.indexOf(file)]!;
    return { path, pieces: bytesOf(file, path) };
  });
  if (folder !== null) await makeFolder(folder);
  const written: WrittenFile[] = [];
  for (const { path, pieces } of copies)
    written.push(await writeNew(await outputPlace(path, inputs, inPlace), pieces, path));
  return written;
}

const owns = ({ result }: ModelRun<unknown>, name: string): boolean =>
  result.elements.some(({ file, use }) => file === name && use !== 'left-out' && use !== 'unresolved');

function copyNames(inputs: readonly InputFile[]): string[] {
  const taken = new Set<string>();
  return inputs.map(({ name, identity }) => {
    const own = nameApart(identity === null ? 'standard input.ifc' : basename(name), taken);
    taken.add(own);
    return own;
  });
}

/** False for one that can be made. A file of this name, or a folder in no folder, is an InputError. */
async function isFolder(path: string): Promise<boolean> {
  const found = await stat(path).catch(() => null);
  if (found?.isDirectory() === true) return true;
  if (found !== null)
    throw new InputError(path, 'is no folder; several models are written into a folder, each under its own name', {
      exit: 2,
    });
  const parent = await stat(dirname(resolve(path))).catch(() => null);
  if (parent?.isDirectory() !== true) throw new InputError(path, `cannot be made: there is no folder ${dirname(path)}`);
  return false;
}

async function makeFolder(path: string): Promise<void> {
  if (await isFolder(path)) return;
  await mkdir(path).catch((error: unknown) => {
    throw new InputError(path, `cannot be made: ${reasonOf(error)}`, { cause: error });
  });
}
