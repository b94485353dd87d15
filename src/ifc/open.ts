import { finding } from '../findings/finding.ts';
import { InputError } from '../findings/input-error.ts';
import type { Model } from '../model/model.ts';
import { unpack } from './container.ts';
import { damageFindings, damageRemarks } from './facts/damage-report.ts';
import { filesApart } from './facts/file-places.ts';
import { joinStoreys } from './facts/join-storeys.ts';
import { type Facts, readFacts } from './facts/read-facts.ts';
import { type Source, sourceOf } from './facts/source.ts';
import { indexLines } from './lines/index-lines.ts';
import { type LineIndex, withoutOwnBlock } from './lines/line-index.ts';
import { nameApart } from './name-apart.ts';

export interface ModelInput {
  /** Base name, as messages and results show it. */
  readonly name: string;
  readonly bytes: Uint8Array;
}

/** A file whose lines are indexed: what a model is read from, and what property sets are written into. */
export interface OpenedFile {
  readonly name: string;
  readonly index: LineIndex;
  readonly sha256: string;
}

/** Hex digest of some bytes: passed in, since hosts differ in how they make one. */
export type Digest = (bytes: Uint8Array) => string;

/**
 * Unpacks and indexes the files. Two of one name are told apart by a number: `model.ifc`, `model (2).ifc`.
 * Throws an InputError for what is no IFC file.
 */
export function openFiles(inputs: readonly ModelInput[], sha256: Digest): OpenedFile[] {
  const taken = new Set<string>();
  return inputs.map((input) => {
    const { name: own, bytes } = unpack(input.name, input.bytes);
    const name = nameApart(own, taken);
    taken.add(name);
    const index = indexLines(bytes);
    if (index.schemas.length === 0) {
      throw new InputError(
        name,
        'the header names no schema (FILE_SCHEMA), so nobody can say what its lines mean; export it again',
      );
    }
    if (!index.schemas.some((schema) => /^IFC/i.test(schema))) {
      throw new InputError(name, `the schema is ${index.schemas[0]}, not IFC: this file is another kind of STEP model`);
    }
    return { name, index, sha256: sha256(withoutOwnBlock(index)) };
  });
}

/**
 * One building from one or several files, each with its own schema, units and placements. A file whose coordinates lie
 * elsewhere is not joined: its elements stay, to be counted; its walls, floors and rooms are no part of the building.
 */
export function modelOf(files: readonly OpenedFile[]): Model {
  const sources = files.map(({ index }, file) => sourceOf(index, file));
  const together = readAll(sources, () => false);
  const apart = files.length === 1 ? [null] : filesApart(together.parts);
  const isApart = (file: number): boolean => apart[file] !== null;
  const { parts, storeys } = apart.some((one) => one !== null) ? readAll(sources, isApart) : together;
  const ofBuilding = parts.filter((_, file) => !isApart(file));
  return {
    files: sources.map((source, k) => ({
      name: files[k]!.name,
      sha256: files[k]!.sha256,
      schema: source.index.schemas[0]!,
      lengthUnit: { name: source.units.length.name, metres: source.units.length.metres },
      remarks: damageRemarks(source, parts[k]!),
      isApart: isApart(k),
    })),
    elements: parts.flatMap((part) => part.elements),
    ports: parts.flatMap((part) => part.ports),
    systems: parts.flatMap((part) => part.systems),
    storeys: storeys.storeys,
    spaces: parts.flatMap((part) => part.spaces),
    walls: ofBuilding.flatMap((part) => part.walls),
    slabs: ofBuilding.flatMap((part) => part.slabs),
    roofs: ofBuilding.flatMap((part) => part.roofs),
    findings: [
      ...sources.flatMap((source, k) => damageFindings(source, files[k]!.name)),
      ...apart.flatMap((one, k) =>
        one === null
          ? []
          : finding('files-apart', [], { file: files[k]!.name, from: files[one.from]!.name, distanceM: one.metres }),
      ),
    ],
  };
}

function readAll(sources: readonly Source[], isApart: (file: number) => boolean) {
  const storeys = joinStoreys(sources, isApart);
  const parts: Facts[] = [];
  const first = { elements: 0, ports: 0, systems: 0, spaces: 0 };
  for (const source of sources) {
    const facts = readFacts(source, storeys, first);
    parts.push(facts);
    first.elements += facts.elements.length;
    first.ports += facts.ports.length;
    first.systems += facts.systems.length;
    first.spaces += facts.spaces.length;
  }
  return { storeys, parts };
}

/** Reads one building from the bytes of its files. Throws an InputError for what is no IFC file. */
export const readModel = (inputs: readonly ModelInput[], sha256: Digest): Model => modelOf(openFiles(inputs, sha256));
