import { cutOut, footOn, polyline } from '../../src/geometry/polyline.ts';
import { add, distance, type Vec3 } from '../../src/geometry/vector.ts';
import type { Answers } from '../../src/model/answers.ts';
import type { MendChange, MendResult } from '../../src/schedule/mend.ts';
import { draftOf } from './draft.ts';
import { type PipeSize, sizeOfInches } from './pipe-sizes.ts';
import type { Sketch, SketchNode, SketchPipe } from './sketch.ts';

/**
 * A plan carried out by hand on the drawing that it was made for: other sizes, new vents as pipes of their own, pipes
 * laid to another fall with everything below them brought down. What cannot be drawn comes back as answers.
 */
export function carryOut(sketch: Sketch, { changes }: MendResult): { sketch: Sketch; answers: Partial<Answers> } {
  const names = new Map(draftOf(sketch).elements.map(({ globalId, name }) => [globalId, name]));
  const draft: Drawing = { nodes: new Map(sketch.nodes), pipes: [...sketch.pipes], added: 0 };
  const batteries = new Map<string, { reading: string }>();
  for (const change of changes) {
    if (change.kind === 'reading' && change.reading !== undefined)
      for (const fixture of change.about) batteries.set(fixture, { reading: change.reading.to });
    else
      make(
        draft,
        change,
        change.about.map((id) => names.get(id) ?? ''),
      );
  }
  return { sketch: { ...sketch, nodes: draft.nodes, pipes: draft.pipes }, answers: { batteries } };
}

interface Drawing {
  readonly nodes: Map<string, SketchNode>;
  pipes: SketchPipe[];
  added: number;
}

function make(draft: Drawing, { kind, size, vent, slope }: MendChange, about: readonly string[]): void {
  if (size !== undefined) resize(draft, about[0]!, size.to.label);
  if (slope !== undefined) relay(draft, about, slope.to);
  if (vent === undefined) return;
  if (kind === 'moved-vent') draft.pipes = draft.pipes.filter(({ name }) => name !== about[0]);
  const points = vent.points.map((point): Vec3 => [point[0], point[1], point[2]]);
  const nodes = points.map((point, at) => nodeAt(draft, point, at === 0 || at === points.length - 1));
  const pipeSize = sizeOf(vent.size!.label);
  for (let leg = 1; leg < nodes.length; leg++) {
    const template = draft.pipes.find(({ medium }) => medium === 'vent') ?? draft.pipes[0]!;
    draft.pipes.push({
      ...template,
      name: `New ${++draft.added}`,
      medium: 'vent',
      size: pipeSize,
      nodes: [nodes[leg - 1]!, nodes[leg]!],
      states: null,
    });
  }
}

const inches: readonly number[] = [1.25, 1.5, 2, 2.5, 3, 4, 5, 6, 8];

function sizeOf(label: string): PipeSize {
  const size = inches.map((one) => sizeOfInches(one)).find((one) => one?.label === label);
  if (size === undefined) throw new Error(`no size ${label}`);
  return size;
}

/** A pipe that was cut meanwhile changes in all its parts. */
function resize(draft: Drawing, name: string, label: string): void {
  const parts = draft.pipes.filter((pipe) => pipe.name === name || pipe.name.startsWith(`${name}'`));
  if (parts.length === 0) throw new Error(`no pipe ${name}`);
  draft.pipes = draft.pipes.map((pipe) => (parts.includes(pipe) ? { ...pipe, size: sizeOf(label) } : pipe));
}

/** The node at a point: one that stands there, one that cuts the pipe that it lies on, or a new one. */
function nodeAt(draft: Drawing, at: Vec3, cuts: boolean): string {
  for (const node of draft.nodes.values()) if (distance(node.at, at) < 0.002) return node.name;
  const name = `New node ${++draft.added}`;
  const pipe = cuts
    ? draft.pipes.find(({ nodes }) => footOn(polyline(lineOf(draft, nodes)), at).off < 0.002)
    : undefined;
  draft.nodes.set(name, { name, at, storey: pipe?.storey ?? null, bare: false, missing: false });
  if (pipe !== undefined) cut(draft, pipe, name, at);
  return name;
}

const lineOf = ({ nodes }: Drawing, names: readonly string[]): Vec3[] => names.map((name) => nodes.get(name)!.at);

function cut(draft: Drawing, pipe: SketchPipe, name: string, at: Vec3): void {
  const line = polyline(lineOf(draft, pipe.nodes));
  const { at: along } = footOn(line, at);
  const before = pipe.nodes.filter((_, place) => line.along[place]! < along - 1e-6);
  const after = pipe.nodes.filter((_, place) => line.along[place]! > along + 1e-6);
  if (cutOut(line, 0, along).length < 2 || after.length === 0) throw new Error(`${pipe.name} cannot be cut`);
  draft.pipes = draft.pipes.flatMap((one) =>
    one === pipe
      ? [
          { ...one, nodes: [...before, name] },
          { ...one, name: `${one.name}'`, nodes: [name, ...after] },
        ]
      : [one],
  );
}

/** Each pipe falls as it shall, from its upper end on; what drains on from its lower end comes down with it. */
function relay(draft: Drawing, about: readonly string[], fall: number): void {
  for (const name of about) {
    const pipe = draft.pipes.find((one) => one.name === name);
    if (pipe === undefined) continue;
    const [up, down] = [pipe.nodes[0]!, pipe.nodes.at(-1)!];
    const [a, b] = [draft.nodes.get(up)!.at, draft.nodes.get(down)!.at];
    const lower = fall * Math.hypot(b[0] - a[0], b[1] - a[1]) - (a[2] - b[2]);
    for (const node of drainedFrom(draft, down)) {
      const it = draft.nodes.get(node)!;
      draft.nodes.set(node, { ...it, at: add(it.at, [0, 0, -lower]) });
    }
  }
}

/** Nodes that the water reaches from one. */
function drainedFrom({ pipes }: Drawing, start: string): Set<string> {
  const found = new Set([start]);
  for (const node of found)
    for (const { medium, nodes } of pipes)
      if (medium === 'drain' && nodes.includes(node))
        for (const next of nodes.slice(nodes.indexOf(node))) found.add(next);
  return found;
}
