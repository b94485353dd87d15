import { distanceOfBoxes } from '../../geometry/box.ts';
import type { Box, Vec3 } from '../../geometry/vector.ts';
import type { Facts } from './read-facts.ts';

/** A file whose coordinates lie elsewhere than the building that the others draw. */
export interface Apart {
  /** Metres from the nearest file of that building. */
  readonly metres: number;
  /** Which one that is. */
  readonly from: number;
}

/** Files that lie nearer to one another than this are one place: a yard drain may end before it reaches the wall. */
const samePlace = 10;
/** Part of a file's things that may lie anywhere, on each side: one forgotten at the origin does not stretch the file. */
const strays = 0.02;

/**
 * Which files lie apart, by file; null for those of the building. Of several places the building is the one with most
 * pipes, then most elements, then the first file. A file that draws nothing lies nowhere, and counts as of the building.
 */
export function filesApart(files: readonly Facts[]): (Apart | null)[] {
  const boxes = files.map(extentOf);
  const placed = files.flatMap((_, file) => (boxes[file] === null ? [] : [file]));
  const places = placesOf(placed, (a, b) => distanceOfBoxes(boxes[a]!, boxes[b]!) <= samePlace);
  const count = (place: readonly number[], of: (facts: Facts) => number): number =>
    place.reduce((sum, file) => sum + of(files[file]!), 0);
  const pipes = ({ elements }: Facts): number => elements.filter(({ kind }) => kind === 'segment').length;
  const [building = []] = places.toSorted(
    (a, b) =>
      count(b, pipes) - count(a, pipes) ||
      count(b, ({ elements }) => elements.length) - count(a, ({ elements }) => elements.length) ||
      a[0]! - b[0]!,
  );
  return files.map((_, file) => {
    const box = boxes[file];
    if (box === null || box === undefined || building.includes(file)) return null;
    const gaps = building.map((other) => distanceOfBoxes(box, boxes[other]!));
    const metres = Math.min(...gaps);
    return { metres, from: building[gaps.indexOf(metres)]! };
  });
}

/** Files that hang together, each place and the list of places in the order of the files. */
function placesOf(files: readonly number[], touch: (a: number, b: number) => boolean): number[][] {
  const open = new Set(files);
  return files.flatMap((first) => {
    if (!open.delete(first)) return [];
    const place = [first];
    for (const file of place) {
      for (const other of [...open]) {
        if (!touch(file, other)) continue;
        open.delete(other);
        place.push(other);
      }
    }
    return [place.sort((a, b) => a - b)];
  });
}

/** Where the things of a file stand, strays left out; null where none has a place. */
function extentOf({ elements, spaces, walls, slabs, roofs }: Facts): Box | null {
  const boxes: Box[] = [];
  for (const thing of elements) {
    const at = thing.box ?? boxOf(thing.centreLine?.points[0] ?? thing.origin);
    if (at !== null) boxes.push(at);
  }
  for (const { box } of [...spaces, ...walls, ...slabs, ...roofs]) if (box !== null) boxes.push(box);
  if (boxes.length === 0) return null;
  const skipped = Math.floor(boxes.length * strays);
  const sorted = (side: 'min' | 'max', axis: 0 | 1 | 2): number[] =>
    boxes.map((box) => box[side][axis]).sort((a, b) => a - b);
  const low = (axis: 0 | 1 | 2): number => sorted('min', axis)[skipped]!;
  const high = (axis: 0 | 1 | 2): number => sorted('max', axis).at(-1 - skipped)!;
  return { min: [low(0), low(1), low(2)], max: [high(0), high(1), high(2)] };
}

const boxOf = (at: Vec3 | null | undefined): Box | null =>
  at === null || at === undefined ? null : { min: at, max: at };
