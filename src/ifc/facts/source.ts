import type { LineIndex } from '../lines/line-index.ts';
import { Reader } from '../reader.ts';
import { Placements } from '../solids/placements.ts';
import { Spatial } from './spatial.ts';
import { type Units, unitsOf } from './units.ts';

/** One file, ready to be asked for its facts. */
export interface Source {
  readonly file: number;
  readonly index: LineIndex;
  readonly reader: Reader;
  readonly units: Units;
  readonly placements: Placements;
  readonly spatial: Spatial;
}

export function sourceOf(index: LineIndex, file: number): Source {
  const reader = new Reader(index);
  const units = unitsOf(reader);
  const placements = new Placements(reader, units.length.metres);
  return { file, index, reader, units, placements, spatial: new Spatial(reader, placements) };
}
