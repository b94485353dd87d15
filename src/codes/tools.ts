import type { Family } from '../tables/open-family.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import type { CodeSettings } from './code-settings.ts';

/** What a family's rules are made from: its tables and what the user set. */
export interface Tools {
  readonly family: Family;
  readonly omit: ReadonlySet<NominalSize>;
  readonly settings: CodeSettings;
}
