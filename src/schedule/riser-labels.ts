import type { Riser, RiserFloor } from './riser.ts';
import type { Flat } from './riser-isometry.ts';
import type { RiserRun } from './riser-runs.ts';
import { symbolSize } from './riser-symbols.ts';

export interface LabelBox {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
}

/** Words in place. `leader` goes from the box to the spot on the pipe; null where the box lies right beside it. */
export interface RiserLabel {
  readonly run: RiserRun | null;
  readonly floor: RiserFloor | null;
  readonly texts: readonly string[];
  readonly box: LabelBox;
  readonly leader: readonly [Flat, Flat] | null;
}

export interface PlacedRiser {
  readonly labels: readonly RiserLabel[];
  /** Of everything drawn, with a margin. */
  readonly frame: LabelBox;
}

export interface RiserTexts {
  /** Lines of the label of a run; none leaves it unlabelled. */
  run(run: RiserRun): readonly string[];
  floor(floor: RiserFloor): string;
}

export const lineHeight = 12;
/** Wider than any usual sans serif at 10 units, so that a box never is too small for its words. */
export const letterWidth = 5.9;
const clear = 2.5;
const margin = 28;
/** Distances of a label's box from the spot it points to, nearest first; the last ones are beyond any drawing's crowd. */
const rings = [7, 12, 20, 30, 44, 60, 80, 104, 132, 168, 210, 260, 320, 400, 500, 640, 820, 1060, 1400];
const beside = 12;
const directions = Array.from({ length: 16 }, (_, at) => (at / 16) * Math.PI * 2);

/**
 * Finds a free place for each label: no label over another, over a pipe or over a symbol. Nearer is better, and a
 * leader that crosses no pipe is better than one that does. There is always a place, if need be outside the drawing.
 */
export function placeRiserLabels(riser: Riser, texts: RiserTexts): PlacedRiser {
  const crowd = new Crowd();
  for (const { points } of riser.lines)
    for (let at = 1; at < points.length; at++) crowd.addLine(points[at - 1]!, points[at]!);
  for (const { is, at } of riser.symbols)
    crowd.addBox(
      is === 'fixture'
        ? { x: at[0] - symbolSize / 2, y: at[1] - symbolSize, width: symbolSize, height: symbolSize }
        : { x: at[0] - 9, y: at[1] - 9, width: 18, height: 18 },
    );
  const labels: RiserLabel[] = [];
  const place = (words: readonly string[], anchors: readonly Flat[]): Pick<RiserLabel, 'box' | 'leader'> | null => {
    if (words.length === 0 || anchors.length === 0) return null;
    const width = Math.max(...words.map((text) => [...text].length)) * letterWidth + 6;
    const height = words.length * lineHeight + 2;
    const found = crowd.freePlace(width, height, anchors);
    crowd.addBox(found.box);
    return found;
  };
  for (const run of riser.runs) {
    const words = texts.run(run);
    const placed = place(words, run.anchors);
    if (placed !== null) labels.push({ run, floor: null, texts: words, ...placed });
  }
  const named = new Set<number>();
  for (const floor of riser.floors) {
    if (named.has(floor.storey)) continue;
    named.add(floor.storey);
    const words = [texts.floor(floor)];
    const placed = place(words, [[floor.at[0] - 14, floor.at[1]]]);
    if (placed !== null) labels.push({ run: null, floor, texts: words, ...placed });
  }
  return { labels, frame: crowd.frame(margin) };
}

const cell = 48;

/** Everything drawn so far, in squares, so that a place is tried against its neighbours only. */
class Crowd {
  private readonly lines = new Map<string, (readonly [Flat, Flat])[]>();
  private readonly boxes = new Map<string, LabelBox[]>();
  private low: [number, number] = [Number.POSITIVE_INFINITY, Number.POSITIVE_INFINITY];
  private high: [number, number] = [Number.NEGATIVE_INFINITY, Number.NEGATIVE_INFINITY];

  addLine(a: Flat, b: Flat): void {
    const line = [a, b] as const;
    const box = around(a, b);
    this.widen(box);
    for (const key of cells(box)) {
      const list = this.lines.get(key);
      if (list === undefined) this.lines.set(key, [line]);
      else list.push(line);
    }
  }

  addBox(box: LabelBox): void {
    this.widen(box);
    for (const key of cells(box)) {
      const list = this.boxes.get(key);
      if (list === undefined) this.boxes.set(key, [box]);
      else list.push(box);
    }
  }

  freePlace(width: number, height: number, anchors: readonly Flat[]): Pick<RiserLabel, 'box' | 'leader'> {
    let best: { score: number; box: LabelBox; leader: readonly [Flat, Flat] } | null = null;
    for (const ring of rings) {
      if (best !== null && ring > best.score) break;
      for (const [rank, anchor] of anchors.entries())
        for (const angle of directions) {
          const box = boxBeside(anchor, angle, ring, width, height);
          if (!this.isFree(box)) continue;
          const leader = [nearestOn(box, anchor), anchor] as const;
          const score = ring + rank * 3 + (ring > beside ? 14 + this.crossings(leader) * 60 : 0);
          if (best === null || score < best.score) best = { score, box, leader };
        }
    }
    if (best === null) {
      const anchor = anchors[0]!;
      const box = { x: this.high[0] + margin, y: anchor[1], width, height };
      return { box, leader: [nearestOn(box, anchor), anchor] };
    }
    const [from, to] = best.leader;
    const near = Math.hypot(from[0] - to[0], from[1] - to[1]) <= beside;
    return { box: best.box, leader: near ? null : best.leader };
  }

  frame(by: number): LabelBox {
    if (this.low[0] > this.high[0]) return { x: 0, y: 0, width: 1, height: 1 };
    return {
      x: Math.floor(this.low[0] - by),
      y: Math.floor(this.low[1] - by),
      width: Math.ceil(this.high[0] - this.low[0] + 2 * by),
      height: Math.ceil(this.high[1] - this.low[1] + 2 * by),
    };
  }

  private isFree(box: LabelBox): boolean {
    const wide = grown(box, clear);
    return cells(wide).every(
      (key) =>
        (this.boxes.get(key) ?? []).every((other) => !overlap(wide, other)) &&
        (this.lines.get(key) ?? []).every(([a, b]) => !lineMeetsBox(a, b, wide)),
    );
  }

  /** Pipes that a leader crosses before its own. */
  private crossings([from, to]: readonly [Flat, Flat]): number {
    const short: Flat = [from[0] + (to[0] - from[0]) * 0.92, from[1] + (to[1] - from[1]) * 0.92];
    const met = new Set<readonly [Flat, Flat]>();
    const box = around(from, short);
    for (const key of cells(box)) {
      for (const line of this.lines.get(key) ?? []) if (linesCross(from, short, line[0], line[1])) met.add(line);
    }
    return met.size;
  }

  private widen({ x, y, width, height }: LabelBox): void {
    this.low = [Math.min(this.low[0], x), Math.min(this.low[1], y)];
    this.high = [Math.max(this.high[0], x + width), Math.max(this.high[1], y + height)];
  }
}

function cells({ x, y, width, height }: LabelBox): readonly string[] {
  const keys: string[] = [];
  for (let column = Math.floor(x / cell); column <= Math.floor((x + width) / cell); column++)
    for (let row = Math.floor(y / cell); row <= Math.floor((y + height) / cell); row++) keys.push(`${column} ${row}`);
  return keys;
}

const around = (a: Flat, b: Flat): LabelBox => ({
  x: Math.min(a[0], b[0]),
  y: Math.min(a[1], b[1]),
  width: Math.abs(a[0] - b[0]),
  height: Math.abs(a[1] - b[1]),
});

const grown = ({ x, y, width, height }: LabelBox, by: number): LabelBox => ({
  x: x - by,
  y: y - by,
  width: width + 2 * by,
  height: height + 2 * by,
});

/** The box whose nearest side lies `ring` away from the anchor in a direction. */
function boxBeside(anchor: Flat, angle: number, ring: number, width: number, height: number): LabelBox {
  const [dx, dy] = [Math.cos(angle), Math.sin(angle)];
  const reach = ring + (Math.abs(dx) * width + Math.abs(dy) * height) / 2;
  return { x: anchor[0] + dx * reach - width / 2, y: anchor[1] + dy * reach - height / 2, width, height };
}

const nearestOn = ({ x, y, width, height }: LabelBox, [px, py]: Flat): Flat => [
  Math.max(x, Math.min(x + width, px)),
  Math.max(y, Math.min(y + height, py)),
];

export const overlap = (a: LabelBox, b: LabelBox): boolean =>
  a.x < b.x + b.width && b.x < a.x + a.width && a.y < b.y + b.height && b.y < a.y + a.height;

/** Whether any point of the stretch lies within the box (Liang and Barsky). */
export function lineMeetsBox(a: Flat, b: Flat, { x, y, width, height }: LabelBox): boolean {
  let [from, to] = [0, 1];
  const [dx, dy] = [b[0] - a[0], b[1] - a[1]];
  for (const [step, gap] of [
    [-dx, a[0] - x],
    [dx, x + width - a[0]],
    [-dy, a[1] - y],
    [dy, y + height - a[1]],
  ] as const) {
    if (step === 0) {
      if (gap < 0) return false;
      continue;
    }
    const t = gap / step;
    if (step < 0) from = Math.max(from, t);
    else to = Math.min(to, t);
  }
  return from <= to;
}

function linesCross(a: Flat, b: Flat, c: Flat, d: Flat): boolean {
  const side = (p: Flat, q: Flat, r: Flat): number => (q[0] - p[0]) * (r[1] - p[1]) - (q[1] - p[1]) * (r[0] - p[0]);
  return side(a, b, c) * side(a, b, d) < 0 && side(c, d, a) * side(c, d, b) < 0;
}
