import { polyline } from '../../geometry/polyline.ts';
import type { Vec3 } from '../../geometry/vector.ts';
import type { ElementId } from '../../model/model.ts';
import type { PipeId } from '../../network/network.ts';
import type { NominalSize } from '../../units/nominal-size.ts';
import { inWalls } from '../../verdicts/in-walls.ts';
import type { Outcome } from '../../verdicts/outcome.ts';
import { wallBodies } from '../../verdicts/wall-bodies.ts';
import type { Weights } from './weights.ts';

/** What changes of one building cost, in points. Lengths are those of the first model. */
export interface Costs {
  readonly weights: Weights;
  /** A pipe in another size: its length times the steps between the sizes, and the wall that is opened for it. */
  readonly resize: (pipe: ElementId, from: NominalSize, to: NominalSize) => number;
  readonly vent: (points: readonly Vec3[], ends: number, throughRoof: boolean) => number;
  /** Pipes of one piping laid to another fall. */
  readonly relay: (outcome: Outcome, pipes: readonly PipeId[]) => number;
}

export function costsOf(outcome: Outcome, weights: Weights): Costs {
  const { network, code, model } = outcome;
  const wallsOf = inWalls(wallBodies(model, code.walls));
  const inWall = (points: readonly Vec3[] | null): number =>
    wallsOf({ points }).reduce((sum, { length }) => sum + length, 0);
  const known = new Map<ElementId, { length: number; walled: number }>();
  const measured = (pipe: ElementId): { length: number; walled: number } => {
    const found = known.get(pipe);
    if (found !== undefined) return found;
    const sections = (network.pipesOf.get(pipe) ?? []).map((section) => network.pipes[section]!);
    const length = sections.reduce((sum, section) => sum + section.length, 0);
    const walled = sections.reduce((sum, { points }) => sum + inWall(points), 0);
    known.set(pipe, { length, walled });
    return { length, walled };
  };
  const { rank } = code.series;
  return {
    weights,
    resize: (pipe, from, to) => {
      const steps = Math.abs(rank(to) - rank(from));
      if (steps === 0) return 0;
      const { length, walled } = measured(pipe);
      return length * steps * weights.sizeStep + walled * weights.openedWall;
    },
    vent: (points, ends, throughRoof) =>
      polyline(points).length * weights.newVent +
      ends * weights.ventJoint +
      (throughRoof ? weights.throughRoof : 0) +
      inWall(points) * weights.openedWall,
    relay: ({ network: { pipes } }, relaid) =>
      relaid.reduce((sum, id) => {
        const { length, points } = pipes[id]!;
        return sum + length * weights.relaying + inWall(points) * weights.openedWall;
      }, 0),
  };
}
