import { InputError } from '../../findings/input-error.ts';
import type { PropertySetToWrite } from '../../model/property-set.ts';
import type { LineIndex } from '../lines/line-index.ts';
import { beginMark, endMark } from '../lines/own-block.ts';
import { AsciiLines } from './ascii-lines.ts';
import type { Digest } from './derive-global-id.ts';
import { type OurClass, ourGlobalId, type Target } from './our-ids.ts';
import { ownerHistory } from './owner-history.ts';
import { stepString, stepValue } from './step-text.ts';

export interface AppendOptions {
  /** What an error calls the file. */
  readonly name: string;
  readonly digest: Digest;
  /** Version of the program, for an owner history of our own. */
  readonly version: string;
}

/** A property set with the record that it goes on. */
export interface ResolvedSet extends PropertySetToWrite {
  readonly target: Target;
}

/** Our lines between their marks, ids from `firstId`, values before their set, a set before its relation. */
export function writtenBlock(
  index: LineIndex,
  sets: readonly ResolvedSet[],
  firstId: number,
  { name, digest, version }: AppendOptions,
): Uint8Array[] {
  const block = new AsciiLines(index.eol);
  const owner = ownerHistory(index, firstId, version);
  const sharing = new Map<string, number>();
  for (const { name: set, target } of sets) {
    const key = JSON.stringify([set, target.globalId]);
    sharing.set(key, (sharing.get(key) ?? 0) + 1);
  }
  block.line(beginMark);
  owner.records.forEach((record) => {
    block.line(record);
  });
  let id = firstId + owner.records.length;
  // A value that many elements share is written once: it halves what is added to a large model.
  const known = new Map<string, number>();
  for (const { name: set, target, properties } of sets) {
    const values = properties.map((property) => {
      const text = `${stepString(property.name)},$,${stepValue(property.value)},$`;
      const found = known.get(text);
      if (found !== undefined) return found;
      block.line(`#${id}=IFCPROPERTYSINGLEVALUE(${text});`);
      known.set(text, id);
      return id++;
    });
    const alone = sharing.get(JSON.stringify([set, target.globalId])) === 1;
    const gid = (line: OurClass): string => ourGlobalId(digest, target, set, line, alone);
    const members = values.map((value) => `#${value}`).join(',');
    const { reference } = owner;
    block.line(`#${id}=IFCPROPERTYSET('${gid('IFCPROPERTYSET')}',${reference},${stepString(set)},$,(${members}));`);
    const relation = `'${gid('IFCRELDEFINESBYPROPERTIES')}',${reference},$,$,(#${target.stepId}),#${id}`;
    block.line(`#${id + 1}=IFCRELDEFINESBYPROPERTIES(${relation});`);
    id += 2;
  }
  block.line(endMark);
  if (id - 1 > largestId)
    throw new InputError(name, `its largest number, #${firstId - 1}, leaves no room for more lines`);
  return block.pieces();
}

const largestId = 4_294_967_295;
