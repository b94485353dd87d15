import { type Box, cross, length, planDistance, subtract, unit, type Vec3 } from '../../src/geometry/vector.ts';
import type { ElementClass, PropertyFact } from '../../src/model/model.ts';
import { type Joints, meetPipes } from './draft-joints.ts';
import { draftFitting, draftFixture, draftJointFitting } from './draft-parts.ts';
import type { PipeSize } from './pipe-sizes.ts';
import type { Sketch, SketchMedium, SketchPipe } from './sketch.ts';
import { globalIdOf } from './sketch-ids.ts';

/**
 * A sketch as elements with shapes, ports and connections: what `modelOf` tells as a model and `ifcOf` writes as a
 * file. Pipes stand first, then the fittings that meeting pipes make, then the parts; each in the order of the sketch.
 */
export interface Draft {
  readonly elements: readonly DraftElement[];
  readonly ports: readonly DraftPort[];
  /** Pairs of ports, in the order of their nodes. */
  readonly connections: readonly (readonly [number, number])[];
}

export interface DraftElement {
  /** Name in the sketch, and of the element. */
  readonly name: string;
  readonly globalId: string;
  readonly ifcClass: string;
  readonly predefined: string | null;
  readonly kind: ElementClass;
  readonly typeName: string;
  readonly medium: SketchMedium;
  readonly storey: number | null;
  /** Index into the sketch's spaces, of fixtures whose outlet lies in one. */
  readonly space: number | null;
  readonly material: string | null;
  readonly size: PipeSize | null;
  readonly origin: Vec3;
  /** Centre line of a pipe, cut back to the faces of its fittings. Without a size it has no body: an axis is all. */
  readonly line: readonly Vec3[] | null;
  /** Solids of everything else, in world metres: boxes, and round bars from point to point. */
  readonly solids: readonly Solid[];
  readonly box: Box;
  readonly properties: readonly PropertyFact[];
  /** Slope to be stated by a property, m/m; null when level, vertical or no pipe. */
  readonly slope: number | null;
  readonly ports: readonly number[];
}

export type Solid =
  | { readonly box: Box }
  | { readonly bar: readonly [Vec3, Vec3]; readonly radius: number }
  /** A bowl or basin: the outline of a box with rounded corners, from the box's bottom to its top. */
  | { readonly bowl: Box };

export interface DraftPort {
  readonly owner: number;
  readonly at: Vec3;
  readonly direction: 'source' | 'sink' | 'unknown';
}

export function draftOf(sketch: Sketch): Draft {
  const known = drafts.get(sketch);
  if (known !== undefined) return known;
  const made = makeDraft(sketch);
  drafts.set(sketch, made);
  return made;
}

/** A sketch never changes, and tests ask it for names one by one. */
const drafts = new WeakMap<Sketch, Draft>();

function makeDraft(sketch: Sketch): Draft {
  const joints = meetPipes(sketch);
  const elements: Omit<DraftElement, 'ports'>[] = sketch.pipes.map((pipe, index) =>
    draftPipe(sketch, pipe, joints, index),
  );
  const places = new Map<string, number>();
  for (const joint of joints.at.values()) {
    const { bare, missing } = joint.node;
    if (joint.part !== null || joint.past !== null || joint.ends.length < 2 || bare || missing) continue;
    places.set(joint.node.name, elements.length);
    elements.push(draftJointFitting(sketch, joint));
  }
  for (const part of sketch.parts) {
    places.set(part.name, elements.length);
    const joint = joints.at.get(part.name)!;
    elements.push(part.is === 'fixture' ? draftFixture(sketch, part, joint) : draftFitting(sketch, part, joint));
  }
  for (const [index, pipe] of sketch.pipes.entries())
    if (pipe.twice) {
      const name = `${pipe.name} double`;
      elements.push({ ...elements[index]!, name, globalId: globalIdOf(sketch.title, 'pipe', name) });
    }
  const { ports, connections } = portsOf(joints, places);
  const owned = elements.map((): number[] => []);
  for (const [index, { owner }] of ports.entries()) owned[owner]!.push(index);
  return { elements: elements.map((element, index) => ({ ...element, ports: owned[index]! })), ports, connections };
}

function draftPipe(sketch: Sketch, pipe: SketchPipe, joints: Joints, index: number): Omit<DraftElement, 'ports'> {
  const line = withoutStraightPoints(joints.lines[index]!);
  const radius = pipe.size.outer / 2;
  const first = line[0]!;
  const last = line.at(-1)!;
  const plan = planDistance(first, last);
  const drawn =
    plan > 0 && line.length === 2 && plan > Math.abs(last[2] - first[2]) ? Math.abs(first[2] - last[2]) / plan : 0;
  return {
    name: pipe.name,
    globalId: globalIdOf(sketch.title, 'pipe', pipe.name),
    ifcClass: 'IfcPipeSegment',
    predefined: 'RIGIDSEGMENT',
    kind: 'segment',
    typeName: `${pipe.material} pipe${pipe.sized === 'by name' ? ` ${pipe.size.label}` : ''}`,
    medium: pipe.medium,
    storey: pipe.storey,
    space: null,
    material: pipe.material,
    size: pipe.sized === 'plainly' ? pipe.size : null,
    origin: first,
    line,
    solids: [],
    box: joined(line.slice(1).map((to, leg) => barBox(line[leg]!, to, radius))),
    properties: [],
    slope: pipe.states ?? (drawn > 1e-6 ? drawn : null),
  };
}

/** A solid that runs straight past its nodes is one straight pipe. */
function withoutStraightPoints(line: readonly Vec3[]): readonly Vec3[] {
  return line.filter((point, place) => {
    const before = line[place - 1];
    const after = line[place + 1];
    if (before === undefined || after === undefined) return true;
    return length(cross(unit(subtract(point, before)), unit(subtract(after, point)))) > 1e-6;
  });
}

/** Box of a round bar, exact: flat ends reach out only as far as the bar is tilted. */
export function barBox(from: Vec3, to: Vec3, radius: number): Box {
  const along = unit(subtract(to, from));
  const reach = along.map((part) => radius * Math.sqrt(Math.max(0, 1 - part * part)));
  const of = (choose: (a: number, b: number) => number, sign: 1 | -1) => (axis: 0 | 1 | 2) =>
    choose(from[axis], to[axis]) + sign * reach[axis]!;
  const least = of(Math.min, -1);
  const most = of(Math.max, 1);
  return { min: [least(0), least(1), least(2)], max: [most(0), most(1), most(2)] };
}

/** The box round boxes. */
export function joined(boxes: readonly Box[]): Box {
  const least = (axis: 0 | 1 | 2) => Math.min(...boxes.map(({ min }) => min[axis]));
  const most = (axis: 0 | 1 | 2) => Math.max(...boxes.map(({ max }) => max[axis]));
  return { min: [least(0), least(1), least(2)], max: [most(0), most(1), most(2)] };
}

const againstFlow = (direction: DraftPort['direction']): DraftPort['direction'] =>
  direction === 'sink' ? 'source' : direction === 'source' ? 'sink' : 'unknown';

/** Water leaves fixtures and enters pipes at their first end; vents say nothing of direction. */
function portsOf(joints: Joints, places: ReadonlyMap<string, number>): Pick<Draft, 'ports' | 'connections'> {
  const ports: DraftPort[] = [];
  const connections: [number, number][] = [];
  const add = (owner: number, at: Vec3, direction: DraftPort['direction']): number =>
    ports.push({ owner, at, direction }) - 1;
  for (const joint of joints.at.values()) {
    const ends = joint.ends.map(({ pipe, first, at, flows, turned }) => {
      const direction = flows ? (first ? 'sink' : 'source') : 'unknown';
      return { at, direction, port: add(pipe, at, turned ? againstFlow(direction) : direction) } as const;
    });
    if (joint.node.missing) continue;
    const owner = joint.past?.pipe ?? places.get(joint.node.name);
    if (owner !== undefined) {
      for (const { at, direction, port } of ends) {
        connections.push([port, add(owner, at, againstFlow(direction))]);
      }
      const part = places.get(joint.node.name);
      if (joint.past !== null && part !== undefined)
        connections.push([add(part, joint.node.at, 'source'), add(joint.past.pipe, joint.node.at, 'sink')]);
    } else for (const { port } of ends.slice(1)) connections.push([ends[0]!.port, port]);
  }
  return { ports, connections };
}
