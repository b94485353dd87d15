import { boxAround, grown } from '../geometry/box.ts';
import type { Box } from '../geometry/vector.ts';
import type { Piping } from './piping.ts';

/** The straight pieces of all pipes, each with the box of its body: what an index of pipe walls is made of. */
export interface Legs {
  readonly boxes: readonly Box[];
  /** By leg: the pipe it belongs to. */
  readonly pipe: Int32Array;
}

export function legsOf({ pipes }: Piping): Legs {
  const boxes: Box[] = [];
  const owners: number[] = [];
  pipes.forEach(({ axis, diameter }, pipe) => {
    for (let leg = 0; axis !== null && leg + 1 < axis.points.length; leg++) {
      boxes.push(grown(boxAround([axis.points[leg]!, axis.points[leg + 1]!])!, diameter / 2));
      owners.push(pipe);
    }
  });
  return { boxes, pipe: Int32Array.from(owners) };
}
