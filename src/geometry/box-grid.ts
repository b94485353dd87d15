import type { Box } from './vector.ts';

/** Finds the boxes that touch a box. Items keep the numbers they were given in. */
export interface BoxGrid {
  /** Calls `visit` once for each item whose box touches `where`, in no stated order. */
  touching(where: Box, visit: (item: number) => void): void;
}

const finest = 0.25;
const step = 4;
/** Enough for a box of any size that a number can mean in metres on Earth. */
const levels = 24;
/** A box lies on the finest level on which it covers at most this many cells along any axis. */
const widest = 3;

/**
 * A hashed grid of several levels: small things in small cells, a long pipe in a few large ones, so that building
 * takes time in proportion to the number of boxes and asking to what is found. null boxes and boxes of numbers that
 * are not finite are never found.
 */
export function boxGrid(given: readonly (Box | null)[]): BoxGrid {
  const boxes = given.map((box) => (box === null || !hasNumbers(box) ? null : box));
  const level = new Int8Array(boxes.length).fill(-1);
  const onLevel: number[][] = Array.from({ length: levels }, () => []);
  let entries = 0;
  boxes.forEach((box, item) => {
    if (box === null) return;
    const size = Math.max(box.max[0] - box.min[0], box.max[1] - box.min[1], box.max[2] - box.min[2]);
    let l = 0;
    while (l < levels - 1 && size > finest * step ** l * (widest - 1)) l++;
    level[item] = l;
    onLevel[l]!.push(item);
    eachCell(box, l, () => entries++);
  });

  const mask = 2 ** Math.max(4, Math.ceil(Math.log2(entries + 1))) - 1;
  const start = new Uint32Array(mask + 2);
  boxes.forEach((box, item) => {
    if (box !== null) eachCell(box, level[item]!, (hash) => start[(hash & mask) + 1]!++);
  });
  for (let i = 0; i <= mask; i++) start[i + 1]! += start[i]!;
  const fill = start.slice();
  const items = new Uint32Array(entries);
  boxes.forEach((box, item) => {
    if (box !== null)
      eachCell(box, level[item]!, (hash) => {
        items[fill[hash & mask]!++] = item;
      });
  });

  const seen = new Uint32Array(boxes.length);
  let turn = 0;
  return {
    touching(where, visit) {
      if (!hasNumbers(where)) return;
      const now = ++turn;
      const meet = (item: number): void => {
        if (seen[item] === now || !touch(boxes[item]!, where)) return;
        seen[item] = now;
        visit(item);
      };
      for (let l = 0; l < levels; l++) {
        const here = onLevel[l]!;
        if (here.length === 0) continue;
        if (cellCount(where, l) > here.length) here.forEach(meet);
        else
          eachCell(where, l, (hash) => {
            const bucket = hash & mask;
            for (let i = start[bucket]!; i < start[bucket + 1]!; i++) meet(items[i]!);
          });
      }
    },
  };
}

const hasNumbers = ({ min, max }: Box): boolean => [...min, ...max].every(Number.isFinite);

function cellCount({ min, max }: Box, level: number): number {
  const cell = finest * step ** level;
  return [0, 1, 2].reduce((n, i) => n * (Math.floor(max[i]! / cell) - Math.floor(min[i]! / cell) + 1), 1);
}

function touch(a: Box, b: Box): boolean {
  return (
    a.min[0] <= b.max[0] &&
    b.min[0] <= a.max[0] &&
    a.min[1] <= b.max[1] &&
    b.min[1] <= a.max[1] &&
    a.min[2] <= b.max[2] &&
    b.min[2] <= a.max[2]
  );
}

function eachCell({ min, max }: Box, level: number, visit: (hash: number) => void): void {
  const cell = finest * step ** level;
  const [x0, y0, z0] = [Math.floor(min[0] / cell), Math.floor(min[1] / cell), Math.floor(min[2] / cell)];
  const [x1, y1, z1] = [Math.floor(max[0] / cell), Math.floor(max[1] / cell), Math.floor(max[2] / cell)];
  for (let x = x0; x <= x1; x++)
    for (let y = y0; y <= y1; y++)
      for (let z = z0; z <= z1; z++)
        visit(Math.imul(x, 73856093) ^ Math.imul(y, 19349663) ^ Math.imul(z, 83492791) ^ Math.imul(level, 668265263));
}
