import { Color, PerspectiveCamera, Scene, Vector3, WebGLRenderer } from 'three';
import type { Theme } from '../colours.ts';
import { type Eye, lensOf, outward, place, spread } from './orbit.ts';
import type { Ray } from './pick.ts';
import { type SharedUniforms, sharedUniforms } from './pipe-material.ts';
import type { Detail } from './piping.ts';
import type { Point } from './polylines.ts';
import { smoothStill } from './smooth-still.ts';

/** What drawing has cost, for the tests and for the choice of detail. Milliseconds; `firstAt` since navigation. */
export interface DrawStats {
  frames: number;
  lastMs: number;
  firstAt: number;
  calls: number;
  readonly software: boolean;
}

export interface Stage {
  readonly scene: Scene;
  readonly shared: SharedUniforms;
  readonly canvas: HTMLCanvasElement;
  readonly stats: DrawStats;
  look(eye: Eye, reach: number): void;
  setTheme(theme: Theme): void;
  /** Draws once at the next frame, however often it is called before. */
  draw(): void;
  /** Draws now and finely: what stands still may take its time. */
  drawStill(): void;
  project(at: Point): { readonly x: number; readonly y: number } | null;
  ray(x: number, y: number): Ray;
  /** Width and height of its place, in CSS pixels, as last seen: while the picture is hidden it has none of its own. */
  readonly size: readonly [number, number];
  /** Fits the picture to its place; false where that has not changed, or is hidden. */
  resize(): boolean;
  /** How much to draw while moving, by what frames have cost so far. */
  readonly detail: Detail;
  /** Share of the plainest detail that this machine draws in time while moving. */
  readonly share: number;
  dispose(): void;
}

/**
 * Milliseconds: a frame dearer than this while moving asks for less detail. A screen shows a new picture every 16.7 ms,
 * so that what takes two of these is seen 30 times a second and what takes a little more only 20 times.
 */
const dear = 32;
/** A picture dearer than this is not drawn eight times only to smooth its edges. */
const dearStill = 160;
const coarseRatio = 0.6;
/** Fewer of the longest pipes than this no longer show what is turned. */
const leastShare = 0.05;

/** The renderer and its camera. Nothing runs while nothing changes. Throws where the browser has no WebGL 2. */
export function stageIn(canvas: HTMLCanvasElement, sections: number): Stage {
  const software = drawsInSoftware();
  const renderer = new WebGLRenderer({ canvas, antialias: !software, powerPreference: 'high-performance' });
  renderer.setPixelRatio(software ? 1 : Math.min(2, window.devicePixelRatio));
  const scene = new Scene();
  scene.background = new Color();
  const camera = new PerspectiveCamera(lensOf({ flat: false }), 1);
  const shared = sharedUniforms();
  const stats = { frames: 0, lastMs: 0, firstAt: 0, calls: 0, software };
  const ladder: readonly Detail[] = ['full', 'light', 'lines'];
  let rung = software && sections > 20_000 ? 2 : software && sections > 3000 ? 1 : 0;
  // The last resort of a slow machine: fewer pixels while the eye moves.
  let coarse = false;
  let share = 1;
  const isCoarse = (): boolean => renderer.getPixelRatio() === coarseRatio;
  let asked = 0;
  let size: readonly [number, number] = [0, 0];
  const reading = new Uint8Array(4);
  const paint = (): void => {
    const began = performance.now();
    renderer.render(scene, camera);
    // Software drawing is only done when somebody looks at it: without this the measure would be of an empty promise.
    if (software) renderer.getContext().readPixels(0, 0, 1, 1, 0x1908, 0x1401, reading);
    stats.frames++;
    if (stats.frames === 1) stats.firstAt = performance.now();
    stats.calls = renderer.info.render.calls;
    stats.lastMs = performance.now() - began;
  };
  /** The next frame draws less where this one was too dear, and again more where there is time to spare. */
  const settle = (milliseconds: number): void => {
    if (sections <= 500) return;
    if (milliseconds <= dear) {
      if (milliseconds < dear / 2) share = Math.min(1, share * 1.1);
    } else if (rung < ladder.length - 1) rung++;
    else if (software && !coarse) coarse = true;
    else share = Math.max(leastShare, share * 0.75);
  };
  const smooth = software ? smoothStill(canvas, camera, paint) : null;
  const stage: Stage = {
    scene,
    shared,
    canvas,
    stats,
    get detail() {
      return ladder[rung] ?? 'full';
    },
    get share() {
      return share;
    },
    look(eye, reach) {
      place(camera, eye, reach);
      shared.pixel.value = (2 * spread(eye)) / Math.max(1, size[1]);
      // A mark every 26 pixels or so, in steps of two, so that patterns do not crawl while zooming.
      const wished = 26 * shared.pixel.value * eye.distance;
      shared.period.value = 2 ** Math.round(Math.log2(Math.max(0.02, wished)));
    },
    setTheme(theme) {
      // The ground is set as it is written: three would take it for linear light.
      (scene.background as Color).setRGB(...asShown(theme.ground));
      shared.light.value = theme.name === 'light' ? 1 : 0;
    },
    draw() {
      smooth?.end();
      if (asked !== 0) return;
      asked = requestAnimationFrame(() => {
        asked = 0;
        if (coarse && !isCoarse()) renderer.setPixelRatio(coarseRatio);
        paint();
        settle(stats.lastMs);
      });
    },
    drawStill() {
      cancelAnimationFrame(asked);
      asked = 0;
      smooth?.end();
      if (isCoarse()) renderer.setPixelRatio(1);
      if (smooth !== null && stats.lastMs < dearStill) smooth.begin();
      else paint();
    },
    project(at) {
      const point = new Vector3(...at).project(camera);
      if (point.z > 1) return null;
      return { x: ((point.x + 1) / 2) * canvas.clientWidth, y: ((1 - point.y) / 2) * canvas.clientHeight };
    },
    ray(x, y) {
      const far = new Vector3((x / canvas.clientWidth) * 2 - 1, 1 - (y / canvas.clientHeight) * 2, 0.5).unproject(
        camera,
      );
      const toward = far.sub(camera.position).normalize();
      return {
        from: camera.position.toArray() as [number, number, number],
        toward: toward.toArray() as [number, number, number],
      };
    },
    get size() {
      return size;
    },
    resize() {
      const { clientWidth, clientHeight } = canvas;
      if (clientWidth === 0 || (clientWidth === size[0] && clientHeight === size[1])) return false;
      size = [clientWidth, clientHeight];
      renderer.setSize(clientWidth, clientHeight, false);
      camera.aspect = clientWidth / Math.max(1, clientHeight);
      camera.updateProjectionMatrix();
      return true;
    },
    dispose() {
      cancelAnimationFrame(asked);
      smooth?.end();
      renderer.dispose();
    },
  };
  return stage;
}

const asShown = (colour: readonly [number, number, number]): [number, number, number] =>
  colour.map((part) => {
    const c = part / 255;
    return c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4;
  }) as [number, number, number];

/** Smoothing edges costs a software renderer half its speed, so it must be known before the real canvas is set up. */
function drawsInSoftware(): boolean {
  const context = document.createElement('canvas').getContext('webgl2');
  if (context === null) throw new Error('no WebGL 2');
  const info = context.getExtension('WEBGL_debug_renderer_info');
  const name = String(context.getParameter(info?.UNMASKED_RENDERER_WEBGL ?? context.RENDERER));
  context.getExtension('WEBGL_lose_context')?.loseContext();
  return /swiftshader|llvmpipe|softpipe|software|basic render/i.test(name);
}

/** The corner of the eye toward the viewer, for those who only need a direction. */
export const eyeDirection = (eye: Eye): Point => outward(eye).toArray() as [number, number, number];
