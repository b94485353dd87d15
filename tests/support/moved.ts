import { boxAround } from '../../src/geometry/box.ts';
import type { Box, Vec3 } from '../../src/geometry/vector.ts';
import type { DrawnPart } from './drawn.ts';

const corners = ({ min, max }: Box): readonly Vec3[] =>
  [min[0], max[0]].flatMap((x) => [min[1], max[1]].flatMap((y) => [min[2], max[2]].map((z): Vec3 => [x, y, z])));

/** The same drawing elsewhere: turned about the vertical by `angle` radians, then shifted. Boxes are boxed anew, and so grow. */
export function moved(part: DrawnPart, angle: number, shift: Vec3): DrawnPart {
  const [c, s] = [Math.cos(angle), Math.sin(angle)];
  const move = ([x, y, z]: Vec3): Vec3 => [c * x - s * y + shift[0], s * x + c * y + shift[1], z + shift[2]];
  return {
    ...part,
    ...(part.line ? { line: part.line.map(move) } : {}),
    ...(part.box ? { box: boxAround(corners(part.box).map(move))! } : {}),
    ...(part.ports ? { ports: part.ports.map((port) => ({ ...port, at: port.at && move(port.at) })) } : {}),
    ...(part.origin ? { origin: move(part.origin) } : {}),
  };
}
