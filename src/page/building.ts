import type { PageData, PageMargin } from '../deliver/page-data.ts';
import type { PipeState, Result, ResultFinding, ResultPipe } from '../schedule/result.ts';
import { outsideDiameter } from './outside-diameter.ts';
import type { PlanSide } from './plan-side.ts';

/**
 * The page's data with what the page looks up again and again. A *section* is one pipe of the network (an index into
 * `data.scene.pipes`); a *pipe* and a *fixture* are rows of the result.
 */
export interface Building {
  readonly data: PageData;
  readonly result: Result;
  /** The plan that mends it, and whether this is the building before or after; null: there is none. */
  readonly plan: PlanSide | null;
  readonly sectionCount: number;
  /** Index of each section's first point; one more at the end. */
  readonly pointStart: Int32Array;
  readonly sectionsOf: readonly (readonly number[])[];
  readonly pipeAt: ReadonlyMap<string, number>;
  readonly fixtureAt: ReadonlyMap<string, number>;
  /** Metres: outside radius as modelled; where nothing is modelled, as required. */
  readonly radius: Float32Array;
  /** Metres: outside radius of the size that the code asks for; the modelled one where it asks for nothing. */
  readonly needRadius: Float32Array;
  /** Index into the scene's storeys; -1 where none. */
  readonly storeyOf: Int32Array;
  readonly findingsAbout: ReadonlyMap<string, readonly ResultFinding[]>;
  /** The state of a section: its own where the pipe is cut, else the pipe's; undefined for links between fittings. */
  state(section: number): PipeState | undefined;
  pipe(section: number): ResultPipe | undefined;
  /** What a pipe still takes; undefined where nobody asked. */
  margin(row: number): PageMargin | undefined;
  /** Sections from the fixture to the sewer. */
  water(fixture: number): readonly number[];
  air(fixture: number): AirPath;
  servesWater(pipe: number): readonly number[];
  servesAir(pipe: number): readonly number[];
}

export interface AirPath {
  readonly arm: readonly number[];
  readonly through: readonly number[];
  readonly dry: readonly number[];
  readonly vented: boolean;
}

export function buildingOf(data: PageData, plan: PlanSide | null = null): Building {
  const { result, scene } = data;
  const { pipes, paths } = scene;
  const sectionCount = pipes.pipe.length;
  const pointStart = new Int32Array(sectionCount + 1);
  const sectionsOf: number[][] = result.pipes.map(() => []);
  for (let section = 0; section < sectionCount; section++) {
    pointStart[section + 1] = pointStart[section]! + pipes.points[section]!;
    sectionsOf[pipes.pipe[section]!]?.push(section);
  }
  const pipe = (section: number): ResultPipe | undefined => result.pipes[pipes.pipe[section] ?? -1];
  const state = (section: number): PipeState | undefined => {
    const row = pipe(section);
    return row?.sections?.[pipes.section[section] ?? 0] ?? row;
  };
  const water = (fixture: number): readonly number[] => {
    const path: number[] = [];
    // A path can not be longer than there are sections: a damaged file must not hang the page.
    for (let at = paths.first[fixture] ?? -1; at >= 0 && path.length <= sectionCount; at = paths.next[at] ?? -1)
      path.push(at);
    return path;
  };
  const airStart = new Int32Array(result.fixtures.length + 1);
  for (let fixture = 0; fixture < result.fixtures.length; fixture++)
    airStart[fixture + 1] =
      airStart[fixture]! + paths.armCount[fixture]! + paths.throughCount[fixture]! + paths.dryCount[fixture]!;
  const air = (fixture: number): AirPath => {
    const [start = 0, arm = 0, through = 0, dry = 0] = [
      airStart[fixture],
      paths.armCount[fixture],
      paths.throughCount[fixture],
      paths.dryCount[fixture],
    ];
    const list = (from: number, count: number): readonly number[] => [...paths.air.subarray(from, from + count)];
    return {
      arm: list(start, arm),
      through: list(start + arm, through),
      dry: list(start + arm + through, dry),
      vented: result.fixtures[fixture]?.ventedBy.how !== 'unvented',
    };
  };
  const serves = (pathOf: (fixture: number) => Iterable<number>): ((pipe: number) => readonly number[]) => {
    let lists: number[][] | undefined;
    return (row) => {
      lists ??= served(result, pipes.pipe, pathOf);
      return lists[row] ?? [];
    };
  };
  const findingsAbout = new Map<string, ResultFinding[]>();
  for (const finding of result.findings)
    for (const id of new Set(finding.about)) {
      const list = findingsAbout.get(id);
      if (list === undefined) findingsAbout.set(id, [finding]);
      else list.push(finding);
    }
  const radius = new Float32Array(sectionCount);
  const needRadius = new Float32Array(sectionCount);
  for (let section = 0; section < sectionCount; section++) {
    const need = outsideDiameter(state(section)?.required?.most?.dn);
    const drawn = pipes.outer[section]! / 10_000 || outsideDiameter(state(section)?.modelled?.dn) || need || 0.05;
    radius[section] = drawn / 2;
    needRadius[section] = (need || drawn) / 2;
  }
  const storeyNames = new Map(scene.storeys.map(({ name }, index) => [name, index]));
  return {
    data,
    result,
    plan,
    sectionCount,
    pointStart,
    sectionsOf,
    pipeAt: firstOf(result.pipes),
    fixtureAt: firstOf(result.fixtures),
    radius,
    needRadius,
    storeyOf: Int32Array.from({ length: sectionCount }, (_, section) => {
      const storey = state(section)?.storey;
      return storey == null ? -1 : (storeyNames.get(storey) ?? -1);
    }),
    findingsAbout,
    state,
    pipe,
    margin: (row) => data.margins.pipes[row],
    water,
    air,
    servesWater: serves(water),
    // The arm is the trap's own; a trap that needs no vent is nobody's guest.
    servesAir: serves((fixture) => {
      const { through, dry } = air(fixture);
      return result.fixtures[fixture]?.ventedBy.how === 'free' ? [] : [...through, ...dry];
    }),
  };
}

/** Where a model doubles a GlobalId the first row answers to it. */
function firstOf(rows: readonly { readonly globalId: string }[]): ReadonlyMap<string, number> {
  const at = new Map<string, number>();
  rows.forEach(({ globalId }, index) => {
    if (!at.has(globalId)) at.set(globalId, index);
  });
  return at;
}

function served(result: Result, pipeOf: Int32Array, pathOf: (fixture: number) => Iterable<number>): number[][] {
  const lists: number[][] = result.pipes.map(() => []);
  result.fixtures.forEach((_, fixture) => {
    for (const section of pathOf(fixture)) {
      const list = lists[pipeOf[section] ?? -1];
      if (list !== undefined && list.at(-1) !== fixture) list.push(fixture);
    }
  });
  return lists;
}
