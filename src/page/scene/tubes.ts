import { BufferAttribute, BufferGeometry } from 'three';
import type { Point } from './polylines.ts';

/** One tube to draw: `section` names the row of the paint texture, `along` counts metres from `alongFrom`. */
export interface Tube {
  readonly section: number;
  readonly points: readonly Point[];
  readonly radius: number;
  readonly alongFrom: number;
}

export interface Ball {
  readonly section: number;
  readonly at: Point;
  readonly radius: number;
}

/**
 * Tubes and balls as one geometry: one draw call however many pipes. `position` is the point on the axis and `normal`
 * the way out from it, so that the shader can keep a thin pipe at least a pixel wide.
 */
export function tubeGeometry(
  tubes: readonly Tube[],
  balls: readonly Ball[],
  { tube: sides, ball: ballSides }: { readonly tube: number; readonly ball: number },
): BufferGeometry {
  const rings = tubes.reduce((sum, { points }) => sum + points.length, 0);
  const spans = tubes.reduce((sum, { points }) => sum + points.length - 1, 0);
  const ball = ballShape(ballSides);
  const vertices = rings * sides + balls.length * ball.directions.length;
  const indices = spans * sides * 6 + balls.length * ball.triangles.length;
  const position = new Float32Array(vertices * 3);
  const normal = new Int8Array(vertices * 4);
  const radius = new Float32Array(vertices);
  const along = new Float32Array(vertices);
  const section = new Float32Array(vertices);
  const index = new Uint32Array(indices);
  let vertex = 0;
  let corner = 0;
  const put = (at: Point, nx: number, ny: number, nz: number, r: number, metres: number, id: number): void => {
    position[vertex * 3] = at[0];
    position[vertex * 3 + 1] = at[1];
    position[vertex * 3 + 2] = at[2];
    normal[vertex * 4] = Math.round(nx * 127);
    normal[vertex * 4 + 1] = Math.round(ny * 127);
    normal[vertex * 4 + 2] = Math.round(nz * 127);
    radius[vertex] = r;
    along[vertex] = metres;
    section[vertex] = id;
    vertex++;
  };
  const turns = Array.from({ length: sides }, (_, side) => (side / sides) * Math.PI * 2);
  const cosines = turns.map(Math.cos);
  const sines = turns.map(Math.sin);
  const frame = { u: [0, 0, 0], v: [0, 0, 0] } as Frame;
  for (const tube of tubes) {
    const { points } = tube;
    let metres = tube.alongFrom;
    for (let at = 0; at < points.length; at++) {
      const point = points[at]!;
      const before = points[Math.max(0, at - 1)]!;
      const after = points[Math.min(points.length - 1, at + 1)]!;
      if (at > 0) metres += Math.hypot(point[0] - before[0], point[1] - before[1], point[2] - before[2]);
      turnFrame(frame, before, after, at === 0);
      for (let side = 0; side < sides; side++) {
        const c = cosines[side]!;
        const s = sines[side]!;
        const { u, v } = frame;
        const nx = u[0] * c + v[0] * s;
        const ny = u[1] * c + v[1] * s;
        const nz = u[2] * c + v[2] * s;
        put(point, nx, ny, nz, tube.radius, metres, tube.section);
      }
      if (at === 0) continue;
      const ring = vertex - sides;
      for (let side = 0; side < sides; side++) {
        const next = (side + 1) % sides;
        const low = ring - sides;
        index[corner++] = low + side;
        index[corner++] = low + next;
        index[corner++] = ring + side;
        index[corner++] = low + next;
        index[corner++] = ring + next;
        index[corner++] = ring + side;
      }
    }
  }
  for (const { section: id, at, radius: r } of balls) {
    const first = vertex;
    for (const [nx, ny, nz] of ball.directions) put(at, nx, ny, nz, r, 0, id);
    for (const local of ball.triangles) index[corner++] = first + local;
  }
  const geometry = new BufferGeometry();
  geometry.setAttribute('position', new BufferAttribute(position, 3));
  geometry.setAttribute('normal', new BufferAttribute(normal, 4, true));
  geometry.setAttribute('radius', new BufferAttribute(radius, 1));
  geometry.setAttribute('along', new BufferAttribute(along, 1));
  geometry.setAttribute('section', new BufferAttribute(section, 1));
  geometry.setIndex(new BufferAttribute(index, 1));
  return geometry;
}

interface Frame {
  u: [number, number, number];
  v: [number, number, number];
}

/** Keeps the ring from twisting: the old `u` is laid flat onto the plane across the new direction. */
function turnFrame(frame: Frame, before: Point, after: Point, fresh: boolean): void {
  let [dx, dy, dz] = [after[0] - before[0], after[1] - before[1], after[2] - before[2]];
  const size = Math.hypot(dx, dy, dz) || 1;
  dx /= size;
  dy /= size;
  dz /= size;
  const old: readonly number[] = fresh ? (Math.abs(dz) < 0.9 ? [0, 0, 1] : [1, 0, 0]) : frame.u;
  const lean = old[0]! * dx + old[1]! * dy + old[2]! * dz;
  let [ux, uy, uz] = [old[0]! - lean * dx, old[1]! - lean * dy, old[2]! - lean * dz];
  const flat = Math.hypot(ux, uy, uz);
  if (flat < 1e-6) {
    if (!fresh) turnFrame(frame, before, after, true);
    return;
  }
  ux /= flat;
  uy /= flat;
  uz /= flat;
  frame.u = [ux, uy, uz];
  frame.v = [dy * uz - dz * uy, dz * ux - dx * uz, dx * uy - dy * ux];
}

/** Directions and triangles of a coarse ball, poles up and down. */
function ballShape(sides: number): { readonly directions: readonly Point[]; readonly triangles: readonly number[] } {
  const bands = Math.max(3, sides >> 1);
  const directions: Point[] = [];
  for (let band = 0; band <= bands; band++) {
    const tilt = (band / bands) * Math.PI;
    for (let side = 0; side < sides; side++) {
      const turn = (side / sides) * Math.PI * 2;
      directions.push([Math.sin(tilt) * Math.cos(turn), Math.sin(tilt) * Math.sin(turn), Math.cos(tilt)]);
    }
  }
  const triangles: number[] = [];
  for (let band = 0; band < bands; band++)
    for (let side = 0; side < sides; side++) {
      const next = (side + 1) % sides;
      const [a, b] = [band * sides + side, band * sides + next];
      triangles.push(a, a + sides, b, b, a + sides, b + sides);
    }
  return { directions, triangles };
}
