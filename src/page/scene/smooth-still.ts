import type { PerspectiveCamera } from 'three';

/**
 * Smooth edges for a picture that stands still, where the renderer has no smoothing of its own: the picture is drawn
 * again and again, each time shifted by a part of a pixel, and the drawings are averaged on a canvas above it. Each
 * drawing costs one plain frame, and the first movement ends it.
 */
export interface SmoothStill {
  begin(): void;
  end(): void;
}

/** Halton points (bases 2 and 3) spread evenly over a pixel, the first in its middle. */
const shifts: readonly (readonly [number, number])[] = Array.from({ length: 8 }, (_, at) => [
  halton(at, 2) - (at === 0 ? 0 : 0.5),
  halton(at, 3) - (at === 0 ? 0 : 0.5),
]);

export function smoothStill(canvas: HTMLCanvasElement, camera: PerspectiveCamera, paint: () => void): SmoothStill {
  const above = document.createElement('canvas');
  above.className = 'smooth';
  above.setAttribute('aria-hidden', 'true');
  above.hidden = true;
  canvas.after(above);
  const pen = above.getContext('2d');
  let drawn = 0;
  let waiting = 0;
  const step = (): void => {
    const shift = shifts[drawn];
    if (shift === undefined || pen === null) return;
    const { width, height } = canvas;
    camera.setViewOffset(width, height, shift[0], shift[1], width, height);
    paint();
    camera.clearViewOffset();
    pen.globalAlpha = 1 / (drawn + 1);
    pen.drawImage(canvas, 0, 0);
    above.hidden = false;
    drawn++;
    // A breath between drawings, so that a hand on the mouse is answered at once.
    waiting = window.setTimeout(() => {
      waiting = requestAnimationFrame(step);
    }, 8);
  };
  const stop = (): void => {
    window.clearTimeout(waiting);
    cancelAnimationFrame(waiting);
  };
  return {
    begin() {
      stop();
      drawn = 0;
      above.width = canvas.width;
      above.height = canvas.height;
      step();
    },
    end() {
      stop();
      above.hidden = true;
    },
  };
}

function halton(index: number, base: number): number {
  let result = 0;
  let part = 1 / base;
  for (let rest = index; rest > 0; rest = Math.floor(rest / base)) {
    result += part * (rest % base);
    part /= base;
  }
  return result;
}
