import { add, cross, dot, scale, subtract, type Vec3 } from '../../geometry/vector.ts';
import { arcSteps } from './arc.ts';
import { type Piece, prismOf, tubeOf } from './piece.ts';
import { outlineOf, type Profile } from './profiles.ts';

/**
 * A profile turned around an axis in its plane. A round profile gives a bend, with the arc of its centre as centre
 * line; any other profile the cloud of its outline at every step.
 */
export function revolved(profile: Profile, centre: Vec3, axis: Vec3, angle: number): Piece['shape'] {
  const steps = arcSteps(angle);
  const turns = Array.from({ length: steps + 1 }, (_, k) => (angle * k) / steps);
  const { round } = profile;
  if (round !== null && off(round.centre, centre, axis) > round.outer * 1e-3) {
    const points = turns.map((turn) => turnedAround(round.centre, centre, axis, turn));
    return tubeOf(points, round.outer, round.inner, 'swept-disk');
  }
  const outline = outlineOf(profile);
  return prismOf(
    turns.flatMap((turn) => outline.flatMap((one) => [...turnedAround(one, centre, axis, turn)])),
    [0, 0, 0],
  );
}

/** Rodrigues' rotation of a point around a line. */
function turnedAround(point: Vec3, centre: Vec3, axis: Vec3, angle: number): Vec3 {
  const v = subtract(point, centre);
  const [c, s] = [Math.cos(angle), Math.sin(angle)];
  const turned = add(add(scale(v, c), scale(cross(axis, v), s)), scale(axis, dot(axis, v) * (1 - c)));
  return add(centre, turned);
}

function off(point: Vec3, centre: Vec3, axis: Vec3): number {
  const v = subtract(point, centre);
  return Math.hypot(...subtract(v, scale(axis, dot(axis, v))));
}
