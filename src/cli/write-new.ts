import { createHash } from 'node:crypto';
import { unlinkSync } from 'node:fs';
import { type FileHandle, open, readdir, rename, unlink } from 'node:fs/promises';
import { basename, dirname, join } from 'node:path';
import { InputError } from '../findings/input-error.ts';
import type { OutputPlace } from './output-place.ts';
import { reasonOf, systemCode } from './system-errors.ts';

export interface Written {
  readonly path: string;
  readonly bytes: number;
  readonly sha256: string;
}

/**
 * Writes the pieces to `place` whole or not at all: to a temporary file beside it, flushed to the disk, then renamed
 * over it, then the folder flushed. At any moment the path holds what it held before or all of the new file.
 * A failure or an interruption takes the temporary file away; one left by a killed run goes with the next.
 */
export async function writeNew(
  { path, mode }: OutputPlace,
  pieces: Iterable<Uint8Array>,
  shown: string,
): Promise<Written> {
  await removeLeftovers(path);
  const temporary = join(dirname(path), `.${basename(path).slice(0, 200)}.${process.pid}${suffix}`);
  const release = removedOnSignal(temporary);
  try {
    const file = await open(temporary, 'wx', mode ?? 0o666);
    const written = await filled(file, pieces, mode);
    await renamed(temporary, path);
    await flushedFolder(dirname(path));
    return { path: shown, ...written };
  } catch (error) {
    await unlink(temporary).catch(() => undefined);
    if (systemCode(error) === null) throw error;
    throw new InputError(shown, `cannot be written: ${reasonOf(error)}`, { cause: error });
  } finally {
    release();
  }
}

const suffix = '.drainwright-tmp';

async function filled(
  file: FileHandle,
  pieces: Iterable<Uint8Array>,
  mode: number | null,
): Promise<{ bytes: number; sha256: string }> {
  try {
    const digest = createHash('sha256');
    let bytes = 0;
    for (const piece of pieces) {
      for (let from = 0; from < piece.length; ) {
        const part = piece.subarray(from, from + largestWrite);
        const { bytesWritten } = await file.write(part);
        digest.update(part.subarray(0, bytesWritten));
        from += bytesWritten;
      }
      bytes += piece.length;
    }
    if (mode !== null) await file.chmod(mode);
    await file.sync();
    return { bytes, sha256: digest.digest('hex') };
  } finally {
    await file.close();
  }
}

/** Small enough that an interruption is noticed soon, large enough that it costs nothing. */
const largestWrite = 1 << 24;

/** A scanner may hold a new file for a moment on some systems: the rename is tried again for up to two seconds. */
async function renamed(from: string, to: string): Promise<void> {
  for (const wait of [50, 150, 300, 500, 1000]) {
    try {
      await rename(from, to);
      return;
    } catch (error) {
      if (!['EPERM', 'EBUSY', 'EACCES'].includes(systemCode(error) ?? '')) throw error;
      await new Promise((done) => setTimeout(done, wait));
    }
  }
  await rename(from, to);
}

/** The name is safe on the disk only when the folder is; systems that cannot flush a folder are let be. */
async function flushedFolder(folder: string): Promise<void> {
  const handle = await open(folder, 'r').catch(() => null);
  if (handle === null) return;
  try {
    await handle.sync();
  } catch (error) {
    if (!['EINVAL', 'EPERM', 'EISDIR', 'EBADF', 'ENOTSUP'].includes(systemCode(error) ?? '')) throw error;
  } finally {
    await handle.close();
  }
}

/** Takes away what a run that was killed left beside the same output; a run that still lives keeps its own. */
async function removeLeftovers(path: string): Promise<void> {
  const start = `.${basename(path).slice(0, 200)}.`;
  const names = await readdir(dirname(path)).catch(() => []);
  for (const name of names) {
    if (!name.startsWith(start) || !name.endsWith(suffix)) continue;
    const owner = Number(name.slice(start.length, -suffix.length));
    if (Number.isInteger(owner) && owner > 0 && !lives(owner))
      await unlink(join(dirname(path), name)).catch(() => undefined);
  }
}

function lives(pid: number): boolean {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    return systemCode(error) === 'EPERM';
  }
}

/** On Ctrl-C or a polite end the temporary file goes, then the signal does what it always does. */
function removedOnSignal(temporary: string): () => void {
  const signals = ['SIGINT', 'SIGTERM', 'SIGHUP'] as const;
  const remove = (signal: NodeJS.Signals): void => {
    try {
      unlinkSync(temporary);
    } catch {
      // It was not there yet, or is already renamed.
    }
    release();
    process.kill(process.pid, signal);
  };
  const release = (): void => {
    for (const signal of signals) process.off(signal, remove);
  };
  for (const signal of signals) process.on(signal, remove);
  return release;
}
