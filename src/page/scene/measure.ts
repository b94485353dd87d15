import type { Hit } from './pick.ts';
import { apart, type Point } from './polylines.ts';

export interface Measure {
  /** A first, then a second spot; a third begins anew. */
  add(hit: Hit | null): void;
  /** Follows the picture. */
  move(): void;
  clear(): void;
}

const nearEnd = 0.08;

/** Two spots on the picture with a line and words between; a spot near the end of a pipe is that end. */
export function measureIn(
  host: HTMLElement,
  project: (at: Point) => { readonly x: number; readonly y: number } | null,
  words: (distances: { readonly length: number; readonly plan: number; readonly rise: number }) => string,
): Measure {
  const space = 'http://www.w3.org/2000/svg';
  const drawing = document.createElementNS(space, 'svg');
  drawing.setAttribute('class', 'measure');
  drawing.setAttribute('aria-hidden', 'true');
  const line = document.createElementNS(space, 'line');
  const dots = [document.createElementNS(space, 'circle'), document.createElementNS(space, 'circle')];
  for (const dot of dots) dot.setAttribute('r', '4');
  drawing.append(line, ...dots);
  const text = document.createElement('output');
  text.className = 'measure-text';
  host.append(drawing, text);
  let spots: Point[] = [];
  const move = (): void => {
    const shown = spots.map(project);
    dots.forEach((dot, index) => {
      const spot = shown[index];
      dot.style.display = spot == null ? 'none' : '';
      if (spot == null) return;
      dot.setAttribute('cx', String(spot.x));
      dot.setAttribute('cy', String(spot.y));
    });
    const [a, b] = shown;
    const both = a != null && b != null;
    line.style.display = both ? '' : 'none';
    text.hidden = !both;
    if (!both) return;
    line.setAttribute('x1', String(a.x));
    line.setAttribute('y1', String(a.y));
    line.setAttribute('x2', String(b.x));
    line.setAttribute('y2', String(b.y));
    text.style.transform = `translate(${Math.round((a.x + b.x) / 2)}px, ${Math.round((a.y + b.y) / 2)}px)`;
  };
  move();
  return {
    add(hit) {
      if (hit === null) return;
      const spot = hit.end !== null && apart(hit.end, hit.at) < nearEnd ? hit.end : hit.at;
      spots = spots.length > 1 ? [spot] : [...spots, spot];
      const [a, b] = spots;
      if (a !== undefined && b !== undefined)
        text.textContent = words({
          length: apart(a, b),
          plan: Math.hypot(a[0] - b[0], a[1] - b[1]),
          rise: b[2] - a[2],
        });
      move();
    },
    move,
    clear() {
      spots = [];
      move();
    },
  };
}
