import { BufferAttribute, type BufferGeometry, Group, LineSegments, Mesh, type RawShaderMaterial } from 'three';
import type { Building } from '../building.ts';
import type { SectionLook } from '../colouring.ts';
import type { Rgb } from '../colours.ts';
import { glowOf } from './glow.ts';
import { ballsOf, collarsOf } from './hubs.ts';
import { lineGeometry } from './mesh-draft.ts';
import type { Bounds } from './orbit.ts';
import { type Paint, paintOf, pipeLineMaterial, pipeMaterial, type SharedUniforms } from './pipe-material.ts';
import { lengthOf, type Polyline, polylineOf } from './polylines.ts';
import { type Tube, tubeGeometry } from './tubes.ts';

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
  /** Of the plain lines, which share is drawn, the longest pipes first; 1: all. */
  setShare(share: number): void;
  /** Whether this detail is built already. */
  has(detail: Detail): boolean;
  bounds(sections: Iterable<number>): Bounds | null;
  dispose(): void;
}

/** Sides of a tube and of a fitting's ball, by how many pipes there are: roundness is dear without a graphics card. */
function roundness(count: number): { readonly tube: number; readonly ball: number; readonly collars: boolean } {
  if (count <= 600) return { tube: 16, ball: 12, collars: true };
  if (count <= 3000) return { tube: 10, ball: 8, collars: true };
  return count <= 15_000 ? { tube: 7, ball: 6, collars: false } : { tube: 5, ball: 5, collars: false };
}

export function pipingOf(building: Building, shared: SharedUniforms): Piping {
  const count = building.sectionCount;
  const polylines = Array.from({ length: count }, (_, section) => polylineOf(building, section));
  const paint = paintOf(count);
  const outlinePaint = paintOf(count);
  const visible = new Uint8Array(count).fill(1);
  const group = new Group();
  const round = roundness(count);
  const tubes = tubesOf(building, polylines);
  const collars = round.collars ? collarsOf(building, polylines) : [];
  const solid = pipeMaterial(paint, shared, { grow: 1, leastPixels: 0.75, morePixels: 0, alpha: 1, halo: false });
  const glow = glowOf(tubes, collars, paint, outlinePaint, shared, round.tube);
  group.add(glow.group);
  // Each detail is built when it is first asked for: the first picture of a large model need not wait for the last.
  const made = new Map<Detail, Mesh | LineSegments>();
  const build = (detail: Detail): Mesh | LineSegments => {
    switch (detail) {
      case 'full':
        return new Mesh(tubeGeometry([...tubes, ...collars], ballsOf(building, polylines), round), solid);
      case 'light':
        return new Mesh(tubeGeometry(tubes, [], { tube: 4, ball: 4 }), solid);
      case 'lines':
        return new LineSegments(segmentLines(polylines), pipeLineMaterial(paint, shared));
    }
  };
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
      if (!made.has(detail)) {
        const mesh = build(detail);
        mesh.frustumCulled = false;
        made.set(detail, mesh);
        group.add(mesh);
      }
      for (const [of, mesh] of made) mesh.visible = of === detail;
      glow.setCheap(detail !== 'full');
    },
    setShare(share) {
      const lines = made.get('lines')?.geometry;
      const corners = lines?.getAttribute('position').count ?? 0;
      lines?.setDrawRange(0, share >= 1 ? corners : 2 * Math.ceil((corners / 2) * share));
    },
    has: (detail) => made.has(detail),
    bounds: (sections) => boundsOf(polylines, sections),
    dispose() {
      for (const mesh of made.values()) {
        mesh.geometry.dispose();
        (mesh.material as RawShaderMaterial).dispose();
      }
      solid.dispose();
      glow.dispose();
      paint.texture.dispose();
      outlinePaint.texture.dispose();
    },
  };
}

function tubesOf(building: Building, polylines: readonly (Polyline | null)[]): Tube[] {
  return polylines.flatMap((line, section) =>
    line === null ? [] : [{ section, points: line.points, radius: building.radius[section]!, alongFrom: 0 }],
  );
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

/** The longest pipes first, so that a part of them still shows the building; without the stubs into their fittings. */
function segmentLines(polylines: readonly (Polyline | null)[]): BufferGeometry {
  const positions: number[] = [];
  const sections: number[] = [];
  const bodies = polylines.flatMap((line) => {
    if (line === null) return [];
    const points = line.points.slice(line.bodyFrom, line.bodyTo + 1);
    return [{ section: line.section, points, length: lengthOf(points) }];
  });
  bodies.sort((a, b) => b.length - a.length);
  for (const { section, points } of bodies)
    for (let at = 1; at < points.length; at++) {
      positions.push(...points[at - 1]!, ...points[at]!);
      sections.push(section, section);
    }
  const geometry = lineGeometry(positions);
  geometry.setAttribute('section', new BufferAttribute(new Float32Array(sections), 1));
  return geometry;
}
