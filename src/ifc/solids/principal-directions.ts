import type { Vec3 } from '../../geometry/vector.ts';

/**
 * The three directions in which points spread (eigenvectors of their covariance, by Jacobi's rotations), first the one
 * whose spread differs most from the other two: the axis of anything round.
 */
export function principalDirections(points: readonly Vec3[]): Vec3[] {
  const n = points.length;
  let [mx, my, mz] = [0, 0, 0];
  for (const [x, y, z] of points) {
    mx += x / n;
    my += y / n;
    mz += z / n;
  }
  const a = [
    [0, 0, 0],
    [0, 0, 0],
    [0, 0, 0],
  ];
  for (const point of points) {
    const d = [point[0] - mx, point[1] - my, point[2] - mz];
    for (let i = 0; i < 3; i++) for (let j = 0; j < 3; j++) a[i]![j]! += (d[i]! * d[j]!) / n;
  }
  const v = [
    [1, 0, 0],
    [0, 1, 0],
    [0, 0, 1],
  ];
  for (let sweep = 0; sweep < 12; sweep++) {
    for (const [p, q] of [
      [0, 1],
      [0, 2],
      [1, 2],
    ] as const) {
      const off = a[p]![q]!;
      if (off === 0) continue;
      const theta = (a[q]![q]! - a[p]![p]!) / (2 * off);
      const t = (theta >= 0 ? 1 : -1) / (Math.abs(theta) + Math.sqrt(theta * theta + 1));
      const c = 1 / Math.sqrt(t * t + 1);
      const s = t * c;
      for (let k = 0; k < 3; k++) {
        const [kp, kq] = [a[k]![p]!, a[k]![q]!];
        a[k]![p] = c * kp - s * kq;
        a[k]![q] = s * kp + c * kq;
      }
      for (let k = 0; k < 3; k++) {
        const [pk, qk] = [a[p]![k]!, a[q]![k]!];
        a[p]![k] = c * pk - s * qk;
        a[q]![k] = s * pk + c * qk;
        const [vp, vq] = [v[k]![p]!, v[k]![q]!];
        v[k]![p] = c * vp - s * vq;
        v[k]![q] = s * vp + c * vq;
      }
    }
  }
  const spread = [a[0]![0]!, a[1]![1]!, a[2]![2]!];
  /** How unlike the other two spreads are, seen from direction k: small when k is an axis of revolution. */
  const unlike = (k: number): number => {
    const [p, q] = [spread[(k + 1) % 3]!, spread[(k + 2) % 3]!];
    return Math.abs(p - q) / (p + q || 1);
  };
  const order = [0, 1, 2].sort((i, j) => unlike(i) - unlike(j) || i - j);
  return order.map((k) => [v[0]![k]!, v[1]![k]!, v[2]![k]!]);
}
