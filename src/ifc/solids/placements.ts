import type { Vec3 } from '../../geometry/vector.ts';
import type { Cursor } from '../lines/cursor.ts';
import { readTriple } from '../lines/number.ts';
import type { Reader } from '../reader.ts';
import { compose, type Frame, identity, isPlace } from './frame.ts';

/** Longest chain of placements that is followed. */
export const deepestPlacement = 200;

/** Points, directions and placements of one file, in metres. */
export class Placements {
  /** Metres in one length unit of the file. */
  readonly metres: number;
  private readonly reader: Reader;
  private readonly cursor: Cursor;
  private readonly worlds = new Map<number, Frame | null>();

  constructor(reader: Reader, metres: number) {
    this.reader = reader;
    this.metres = metres;
    this.cursor = reader.cursor();
  }

  /** Coordinates of a cartesian point, missing ones 0; the origin for a record that is none. */
  point(record: number): Vec3 {
    if (record < 0) return [0, 0, 0];
    const { metres } = this;
    const t = readTriple(this.cursor.bytes, this.reader.args[record]! + 1);
    return [t[0]! * metres, t[1]! * metres, t[2]! * metres];
  }

  /** Unit vector of a direction; null for a record that is none and for a direction without length. */
  direction(record: number): Vec3 | null {
    if (record < 0) return null;
    const t = readTriple(this.cursor.bytes, this.reader.args[record]! + 1);
    const x = t[0]!;
    const y = t[1]!;
    const z = t[2]!;
    const size = Math.sqrt(x * x + y * y + z * z);
    return size > 0 && size < Infinity ? [x / size, y / size, z / size] : null;
  }

  /** Frame of an axis placement in 2D or 3D; the identity for a record that is none (`$` means that). */
  axes(record: number): Frame {
    if (record < 0) return identity;
    const { cursor, reader } = this;
    const isPlane = reader.type(record) === 'IFCAXIS2PLACEMENT2D';
    cursor.at(reader.args[record]!);
    const location = reader.follow(cursor.id(), record);
    const first = reader.follow(cursor.id(), record);
    const second = isPlane ? -1 : reader.follow(cursor.id(), record);
    const o = this.point(location);
    if (first < 0 && second < 0) {
      if (o[0] === 0 && o[1] === 0 && o[2] === 0) return identity;
      return [1, 0, 0, 0, 1, 0, 0, 0, 1, o[0], o[1], o[2]];
    }
    return isPlane
      ? rightAngled(o, null, this.direction(first))
      : rightAngled(o, this.direction(first), this.direction(second));
  }

  /** Frame of an object placement in the world; null where the chain is endless, dangling or of a kind unknown. */
  world(record: number): Frame | null {
    if (record < 0) return null;
    const known = this.worlds.get(record);
    return known === undefined ? this.climb(record) : known;
  }

  /** Origin only of an object placement in the world: quicker for those that are asked for once. */
  worldOrigin(record: number): Vec3 | null {
    const { cursor, reader } = this;
    if (reader.type(record) !== 'IFCLOCALPLACEMENT') return originIn(this.world(record));
    cursor.at(reader.args[record]!);
    const parentId = cursor.id();
    const own = reader.follow(cursor.id(), record);
    const parent = parentId === 0 ? identity : this.world(reader.follow(parentId, record));
    if (parent === null || own < 0) return originIn(parent);
    const location = reader.follow(cursor.at(reader.args[own]!).id(), own);
    if (location < 0) return originIn(parent);
    const { metres } = this;
    const t = readTriple(cursor.bytes, reader.args[location]! + 1);
    const x = t[0]! * metres;
    const y = t[1]! * metres;
    const z = t[2]! * metres;
    const wx = parent[0] * x + parent[3] * y + parent[6] * z + parent[9];
    const wy = parent[1] * x + parent[4] * y + parent[7] * z + parent[10];
    const wz = parent[2] * x + parent[5] * y + parent[8] * z + parent[11];
    return isPlace(wx, wy, wz) ? [wx, wy, wz] : null;
  }

  private climb(record: number): Frame | null {
    const { worlds } = this;
    const chain: Step[] = [];
    let at = record;
    let frame: Frame | null = identity;
    while (at >= 0) {
      const known = worlds.get(at);
      if (known !== undefined) {
        frame = known;
        break;
      }
      const step = chain.length < deepestPlacement ? this.step(at) : null;
      if (step === null) {
        if (chain.length >= deepestPlacement) this.reader.troubles.endlessPlacements.push(record);
        frame = null;
        worlds.set(at, null);
        break;
      }
      chain.push(step);
      at = step.parent;
    }
    for (let k = chain.length - 1; k >= 0; k--) {
      const step = chain[k]!;
      frame = frame === null ? null : compose(frame, this.axes(step.axes));
      if (frame !== null && !isPlace(frame[9], frame[10], frame[11])) frame = null;
      worlds.set(step.record, frame);
    }
    return frame;
  }

  private step(record: number): Step | null {
    const { cursor, reader } = this;
    const kind = reader.type(record);
    // Some files place a product on an axis placement directly.
    if (kind === 'IFCAXIS2PLACEMENT3D' || kind === 'IFCAXIS2PLACEMENT2D') return { record, axes: record, parent: -1 };
    if (kind !== 'IFCLOCALPLACEMENT' && kind !== 'IFCLINEARPLACEMENT') return null;
    cursor.at(reader.args[record]!);
    const parentId = cursor.id();
    // A linear placement states its place in coordinates as a third argument, where the writer was kind enough.
    const isLinear = kind === 'IFCLINEARPLACEMENT';
    const axes = reader.follow(isLinear ? cursor.skip(1).id() : cursor.id(), record);
    if (isLinear) return axes < 0 ? null : { record, axes, parent: -1 };
    const parent = reader.follow(parentId, record);
    return parentId !== 0 && parent < 0 ? null : { record, axes, parent };
  }
}

interface Step {
  readonly record: number;
  /** Axis placement that an object placement states. */
  readonly axes: number;
  /** Placement that it is relative to; -1 for none. */
  readonly parent: number;
}

const originIn = (frame: Frame | null): Vec3 | null => (frame === null ? null : [frame[9], frame[10], frame[11]]);

/** Frame at `o` with z along `axis` and x as near to `ref` as a right angle allows; defaults as the standard has them. */
export function rightAngled(o: Vec3, axis: Vec3 | null, ref: Vec3 | null): Frame {
  const z = axis ?? up;
  const x = flattened(ref ?? right, z) ?? flattened(Math.abs(z[0]) < 0.9 ? right : back, z) ?? right;
  const yx = z[1] * x[2] - z[2] * x[1];
  const yy = z[2] * x[0] - z[0] * x[2];
  const yz = z[0] * x[1] - z[1] * x[0];
  return [x[0], x[1], x[2], yx, yy, yz, z[0], z[1], z[2], o[0], o[1], o[2]];
}

const up: Vec3 = [0, 0, 1];
const right: Vec3 = [1, 0, 0];
const back: Vec3 = [0, 1, 0];

/** The part of `v` at right angles to unit vector `z`, as a unit vector; null when there is none to speak of. */
function flattened(v: Vec3, z: Vec3): Vec3 | null {
  const along = v[0] * z[0] + v[1] * z[1] + v[2] * z[2];
  const x = v[0] - z[0] * along;
  const y = v[1] - z[1] * along;
  const w = v[2] - z[2] * along;
  const size = Math.sqrt(x * x + y * y + w * w);
  return size < 1e-9 ? null : [x / size, y / size, w / size];
}
