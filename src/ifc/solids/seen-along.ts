import { cross, unit, type Vec3 } from '../../geometry/vector.ts';

/** Points as seen along a direction, around the centre that fits them best. */
export interface Seen {
  readonly x: Vec3;
  readonly y: Vec3;
  readonly u: number;
  readonly v: number;
  readonly from: number;
  readonly to: number;
  readonly across: Float64Array;
  readonly up: Float64Array;
  readonly radii: Float64Array;
  readonly largest: number;
}

export function seenAlong(flat: readonly number[], along: Vec3): Seen | null {
  const n = flat.length / 3;
  const x = unit(cross(along, Math.abs(along[2]) < 0.9 ? [0, 0, 1] : [1, 0, 0]));
  const y = cross(along, x);
  const across = new Float64Array(n);
  const up = new Float64Array(n);
  let from = Infinity;
  let to = -Infinity;
  let mu = 0;
  let mv = 0;
  for (let k = 0, i = 0; k < n; k++, i += 3) {
    const px = flat[i]!;
    const py = flat[i + 1]!;
    const pz = flat[i + 2]!;
    const t = px * along[0] + py * along[1] + pz * along[2];
    if (t < from) from = t;
    if (t > to) to = t;
    mu += across[k] = px * x[0] + py * x[1] + pz * x[2];
    mv += up[k] = px * y[0] + py * y[1] + pz * y[2];
  }
  const centre = circleCentre(across, up, mu / n, mv / n);
  if (centre === null || !(to - from > 1e-6)) return null;
  const { u, v } = centre;
  const radii = new Float64Array(n);
  let largest = 0;
  for (let k = 0; k < n; k++) {
    const du = across[k]! - u;
    const dv = up[k]! - v;
    const radius = Math.sqrt(du * du + dv * dv);
    radii[k] = radius;
    if (radius > largest) largest = radius;
  }
  return largest > 0 ? { x, y, u, v, from, to, across, up, radii, largest } : null;
}

const steps = 72;
/** Widest gap between neighbouring corners of a wall, seen along the axis, in steps of five degrees: a hexagon has 60°. */
const widestGap = 14;
const taken = new Uint8Array(steps);

/** True where the corners between two radii stand all around the centre; four of them make a duct. */
export function goesRound({ across, up, radii, u, v }: Seen, least: number, most: number): boolean {
  taken.fill(0);
  for (let k = 0; k < radii.length; k++) {
    if (radii[k]! < least || radii[k]! > most) continue;
    taken[(Math.round(Math.atan2(up[k]! - v, across[k]! - u) * (steps / 2 / Math.PI)) + steps) % steps] = 1;
  }
  const first = taken.indexOf(1);
  if (first < 0) return false;
  let gap = 0;
  for (let k = first + 1; k <= first + steps; k++) {
    gap = taken[k % steps] === 1 ? 0 : gap + 1;
    if (gap > widestGap) return false;
  }
  return true;
}

/** Centre of the circle that fits points in a plane best (Kåsa's linear least squares); null for points on a line. */
function circleCentre(
  across: Float64Array,
  up: Float64Array,
  mu: number,
  mv: number,
): { readonly u: number; readonly v: number } | null {
  let uu = 0;
  let vv = 0;
  let uv = 0;
  let ur = 0;
  let vr = 0;
  for (let k = 0; k < across.length; k++) {
    const a = across[k]! - mu;
    const b = up[k]! - mv;
    const rr = a * a + b * b;
    uu += a * a;
    vv += b * b;
    uv += a * b;
    ur += a * rr;
    vr += b * rr;
  }
  const determinant = uu * vv - uv * uv;
  if (!(Math.abs(determinant) > 1e-12 * uu * vv)) return null;
  return { u: mu + (ur * vv - vr * uv) / (2 * determinant), v: mv + (vr * uu - ur * uv) / (2 * determinant) };
}
