import { dot, subtract, unit, type Vec3 } from '../geometry/vector.ts';
import type { JointId, Network, PipeId } from '../network/network.ts';
import type { NominalSize } from '../units/nominal-size.ts';
import type { Outcome } from '../verdicts/outcome.ts';

/** A fitting that piping needs, told from what meets at a joint: nothing is read off the model's own fittings. */
export interface Fitting {
  readonly kind: 'bend' | 'junction' | 'double-junction' | 'reducer' | 'coupling';
  /** Degrees, of a bend. */
  readonly angle: number | null;
  readonly size: NominalSize;
  /** Of a junction the largest branch, of a reducer the smaller end. */
  readonly branch: NominalSize | null;
  /** A pipe of that size that ends in it. */
  readonly pipe: PipeId;
}

const degrees = 180 / Math.PI;
/** Pipes that meet within this go on straight. */
const straight = 5;
/** Bends as they are made; others keep their own angle. */
const bends = [22.5, 45, 60, 67.5, 72, 90];
const nearBend = 6;

/**
 * Fittings at the joints of some pipes, by joint, and at the corners of the pipes themselves. Traps, cleanouts,
 * fixtures and what ends a pipe are none. `changed`: the joint has lost or gained a pipe, so that a fitting of the model
 * at it says nothing.
 */
export function fittingsOf(
  outcome: Outcome,
  pipes: readonly PipeId[],
  changed: (joint: JointId) => boolean,
): Fitting[] {
  const { network, identities, code } = outcome;
  const sizeOf = (pipe: PipeId): NominalSize | null =>
    outcome.pipes[pipe]!.required?.most ?? outcome.shown.loads.modelled[pipe]!.size;
  const joints = [...new Set(pipes.flatMap((pipe) => network.pipes[pipe]!.ends))].sort((a, b) => a - b);
  const atJoints = joints.flatMap((joint) => {
    const { elements } = network.joints[joint]!;
    const own = elements.some((element) => noFitting.has(identities[element]!.part));
    return own ? [] : fittingsAt(network, joint, sizeOf, code.series, elements.length > 0 && !changed(joint));
  });
  const corners = pipes.flatMap((pipe) => {
    const size = sizeOf(pipe);
    return size === null ? [] : cornersOf(network.pipes[pipe]!.points ?? []).map((angle) => bend(angle, size, pipe));
  });
  return [...atJoints, ...corners];
}

const noFitting: ReadonlySet<string> = new Set([
  'trap',
  'cleanout',
  'fixture',
  'unknown-terminal',
  'sewer-connection',
  'vent-terminal',
  'chamber',
]);

function fittingsAt(
  network: Network,
  joint: JointId,
  sizeOf: (pipe: PipeId) => NominalSize | null,
  { rank, larger }: Outcome['code']['series'],
  modelled: boolean,
): Fitting[] {
  const ends = network.joints[joint]!.pipes.flatMap((pipe) => {
    const size = sizeOf(pipe);
    const direction = outward(network, pipe, joint);
    return size === null || direction === null ? [] : [{ pipe, size, direction }];
  });
  if (ends.length < 2) return [];
  const [a, b] = run(ends);
  const size = larger(a.size, b.size);
  const { pipe } = rank(a.size) >= rank(b.size) ? a : b;
  const smaller = rank(a.size) < rank(b.size) ? a.size : b.size;
  const reducer: Fitting[] = smaller === size ? [] : [{ kind: 'reducer', angle: null, size, branch: smaller, pipe }];
  if (ends.length > 2) {
    const branch = ends
      .filter((end) => end !== a && end !== b)
      .map((end) => end.size)
      .reduce(larger);
    return [{ kind: ends.length === 3 ? 'junction' : 'double-junction', angle: null, size, branch, pipe }, ...reducer];
  }
  const angle = 180 - angleBetween(a.direction, b.direction);
  if (angle > straight) return [bend(angle, size, pipe), ...reducer];
  return reducer.length > 0 || !modelled ? reducer : [{ kind: 'coupling', angle: null, size, branch: null, pipe }];
}

/** The two ends that lie most nearly in a line; equal ones by size, then as they stand. */
function run<T extends { readonly direction: Vec3 }>(ends: readonly T[]): [T, T] {
  let best: [T, T] = [ends[0]!, ends[1]!];
  let widest = -1;
  ends.forEach((a, at) => {
    for (const b of ends.slice(at + 1)) {
      const angle = angleBetween(a.direction, b.direction);
      if (angle <= widest + 1e-6) continue;
      widest = angle;
      best = [a, b];
    }
  });
  return best;
}

const angleBetween = (a: Vec3, b: Vec3): number => Math.acos(Math.min(1, Math.max(-1, dot(a, b)))) * degrees;

const bend = (angle: number, size: NominalSize, pipe: PipeId): Fitting => {
  const made = bends.find((one) => Math.abs(one - angle) <= nearBend / 2);
  return { kind: 'bend', angle: made ?? Math.round(angle), size, branch: null, pipe };
};

function outward(network: Network, pipe: PipeId, joint: JointId): Vec3 | null {
  const { points, ends } = network.pipes[pipe]!;
  if (points === null) return null;
  const [near, next] = ends[0] === joint ? [points[0]!, points[1]!] : [points.at(-1)!, points.at(-2)!];
  return unit(subtract(next, near));
}

function cornersOf(points: readonly Vec3[]): number[] {
  return points.slice(1, -1).flatMap((point, at) => {
    const angle = angleBetween(unit(subtract(point, points[at]!)), unit(subtract(points[at + 2]!, point)));
    return angle > straight ? [angle] : [];
  });
}
