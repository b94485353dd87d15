import { boxAround, distanceOfBoxes, grown } from '../../src/geometry/box.ts';
import { type Element, elementId, type Model } from '../../src/model/model.ts';

/** Farther from everything else than this, metres: what crosses one pipe shall cross nothing more. */
const aside = 0.1;

/**
 * The model with a pipe of the same size laid level across every straight level pipe over half a metre, `clear` metres
 * between the two walls, wherever there is room for it. They stand behind the model's own elements and join nothing.
 */
export function withCrossings(model: Model, clear: number): Model {
  const added: Element[] = [];
  const boxes = model.elements.map(({ box }) => box);
  for (const element of model.elements) {
    const line = element.centreLine;
    const diameter = line?.outerDiameter ?? null;
    if (element.kind !== 'segment' || line === null || diameter === null || line.points.length !== 2) continue;
    const [a, b] = [line.points[0]!, line.points[1]!];
    const long = Math.hypot(b[0] - a[0], b[1] - a[1]);
    if (long < 0.5 || Math.abs(b[2] - a[2]) > 0.1 * long) continue;
    const [x, y, z] = [(a[0] + b[0]) / 2, (a[1] + b[1]) / 2, (a[2] + b[2]) / 2 + diameter + clear];
    const [across, up] = [-(b[1] - a[1]) / long / 2, (b[0] - a[0]) / long / 2];
    const points = [
      [x - across, y - up, z],
      [x + across, y + up, z],
    ] as const;
    const box = grown(boxAround(points)!, diameter / 2);
    const near = boxes.some((other, id) => other !== null && id !== element.id && distanceOfBoxes(box, other) < aside);
    if (near) continue;
    const id = elementId(model.elements.length + added.length);
    const own = { ports: [], globalId: `crossing ${element.globalId}`, stepId: 9_000_000 + id };
    added.push({ ...element, ...own, id, box, origin: points[0], centreLine: { ...line, points } });
    boxes.push(box);
  }
  return { ...model, elements: [...model.elements, ...added] };
}
