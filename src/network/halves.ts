import { cutOut, polyline } from '../geometry/polyline.ts';
import type { Vec3 } from '../geometry/vector.ts';
import { metres } from '../units/quantity.ts';
import type { JointId, Pipe } from './network.ts';

type Half = Omit<Pipe, 'id'>;

/**
 * A pipe cut in two at `at` metres from its end 0, strictly inside: each part keeps its own end, and the new joint lies
 * between them without a fitting. `place` is null where the model has no geometry.
 */
export function halves(pipe: Pipe, at: number, joint: JointId): { place: Vec3 | null; parts: readonly [Half, Half] } {
  const { id: _, points, ends, reach, ...rest } = pipe;
  const line = points === null ? null : polyline(points);
  const after = line === null ? null : cutOut(line, at, line.length);
  const border = metres(pipe.from + at * Math.sign(pipe.to - pipe.from || 1));
  const none = metres(0);
  return {
    place: after?.[0] ?? null,
    parts: [
      {
        ...rest,
        ends: [ends[0], joint],
        points: line === null ? null : cutOut(line, 0, at),
        length: metres(at),
        reach: [reach[0], none],
        to: border,
      },
      {
        ...rest,
        ends: [joint, ends[1]],
        points: after,
        length: metres(pipe.length - at),
        reach: [none, reach[1]],
        from: border,
      },
    ],
  };
}
