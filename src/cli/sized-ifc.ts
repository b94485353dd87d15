import { gzipSync, zipSync } from 'fflate';
import { mendSets } from '../deliver/mend-sets.ts';
import { propertySets, type TargetFile } from '../deliver/property-sets.ts';
import type { OpenedFile } from '../ifc/open.ts';
import { appendSets } from '../ifc/write/append-sets.ts';
import type { PropertySetToWrite } from '../model/property-set.ts';
import type { MendResult } from '../schedule/mend.ts';
import { programVersion } from './program-version.ts';
import { type ModelRun, sha256 } from './run-model.ts';

/** The bytes of a file's sized copy, packed where the name of the output says so. The same input gives the same bytes. */
export function sizedIfc(run: ModelRun<unknown>, file: OpenedFile, out: string): readonly Uint8Array[] {
  return withSets(file, propertySets(run.result, targetOf(run, file)), out);
}

/** The sized copy with the changes of a plan on the elements that they concern. */
export function mendedIfc(
  run: ModelRun<unknown>,
  plan: MendResult,
  file: OpenedFile,
  out: string,
): readonly Uint8Array[] {
  const target = targetOf(run, file);
  return withSets(file, [...propertySets(run.result, target), ...mendSets(plan, run.result, target.file)], out);
}

function targetOf({ model, files }: ModelRun<unknown>, file: OpenedFile): TargetFile {
  const source = model.files[files.indexOf(file)];
  if (source === undefined) throw new Error('a file of another run');
  return { file: source.name, metresPerUnit: source.lengthUnit.metres };
}

function withSets(file: OpenedFile, sets: readonly PropertySetToWrite[], out: string): readonly Uint8Array[] {
  const pieces = appendSets(file.index, sets, { name: file.name, digest: sha256, version: programVersion() });
  if (/\.gz$/i.test(out)) return [gzipSync(joined(pieces), { mtime: 0 })];
  if (/\.(?:ifczip|zip)$/i.test(out)) return [zipSync({ [entryName(out)]: joined(pieces) }, { mtime: firstZipDay })];
  return pieces;
}

/** Zip dates are local times: this one reads the same in every zone. */
const firstZipDay = new Date(1980, 0, 1);

const entryName = (out: string): string =>
  `${(out.split(/[\\/]/).at(-1) ?? 'model').replace(/(?:\.ifc)?\.(?:ifczip|zip)$/i, '')}.ifc`;

const joined = (pieces: readonly Uint8Array[]): Uint8Array => new Uint8Array(Buffer.concat(pieces));
