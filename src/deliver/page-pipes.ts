import type { Box, Vec3 } from '../geometry/vector.ts';
import type { Element, ElementId, Model } from '../model/model.ts';
import type { Network, Pipe } from '../network/network.ts';
import type { ResultFixture, ResultPipe } from '../schedule/result.ts';

/** One entry a pipe of the network unless said. Lengths in millimetres from the scene's origin; -1 is none. */
export interface PipeColumns {
  /** Index into the result's pipes; -1 for a link between fittings, which is never sized. */
  readonly pipe: Int32Array;
  /** Index into that pipe's sections; 0 where it has one. */
  readonly section: Int32Array;
  /** Count of its points; 0 where the model gives no geometry. */
  readonly points: Int32Array;
  /** Outside diameter as drawn, tenths of a millimetre; 0 where nothing says. */
  readonly outer: Int32Array;
  /** Joints at the first and the last point. */
  readonly jointA: Int32Array;
  readonly jointB: Int32Array;
  /** All points, one pipe after the other. */
  readonly x: Int32Array;
  readonly y: Int32Array;
  readonly z: Int32Array;
  /** One entry a joint. `jointKnown` 0: no position. `jointFitting`: index into `fittings`. */
  readonly jointX: Int32Array;
  readonly jointY: Int32Array;
  readonly jointZ: Int32Array;
  readonly jointKnown: Int32Array;
  readonly jointFitting: Int32Array;
  /** 1: geometry inferred this joint. */
  readonly jointInferred: Int32Array;
}

/** One entry a fixture of the result: its box; all zero where the model gives none. `facing`: see `facingOf`. */
export interface FixtureColumns {
  readonly minX: Int32Array;
  readonly minY: Int32Array;
  readonly minZ: Int32Array;
  readonly maxX: Int32Array;
  readonly maxY: Int32Array;
  readonly maxZ: Int32Array;
  /** Where its front looks: 0 +x, 1 +y, 2 -x, 3 -y. */
  readonly facing: Int32Array;
}

export interface SceneFitting {
  readonly globalId: string;
  readonly name: string | null;
  readonly class: string;
}

const mm = (value: number): number => Math.round(value * 1000);
const key = ({ globalId, stepId }: Element): string => `${globalId} ${stepId}`;

/** Whole millimetres in the middle of the piping, so that a site grid far away costs no precision in the page. */
export function originOf(model: Model, network: Network): Vec3 {
  const box = new Bounds();
  for (const pipe of network.pipes) for (const point of pipe.points ?? []) box.add(point);
  if (box.empty) for (const element of model.elements) if (element.box !== null) box.addBox(element.box);
  if (box.empty) return [0, 0, 0];
  const middle = (axis: 0 | 1): number => mm((box.min[axis]! + box.max[axis]!) / 2) / 1000;
  return [middle(0), middle(1), mm(box.min[2]!) / 1000];
}

class Bounds {
  readonly min = [Number.POSITIVE_INFINITY, Number.POSITIVE_INFINITY, Number.POSITIVE_INFINITY];
  readonly max = [Number.NEGATIVE_INFINITY, Number.NEGATIVE_INFINITY, Number.NEGATIVE_INFINITY];
  get empty(): boolean {
    return this.min[0]! > this.max[0]!;
  }
  add(point: Vec3): void {
    for (const axis of [0, 1, 2] as const) {
      this.min[axis] = Math.min(this.min[axis]!, point[axis]);
      this.max[axis] = Math.max(this.max[axis]!, point[axis]);
    }
  }
  addBox({ min, max }: Box): void {
    this.add(min);
    this.add(max);
  }
}

export function pipeColumns(
  model: Model,
  network: Network,
  rows: readonly ResultPipe[],
  rowAt: ReadonlyMap<string, number>,
  origin: Vec3,
): { readonly columns: PipeColumns; readonly fittings: readonly SceneFitting[] } {
  const { pipes, joints } = network;
  const column = (of: (pipe: Pipe) => number): Int32Array => Int32Array.from(pipes, of);
  const elementOf = (pipe: Pipe): Element | undefined =>
    pipe.element === null ? undefined : model.elements[pipe.element];
  const row = (pipe: Pipe): number => {
    const element = elementOf(pipe);
    return element === undefined ? -1 : (rowAt.get(key(element)) ?? -1);
  };
  const shapes = pipes.map((pipe) => pipe.points ?? linkPoints(network, pipe));
  const all = shapes.flat();
  const axis = (index: 0 | 1 | 2): Int32Array => Int32Array.from(all, (point) => mm(point[index] - origin[index]));
  const fittings: SceneFitting[] = [];
  const seen = new Map<ElementId, number>();
  const fittingOf = (elements: readonly ElementId[]): number => {
    const id = elements[0];
    const element = id === undefined ? undefined : model.elements[id];
    if (id === undefined || element === undefined) return -1;
    const known = seen.get(id);
    if (known !== undefined) return known;
    seen.set(id, fittings.length);
    return fittings.push({ globalId: element.globalId, name: element.name, class: element.ifcClass }) - 1;
  };
  const jointAxis = (index: 0 | 1 | 2): Int32Array =>
    Int32Array.from(joints, ({ at }) => (at === null ? 0 : mm(at[index] - origin[index])));
  return {
    fittings,
    columns: {
      pipe: column(row),
      section: column((pipe) => sectionOf(network, pipe, rows[row(pipe)])),
      points: Int32Array.from(shapes, (points) => points.length),
      outer: column((pipe) => Math.round((elementOf(pipe)?.centreLine?.outerDiameter ?? 0) * 10_000)),
      jointA: column(({ ends }) => ends[0]),
      jointB: column(({ ends }) => ends[1]),
      x: axis(0),
      y: axis(1),
      z: axis(2),
      jointX: jointAxis(0),
      jointY: jointAxis(1),
      jointZ: jointAxis(2),
      jointKnown: Int32Array.from(joints, ({ at }) => (at === null ? 0 : 1)),
      jointFitting: Int32Array.from(joints, ({ elements }) => fittingOf(elements)),
      jointInferred: Int32Array.from(joints, ({ inferred }) => (inferred === null ? 0 : 1)),
    },
  };
}

/** A link has no shape of its own: it runs from joint to joint. */
function linkPoints(network: Network, pipe: Pipe): readonly Vec3[] {
  if (pipe.element !== null) return [];
  const [a, b] = pipe.ends.map((end) => network.joints[end]?.at ?? null);
  return a == null || b == null ? [] : [a, b];
}

/** The result cuts an element where the network does; where it has merged sections, by the middle of this one. */
function sectionOf(network: Network, pipe: Pipe, row: ResultPipe | undefined): number {
  const sections = row?.sections;
  if (sections === undefined || pipe.element === null) return 0;
  const own = network.pipesOf.get(pipe.element) ?? [];
  if (own.length === sections.length) return Math.max(0, own.indexOf(pipe.id));
  const middle = (pipe.from + pipe.to) / 2;
  return Math.max(
    0,
    sections.findIndex(({ from, to }) => middle >= from && middle <= to),
  );
}

export function fixtureBoxes(
  model: Model,
  network: Network,
  rows: readonly ResultFixture[],
  rowAt: ReadonlyMap<string, number>,
  origin: Vec3,
): FixtureColumns {
  const boxes: (Box | null)[] = rows.map(() => null);
  const facings = rows.map(() => 0);
  for (const element of model.elements) {
    const at = rowAt.get(key(element));
    if (at === undefined) continue;
    const box = element.box ?? standIn(network, element);
    boxes[at] = box;
    if (box !== null) facings[at] = facingOf(model, box);
  }
  const side = (end: 'min' | 'max', axis: 0 | 1 | 2): Int32Array =>
    Int32Array.from(boxes, (box) => (box === null ? 0 : mm(box[end][axis] - origin[axis])));
  return {
    minX: side('min', 0),
    minY: side('min', 1),
    minZ: side('min', 2),
    maxX: side('max', 0),
    maxY: side('max', 1),
    maxZ: side('max', 2),
    facing: Int32Array.from(facings),
  };
}

/** Where a fixture has no body, a hand-sized block stands at its outlet, so that it can be seen and picked. */
function standIn(network: Network, element: Element): Box | null {
  const outlet = network.jointsOf.get(element.id)?.[0];
  const at = (outlet === undefined ? null : network.joints[outlet]?.at) ?? element.origin;
  if (at === null || at === undefined) return null;
  const half = 0.1;
  return { min: [at[0] - half, at[1] - half, at[2]], max: [at[0] + half, at[1] + half, at[2] + 2 * half] };
}

/** A fixture turns its back to the nearest wall; away from every wall its front is the shorter side of its box. */
function facingOf(model: Model, box: Box): number {
  let best = { gap: 0.6, facing: box.max[0] - box.min[0] >= box.max[1] - box.min[1] ? 3 : 0 };
  const consider = (gap: number, facing: number): void => {
    if (Math.abs(gap) < best.gap) best = { gap: Math.abs(gap), facing };
  };
  for (const wall of model.walls) {
    const body = wall.box;
    if (body === null || body.max[2] < box.min[2] || body.min[2] > box.max[2]) continue;
    const beside = (axis: 0 | 1): boolean => body.min[axis] <= box.max[axis] && body.max[axis] >= box.min[axis];
    if (beside(1)) {
      consider(box.min[0] - body.max[0], 0);
      consider(body.min[0] - box.max[0], 2);
    }
    if (beside(0)) {
      consider(box.min[1] - body.max[1], 1);
      consider(body.min[1] - box.max[1], 3);
    }
  }
  return best.facing;
}
