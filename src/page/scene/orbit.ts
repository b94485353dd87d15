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
}

export interface Bounds {
  readonly min: Point;
  readonly max: Point;
}

export const fieldOfView = 32;
const steepest = Math.PI / 2 - 0.001;

/** Named views; `home` shows the building as an isometric drawing would. */
export const namedViews = {
  home: { yaw: Math.PI / 5, pitch: 0.5 },
  top: { yaw: 0, pitch: steepest },
  front: { yaw: 0, pitch: 0.02 },
  right: { yaw: Math.PI / 2, pitch: 0.02 },
  back: { yaw: Math.PI, pitch: 0.02 },
  left: { yaw: -Math.PI / 2, pitch: 0.02 },
  below: { yaw: Math.PI / 5, pitch: -0.6 },
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
  camera.near = Math.max(0.02, eye.distance / 200);
  camera.far = eye.distance + reach * 4 + 10;
  camera.updateProjectionMatrix();
  camera.updateMatrixWorld();
}

/** The eye that sees all of `bounds` in a view as wide as `aspect` times its height. */
export function framing(bounds: Bounds, yaw: number, pitch: number, aspect: number, margin = 1.12): Eye {
  const target: Point = [
    (bounds.min[0] + bounds.max[0]) / 2,
    (bounds.min[1] + bounds.max[1]) / 2,
    (bounds.min[2] + bounds.max[2]) / 2,
  ];
  const eye = { target, distance: 1, yaw, pitch };
  const camera = new PerspectiveCamera(fieldOfView, aspect);
  place(camera, eye, 1);
  const toEye = new Matrix4().copy(camera.matrixWorld).invert();
  const tall = Math.tan((fieldOfView * Math.PI) / 360) / margin;
  let distance = 0.5;
  for (const x of [bounds.min[0], bounds.max[0]])
    for (const y of [bounds.min[1], bounds.max[1]])
      for (const z of [bounds.min[2], bounds.max[2]]) {
        const corner = new Vector3(x, y, z).applyMatrix4(toEye);
        // The camera stood one metre off: depth beyond the target is -z - 1.
        const depth = -corner.z - 1;
        distance = Math.max(distance, Math.abs(corner.y) / tall - depth, Math.abs(corner.x) / (tall * aspect) - depth);
      }
  return { ...eye, distance };
}

export const clampPitch = (pitch: number): number => Math.max(-steepest, Math.min(steepest, pitch));

/** Part way from one eye to another, the short way round. */
export function partWay(a: Eye, b: Eye, t: number): Eye {
  const s = t * t * (3 - 2 * t);
  const turn = Math.atan2(Math.sin(b.yaw - a.yaw), Math.cos(b.yaw - a.yaw));
  const mixed = (from: number, to: number): number => from + (to - from) * s;
  return {
    target: [mixed(a.target[0], b.target[0]), mixed(a.target[1], b.target[1]), mixed(a.target[2], b.target[2])],
    distance: Math.exp(mixed(Math.log(a.distance), Math.log(b.distance))),
    yaw: a.yaw + turn * s,
    pitch: mixed(a.pitch, b.pitch),
  };
}
