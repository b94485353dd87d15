import { cross, dot, length, scale, subtract, type Vec3 } from '../../geometry/vector.ts';
import { readNumbers } from '../lines/number.ts';
import type { Reader } from '../reader.ts';
import { compose, type Frame, identity } from './frame.ts';

/** Longest chain of placements that is followed. */
export const deepestPlacement = 200;

/** Points, directions and placements of one file, in metres. */
export interface Placements {
  /** Metres in one length unit of the file. */
  readonly metres: number;
  /** Coordinates of a cartesian point, missing ones 0; the origin for a record that is none. */
  readonly point: (record: number) => Vec3;
  /** Unit vector of a direction; null for a record that is none and for a direction without length. */
  readonly direction: (record: number) => Vec3 | null;
  /** Frame of an axis placement in 2D or 3D; the identity for a record that is none (`$` means that). */
  readonly axes: (record: number) => Frame;
  /** Frame of an object placement in the world; null where the chain is endless, dangling or of a kind unknown. */
  readonly world: (record: number) => Frame | null;
  /** Origin only of an object placement in the world: quicker for those that are asked for once. */
  readonly worldOrigin: (record: number) => Vec3 | null;
}

export function placementsOf(reader: Reader, metres: number): Placements {
  const { index, follow, type } = reader;
  const { args, bytes } = index;
  const cursor = reader.cursor();
  const numbers: number[] = [];
  const worlds = new Map<number, Frame | null>();

  const point = (record: number): Vec3 => {
    if (record < 0) return [0, 0, 0];
    numbers.length = 0;
    readNumbers(bytes, args[record]! + 1, numbers);
    const n = numbers.length;
    return [n > 0 ? numbers[0]! * metres : 0, n > 1 ? numbers[1]! * metres : 0, n > 2 ? numbers[2]! * metres : 0];
  };
  const direction = (record: number): Vec3 | null => {
    if (record < 0) return null;
    numbers.length = 0;
    readNumbers(bytes, args[record]! + 1, numbers);
    const n = numbers.length;
    const x = n > 0 ? numbers[0]! : 0;
    const y = n > 1 ? numbers[1]! : 0;
    const z = n > 2 ? numbers[2]! : 0;
    const size = Math.hypot(x, y, z);
    return size > 0 && Number.isFinite(size) ? [x / size, y / size, z / size] : null;
  };
  const axes = (record: number): Frame => {
    if (record < 0) return identity;
    const isPlane = type(record) === 'IFCAXIS2PLACEMENT2D';
    cursor.at(args[record]!);
    const location = follow(cursor.id(), record);
    const first = follow(cursor.id(), record);
    const second = isPlane ? -1 : follow(cursor.id(), record);
    const o = point(location);
    if (first < 0 && second < 0) return [1, 0, 0, 0, 1, 0, 0, 0, 1, o[0], o[1], o[2]];
    return isPlane ? rightAngled(o, [0, 0, 1], direction(first)) : rightAngled(o, direction(first), direction(second));
  };
  /** Axis placement that an object placement states, and the placement it is relative to (-1: none). */
  const step = (record: number): { readonly axes: number; readonly parent: number } | null => {
    const kind = type(record);
    // Some files place a product on an axis placement directly.
    if (kind === 'IFCAXIS2PLACEMENT3D' || kind === 'IFCAXIS2PLACEMENT2D') return { axes: record, parent: -1 };
    if (kind !== 'IFCLOCALPLACEMENT' && kind !== 'IFCLINEARPLACEMENT') return null;
    cursor.at(args[record]!);
    const parentId = cursor.id();
    // A linear placement states its place in coordinates as a third argument, where the writer was kind enough.
    const axesId = kind === 'IFCLINEARPLACEMENT' ? cursor.skip(1).id() : cursor.id();
    const own = follow(axesId, record);
    const parent = follow(parentId, record);
    if ((parentId !== 0 && parent < 0) || (kind === 'IFCLINEARPLACEMENT' && own < 0)) return null;
    return { axes: own, parent: kind === 'IFCLINEARPLACEMENT' ? -1 : parent };
  };
  const world = (record: number): Frame | null => {
    if (record < 0) return null;
    const chain: { readonly record: number; readonly axes: number }[] = [];
    let at = record;
    let frame: Frame | null = identity;
    while (at >= 0) {
      const known = worlds.get(at);
      if (known !== undefined) {
        frame = known;
        break;
      }
      const here = chain.length < deepestPlacement ? step(at) : null;
      if (here === null) {
        if (chain.length >= deepestPlacement) reader.troubles.endlessPlacements.push(record);
        frame = null;
        worlds.set(at, null);
        break;
      }
      chain.push({ record: at, axes: here.axes });
      at = here.parent;
    }
    for (let k = chain.length - 1; k >= 0; k--) {
      const link = chain[k]!;
      frame = frame === null ? null : compose(frame, axes(link.axes));
      worlds.set(link.record, frame);
    }
    return frame;
  };
  const worldOrigin = (record: number): Vec3 | null => {
    if (type(record) !== 'IFCLOCALPLACEMENT') return originIn(world(record));
    cursor.at(args[record]!);
    const parentId = cursor.id();
    const own = follow(cursor.id(), record);
    const parent = parentId === 0 ? identity : world(follow(parentId, record));
    if (parent === null || own < 0) return originIn(parent);
    const [x, y, z] = point(follow(cursor.at(args[own]!).id(), own));
    return [
      parent[0] * x + parent[3] * y + parent[6] * z + parent[9],
      parent[1] * x + parent[4] * y + parent[7] * z + parent[10],
      parent[2] * x + parent[5] * y + parent[8] * z + parent[11],
    ];
  };
  return { metres, point, direction, axes, world, worldOrigin };
}

const originIn = (frame: Frame | null): Vec3 | null => (frame === null ? null : [frame[9], frame[10], frame[11]]);

/** Frame at `o` with z along `axis` and x as near to `ref` as a right angle allows; defaults as the standard has them. */
export function rightAngled(o: Vec3, axis: Vec3 | null, ref: Vec3 | null): Frame {
  const z: Vec3 = axis ?? [0, 0, 1];
  let x = flattened(ref ?? [1, 0, 0], z);
  if (x === null) x = flattened(Math.abs(z[0]) < 0.9 ? [1, 0, 0] : [0, 1, 0], z)!;
  const y = cross(z, x);
  return [x[0], x[1], x[2], y[0], y[1], y[2], z[0], z[1], z[2], o[0], o[1], o[2]];
}

/** The part of `v` at right angles to unit vector `z`, as a unit vector; null when there is none to speak of. */
function flattened(v: Vec3, z: Vec3): Vec3 | null {
  const rest = subtract(v, scale(z, dot(v, z)));
  const size = length(rest);
  return size < 1e-9 ? null : scale(rest, 1 / size);
}
