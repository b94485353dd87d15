import { add, distance, scale, subtract, unit, type Vec3 } from '../../src/geometry/vector.ts';
import type { Sketch, SketchMedium, SketchNode, SketchPart, SketchPipe } from './sketch.ts';

/** What meets at a node. */
export interface DraftJoint {
  readonly node: SketchNode;
  /** By pipe, in the order of the sketch. */
  readonly ends: readonly PipeEnd[];
  readonly part: SketchPart | null;
  /** The pipe that runs past the node without a joint of its own. */
  readonly past: { readonly pipe: number } | null;
}

export interface PipeEnd {
  readonly pipe: number;
  readonly drawn: SketchPipe;
  readonly medium: SketchMedium;
  readonly first: boolean;
  /** Ports know a direction: not on vents. */
  readonly flows: boolean;
  /** The pipe's own ports tell it the wrong way round. */
  readonly turned: boolean;
  /** Where the pipe's own body ends, metres from the node. */
  readonly at: Vec3;
  /** From the node into the pipe. */
  readonly into: Vec3;
}

export interface Joints {
  readonly at: ReadonlyMap<string, DraftJoint>;
  /** Centre line of each pipe, cut back to its fittings. */
  readonly lines: readonly (readonly Vec3[])[];
}

/** How far a fitting reaches along each pipe, in outside diameters of the largest pipe (common practice, no source). */
const fittingReach = 0.75;
/** A fitting takes at most this share of a short pipe. */
const largestShare = 0.3;

export function meetPipes(sketch: Sketch): Joints {
  const parts = new Map(sketch.parts.map((part) => [part.name, part]));
  const lines = sketch.pipes.map(({ nodes }) => nodes.map((name) => sketch.nodes.get(name)!.at));
  const at = new Map<string, DraftJoint>();
  const trimmed = lines.map((line) => [...line]);
  const meeting = meetingPipes(sketch);
  for (const node of sketch.nodes.values()) {
    const { here, passing } = meeting.get(node.name) ?? { here: [], passing: [] };
    const part = parts.get(node.name) ?? null;
    const past = passing[0] === undefined ? null : { pipe: passing[0] };
    const widest = Math.max(...here.map((end) => sketch.pipes[end.pipe]!.size.outer));
    const fitted = past === null && here.length >= 2 && (part !== null || !node.bare);
    const ends = here.map(({ pipe, first }): PipeEnd => {
      const drawn = sketch.pipes[pipe]!;
      const line = lines[pipe]!;
      const next = first ? line[1]! : line.at(-2)!;
      const into = unit(subtract(next, node.at));
      const room = distance(node.at, next);
      let reach = fitted ? Math.min(widest * fittingReach, room * largestShare) : 0;
      if (past !== null) reach = Math.min(sketch.pipes[past.pipe]!.size.outer / 2, room * largestShare);
      const end = reach === 0 ? node.at : add(node.at, scale(into, reach));
      trimmed[pipe]![first ? 0 : line.length - 1] = end;
      return {
        pipe,
        drawn,
        medium: drawn.medium,
        first,
        flows: drawn.medium !== 'vent',
        turned: drawn.turned,
        at: end,
        into,
      };
    });
    at.set(node.name, { node, ends, part, past });
  }
  return { at, lines: trimmed };
}

interface Meeting {
  readonly here: { readonly pipe: number; readonly first: boolean }[];
  readonly passing: number[];
}

function meetingPipes(sketch: Sketch): ReadonlyMap<string, Meeting> {
  const found = new Map<string, Meeting>([...sketch.nodes.keys()].map((name) => [name, { here: [], passing: [] }]));
  for (const [pipe, { nodes }] of sketch.pipes.entries())
    for (const [place, name] of nodes.entries()) {
      const meeting = found.get(name)!;
      if (place > 0 && place < nodes.length - 1) meeting.passing.push(pipe);
      else meeting.here.push({ pipe, first: place === 0 });
    }
  return found;
}
