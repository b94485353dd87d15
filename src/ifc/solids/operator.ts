import { cross, dot, scale, subtract, unit, type Vec3 } from '../../geometry/vector.ts';
import type { Reader } from '../reader.ts';
import { type Frame, identity } from './frame.ts';
import type { Placements } from './placements.ts';

/** Frame of an IfcCartesianTransformationOperator, 2D or 3D, with its scale or its three scales. */
export function operatorFrame(reader: Reader, placements: Placements, record: number): Frame {
  const kind = reader.type(record);
  const cursor = reader.open(record);
  const axis1 = cursor.id();
  const axis2 = cursor.id();
  const origin = cursor.id();
  const scale1 = cursor.number() ?? 1;
  const isPlane = kind.includes('OPERATOR2D');
  const axis3 = isPlane ? 0 : cursor.id();
  const isUneven = kind.endsWith('NONUNIFORM');
  const scale2 = isUneven ? (cursor.number() ?? scale1) : scale1;
  const scale3 = isUneven && !isPlane ? (cursor.number() ?? scale1) : scale1;

  const o = placements.point(reader.follow(origin, record));
  const isShifted = o[0] !== 0 || o[1] !== 0 || o[2] !== 0;
  if (axis1 === 0 && axis2 === 0 && axis3 === 0 && !isUneven && scale1 === 1 && !isShifted) return identity;
  const first = placements.direction(reader.follow(axis1, record));
  const second = placements.direction(reader.follow(axis2, record));
  const z: Vec3 = isPlane ? [0, 0, 1] : (placements.direction(reader.follow(axis3, record)) ?? upright(first, second));
  const x = across(first ?? (second === null ? [1, 0, 0] : cross(second, z)), z);
  // A mirror is an operator whose second axis points against the right-handed one.
  const right = cross(z, x);
  const y = second !== null && dot(second, right) < 0 ? scale(right, -1) : right;
  return [
    x[0] * scale1,
    x[1] * scale1,
    x[2] * scale1,
    y[0] * scale2,
    y[1] * scale2,
    y[2] * scale2,
    z[0] * scale3,
    z[1] * scale3,
    z[2] * scale3,
    o[0],
    o[1],
    o[2],
  ];
}

const upright = (first: Vec3 | null, second: Vec3 | null): Vec3 => {
  if (first === null || second === null) return [0, 0, 1];
  const z = unit(cross(first, second));
  return z[0] === 0 && z[1] === 0 && z[2] === 0 ? [0, 0, 1] : z;
};

/** `v` made to stand at right angles to `z`; some direction that does, where `v` runs along `z`. */
function across(v: Vec3, z: Vec3): Vec3 {
  const flat = unit(subtract(v, scale(z, dot(v, z))));
  if (flat[0] !== 0 || flat[1] !== 0 || flat[2] !== 0) return flat;
  return unit(cross(z, Math.abs(z[0]) < 0.9 ? [1, 0, 0] : [0, 1, 0]));
}
