import type { Point } from './polylines.ts';

export interface LabelWish {
  readonly at: Point;
  readonly text: string;
  readonly tone: 'plain' | 'undersized' | 'chosen' | 'way';
  /** Ends of the pipe it speaks of: a pipe that looks shorter than its words goes without. */
  readonly along?: readonly [Point, Point];
}

export interface Labels {
  /** Places as many wishes as do not cover each other, earlier ones first. */
  show(wishes: readonly LabelWish[], project: (at: Point) => { x: number; y: number } | null): void;
  hide(): void;
}

const most = 60;
const gap = 4;
/** Pixels, roughly; only to leave out what cannot fit before it is laid out. */
const widthOfLetter = 5;

/** Words over the picture are plain elements: crisp, selectable by no one, read aloud by no one (the panel says all). */
export function labelsIn(layer: HTMLElement): Labels {
  const pool: HTMLElement[] = [];
  const taken = (index: number): HTMLElement => {
    const known = pool[index];
    if (known !== undefined) return known;
    const made = document.createElement('div');
    layer.append(made);
    pool.push(made);
    return made;
  };
  return {
    show(wishes, project) {
      layer.hidden = false;
      const boxes: { x: number; y: number; w: number; h: number }[] = [];
      const { clientWidth, clientHeight } = layer;
      let used = 0;
      for (const { at, text, tone, along } of wishes) {
        if (used >= most) break;
        const spot = project(at);
        if (spot === null || spot.x < 0 || spot.y < 0 || spot.x > clientWidth || spot.y > clientHeight) continue;
        const ends = along?.map(project);
        const upright = ends !== undefined && isUpright(ends[0] ?? null, ends[1] ?? null);
        if (ends !== undefined && lengthSeen(ends[0] ?? null, ends[1] ?? null) < roomFor(text, upright)) continue;
        const element = taken(used);
        element.className = `label label-${tone}`;
        element.textContent = text;
        element.hidden = false;
        const [w, h] = [element.offsetWidth, element.offsetHeight];
        // Beside a standing pipe, above a lying one: never on it.
        const box = upright
          ? { x: spot.x + 9, y: spot.y - h / 2, w, h }
          : { x: spot.x - w / 2, y: spot.y - h - 9, w, h };
        const free = boxes.every(
          (other) =>
            box.x > other.x + other.w + gap ||
            other.x > box.x + w + gap ||
            box.y > other.y + other.h + gap ||
            other.y > box.y + h + gap,
        );
        if (!free || box.x < 0 || box.x + w > clientWidth || box.y < 0) {
          element.hidden = true;
          continue;
        }
        element.style.transform = `translate(${Math.round(box.x)}px, ${Math.round(box.y)}px)`;
        boxes.push(box);
        used++;
      }
      for (let index = used; index < pool.length; index++) pool[index]!.hidden = true;
    },
    hide() {
      layer.hidden = true;
    },
  };
}

type Spot = { readonly x: number; readonly y: number } | null;

const lengthSeen = (a: Spot, b: Spot): number => (a === null || b === null ? 0 : Math.hypot(a.x - b.x, a.y - b.y));
const isUpright = (a: Spot, b: Spot): boolean =>
  a !== null && b !== null && Math.abs(a.y - b.y) > 2 * Math.abs(a.x - b.x);
const roomFor = (text: string, upright: boolean): number => (upright ? 22 : text.length * widthOfLetter);
