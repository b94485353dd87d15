import type { Vec3 } from '../geometry/vector.ts';
import { leanResult } from '../schedule/lean-result.ts';
import type { BatteryMargin, MarginResult, PipeMargin } from '../schedule/margin.ts';
import type { MendResult } from '../schedule/mend.ts';
import type { Question } from '../schedule/question.ts';
import { questionsOf } from '../schedule/questions.ts';
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
  readonly margins: PageMargins;
  /** null: nobody looked for a plan, or there is nothing to mend. */
  readonly mend: PageMend | null;
  readonly scene: PageScene;
  /** Line drawings, one for each drain system, the one with most fixtures first. */
  readonly risers: readonly Riser[];
}

/** What everything still takes before its size changes. */
export interface PageMargins {
  /** A row for each pipe of the result, in its order; empty where nobody asked. */
  readonly pipes: readonly PageMargin[];
  readonly batteries: readonly BatteryMargin[];
}

/** All null for a pipe that needs no size. */
export type PageMargin = Omit<PipeMargin, 'globalId'>;

/** The least change that mends the model, and the building on which it is made. */
export interface PageMend {
  readonly plan: MendResult;
  /** The changed building in the same place. Its `mend` is null; its building fabric is that of the model. */
  readonly after: PageData;
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

/** What the page shows besides the result and its picture; nothing of it where it is absent. */
export interface PageExtras {
  /** Sizes that the code offers, smallest first. */
  readonly sizes?: readonly SizeLabel[];
  /** Its batteries under each reading. */
  readonly weighed?: readonly WeighBattery[];
  readonly margins?: MarginResult;
  readonly mend?: PageMend | null;
  /** Of the scene; that of the piping where it is absent. */
  readonly origin?: Vec3;
}

/** Everything for the page from one run. Sections of `scene` are the pipes of the network, in the same order. */
export function pageData(result: Result, source: RiserSource, extras: PageExtras = {}): PageData {
  const { model, network, paths } = source;
  const { sizes = [], weighed = [], margins, mend = null, origin = originOf(model, network) } = extras;
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
    margins: pageMargins(result, margins),
    mend,
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

function pageMargins({ pipes }: Result, margins: MarginResult | undefined): PageMargins {
  if (margins === undefined) return { pipes: [], batteries: [] };
  const known = new Map(margins.pipes.map(({ globalId, ...margin }) => [globalId, margin]));
  const none: PageMargin = { load: null, drawn: null, length: null, next: null };
  return { pipes: pipes.map(({ globalId }) => known.get(globalId) ?? none), batteries: margins.batteries };
}

const millimetres = (value: number): number => Math.round(value * 1000);

/** Where a row of the result stands, by file-independent key; a doubled GlobalId is told apart by its STEP id. */
function indexOf(rows: readonly { readonly globalId: string; readonly stepId: number }[]): ReadonlyMap<string, number> {
  return new Map(rows.map(({ globalId, stepId }, index) => [`${globalId} ${stepId}`, index]));
}
