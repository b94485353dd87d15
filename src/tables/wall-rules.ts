import type { DimensionSeries } from './pipe-dimensions.ts';
import type { Trust } from './table.ts';

/** What of a wall and a pipe decides whether one fits into the other. Lengths in millimetres. */
export interface WallRules {
  /** Shallowest first. */
  readonly studs: readonly Stud[];
  /** From stud to stud. */
  readonly spacingMm: number;
  /** A hole is this much wider than the pipe. */
  readonly clearanceMm: number;
  /** Board on each face of a wall that states no layers. */
  readonly liningMm: number;
  /** Largest holes by the building code that goes with the plumbing code; null where none is known. */
  readonly holes: HoleRules | null;
  /** What a layer is by its name; null: the name does not say. */
  readonly layerOf: (name: string) => LayerKind | null;
  /** Dimensions of pipe of a material; `assumed` where the name says nothing and the usual pipe is taken. */
  readonly pipeOf: (material: string | null) => { readonly series: DimensionSeries; readonly assumed: boolean };
}

export interface Stud {
  /** `38 × 89`. */
  readonly name: string;
  readonly faceMm: number;
  readonly depthMm: number;
}

export type LayerKind = 'steel' | 'framing' | 'air' | 'solid';

/** A bored stud or plate keeps some of its depth; what is left is told apart by whether it bears load. */
export interface HoleRules {
  readonly document: string;
  readonly stud: HoleRule;
  readonly plate: HoleRule;
  readonly note: string;
}

export interface HoleRule {
  readonly clause: string;
  readonly trust: Trust;
  /** Largest hole in a member of this depth, millimetres; infinite where the rule sets no limit. */
  mostMm(depthMm: number, loadbearing: boolean): number;
}
