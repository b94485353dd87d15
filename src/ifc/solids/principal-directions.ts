import type { Vec3 } from '../../geometry/vector.ts';

const pairs = [0, 1, 0, 2, 1, 2];
const a = new Float64Array(9);
const v = new Float64Array(9);

/**
 * The three directions in which points (flat x, y, z) spread: eigenvectors of their covariance, by Jacobi's rotations.
 * First the one seen from which the other two spreads are most alike: the axis of anything round.
 */
export function principalDirections(flat: readonly number[]): Vec3[] {
  const n = flat.length / 3;
  let mx = 0;
  let my = 0;
  let mz = 0;
  for (let i = 0; i < flat.length; i += 3) {
    mx += flat[i]!;
    my += flat[i + 1]!;
    mz += flat[i + 2]!;
  }
  mx /= n;
  my /= n;
  mz /= n;
  a.fill(0);
  for (let i = 0; i < flat.length; i += 3) {
    const x = flat[i]! - mx;
    const y = flat[i + 1]! - my;
    const z = flat[i + 2]! - mz;
    a[0]! += x * x;
    a[1]! += x * y;
    a[2]! += x * z;
    a[4]! += y * y;
    a[5]! += y * z;
    a[8]! += z * z;
  }
  a[3] = a[1]!;
  a[6] = a[2]!;
  a[7] = a[5]!;
  v.fill(0);
  v[0] = v[4] = v[8] = 1;
  const tiny = 1e-30 * (a[0]! + a[4]! + a[8]!) ** 2;
  for (let sweep = 0; sweep < 20; sweep++) {
    if (a[1]! ** 2 + a[2]! ** 2 + a[5]! ** 2 <= tiny) break;
    for (let pair = 0; pair < 6; pair += 2) rotate(pairs[pair]!, pairs[pair + 1]!);
  }
  /** How unlike the other two spreads are, seen from direction k: small when k is an axis of revolution. */
  const unlike = (k: number): number => {
    const p = a[((k + 1) % 3) * 4]!;
    const q = a[((k + 2) % 3) * 4]!;
    return Math.abs(p - q) / (p + q || 1);
  };
  const order = [0, 1, 2].sort((i, j) => unlike(i) - unlike(j) || i - j);
  return order.map((k) => [v[k]!, v[3 + k]!, v[6 + k]!]);
}

/** One Jacobi rotation: makes a[p][q] zero and turns the directions along. */
function rotate(p: number, q: number): void {
  const off = a[p * 3 + q]!;
  if (off === 0) return;
  const theta = (a[q * 4]! - a[p * 4]!) / (2 * off);
  const t = (theta >= 0 ? 1 : -1) / (Math.abs(theta) + Math.sqrt(theta * theta + 1));
  const c = 1 / Math.sqrt(t * t + 1);
  const s = t * c;
  for (let k = 0; k < 3; k++) {
    const kp = a[k * 3 + p]!;
    const kq = a[k * 3 + q]!;
    a[k * 3 + p] = c * kp - s * kq;
    a[k * 3 + q] = s * kp + c * kq;
  }
  for (let k = 0; k < 3; k++) {
    const pk = a[p * 3 + k]!;
    const qk = a[q * 3 + k]!;
    a[p * 3 + k] = c * pk - s * qk;
    a[q * 3 + k] = s * pk + c * qk;
    const vp = v[k * 3 + p]!;
    const vq = v[k * 3 + q]!;
    v[k * 3 + p] = c * vp - s * vq;
    v[k * 3 + q] = s * vp + c * vq;
  }
}
