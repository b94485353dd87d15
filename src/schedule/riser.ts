import type { Vec3 } from '../geometry/vector.ts';
import type { JointId, Pipe } from '../network/network.ts';
import type { PipeState, Result } from './result.ts';
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
    const flat = isometry(drawn.map(({ points }) => points));
    const lines = drawn.map(({ pipe, points, row }): RiserLine & { readonly depth: number } => {
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
    const inside = new Set<JointId>(drawn.flatMap(({ pipe }) => pipe.ends));
    const symbols = riserSymbols(result, source, inside, placeOf, flat);
    return [
      {
        system,
        stack: stack === null ? null : rowOfPipe(network.pipes[stack]!),
        lines: lines.map(({ depth: _, ...line }) => line),
        symbols,
        floors: floorsOf(source, drawn, flat),
        runs: labelRuns(result, source, lines),
      },
    ];
  });
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
): readonly RiserFloor[] {
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
        floors.push({ storey, name, at: flat.at([a[0], a[1], elevation]) });
      }
    }
  });
  return floors;
}
