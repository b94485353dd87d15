import type { FixtureRow } from '../codes/fixture-row.ts';
import type { StatedUses } from '../codes/way.ts';
import type { FixtureId } from '../paths/paths.ts';
import type { Cell } from '../tables/table.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import type { Load } from '../units/quantity.ts';
import type { ModelledSize } from './read-size.ts';

/** How a fixture that the model does not settle is read in one run of the stages. */
export type Scenario = 'as-modelled' | 'lightest' | 'heaviest' | 'closet';

export interface Loads {
  readonly scenario: Scenario;
  readonly fixtures: readonly FixtureLoad[];
  /** By pipe id. */
  readonly pipes: readonly PipeLoad[];
  /** Size the model gives each pipe, by pipe id; sections share their element's. */
  readonly modelled: readonly ModelledSize[];
  /** Fixtures in the order of a walk up the trees of water: each pipe's own are one stretch of it. */
  readonly order: readonly FixtureId[];
  /** Bathroom groups, by their closet. */
  readonly groups: readonly BathroomGroup[];
  /** Index into `groups`; null for fixtures in none. By fixture id. */
  readonly groupOf: readonly (number | null)[];
}

export interface BathroomGroup {
  readonly members: readonly FixtureId[];
  readonly figure: Load;
}

/** Fixtures whose loads do not simply add up on a pipe that carries several of them. */
export interface Bundle {
  readonly members: readonly FixtureId[];
  /** Load of so many of them on one pipe, `sum` being what they put in one by one. */
  readonly together: (sum: Load, count: number) => Load;
}

export interface FixtureLoad {
  readonly row: FixtureRow;
  readonly load: Load;
  readonly cell: Cell;
  /** Steady or pumped flow of the fixture, l/s, beside the load; 0 where the code counts it as load. */
  readonly steady: number;
  readonly trap: NominalSize;
  readonly trapFrom: 'drawn' | 'property' | 'answer' | 'pipe' | 'assumed';
  /** The kind is known, and every row it may be puts in the same load through the same trap. */
  readonly settled: boolean;
}

export interface PipeLoad {
  readonly load: Load;
  /** Largest load of one fixture whose water passes. */
  readonly largest: Load;
  /** Steady and pumped flow, l/s, where the code keeps it apart from loads. */
  readonly steady: number;
  readonly statedUses: StatedUses;
  readonly closets: number;
  /** What else the code counts, by the names it gives. */
  readonly counts: Readonly<Record<string, number>>;
  /** Stretch of `Loads.order`: from, up to but without. Empty for dry pipes. */
  readonly from: number;
  readonly to: number;
}
