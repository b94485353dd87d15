import { InputError } from '../findings/input-error.ts';
import { lineNumber } from './lines/line-index.ts';
import { type ModelInput, type OpenedFile, openFiles } from './open.ts';
import { withoutOurLines } from './write/append-sets.ts';

/** SHA-256 as the host makes it: raw over some bytes, and in hex over pieces one after the other. */
export interface Hashing {
  readonly sha256: (bytes: Uint8Array) => Uint8Array;
  readonly hexOf: (pieces: readonly Uint8Array[]) => string;
}

/**
 * The files of one building with their lines indexed. A digest leaves out what an earlier run of ours wrote into its
 * file. Throws an InputError for what is no IFC file, for one that is cut off, and for one model given twice.
 */
export function wholeFiles(inputs: readonly ModelInput[], { sha256, hexOf }: Hashing): OpenedFile[] {
  const files = openFiles(inputs, () => '').map((file) => {
    const { index } = file;
    const { cutOff } = index.damage;
    if (cutOff !== null) {
      const line = lineNumber(index.bytes, cutOff.offset);
      const where = `it ends ${cutOff.where} (line ${line}, byte ${cutOff.offset})`;
      throw new InputError(file.name, `the file is cut off: ${where}; copy or export it again`);
    }
    return { ...file, sha256: hexOf(withoutOurLines(index, sha256)) };
  });
  for (const [place, { name, sha256: own }] of files.entries()) {
    const twin = files.find((other, at) => at < place && other.sha256 === own);
    if (twin !== undefined)
      throw new InputError(name, `is the same model as ${twin.name}; name each file of the building once`, { exit: 2 });
  }
  return files;
}
