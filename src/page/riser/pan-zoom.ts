interface Frame {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
}

/** Moves and scales a drawing by its view box: wheel zooms to the spot, a drag moves, two fingers do both. */
export function panZoom(drawing: SVGSVGElement, whole: Frame): { fit(): void; zoom(factor: number): void } {
  let frame = whole;
  const show = (next: Frame): void => {
    frame = next;
    drawing.setAttribute('viewBox', `${next.x} ${next.y} ${next.width} ${next.height}`);
  };
  /** Drawing units under one CSS pixel, and the corner that the view box is centred from. */
  const scale = (): { unit: number; left: number; top: number } => {
    const { width, height } = drawing.getBoundingClientRect();
    const unit = Math.max(frame.width / Math.max(1, width), frame.height / Math.max(1, height));
    return {
      unit,
      left: frame.x - (width * unit - frame.width) / 2,
      top: frame.y - (height * unit - frame.height) / 2,
    };
  };
  const zoomAt = (factor: number, px: number, py: number): void => {
    const { unit, left, top } = scale();
    const [x, y] = [left + px * unit, top + py * unit];
    const width = Math.max(whole.width / 40, Math.min(whole.width * 4, frame.width * factor));
    const real = width / frame.width;
    show({ x: x + (frame.x - x) * real, y: y + (frame.y - y) * real, width, height: frame.height * real });
  };
  const at = (event: MouseEvent): readonly [number, number] => {
    const box = drawing.getBoundingClientRect();
    return [event.clientX - box.left, event.clientY - box.top];
  };
  drawing.addEventListener(
    'wheel',
    (event) => {
      event.preventDefault();
      zoomAt(Math.exp(Math.max(-200, Math.min(200, event.deltaY)) * 0.0018), ...at(event));
    },
    { passive: false },
  );
  const fingers = new Map<number, readonly [number, number]>();
  let dragged = false;
  drawing.addEventListener('pointerdown', (event) => {
    fingers.set(event.pointerId, at(event));
    dragged = false;
  });
  drawing.addEventListener('pointermove', (event) => {
    const before = fingers.get(event.pointerId);
    if (before === undefined) return;
    const now = at(event);
    const other = [...fingers].find(([id]) => id !== event.pointerId)?.[1];
    const [dx, dy] = [now[0] - before[0], now[1] - before[1]];
    if (!dragged && other === undefined && Math.hypot(dx, dy) < 4) return;
    if (!dragged) drawing.setPointerCapture(event.pointerId);
    dragged = true;
    fingers.set(event.pointerId, now);
    const { unit } = scale();
    const share = other === undefined ? 1 : 0.5;
    show({ ...frame, x: frame.x - dx * unit * share, y: frame.y - dy * unit * share });
    if (other !== undefined) {
      const apart = (p: readonly [number, number]): number => Math.hypot(p[0] - other[0], p[1] - other[1]);
      if (apart(now) > 8) zoomAt(apart(before) / apart(now), (now[0] + other[0]) / 2, (now[1] + other[1]) / 2);
    }
  });
  const lift = (event: PointerEvent): void => {
    fingers.delete(event.pointerId);
  };
  drawing.addEventListener('pointerup', lift);
  drawing.addEventListener('pointercancel', lift);
  // A drag ends in a click of its own; it chooses nothing.
  drawing.addEventListener('click', (event) => dragged && event.stopImmediatePropagation(), { capture: true });
  return {
    fit: () => show(whole),
    zoom(factor) {
      const { width, height } = drawing.getBoundingClientRect();
      zoomAt(factor, width / 2, height / 2);
    },
  };
}
