import { createHash } from 'node:crypto';
import { readModel } from '../../src/ifc/open.ts';
import type { Model } from '../../src/model/model.ts';
import { runModel } from './run-sketch.ts';
import type { Sketch } from './sketch.ts';
import { type IfcOptions, ifcOf } from './write-ifc.ts';

const sha256 = (bytes: Uint8Array): string => createHash('sha256').update(bytes).digest('hex');

/** What the program says of every pipe and fixture, by GlobalId: role, portion, loads, size; kind, load, trap, vent. */
export function answerOf(model: Model, code = 'npc-2020'): ReadonlyMap<string, string> {
  const { result } = runModel(model, { code });
  const answers = new Map<string, string>();
  for (const { globalId, name, role, also, portion, load, ventLoad, required } of result.pipes) {
    const size = `${required?.least?.label ?? '-'} to ${required?.most?.label ?? '-'}`;
    const vent = ventLoad === undefined ? '' : ` vents ${ventLoad.least} to ${ventLoad.most}`;
    const words = [role, ...also, portion ?? ''].join(' ');
    answers.set(globalId, `${name}: ${words}, ${load.least} to ${load.most}${vent}, ${size}`);
  }
  for (const { globalId, name, row, load, trapSize, ventedBy } of result.fixtures) {
    answers.set(globalId, `${name}: ${row}, ${load.least} to ${load.most}, trap ${trapSize?.label}, ${ventedBy.how}`);
  }
  for (const { fixtures, reading, broken } of result.batteries) {
    const name = [...fixtures].sort().join(' ');
    answers.set(name, `row: ${reading}, breaks ${broken.map(({ rule }) => rule).join(' ') || 'nothing'}`);
  }
  return answers;
}

/** The sketch written as an IFC file and read again. */
export const throughIfc = (sketch: Sketch, options: Partial<IfcOptions>): Model =>
  readModel([{ name: 'sketch.ifc', bytes: new TextEncoder().encode(ifcOf(sketch, options)) }], sha256);

/** Answers that differ, as `before => after`; empty when both say the same of the same things. */
export function differences(before: ReadonlyMap<string, string>, after: ReadonlyMap<string, string>): string[] {
  const keys = [...new Set([...before.keys(), ...after.keys()])].sort();
  return keys.flatMap((key) => (before.get(key) === after.get(key) ? [] : [`${before.get(key)} => ${after.get(key)}`]));
}
