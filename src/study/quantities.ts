import type { PipeId } from '../network/network.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import { pipeWidth } from '../verdicts/wall-fit.ts';
import type { Attempt } from './attempt.ts';
import { type FloorHole, floorHoles } from './floor-holes.ts';
import type { Row } from './row.ts';
import { type RowCleanout, rowCleanouts } from './row-cleanouts.ts';
import { type Fitting, fittingsOf } from './row-fittings.ts';
import { type RowPiece, rowPieces } from './row-pieces.ts';
import { type WallNeed, wallNeed } from './wall-need.ts';

/** What an alternative takes to build, over the pipes that all alternatives are compared on. */
export interface Quantities {
  readonly pieces: readonly RowPiece[];
  readonly fittings: readonly Fitting[];
  readonly cleanouts: readonly RowCleanout[];
  readonly floorHoles: readonly FloorHole[];
  readonly wall: WallNeed | null;
  /** `laidUnderFloor`: the size in which the largest under the floor is made in its material. */
  readonly largest: {
    readonly inWall: NominalSize | null;
    readonly underFloor: NominalSize | null;
    readonly laidUnderFloor: NominalSize | null;
  };
}

export function quantities(row: Row, attempt: Attempt, scope: ReadonlySet<PipeId>): Quantities {
  const { outcome } = attempt;
  const { network } = row.outcome;
  const pieces = rowPieces(row, attempt, scope);
  const largestOf = (list: readonly RowPiece[]): NominalSize | null => {
    const sizes = list.flatMap(({ size }) => size ?? []);
    return sizes.length === 0 ? null : sizes.reduce(outcome.code.series.larger);
  };
  const buried = pieces.filter(({ underFloor }) => underFloor);
  const laid = buried.flatMap(({ size, material }) =>
    size === null ? [] : (pipeWidth(outcome.code, size, material).made ?? size),
  );
  const walled = pieces.filter(({ walls }) => walls.length > 0);
  const changed = (joint: number): boolean =>
    network.joints[joint]?.pipes.length !== outcome.network.joints[joint]!.pipes.length;
  return {
    pieces,
    fittings: fittingsOf(
      outcome,
      pieces.map(({ pipe }) => pipe),
      changed,
    ),
    cleanouts: rowCleanouts(row, attempt),
    floorHoles: floorHoles(outcome, pieces),
    wall: wallNeed(outcome, pieces),
    largest: {
      inWall: largestOf(walled.length > 0 ? walled : pieces.filter(({ place }) => place === 'room')),
      underFloor: largestOf(buried),
      laidUnderFloor: laid.length === 0 ? null : laid.reduce(outcome.code.series.larger),
    },
  };
}
