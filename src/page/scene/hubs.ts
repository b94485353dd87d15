import type { Building } from '../building.ts';
import { between, jointPoint, type Point, type Polyline } from './polylines.ts';
import type { Ball, Tube } from './tubes.ts';

/** A fitting is this much wider than its pipe, and covers so many metres of it. */
const hubGrow = 1.16;
const collarOver = 0.012;

/** The hub of a fitting round the end of each pipe. */
export function collarsOf(building: Building, polylines: readonly (Polyline | null)[]): Tube[] {
  const collars: Tube[] = [];
  const add = (section: number, joint: Point, end: Point, inner: Point): void => {
    const over = collarOver / Math.max(0.02, Math.hypot(inner[0] - end[0], inner[1] - end[1], inner[2] - end[2]));
    const points = [joint, end, between(end, inner, Math.min(0.4, over))];
    collars.push({ section, points, radius: building.radius[section]! * hubGrow, alongFrom: 0 });
  };
  for (const line of polylines) {
    if (line === null) continue;
    const { section, points, bodyFrom, bodyTo } = line;
    if (bodyFrom === 1) add(section, points[0]!, points[1]!, points[2]!);
    if (bodyTo === points.length - 2) add(section, points.at(-1)!, points.at(-2)!, points.at(-3)!);
  }
  return collars;
}

/** A ball closes the corner where pipes meet, as wide as the widest of them; it is painted as that one, of equals as an undersized one. */
export function ballsOf(building: Building, polylines: readonly (Polyline | null)[]): Ball[] {
  const { pipes } = building.data.scene;
  const widest = new Map<number, { section: number; radius: number; ends: number }>();
  polylines.forEach((line, section) => {
    if (line === null) return;
    for (const joint of [pipes.jointA[section]!, pipes.jointB[section]!]) {
      const radius = building.radius[section]!;
      const known = widest.get(joint);
      if (known === undefined) widest.set(joint, { section, radius, ends: 1 });
      else {
        known.ends++;
        const worse = building.state(section)?.verdict === 'undersized' && radius === known.radius;
        if (radius > known.radius || worse) Object.assign(known, { section, radius });
      }
    }
  });
  const balls: Ball[] = [];
  for (const [joint, { section, radius, ends }] of widest) {
    const at = jointPoint(building, joint);
    if (at === null || ends < 2) continue;
    const fitted = pipes.jointFitting[joint]! >= 0;
    balls.push({ section, at, radius: radius * (fitted ? hubGrow : 1) });
  }
  return balls;
}
