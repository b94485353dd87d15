import type { LineIndex } from '../lines/line-index.ts';
import { type Reader, readerOf } from '../reader.ts';
import { type Placements, placementsOf } from '../solids/placements.ts';
import { type Spatial, spatialOf } from './spatial.ts';
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
  const reader = readerOf(index);
  const units = unitsOf(reader);
  const placements = placementsOf(reader, units.length.metres);
  return { file, index, reader, units, placements, spatial: spatialOf(reader, placements) };
}
