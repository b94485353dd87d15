import type { Building } from '../building.ts';
import { lookOf } from '../colouring.ts';
import { type Theme, themes } from '../colours.ts';
import type { PageState, Store } from '../state.ts';
import { contextOf } from './context.ts';
import { eyeControl } from './eye-control.ts';
import { type LabelText, labelWishes } from './label-wishes.ts';
import { labelsIn } from './labels.ts';
import { type Measure, measureIn } from './measure.ts';
import { type Bounds, type Eye, framing, type NamedView, namedViews, spread } from './orbit.ts';
import { type Hit, pick } from './pick.ts';
import { pipingOf } from './piping.ts';
import type { Point } from './polylines.ts';
import { routeOf, type Way, wayOf } from './route.ts';
import { type DrawStats, stageIn } from './stage.ts';
import { boxOf, fabricBounds, fixtureBounds, storeyBox, widened, withFabric, within } from './surroundings.ts';
import { undersizedRuns } from './undersized-runs.ts';

export interface SceneView {
  readonly stats: DrawStats;
  /** Frames the pipes of these rows with some of what is round them. */
  framePipes(rows: readonly number[]): void;
  frameFixture(row: number): void;
  frameWay(): void;
  fit(): void;
  view(name: NamedView): void;
  readonly eye: Eye;
  setEye(eye: Eye): void;
  /** CSS pixels of the canvas; null where the point lies behind the eye. */
  project(at: Point): { readonly x: number; readonly y: number } | null;
  middleOf(row: number): Point | null;
  resize(): void;
  dispose(): void;
}

export interface SceneParts {
  readonly canvas: HTMLCanvasElement;
  readonly labelLayer: HTMLElement;
  readonly tip: HTMLElement;
  /** What to say of a thing under the pointer. */
  readonly tipText: (hit: Hit) => string;
  readonly labelText: LabelText;
  /** Pixels at the bottom that something else covers. */
  readonly covered: () => number;
}

const margin = 0.9;
/** Pixels at the top that the tools cover. */
const underTools = 56;
/** A model of more sections than this is drawn in lines first. */
const firstInLines = 4000;

export function sceneView(building: Building, store: Store, parts: SceneParts): SceneView {
  const { canvas } = parts;
  const stage = stageIn(canvas, building.sectionCount);
  const piping = pipingOf(building, stage.shared);
  const context = contextOf(building, stage.shared);
  const route = routeOf(building, stage.shared);
  const labels = labelsIn(parts.labelLayer);
  stage.scene.add(context.group, piping.group, route.group);
  const all = Array.from({ length: building.sectionCount }, (_, section) => section);
  const piped = piping.bounds(all) ?? fixtureBounds(building);
  const whole = widened(piped === null ? fabricBounds(building) : withFabric(building, piped), 0.3);
  const reach = Math.hypot(...([0, 1, 2] as const).map((axis) => whole.max[axis] - whole.min[axis]));
  const runs = undersizedRuns(building);
  const reduced = window.matchMedia('(prefers-reduced-motion: reduce)');
  let way: Way | null = null;
  let clip: Bounds | null = null;
  let ticking = 0;
  const inside = (at: Point): boolean =>
    clip === null || ([0, 1, 2] as const).every((axis) => at[axis] >= clip!.min[axis] && at[axis] <= clip!.max[axis]);
  const aspect = (): number => Math.max(1, stage.size[0]) / Math.max(1, stage.size[1]);
  const hitAt = (x: number, y: number, slackPixels: number): Hit | null =>
    pick(building, piping.polylines, stage.ray(x, y), slackPixels * stage.shared.pixel.value, inside, piping.visible);
  const theme = (): Theme => themes[store.state.theme];

  let finishing = 0;
  const still = (): void => {
    window.clearTimeout(finishing);
    if (building.sectionCount > firstInLines && !piping.has('full')) {
      // The first picture of a large model comes at once, in lines; the tubes are built behind it.
      piping.setDetail('lines');
      piping.setShare(1);
      context.setCheap(true);
      stage.draw();
      finishing = window.setTimeout(finish, 60);
      return;
    }
    finish();
  };
  const finish = (): void => {
    piping.setDetail('full');
    context.setCheap(false);
    stage.drawStill();
    placeLabels();
  };
  const moving = (): void => {
    window.clearTimeout(finishing);
    piping.setDetail(stage.detail);
    piping.setShare(stage.share);
    context.setCheap(stage.detail !== 'full');
    stage.look(control.eye, reach);
    labels.hide();
    measure.move();
    stage.draw();
  };
  const control = eyeControl(canvas, framing(whole, namedViews.home, 1.5), () => reduced.matches, {
    moved: moving,
    settled: still,
    clicked(x, y) {
      const hit = hitAt(x, y, 5);
      if (store.state.measuring) {
        measure.add(hit);
        return;
      }
      store.set({ chosen: chosenBy(building, hit), follow: null });
    },
    hovered(x, y) {
      const hit = hitAt(x, y, 3);
      parts.tip.hidden = hit === null;
      canvas.classList.toggle('over', hit !== null);
      if (hit === null) return;
      parts.tip.textContent = parts.tipText(hit);
      parts.tip.style.transform = `translate(${Math.min(x + 14, canvas.clientWidth - parts.tip.offsetWidth - 8)}px, ${y + 16}px)`;
    },
    under: (x, y) => hitAt(x, y, 12)?.at ?? null,
  });
  canvas.addEventListener('pointerleave', () => {
    parts.tip.hidden = true;
  });
  const measure: Measure = measureIn(
    parts.labelLayer.parentElement ?? document.body,
    (at) => stage.project(at),
    (text) => parts.labelText.measure(text),
  );
  const placeLabels = (): void => {
    measure.move();
    labels.show(labelWishes(building, store.state, piping, runs, way, parts.labelText, inside), (at) =>
      stage.project(at),
    );
  };

  const show = (state: PageState): void => {
    piping.show(lookOf(building, state, theme()), theme().name === 'light' ? [27, 33, 41] : [231, 235, 239]);
    context.show(theme(), state.context, state.chosen?.is === 'fixture' ? state.chosen.row : null);
    stage.setTheme(theme());
    clip = storeyBox(building, state.storey);
    stage.shared.clipMin.value.set(...(clip?.min ?? [-1e9, -1e9, -1e9]));
    stage.shared.clipMax.value.set(...(clip?.max ?? [1e9, 1e9, 1e9]));
    way = state.follow === null ? null : wayOf(building, piping.polylines, state.follow);
    route.show(way, state.follow?.what ?? 'water', state.follow?.step ?? 0, theme());
    if (!state.measuring) measure.clear();
    stage.look(control.eye, reach);
    run(way !== null && !reduced.matches);
    still();
  };
  /** Only a followed way moves by itself; everything else is drawn when it changes. */
  const run = (wanted: boolean): void => {
    cancelAnimationFrame(ticking);
    ticking = 0;
    if (!wanted) {
      route.setTime(0);
      return;
    }
    const tick = (now: number): void => {
      route.setTime((now / 1000) * 0.9);
      if (!document.hidden && canvas.clientWidth > 0) stage.draw();
      // A slow machine is given time to answer the reader between frames.
      ticking = requestAnimationFrame(stage.stats.lastMs > 60 ? () => requestAnimationFrame(tick) : tick);
    };
    ticking = requestAnimationFrame(tick);
  };
  store.watch((now, before) => {
    if (now.view === 'model' && now !== before && canvas.clientWidth > 0) show(now);
  });

  const fly = (bounds: Bounds | null, turnTo?: Pick<Eye, 'yaw' | 'pitch' | 'flat'>): void => {
    if (bounds === null) return;
    const { yaw, pitch, flat } = control.eye;
    const turned = turnTo ?? { yaw, flat, pitch: flat ? pitch : Math.max(0.2, Math.min(1.1, pitch)) };
    control.fly(clearOf(parts.covered(), framing(bounds, turned, aspect())));
  };
  const sectionsOf = (rows: readonly number[]): number[] => rows.flatMap((row) => building.sectionsOf[row] ?? []);
  /** The same view in the part of the picture that nothing covers. */
  const clearOf = (covered: number, eye: Eye): Eye => {
    const height = Math.max(1, stage.size[1]);
    const free = Math.max(height * 0.3, height - covered - underTools);
    const distance = eye.distance * (height / free);
    const lower = ((covered - underTools) * spread(eye) * distance) / height;
    const [cy, sy, cp, sp] = [Math.cos(eye.yaw), Math.sin(eye.yaw), Math.cos(eye.pitch), Math.sin(eye.pitch)];
    const [x, y, z] = eye.target;
    return { ...eye, distance, target: [x + sy * sp * lower, y - cy * sp * lower, z - cp * lower] };
  };
  /** What a storey's picture holds: the pipes in it and the building round them. */
  const seenIn = (box: Bounds): Bounds | null => {
    const bounds = piping.bounds(
      all.filter((section) => {
        const own = piping.bounds([section]);
        return own !== null && piping.visible[section] === 1 && own.max[2] > box.min[2] && own.min[2] < box.max[2];
      }),
    );
    return bounds === null ? null : within(withFabric(building, within(bounds, box)), box);
  };
  const view: SceneView = {
    stats: stage.stats,
    framePipes(rows) {
      const bounds = piping.bounds(sectionsOf(rows));
      if (bounds !== null) fly(widened(bounds, margin));
    },
    frameFixture(row) {
      const box = boxOf(building, row);
      if (box !== null) fly(widened(box, margin * 1.3));
    },
    frameWay() {
      if (way !== null) fly(piping.bounds(way.sections) && widened(piping.bounds(way.sections)!, 0.6));
    },
    fit() {
      const bounds = piping.bounds(all.filter((section) => piping.visible[section] === 1)) ?? whole;
      fly(clip === null ? widened(bounds, 0.3) : (seenIn(clip) ?? bounds), control.eye);
    },
    view(name) {
      fly(clip === null ? whole : (seenIn(clip) ?? whole), namedViews[name]);
    },
    get eye() {
      return control.eye;
    },
    setEye(eye) {
      control.eye = eye;
    },
    project: (at) => stage.project(at),
    middleOf(row) {
      const bounds = piping.bounds(sectionsOf([row]));
      if (bounds === null) return null;
      const middle = (axis: 0 | 1 | 2): number => (bounds.min[axis] + bounds.max[axis]) / 2;
      return [middle(0), middle(1), middle(2)];
    },
    resize() {
      if (!stage.resize()) return;
      stage.look(control.eye, reach);
      still();
    },
    dispose() {
      run(false);
      window.clearTimeout(finishing);
      control.dispose();
      piping.dispose();
      context.dispose();
      route.dispose();
      stage.dispose();
    },
  };
  const frameHome = (): void => {
    control.eye = framing(whole, namedViews.home, aspect());
  };
  stage.resize();
  frameHome();
  show(store.state);
  let hidden = canvas.clientWidth === 0;
  new ResizeObserver(() => {
    const wasHidden = hidden;
    hidden = canvas.clientWidth === 0;
    if (hidden) return;
    // Whatever changed while nobody saw it is drawn now, when its place is known again.
    if (!wasHidden) view.resize();
    else {
      const isFirst = stage.size[0] === 0;
      stage.resize();
      if (isFirst) frameHome();
      show(store.state);
    }
  }).observe(canvas);
  return view;
}

function chosenBy(building: Building, hit: Hit | null): PageState['chosen'] {
  if (hit === null) return null;
  if (hit.is === 'fixture') return { is: 'fixture', row: hit.index };
  const row = building.data.scene.pipes.pipe[hit.index] ?? -1;
  return row < 0 ? null : { is: 'pipe', row };
}
