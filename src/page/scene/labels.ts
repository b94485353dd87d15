import type { Point } from './polylines.ts';

export interface LabelWish {
  readonly at: Point;
  readonly text: string;
  readonly tone: 'plain' | 'undersized' | 'chosen' | 'way';
}

export interface Labels {
  /** Places as many wishes as do not cover each other, earlier ones first. */
  show(wishes: readonly LabelWish[], project: (at: Point) => { x: number; y: number } | null): void;
  hide(): void;
}

const most = 60;
const gap = 4;

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
      const boxes: { x: number; y: number; w: number; h: number }[] = [];
      const { clientWidth, clientHeight } = layer;
      let used = 0;
      for (const { at, text, tone } of wishes) {
        if (used >= most) break;
        const spot = project(at);
        if (spot === null || spot.x < 0 || spot.y < 0 || spot.x > clientWidth || spot.y > clientHeight) continue;
        const element = taken(used);
        element.className = `label label-${tone}`;
        element.textContent = text;
        element.hidden = false;
        const [w, h] = [element.offsetWidth, element.offsetHeight];
        const box = { x: spot.x - w / 2, y: spot.y - h - 10, w, h };
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
      layer.hidden = false;
    },
    hide() {
      layer.hidden = true;
    },
  };
}
