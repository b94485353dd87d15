import { add, cross, dot, scale, subtract, type Vec3 } from '../../geometry/vector.ts';
import type { Piece } from './piece.ts';
import type { Profile } from './profiles.ts';

/** Largest turn between two neighbouring points of the centre line. */
const step = Math.PI / 24;

/**
 * A profile turned around an axis in its plane. A round profile gives a bend, with the arc of its centre as centre
 * line; any other profile the cloud of its outline at every step.
 */
export function revolved(profile: Profile, centre: Vec3, axis: Vec3, angle: number): Piece['shape'] {
  const steps = Math.max(1, Math.ceil(Math.abs(angle) / step - 1e-9));
  const turns = Array.from({ length: steps + 1 }, (_, k) => (angle * k) / steps);
  const { round } = profile;
  if (round !== null && off(round.centre, centre, axis) > round.outer * 1e-3) {
    const points = turns.map((turn) => turnedAround(round.centre, centre, axis, turn));
    return { kind: 'tube', points, outerRadius: round.outer, innerRadius: round.inner, ground: 'swept-disk' };
  }
  const outline = profile.outline();
  const base = turns.flatMap((turn) => outline.flatMap((one) => [...turnedAround(one, centre, axis, turn)]));
  return { kind: 'prism', base, shift: [0, 0, 0] };
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
