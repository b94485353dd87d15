import type { Network, Pipe, PipeId } from '../network/network.ts';
import type { PipeState, Result, Verdict } from './result.ts';
import type { Flat } from './riser-isometry.ts';

/** How a line is drawn: drains whole, vents dashed, what is both with both. */
export type RiserLook = 'drain' | 'vent' | 'both' | 'link';

export interface RiserLine {
  /** Pipe of the network. */
  readonly section: PipeId;
  /** Row of the result's pipes; -1 for a link between fittings. */
  readonly pipe: number;
  readonly look: RiserLook;
  readonly verdict: Verdict | null;
  /** Line width in drawing units. */
  readonly width: number;
  readonly points: readonly Flat[];
}

/** The section's own state where an element is cut into sections as the network cuts it, else the element's. */
export function stateOf(result: Result, network: Network, pipe: Pipe, row: number): PipeState | null {
  const whole = result.pipes[row];
  if (whole === undefined) return null;
  const own = pipe.element === null ? [] : (network.pipesOf.get(pipe.element) ?? []);
  const { sections } = whole;
  if (sections === undefined) return whole;
  if (sections.length === own.length) return sections[own.indexOf(pipe.id)] ?? whole;
  const middle = (pipe.from + pipe.to) / 2;
  return sections.find(({ from, to }) => middle >= from && middle <= to) ?? whole;
}
