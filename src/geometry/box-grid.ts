import { isSound } from './box.ts';
import type { Box } from './vector.ts';

/** Finds the boxes that touch a box. Items keep the numbers they were given in. */
export interface BoxGrid {
  /** Calls `visit` once for each item whose box touches `where`, in no stated order. Not to be called from `visit`. */
  touching(where: Box, visit: (item: number) => void): void;
}

const finest = 0.5;
const step = 4;
/** Enough for a box of any size that a number can mean in metres on Earth. */
const levels = 24;
/** A box lies on the finest level on which it covers at most this many cells along any axis. */
const widest = 3;

/**
 * A hashed grid of several levels: small things in small cells, a long pipe in a few large ones, so that building
 * takes time in proportion to the number of boxes and asking to what is found. null boxes and boxes that are not
 * sound are never found.
 */
export function boxGrid(boxes: readonly (Box | null)[]): BoxGrid {
  const level = new Int8Array(boxes.length).fill(-1);
  const bounds = new Float64Array(6 * boxes.length);
  const onLevel: number[][] = Array.from({ length: levels }, () => []);
  boxes.forEach((box, item) => {
    if (box === null || !isSound(box)) return;
    setBounds(bounds, 6 * item, box);
    const size = Math.max(box.max[0] - box.min[0], box.max[1] - box.min[1], box.max[2] - box.min[2]);
    let l = 0;
    while (l < levels - 1 && size > finest * step ** l * (widest - 1)) l++;
    level[item] = l;
    onLevel[l]!.push(item);
  });

  // First count what falls into each bucket, then fill: one block of memory, no lists.
  const cells = new Int32Array(6);
  let entries = 0;
  onLevel.forEach((items, l) => {
    for (const item of items) {
      cellsOf(bounds, 6 * item, l, cells);
      entries += cellCount(cells);
    }
  });
  const mask = 2 ** Math.max(4, Math.ceil(Math.log2(entries + 1)) + 1) - 1;
  const start = new Uint32Array(mask + 2);
  const items = new Uint32Array(entries);
  for (const filling of [false, true]) {
    onLevel.forEach((here, l) => {
      for (const item of here) {
        cellsOf(bounds, 6 * item, l, cells);
        for (let x = cells[0]!; x <= cells[3]!; x++)
          for (let y = cells[1]!; y <= cells[4]!; y++)
            for (let z = cells[2]!; z <= cells[5]!; z++) {
              const bucket = hash(x, y, z, l) & mask;
              if (filling) items[--start[bucket]!] = item;
              else start[bucket]!++;
            }
      }
    });
    if (!filling) for (let bucket = 1; bucket < start.length; bucket++) start[bucket]! += start[bucket - 1]!;
  }

  const seen = new Uint32Array(boxes.length);
  const wanted = new Float64Array(6);
  let turn = 0;
  const meet = (item: number, visit: (item: number) => void): void => {
    if (seen[item] === turn) return;
    seen[item] = turn;
    const at = 6 * item;
    if (
      bounds[at]! <= wanted[3]! &&
      bounds[at + 1]! <= wanted[4]! &&
      bounds[at + 2]! <= wanted[5]! &&
      bounds[at + 3]! >= wanted[0]! &&
      bounds[at + 4]! >= wanted[1]! &&
      bounds[at + 5]! >= wanted[2]!
    )
      visit(item);
  };
  return {
    touching(where, visit) {
      if (!isSound(where)) return;
      turn++;
      setBounds(wanted, 0, where);
      for (let l = 0; l < levels; l++) {
        const here = onLevel[l]!;
        if (here.length === 0) continue;
        cellsOf(wanted, 0, l, cells);
        if (cellCount(cells) > here.length) {
          for (const item of here) meet(item, visit);
          continue;
        }
        for (let x = cells[0]!; x <= cells[3]!; x++)
          for (let y = cells[1]!; y <= cells[4]!; y++)
            for (let z = cells[2]!; z <= cells[5]!; z++) {
              const bucket = hash(x, y, z, l) & mask;
              for (let i = start[bucket]!; i < start[bucket + 1]!; i++) meet(items[i]!, visit);
            }
      }
    },
  };
}

function setBounds(bounds: Float64Array, at: number, { min, max }: Box): void {
  bounds[at] = min[0];
  bounds[at + 1] = min[1];
  bounds[at + 2] = min[2];
  bounds[at + 3] = max[0];
  bounds[at + 4] = max[1];
  bounds[at + 5] = max[2];
}

/** First and last cell along each axis. Cells past 32 bits wrap: they only share buckets, and boxes are compared anyway. */
function cellsOf(bounds: Float64Array, at: number, level: number, cells: Int32Array): void {
  const cell = finest * step ** level;
  for (let i = 0; i < 6; i++) cells[i] = Math.floor(bounds[at + i]! / cell);
}

const cellCount = (cells: Int32Array): number =>
  span(cells[0]!, cells[3]!) * span(cells[1]!, cells[4]!) * span(cells[2]!, cells[5]!);
const span = (first: number, last: number): number => Math.max(0, last - first + 1);

function hash(x: number, y: number, z: number, level: number): number {
  const mixed = Math.imul(x, 73856093) ^ Math.imul(y, 19349663) ^ Math.imul(z, 83492791) ^ Math.imul(level, 668265263);
  // Buildings repeat at round distances: without stirring, whole storeys would share a bucket.
  const stirred = Math.imul(mixed ^ (mixed >>> 15), 0x2c1b3c6d);
  return stirred ^ (stirred >>> 13);
}
