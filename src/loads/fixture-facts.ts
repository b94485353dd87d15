import type { Paths } from '../paths/paths.ts';
import type { Building } from './building.ts';
import type { ModelledSize } from './read-size.ts';

export interface FixtureFacts extends Building {
  readonly paths: Paths;
  readonly modelled: readonly ModelledSize[];
}
