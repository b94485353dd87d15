import { clampPitch, type Eye, partWay, spread, withLens } from './orbit.ts';

export interface EyeControl {
  eye: Eye;
  /** Moves there over half a second; at once where the reader asked for less motion. */
  fly(to: Eye): void;
  stop(): void;
  dispose(): void;
}

export interface EyeHandlers {
  readonly moved: () => void;
  readonly settled: () => void;
  /** A press without a drag, in CSS pixels of the canvas. */
  readonly clicked: (x: number, y: number) => void;
  readonly hovered: (x: number, y: number) => void;
  /** The point of the scene under a spot of the canvas, to turn and zoom about; null over nothing. */
  readonly under: (x: number, y: number) => readonly [number, number, number] | null;
}

const flightMs = 520;
const clickSlack = 5;

/** Mouse (left turns, right or shift pans, wheel zooms to the spot), touch (one turns, two pan and zoom) and keys. */
export function eyeControl(canvas: HTMLCanvasElement, first: Eye, still: () => boolean, on: EyeHandlers): EyeControl {
  let eye = first;
  let frame = 0;
  let settle = 0;
  const pointers = new Map<number, { x: number; y: number }>();
  let pressed: { x: number; y: number; moved: boolean; pan: boolean } | null = null;
  const off = new AbortController();
  const listen = <K extends keyof HTMLElementEventMap>(
    type: K,
    listener: (event: HTMLElementEventMap[K]) => void,
    passive = true,
  ): void => canvas.addEventListener(type, listener, { signal: off.signal, passive });

  const changed = (): void => {
    on.moved();
    window.clearTimeout(settle);
    settle = window.setTimeout(on.settled, 160);
  };
  const move = (next: Eye): void => {
    cancelAnimationFrame(frame);
    eye = next;
    changed();
  };
  const turn = (dx: number, dy: number): void =>
    move({ ...withLens(eye, false), yaw: eye.yaw - dx * 0.0062, pitch: clampPitch(eye.pitch + dy * 0.0062) });
  const perPixel = (): number => (2 * eye.distance * spread(eye)) / Math.max(1, canvas.clientHeight);
  const pan = (dx: number, dy: number): void => {
    const step = perPixel();
    const [cy, sy] = [Math.cos(eye.yaw), Math.sin(eye.yaw)];
    const [cp, sp] = [Math.cos(eye.pitch), Math.sin(eye.pitch)];
    const right = [cy, sy, 0];
    const up = [-sy * sp, cy * sp, cp];
    const shifted = [0, 1, 2].map((axis) => eye.target[axis]! - right[axis]! * dx * step + up[axis]! * dy * step);
    move({ ...eye, target: [shifted[0]!, shifted[1]!, shifted[2]!] });
  };
  const zoom = (factor: number, x?: number, y?: number): void => {
    const distance = Math.max(0.25, Math.min(1e5, eye.distance * factor));
    const real = distance / eye.distance;
    const spot = x === undefined || y === undefined ? null : on.under(x, y);
    const drawn = (axis: 0 | 1 | 2): number =>
      spot === null ? eye.target[axis] : spot[axis] + (eye.target[axis] - spot[axis]) * real;
    move({ ...eye, distance, target: [drawn(0), drawn(1), drawn(2)] });
  };
  const at = (event: MouseEvent): { x: number; y: number } => {
    const box = canvas.getBoundingClientRect();
    return { x: event.clientX - box.left, y: event.clientY - box.top };
  };

  listen('pointerdown', (event) => {
    canvas.setPointerCapture(event.pointerId);
    pointers.set(event.pointerId, at(event));
    pressed = { ...at(event), moved: pointers.size > 1, pan: event.button !== 0 || event.shiftKey || event.ctrlKey };
    cancelAnimationFrame(frame);
  });
  listen('pointermove', (event) => {
    const now = at(event);
    const before = pointers.get(event.pointerId);
    if (before === undefined || pressed === null) {
      if (event.pointerType === 'mouse') on.hovered(now.x, now.y);
      return;
    }
    if (!pressed.moved && Math.hypot(now.x - pressed.x, now.y - pressed.y) < clickSlack) return;
    pressed.moved = true;
    const other = [...pointers].find(([id]) => id !== event.pointerId)?.[1];
    pointers.set(event.pointerId, now);
    const [dx, dy] = [now.x - before.x, now.y - before.y];
    if (other !== undefined) {
      const apart = (p: { x: number; y: number }): number => Math.hypot(p.x - other.x, p.y - other.y);
      pan(dx / 2, dy / 2);
      if (apart(now) > 10) zoom(apart(before) / apart(now));
    } else if (pressed.pan) pan(dx, dy);
    else turn(dx, dy);
  });
  const lifted = (event: PointerEvent): void => {
    pointers.delete(event.pointerId);
    if (pressed !== null && !pressed.moved && event.type === 'pointerup') on.clicked(pressed.x, pressed.y);
    if (pointers.size === 0) pressed = null;
  };
  listen('pointerup', lifted);
  listen('pointercancel', lifted);
  listen('contextmenu', (event) => event.preventDefault(), false);
  listen(
    'wheel',
    (event) => {
      event.preventDefault();
      const { x, y } = at(event);
      const lines = event.deltaMode === 1 ? 16 : 1;
      zoom(Math.exp(Math.max(-240, Math.min(240, event.deltaY * lines)) * 0.0016), x, y);
    },
    false,
  );
  listen(
    'keydown',
    (event) => {
      if (event.altKey || event.metaKey || event.ctrlKey) return;
      const step = event.shiftKey ? 60 : 30;
      const acts: Record<string, () => void> = {
        ArrowLeft: () => (event.shiftKey ? pan(step, 0) : turn(-step, 0)),
        ArrowRight: () => (event.shiftKey ? pan(-step, 0) : turn(step, 0)),
        ArrowUp: () => (event.shiftKey ? pan(0, step) : turn(0, -step)),
        ArrowDown: () => (event.shiftKey ? pan(0, -step) : turn(0, step)),
        '+': () => zoom(0.8),
        '=': () => zoom(0.8),
        '-': () => zoom(1.25),
      };
      const act = acts[event.key];
      if (act === undefined) return;
      event.preventDefault();
      act();
    },
    false,
  );

  return {
    get eye() {
      return eye;
    },
    set eye(next) {
      move(next);
    },
    fly(to) {
      cancelAnimationFrame(frame);
      if (still()) {
        move(to);
        return;
      }
      const from = eye;
      const began = performance.now();
      const step = (now: number): void => {
        const t = Math.min(1, (now - began) / flightMs);
        eye = partWay(from, to, t);
        changed();
        if (t < 1) frame = requestAnimationFrame(step);
      };
      frame = requestAnimationFrame(step);
    },
    stop() {
      cancelAnimationFrame(frame);
    },
    dispose() {
      cancelAnimationFrame(frame);
      window.clearTimeout(settle);
      off.abort();
    },
  };
}
