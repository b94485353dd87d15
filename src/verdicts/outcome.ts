import type { Finding } from '../findings/finding.ts';
import type { Building } from '../loads/building.ts';
import type { Loads } from '../loads/loads.ts';
import type { FixtureKind } from '../model/identity.ts';
import type { Paths } from '../paths/paths.ts';
import type { Roles } from '../roles/roles.ts';
import type { Sizing } from '../sizes/size-pipes.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import type { Load, Range } from '../units/quantity.ts';

/** Loads, roles and sizes under one way to read what the model leaves open. */
export interface Run {
  /** What every unidentified fixture is taken for in this run; null: they are read by their load alone. */
  readonly kind: FixtureKind | null;
  readonly loads: Loads;
  readonly roles: Roles;
  readonly sizes: readonly Sizing[];
}

/** Everything of one run of the program over one building. */
export interface Outcome extends Building {
  readonly paths: Paths;
  /** The run with the heaviest reading: its roles and trails are shown. */
  readonly shown: Run;
  /** All runs; one where the model leaves nothing open. */
  readonly runs: readonly Run[];
  /** By pipe id. */
  readonly pipes: readonly PipeVerdict[];
  /** By fixture id. */
  readonly fixtureLoads: readonly Range<Load>[];
  readonly findings: readonly Finding[];
  /** Of these, what reading and joining had to say: it stays when a study changes the piping. */
  readonly read: readonly Finding[];
}

export type Verdict = 'undersized' | 'agrees' | 'oversized' | 'unknown';

export interface PipeVerdict {
  readonly load: Range<Load>;
  readonly ventLoad: Range<Load> | null;
  /** null ends: no size holds it. */
  readonly required: Range<NominalSize | null> | null;
  readonly provisional: boolean;
  readonly verdict: Verdict;
  /** Of `unknown`. */
  readonly reason: string | null;
}
