import type { Vec3 } from '../geometry/vector.ts';
import type { JointId, Pipe } from '../network/network.ts';
import type { PipeState, Result, ResultFixture } from './result.ts';
import { type Folded, foldedStoreys, type RiserFold } from './riser-fold.ts';
import { type Flat, isometry } from './riser-isometry.ts';
import { type RiserLine, type RiserLook, stateOf } from './riser-line.ts';
import { riserPieces } from './riser-pieces.ts';
import { riserPlaces } from './riser-places.ts';
import { labelRuns, type RiserRun } from './riser-runs.ts';
import type { RiserSource } from './riser-source.ts';
import { type RiserSymbol, riserSymbols } from './riser-symbols.ts';

/** Where a stack passes a floor. */
export interface RiserFloor {
  readonly storey: number;
  readonly name: string | null;
  readonly at: Flat;
  /** Of a folded storey: the storey that is drawn in its place. */
  readonly like?: number;
  /** Of a drawn storey: those that are alike and folded away. */
  readonly also?: readonly number[];
}

/**
 * An isometric line drawing of one drain system, not to scale: long straight runs are shortened so that what hangs on
 * them stays apart. In drawing units (one CSS pixel at full size), x to the right, y down; lines from back to front.
 */
export interface Riser {
  /** Index into the result's systems; null for piping that reaches no sewer. */
  readonly system: number | null;
  /** Row of the pipe that names a part of a large system; null where the drawing shows a whole one. */
  readonly stack: number | null;
  readonly lines: readonly RiserLine[];
  readonly symbols: readonly RiserSymbol[];
  readonly floors: readonly RiserFloor[];
  /** What asks for words, most important first. */
  readonly runs: readonly RiserRun[];
  /** The same with storeys that are alike drawn once; absent where no two are. */
  readonly folded?: Riser;
}

/** Line drawings of all drain systems in their order, then of pieces with fixtures that reach no sewer. */
export function risersOf(result: Result, source: RiserSource): readonly Riser[] {
  const { model, network } = source;
  const rowOf = new Map(result.pipes.map(({ globalId, stepId }, row) => [`${globalId} ${stepId}`, row]));
  const rowOfPipe = ({ element }: Pipe): number => {
    const found = element === null ? undefined : model.elements[element];
    return found === undefined ? -1 : (rowOf.get(`${found.globalId} ${found.stepId}`) ?? -1);
  };
  return riserPieces(source).flatMap(({ system, stack, pipes }) => {
    const placeOf = riserPlaces(source, pipes);
    const drawn = pipes.flatMap((id) => {
      const pipe = network.pipes[id]!;
      const points = way(placeOf, pipe);
      return points === null ? [] : [{ pipe, points, row: rowOfPipe(pipe) }];
    });
    if (drawn.length === 0) return [];
    const name = stack === null ? null : rowOfPipe(network.pipes[stack]!);
    const draw = (some: readonly Drawn[], folds: readonly RiserFold[]): Riser => {
      const flat = isometry(some.map(({ points }) => points));
      const lines = some.map(({ pipe, points, row }): RiserLine & { readonly depth: number } => {
        const state = stateOf(result, network, pipe, row);
        return {
          section: pipe.id,
          pipe: row,
          look: lookOf(source, pipe, state),
          verdict: state?.verdict ?? null,
          width: widthOf(state),
          points: points.map((point) => flat.at(point)),
          depth: Math.min(...points.map((point) => flat.depth(point))),
        };
      });
      lines.sort((a, b) => a.depth - b.depth || a.section - b.section);
      const inside = new Set<JointId>(some.flatMap(({ pipe }) => pipe.ends));
      return {
        system,
        stack: name,
        lines: lines.map(({ depth: _, ...line }) => line),
        symbols: riserSymbols(result, source, inside, placeOf, flat),
        floors: floorsOf(source, some, flat, folds),
        runs: labelRuns(result, source, lines),
      };
    };
    const folded = fold(result, source, drawn);
    const whole = draw(drawn, []);
    if (folded === null) return [whole];
    const left = drawn.filter(({ pipe }) => !folded.hidden.has(pipe.id));
    return [{ ...whole, folded: draw(left, folded.folds) }];
  });
}

interface Drawn {
  readonly pipe: Pipe;
  readonly points: readonly Vec3[];
  readonly row: number;
}

function fold(result: Result, { model, network, paths }: RiserSource, drawn: readonly Drawn[]): Folded | null {
  const storeys = new Map(model.storeys.map(({ name }, storey) => [name, storey]));
  const storeyOf = (name: string | null | undefined): number | null =>
    name == null ? null : (storeys.get(name) ?? null);
  const joints = new Set<JointId>(drawn.flatMap(({ pipe }) => pipe.ends));
  const rows = new Map(result.fixtures.map((fixture) => [`${fixture.globalId} ${fixture.stepId}`, fixture]));
  const fixtures = new Map<number, ResultFixture[]>();
  for (const { element, outlet } of paths.fixtures) {
    const found = model.elements[element];
    const fixture = found === undefined ? undefined : rows.get(`${found.globalId} ${found.stepId}`);
    const storey = storeyOf(fixture?.storey);
    if (fixture === undefined || storey === null || !joints.has(outlet)) continue;
    fixtures.set(storey, [...(fixtures.get(storey) ?? []), fixture]);
  }
  const pipes = drawn.map(({ pipe, row }) => {
    const state = stateOf(result, network, pipe, row);
    return { pipe, state, storey: storeyOf(state?.storey) };
  });
  return foldedStoreys(pipes, fixtures);
}

/** From joint to joint; null where neither the model nor the order of the piping gives a place. */
function way(placeOf: (joint: JointId) => Vec3 | null, { ends, points }: Pipe): readonly Vec3[] | null {
  const [a, b] = [placeOf(ends[0]), placeOf(ends[1])];
  const whole = [...(a === null ? [] : [a]), ...(points ?? []), ...(b === null ? [] : [b])];
  return whole.length < 2 ? null : whole;
}

function lookOf({ paths }: RiserSource, pipe: Pipe, state: PipeState | null): RiserLook {
  if (state === null) return paths.wet[pipe.id] === true ? 'link' : 'vent';
  const wet = state.load.most > 0 || paths.wet[pipe.id] === true;
  const airs = state.role.includes('vent');
  return wet ? (airs ? 'both' : 'drain') : 'vent';
}

const widthOf = (state: PipeState | null): number => {
  const dn = state?.modelled?.dn ?? state?.required?.most?.dn ?? 50;
  return Math.round((1.1 + Math.min(dn, 300) / 75) * 10) / 10;
};

/** A mark where a stack or its vent passes a floor; one for each stack and floor. */
function floorsOf(
  { model }: RiserSource,
  drawn: readonly { readonly points: readonly Vec3[] }[],
  flat: ReturnType<typeof isometry>,
  folds: readonly RiserFold[],
): readonly RiserFloor[] {
  const foldOf = (storey: number): Pick<RiserFloor, 'like' | 'also'> => {
    const own = folds.find(({ drawn: shown, alike }) => shown === storey || alike.includes(storey));
    if (own === undefined) return {};
    return own.drawn === storey ? { also: own.alike } : { like: own.drawn };
  };
  const floors: RiserFloor[] = [];
  const seen = new Set<string>();
  model.storeys.forEach(({ name, elevation }, storey) => {
    for (const { points } of drawn) {
      for (let place = 1; place < points.length; place++) {
        const [a, b] = [points[place - 1]!, points[place]!];
        const rise = Math.abs(a[2] - b[2]);
        const plumb = rise > 0.6 && rise > 8 * Math.hypot(a[0] - b[0], a[1] - b[1]);
        if (!plumb || (a[2] - elevation) * (b[2] - elevation) >= 0) continue;
        const key = `${storey} ${a[0].toFixed(1)} ${a[1].toFixed(1)}`;
        if (seen.has(key)) continue;
        seen.add(key);
        floors.push({ storey, name, at: flat.at([a[0], a[1], elevation]), ...foldOf(storey) });
      }
    }
  });
  return floors;
}
