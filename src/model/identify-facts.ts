import type { MediumSaid } from './element-medium.ts';
import type { NamesTable } from './names-table.ts';

/** What all elements of a model share while they are identified. */
export interface IdentifyFacts {
  readonly names: NamesTable;
  /** By system id. */
  readonly media: readonly (MediumSaid | null)[];
  readonly venting: readonly (string | null)[];
}
