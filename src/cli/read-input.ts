import { type BigIntStats, constants } from 'node:fs';
import { type FileHandle, open } from 'node:fs/promises';
import { basename } from 'node:path';
import { InputError } from '../findings/input-error.ts';
import { reasonOf } from './system-errors.ts';

export interface InputFile {
  readonly bytes: Uint8Array;
  /** Base name; `standard input` for `-`. */
  readonly name: string;
  /** Which file on which disk it is; null for standard input. Two paths with the same pair are one file. */
  readonly identity: FileIdentity | null;
}

export interface FileIdentity {
  readonly device: bigint;
  readonly inode: bigint;
}

/** Reads a whole file, or standard input for `-`. What is no readable, settled, non-empty file is an InputError. */
export async function readInput(path: string, stdin: NodeJS.ReadStream = process.stdin): Promise<InputFile> {
  if (path === '-') return { bytes: await readStream(stdin), name: 'standard input', identity: null };
  const file = await opened(path);
  try {
    const before = await file.stat({ bigint: true });
    refuseOddities(path, before);
    const bytes = await file.readFile();
    const after = await file.stat({ bigint: true });
    if (after.size !== before.size || after.mtimeNs !== before.mtimeNs || BigInt(bytes.length) !== before.size)
      throw new InputError(path, 'the file changed while it was read; try again when nothing writes to it');
    const whole = new Uint8Array(bytes.buffer, bytes.byteOffset, bytes.length);
    return { bytes: whole, name: basename(path), identity: identityOf(before) };
  } catch (error) {
    if (error instanceof InputError) throw error;
    throw new InputError(path, `cannot be read: ${reasonOf(error)}`, { cause: error });
  } finally {
    await file.close();
  }
}

/** The files of one building, in the order given. One named twice, by whatever path, is wrong usage. */
export async function readInputs(paths: readonly string[]): Promise<InputFile[]> {
  if (paths.filter((path) => path === '-').length > 1)
    throw new InputError('-', 'standard input can be one of the files, not several', { exit: 2 });
  const inputs: InputFile[] = [];
  for (const path of paths) {
    const input = await readInput(path);
    if (inputs.some(({ identity }) => isSameFile(identity, input.identity)))
      throw new InputError(path, 'is named twice; name each file of the building once', { exit: 2 });
    inputs.push(input);
  }
  return inputs;
}

export const isSameFile = (a: FileIdentity | null, b: FileIdentity | null): boolean =>
  a !== null && b !== null && a.device === b.device && a.inode === b.inode;

/** A UTF-8 text file (answers, tables), a byte order mark taken off. */
export async function readText(path: string): Promise<string> {
  const { bytes } = await readInput(path);
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch (error) {
    throw new InputError(path, 'is not UTF-8 text; save it as UTF-8', { cause: error });
  }
}

export const identityOf = ({ dev, ino }: BigIntStats): FileIdentity => ({ device: dev, inode: ino });

/** Opened without waiting: a FIFO that nobody writes to must not hang the program. */
async function opened(path: string): Promise<FileHandle> {
  try {
    return await open(path, constants.O_RDONLY | (constants.O_NONBLOCK ?? 0));
  } catch (error) {
    throw new InputError(path, `cannot be read: ${reasonOf(error)}`, { cause: error });
  }
}

function refuseOddities(path: string, stat: BigIntStats): void {
  if (stat.isDirectory()) throw new InputError(path, 'is a folder; give the path of one IFC file');
  if (!stat.isFile())
    throw new InputError(path, 'is no regular file but a pipe, socket or device; hand it in with `-` instead');
  if (stat.size === 0n) throw new InputError(path, 'the file is empty');
  if (stat.size > largestFile)
    throw new InputError(path, `has ${stat.size / megabyte} MB; files up to ${largestFile / megabyte} MB are read`);
}

const megabyte = 1_000_000n;
/** What one read of this runtime takes, 2 GiB less one byte. */
const largestFile = 2n ** 31n - 1n;

async function readStream(stdin: NodeJS.ReadStream): Promise<Uint8Array> {
  if (stdin.isTTY)
    throw new InputError('-', 'nothing is piped into standard input; give a file, or `… < model.ifc`', { exit: 2 });
  const chunks: Buffer[] = [];
  let length = 0;
  try {
    for await (const chunk of stdin) {
      const piece = Buffer.from(chunk);
      chunks.push(piece);
      length += piece.length;
      if (length > Number(largestFile)) throw new InputError('standard input', 'is larger than 2 GiB');
    }
  } catch (error) {
    if (error instanceof InputError) throw error;
    throw new InputError('standard input', `cannot be read: ${reasonOf(error)}`, { cause: error });
  }
  if (length === 0) throw new InputError('standard input', 'is empty');
  const whole = Buffer.concat(chunks, length);
  return new Uint8Array(whole.buffer, whole.byteOffset, length);
}
