import { gzipSync, zipSync } from 'fflate';
import { mendSets } from '../deliver/mend-sets.ts';
import { propertySets, type TargetFile } from '../deliver/property-sets.ts';
import { appendSets } from '../ifc/write/append-sets.ts';
import type { PropertySetToWrite } from '../model/property-set.ts';
import type { MendResult } from '../schedule/mend.ts';
import { programVersion } from './program-version.ts';
import { type ModelRun, sha256 } from './run-model.ts';

/** The bytes of the sized copy, packed where the name of the output says so. The same input gives the same bytes. */
export function sizedIfc(run: ModelRun<unknown>, out: string): readonly Uint8Array[] {
  return withSets(run, propertySets(run.result, sourceOf(run)), out);
}

/** The sized copy with the changes of a plan on the elements that they concern. */
export function mendedIfc(run: ModelRun<unknown>, plan: MendResult, out: string): readonly Uint8Array[] {
  const source = sourceOf(run);
  return withSets(run, [...propertySets(run.result, source), ...mendSets(plan, run.result, source.file)], out);
}

function sourceOf({ model }: ModelRun<unknown>): TargetFile {
  const source = model.files[0];
  if (source === undefined) throw new Error('a model of no file');
  return { file: source.name, metresPerUnit: source.lengthUnit.metres };
}

function withSets(
  { file }: ModelRun<unknown>,
  sets: readonly PropertySetToWrite[],
  out: string,
): readonly Uint8Array[] {
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
