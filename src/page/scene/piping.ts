import { BufferAttribute, type BufferGeometry, Group, LineSegments, Mesh, type RawShaderMaterial } from 'three';
import type { Building } from '../building.ts';
import type { SectionLook } from '../colouring.ts';
import type { Rgb } from '../colours.ts';
import { glowOf } from './glow.ts';
import { lineGeometry } from './mesh-draft.ts';
import type { Bounds } from './orbit.ts';
import { type Paint, paintOf, pipeLineMaterial, pipeMaterial, type SharedUniforms } from './pipe-material.ts';
import { between, jointPoint, type Point, type Polyline, polylineOf } from './polylines.ts';
import { type Ball, type Tube, tubeGeometry } from './tubes.ts';

/** How much of the piping is drawn while the eye moves: everything, thin tubes without fittings, or plain lines. */
export type Detail = 'full' | 'light' | 'lines';

export interface Piping {
  readonly group: Group;
  readonly polylines: readonly (Polyline | null)[];
  readonly paint: Paint;
  /** Sections that are not hidden, by index. */
  readonly visible: Uint8Array;
  /** Repaints all sections; what is lit is drawn again over everything else. */
  show(look: (section: number) => SectionLook, outline: Rgb): void;
  setDetail(detail: Detail): void;
  bounds(sections: Iterable<number>): Bounds | null;
  dispose(): void;
}

const hubGrow = 1.16;
const collarOver = 0.012;

export function pipingOf(building: Building, shared: SharedUniforms): Piping {
  const count = building.sectionCount;
  const polylines = Array.from({ length: count }, (_, section) => polylineOf(building, section));
  const paint = paintOf(count);
  const outlinePaint = paintOf(count);
  const visible = new Uint8Array(count).fill(1);
  const group = new Group();
  const rich = count <= 3000 ? 16 : count <= 12_000 ? 9 : 6;
  const tubes = tubesOf(building, polylines);
  const collars = count <= 12_000 ? collarsOf(building, polylines) : [];
  const full = new Mesh(
    tubeGeometry([...tubes, ...collars], ballsOf(building, polylines), rich),
    pipeMaterial(paint, shared, { grow: 1, leastPixels: 0.75, morePixels: 0, alpha: 1, halo: false }),
  );
  full.frustumCulled = false;
  group.add(full);
  const cheap = new Map<Detail, Mesh | LineSegments>();
  const cheapOf = (detail: Detail): Mesh | LineSegments => {
    const known = cheap.get(detail);
    if (known !== undefined) return known;
    const made =
      detail === 'light'
        ? new Mesh(tubeGeometry(tubes, [], 4), full.material)
        : new LineSegments(segmentLines(polylines), pipeLineMaterial(paint, shared));
    made.frustumCulled = false;
    cheap.set(detail, made);
    group.add(made);
    return made;
  };
  const glow = glowOf(tubes, collars, paint, outlinePaint, shared);
  group.add(glow.group);
  return {
    group,
    polylines,
    paint,
    visible,
    show(look, outline) {
      const lit: number[] = [];
      const chosen: number[] = [];
      for (let section = 0; section < count; section++) {
        const { colour, pattern, hidden, lit: isLit, chosen: isChosen } = look(section);
        paint.set(section, colour, pattern, hidden);
        visible[section] = hidden ? 0 : 1;
        if (isLit && !hidden) lit.push(section);
        if (!isChosen || hidden) continue;
        chosen.push(section);
        outlinePaint.set(section, outline, 0, false);
      }
      paint.commit();
      if (chosen.length > 0) outlinePaint.commit();
      glow.show(lit, chosen);
    },
    setDetail(detail) {
      full.visible = detail === 'full';
      if (detail !== 'full') cheapOf(detail);
      for (const [of, mesh] of cheap) mesh.visible = of === detail;
    },
    bounds: (sections) => boundsOf(polylines, sections),
    dispose() {
      for (const mesh of [full, ...cheap.values()]) {
        mesh.geometry.dispose();
        (mesh.material as RawShaderMaterial).dispose();
      }
      glow.dispose();
      for (const texture of [paint.colours, paint.marks, outlinePaint.colours, outlinePaint.marks]) texture.dispose();
    },
  };
}

function tubesOf(building: Building, polylines: readonly (Polyline | null)[]): Tube[] {
  return polylines.flatMap((line, section) =>
    line === null ? [] : [{ section, points: line.points, radius: building.radius[section]!, alongFrom: 0 }],
  );
}

/** The hub of a fitting round the end of each pipe. */
function collarsOf(building: Building, polylines: readonly (Polyline | null)[]): Tube[] {
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

/** A ball closes the corner where pipes meet, as wide as the widest of them; it is painted as that one. */
function ballsOf(building: Building, polylines: readonly (Polyline | null)[]): Ball[] {
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
        if (radius > known.radius) Object.assign(known, { section, radius });
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

export function boundsOf(polylines: readonly (Polyline | null)[], sections: Iterable<number>): Bounds | null {
  const min: [number, number, number] = [1e9, 1e9, 1e9];
  const max: [number, number, number] = [-1e9, -1e9, -1e9];
  for (const section of sections)
    for (const point of polylines[section]?.points ?? [])
      for (const axis of [0, 1, 2] as const) {
        min[axis] = Math.min(min[axis], point[axis]);
        max[axis] = Math.max(max[axis], point[axis]);
      }
  return min[0] > max[0] ? null : { min, max };
}

function segmentLines(polylines: readonly (Polyline | null)[]): BufferGeometry {
  const positions: number[] = [];
  const sections: number[] = [];
  for (const line of polylines)
    for (let at = 1; line !== null && at < line.points.length; at++) {
      positions.push(...line.points[at - 1]!, ...line.points[at]!);
      sections.push(line.section, line.section);
    }
  const geometry = lineGeometry(positions);
  geometry.setAttribute('section', new BufferAttribute(new Float32Array(sections), 1));
  return geometry;
}
