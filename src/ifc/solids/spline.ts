import type { Vec3 } from '../../geometry/vector.ts';
import type { Reader } from '../reader.ts';
import type { Placements } from './placements.ts';

/** Points on a B-spline between two neighbouring knots. */
const perSpan = 8;
const largestDegree = 10;

/** Points along a B-spline or Bezier curve, its ends included; null where its numbers do not fit together. */
export function splinePoints(reader: Reader, placements: Placements, record: number): Vec3[] | null {
  const cursor = reader.open(record);
  const degree = cursor.number() ?? 0;
  const control = cursor.ids().map((id) => placements.point(reader.follow(id, record)));
  cursor.skip(3);
  const multiplicities = cursor.numbers([]);
  const knotValues = cursor.numbers([]);
  cursor.skip(1);
  const weights = cursor.numbers([]);
  if (degree < 1 || degree > largestDegree || control.length <= degree) return null;
  const listed = knotValues.flatMap((knot, k) =>
    Array<number>(Math.min(multiplicities[k] ?? 1, degree + 1)).fill(knot),
  );
  const knots = listed.length > 0 ? listed : evenKnots(control.length, degree);
  if (knots.length !== control.length + degree + 1) return null;
  const path: Vec3[] = [];
  for (let span = degree; span < control.length; span++) {
    const [from, to] = [knots[span]!, knots[span + 1]!];
    if (to <= from) continue;
    for (let k = path.length === 0 ? 0 : 1; k <= perSpan; k++) {
      path.push(pointAt(from + ((to - from) * k) / perSpan, span, degree, knots, control, weights));
    }
  }
  return path.length > 1 ? path : null;
}

const evenKnots = (points: number, degree: number): number[] => [
  ...Array<number>(degree + 1).fill(0),
  ...Array.from({ length: points - degree - 1 }, (_, k) => k + 1),
  ...Array<number>(degree + 1).fill(points - degree),
];

/** De Boor's scheme, in homogeneous coordinates where the curve is rational. */
function pointAt(
  t: number,
  span: number,
  degree: number,
  knots: readonly number[],
  control: readonly Vec3[],
  weights: readonly number[],
): Vec3 {
  const d = Array.from({ length: degree + 1 }, (_, j) => {
    const at = span - degree + j;
    const w = weights[at] ?? 1;
    const [x, y, z] = control[at]!;
    return [x * w, y * w, z * w, w];
  });
  for (let r = 1; r <= degree; r++) {
    for (let j = degree; j >= r; j--) {
      const low = knots[span - degree + j]!;
      const part = (t - low) / (knots[span + 1 + j - r]! - low);
      d[j] = d[j]!.map((value, k) => (1 - part) * d[j - 1]![k]! + part * value);
    }
  }
  const [x, y, z, w] = d[degree]!;
  return [x! / w!, y! / w!, z! / w!];
}
