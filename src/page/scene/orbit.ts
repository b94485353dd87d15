import { Matrix4, PerspectiveCamera, Vector3 } from 'three';
import type { Point } from './polylines.ts';

/** Where the eye is: it looks at `target` from `distance` metres, `yaw` round the plumb line, `pitch` above level. */
export interface Eye {
  readonly target: Point;
  readonly distance: number;
  /** Radians; 0 looks along +y (north), growing counter-clockwise seen from above. */
  readonly yaw: number;
  /** Radians above the horizon; just under a quarter turn looks straight down. */
  readonly pitch: number;
  /** Seen from so far off that parallel lines stay parallel, as on a plan or an elevation. */
  readonly flat: boolean;
}

export interface Bounds {
  readonly min: Point;
  readonly max: Point;
}

const wideLens = 26;
const flatLens = 1.2;
/** Opening of the lens, degrees. */
export const lensOf = ({ flat }: Pick<Eye, 'flat'>): number => (flat ? flatLens : wideLens);
/** Half the height of the picture for each metre of distance. */
export const spread = (eye: Pick<Eye, 'flat'>): number => Math.tan((lensOf(eye) * Math.PI) / 360);

/** The same picture through the other lens: what stands at the target keeps its size. */
export const withLens = (eye: Eye, flat: boolean): Eye =>
  eye.flat === flat ? eye : { ...eye, flat, distance: (eye.distance * spread(eye)) / spread({ flat }) };
const steepest = Math.PI / 2 - 0.001;

/** Named views; `home` shows the building as an isometric drawing would. */
export const namedViews = {
  home: { yaw: Math.PI / 5, pitch: 0.5, flat: false },
  top: { yaw: 0, pitch: steepest, flat: true },
  front: { yaw: 0, pitch: 0, flat: true },
  right: { yaw: Math.PI / 2, pitch: 0, flat: true },
  back: { yaw: Math.PI, pitch: 0, flat: true },
  left: { yaw: -Math.PI / 2, pitch: 0, flat: true },
  below: { yaw: Math.PI / 5, pitch: -0.6, flat: false },
} as const;
export type NamedView = keyof typeof namedViews;

/** From the target to the eye, unit length. */
export function outward({ yaw, pitch }: Eye): Vector3 {
  return new Vector3(Math.sin(yaw) * Math.cos(pitch), -Math.cos(yaw) * Math.cos(pitch), Math.sin(pitch));
}

export function place(camera: PerspectiveCamera, eye: Eye, reach: number): void {
  const out = outward(eye);
  const target = new Vector3(...eye.target);
  camera.position.copy(target).addScaledVector(out, eye.distance);
  camera.up.set(0, 0, 1);
  if (Math.abs(eye.pitch) > steepest - 0.01)
    camera.up.set(-Math.sin(eye.yaw), Math.cos(eye.yaw), 0).multiplyScalar(eye.pitch < 0 ? -1 : 1);
  camera.lookAt(target);
  camera.fov = lensOf(eye);
  const behind = reach * 2 + 10;
  camera.near = Math.max(eye.distance / 200, 0.02, eye.flat ? eye.distance - behind : 0);
  camera.far = eye.distance + reach * 4 + 10;
  camera.updateProjectionMatrix();
  camera.updateMatrixWorld();
}

/** The eye that sees all of `bounds` in a view as wide as `aspect` times its height, its corners evenly about the middle. */
export function framing(
  bounds: Bounds,
  { yaw, pitch, flat }: Pick<Eye, 'yaw' | 'pitch' | 'flat'>,
  aspect: number,
  margin = 1.08,
): Eye {
  const middle = (axis: 0 | 1 | 2): number => (bounds.min[axis] + bounds.max[axis]) / 2;
  let eye: Eye = { target: [middle(0), middle(1), middle(2)], distance: 1, yaw, pitch, flat };
  // What is near looks larger, so the middle of the box is not the middle of the picture: a few rounds settle it.
  for (let round = 0; round < 4; round++) {
    const fitted = { ...eye, distance: fittingDistance(bounds, eye, aspect, margin) };
    eye = { ...fitted, target: seenMiddle(bounds, fitted) };
  }
  return { ...eye, distance: fittingDistance(bounds, eye, aspect, margin) };
}

/** Corners of the box as the eye sees them: right, up and away from it, metres. */
function corners(bounds: Bounds, eye: Eye): readonly Vector3[] {
  const camera = new PerspectiveCamera(wideLens, 1);
  place(camera, eye, 1);
  const toEye = new Matrix4().copy(camera.matrixWorld).invert();
  return [bounds.min[0], bounds.max[0]].flatMap((x) =>
    [bounds.min[1], bounds.max[1]].flatMap((y) =>
      [bounds.min[2], bounds.max[2]].map((z) => {
        const { x: right, y: up, z: back } = new Vector3(x, y, z).applyMatrix4(toEye);
        return new Vector3(right, up, -back);
      }),
    ),
  );
}

function fittingDistance(bounds: Bounds, eye: Eye, aspect: number, margin: number): number {
  const tall = spread(eye) / margin;
  return Math.max(
    0.5,
    ...corners(bounds, eye).map(({ x, y, z }) => {
      const beyond = z - eye.distance;
      return Math.max(Math.abs(y) / tall, Math.abs(x) / (tall * aspect)) - beyond;
    }),
  );
}

function seenMiddle(bounds: Bounds, eye: Eye): Point {
  const seen = corners(bounds, eye).map(({ x, y, z }) => ({ x: x / z, y: y / z }));
  const centre = (axis: 'x' | 'y'): number =>
    ((Math.min(...seen.map((it) => it[axis])) + Math.max(...seen.map((it) => it[axis]))) / 2) * eye.distance;
  const [cy, sy, cp, sp] = [Math.cos(eye.yaw), Math.sin(eye.yaw), Math.cos(eye.pitch), Math.sin(eye.pitch)];
  const [right, up] = [centre('x'), centre('y')];
  return [
    eye.target[0] + cy * right - sy * sp * up,
    eye.target[1] + sy * right + cy * sp * up,
    eye.target[2] + cp * up,
  ];
}

export const clampPitch = (pitch: number): number => Math.max(-steepest, Math.min(steepest, pitch));

/** Part way from one eye to another, the short way round. */
export function partWay(from: Eye, b: Eye, t: number): Eye {
  const a = withLens(from, b.flat);
  const s = t * t * (3 - 2 * t);
  const turn = Math.atan2(Math.sin(b.yaw - a.yaw), Math.cos(b.yaw - a.yaw));
  const mixed = (start: number, end: number): number => start + (end - start) * s;
  return {
    target: [mixed(a.target[0], b.target[0]), mixed(a.target[1], b.target[1]), mixed(a.target[2], b.target[2])],
    distance: Math.exp(mixed(Math.log(a.distance), Math.log(b.distance))),
    yaw: a.yaw + turn * s,
    pitch: mixed(a.pitch, b.pitch),
    flat: b.flat,
  };
}
