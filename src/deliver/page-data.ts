import type { Vec3 } from '../geometry/vector.ts';
import { leanResult } from '../schedule/lean-result.ts';
import { type Question, questionsOf } from '../schedule/questions.ts';
import type { Result, SizeLabel } from '../schedule/result.ts';
import { type Riser, risersOf } from '../schedule/riser.ts';
import type { RiserSource } from '../schedule/riser-source.ts';
import type { WeighBattery } from '../schedule/weigh.ts';
import { type FabricColumns, fabricColumns } from './page-fabric.ts';
import { type PathColumns, pathColumns } from './page-paths.ts';
import { type FixtureColumns, fixtureBoxes, originOf, type PipeColumns, pipeColumns } from './page-pipes.ts';

/** All that the page knows: the result as people read it, and numbers to draw it with. */
export interface PageData {
  readonly format: 'drainwright-page';
  readonly version: 1;
  /** Lean: without `elements` and the lists of ids, which the page finds again from the paths in `scene`. */
  readonly result: Result;
  /** Sizes that the code offers, smallest first. */
  readonly sizes: readonly SizeLabel[];
  /** What the model does not say and a person can, most weighty first. */
  readonly questions: readonly Question[];
  /** Batteries under each reading, side by side; empty where nobody weighed them. */
  readonly weighed: readonly WeighBattery[];
  readonly scene: PageScene;
  /** Line drawings, one for each drain system, the one with most fixtures first. */
  readonly risers: readonly Riser[];
}

export interface PageScene {
  /** World metres of the scene's zero, whole millimetres; the scene itself is in millimetres from here, z up. */
  readonly origin: Vec3;
  /** Lowest first; elevations in millimetres above the origin. */
  readonly storeys: readonly { readonly name: string | null; readonly elevation: number }[];
  readonly pipes: PipeColumns;
  readonly fixtures: FixtureColumns;
  readonly paths: PathColumns;
  readonly fabric: FabricColumns;
  /** Names of walls, slabs, roofs and spaces, in the order of `fabric`. */
  readonly fabricNames: readonly (string | null)[];
  /** Of elements that stand at joints, in the order of `pipes.jointFitting`. */
  readonly fittings: readonly { readonly globalId: string; readonly name: string | null; readonly class: string }[];
}

/**
 * Everything for the page from one run. Sections of `scene` are the pipes of the network, in the same order. `sizes`
 * are those the code offers, smallest first; `weighed` compares the readings of its batteries.
 */
export function pageData(
  result: Result,
  source: RiserSource,
  sizes: readonly SizeLabel[] = [],
  weighed: readonly WeighBattery[] = [],
): PageData {
  const { model, network, paths } = source;
  const origin = originOf(model, network);
  const pipeAt = indexOf(result.pipes);
  const fixtureAt = indexOf(result.fixtures);
  const { columns, fittings } = pipeColumns(model, network, result.pipes, pipeAt, origin);
  const fabric = fabricColumns(model, origin);
  return {
    format: 'drainwright-page',
    version: 1,
    result: { ...leanResult(result), elements: [] },
    sizes,
    questions: questionsOf(result),
    // Pipe by pipe it is in the command's own result; here the sums do.
    weighed: weighed.map(({ alternatives, ...battery }) => ({
      ...battery,
      alternatives: alternatives.map((alternative) => ({ ...alternative, sections: [], fittings: [] })),
    })),
    scene: {
      origin,
      storeys: model.storeys.map(({ name, elevation }) => ({ name, elevation: millimetres(elevation - origin[2]) })),
      pipes: columns,
      fixtures: fixtureBoxes(model, network, result.fixtures, fixtureAt, origin),
      paths: pathColumns(model, network, paths, result.fixtures, fixtureAt),
      fabric: fabric.columns,
      fabricNames: fabric.names,
      fittings,
    },
    risers: risersOf(result, source),
  };
}

const millimetres = (value: number): number => Math.round(value * 1000);

/** Where a row of the result stands, by file-independent key; a doubled GlobalId is told apart by its STEP id. */
function indexOf(rows: readonly { readonly globalId: string; readonly stepId: number }[]): ReadonlyMap<string, number> {
  return new Map(rows.map(({ globalId, stepId }, index) => [`${globalId} ${stepId}`, index]));
}
