import type { JointId, PipeId } from '../network/network.ts';
import type { PipeState, Result } from './result.ts';
import type { Flat } from './riser-isometry.ts';
import { type RiserLine, stateOf } from './riser-line.ts';
import type { RiserSource } from './riser-source.ts';

/** Pipes in a row that one label speaks for. */
export interface RiserRun {
  readonly sections: readonly PipeId[];
  /** The section whose numbers the label gives: the most downstream one. */
  readonly section: PipeId;
  readonly pipe: number;
  /** The role is said once for pipes of one role that hang together; null on the others. */
  readonly role: string | null;
  readonly undersized: boolean;
  /** Where the label may point: spots on the run, the best first. */
  readonly anchors: readonly Flat[];
}

/** Roles that a drawing names; a fixture drain is plain from its place. */
const unnamed = new Set(['fixture-drain', 'unknown', 'idle']);

export function labelRuns(result: Result, source: RiserSource, lines: readonly RiserLine[]): readonly RiserRun[] {
  const lineOf = new Map(lines.map((line) => [line.section, line]));
  const states = new Map<PipeId, PipeState>();
  for (const { section, pipe } of lines) {
    const state = stateOf(result, source.network, source.network.pipes[section]!, pipe);
    if (state !== null) states.set(section, state);
  }
  const alike = (a: PipeState, b: PipeState): boolean =>
    a.role === b.role &&
    a.modelled?.label === b.modelled?.label &&
    a.required?.most?.label === b.required?.most?.label &&
    a.load.most === b.load.most;
  const runs = grouped(source, states, alike, true);
  const named = new Set<PipeId>();
  for (const group of grouped(source, states, (a, b) => a.role === b.role, false)) {
    const longest = group.reduce((best, id) => (lengthOf(lineOf, id) > lengthOf(lineOf, best) ? id : best));
    if (!unnamed.has(states.get(longest)!.role)) named.add(longest);
  }
  const made = runs.map((sections): RiserRun & { readonly weight: number } => {
    const state = states.get(sections[0]!)!;
    const longest = [...sections].sort((a, b) => lengthOf(lineOf, b) - lengthOf(lineOf, a) || a - b);
    const last = sections.find((id) => !sections.includes(source.paths.next[id] ?? (-1 as PipeId))) ?? sections[0]!;
    const undersized = state.verdict === 'undersized';
    const role = sections.some((id) => named.has(id)) ? state.role : null;
    return {
      sections,
      section: last,
      pipe: lineOf.get(last)!.pipe,
      role,
      undersized,
      anchors: longest.slice(0, 2).flatMap((id) => spots(lineOf.get(id)!.points)),
      weight: (undersized ? 1e6 : 0) + (role === null ? 0 : 1e4) + lengthOf(lineOf, longest[0]!),
    };
  });
  made.sort((a, b) => b.weight - a.weight || a.section - b.section);
  return made.map(({ weight: _, ...run }) => run);
}

/** Pipes that hang together and are alike; `simple`: only through joints where nothing else joins. */
function grouped(
  { network }: RiserSource,
  states: ReadonlyMap<PipeId, PipeState>,
  alike: (a: PipeState, b: PipeState) => boolean,
  simple: boolean,
): readonly (readonly PipeId[])[] {
  const seen = new Set<PipeId>();
  const groups: PipeId[][] = [];
  const through = (joint: JointId): readonly PipeId[] => {
    const pipes = network.joints[joint]!.pipes;
    return simple && pipes.length > 2 ? [] : pipes;
  };
  for (const [id, state] of states) {
    if (seen.has(id)) continue;
    seen.add(id);
    const group: PipeId[] = [];
    const waiting = [id];
    while (waiting.length > 0) {
      const at = waiting.pop()!;
      group.push(at);
      for (const end of network.pipes[at]!.ends)
        for (const next of through(end)) {
          const other = states.get(next);
          if (other === undefined || seen.has(next) || !alike(state, other)) continue;
          seen.add(next);
          waiting.push(next);
        }
    }
    groups.push(group.sort((a, b) => a - b));
  }
  return groups;
}

const lengthOf = (lines: ReadonlyMap<PipeId, RiserLine>, id: PipeId): number =>
  drawnLength(lines.get(id)?.points ?? []);

function drawnLength(points: readonly Flat[]): number {
  let sum = 0;
  for (let at = 1; at < points.length; at++)
    sum += Math.hypot(points[at]![0] - points[at - 1]![0], points[at]![1] - points[at - 1]![1]);
  return sum;
}

/** Spots on the longest stretch of a line: its middle, then to both sides of it. */
function spots(points: readonly Flat[]): readonly Flat[] {
  let best: readonly [Flat, Flat] | null = null;
  let longest = -1;
  for (let at = 1; at < points.length; at++) {
    const [a, b] = [points[at - 1]!, points[at]!];
    const length = Math.hypot(b[0] - a[0], b[1] - a[1]);
    if (length > longest) {
      longest = length;
      best = [a, b];
    }
  }
  if (best === null) return [];
  const [a, b] = best;
  return [0.5, 0.35, 0.65, 0.2, 0.8].map((t) => [
    Math.round((a[0] + (b[0] - a[0]) * t) * 10) / 10,
    Math.round((a[1] + (b[1] - a[1]) * t) * 10) / 10,
  ]);
}
