import { boxAround } from '../../src/geometry/box.ts';
import { cutOut, polyline } from '../../src/geometry/polyline.ts';
import type { Box, Vec3 } from '../../src/geometry/vector.ts';
import type { Element, Model } from '../../src/model/model.ts';

const withElements = (model: Model, change: (element: Element) => Element): Model => ({
  ...model,
  elements: model.elements.map(change),
});

/** The model without any port: geometry alone says who is joined to whom. */
export const withoutPorts = (model: Model): Model => ({
  ...withElements(model, (element) => ({ ...element, ports: [] })),
  ports: [],
});

/** Every pipe stops short by `gap(end)` metres at each end; short pipes keep a third of their length. */
export function withGaps(model: Model, gap: (end: number) => number): Model {
  let end = 0;
  return withElements(model, (element) => {
    const line = element.centreLine;
    if (line === null || element.kind !== 'segment') return element;
    const axis = polyline(line.points);
    const most = axis.length / 3;
    const from = Math.min(gap(end++), most);
    const to = axis.length - Math.min(gap(end++), most);
    return { ...element, centreLine: { ...line, points: cutOut(axis, from, to) } };
  });
}

const corners = ({ min, max }: Box): readonly Vec3[] =>
  [min[0], max[0]].flatMap((x) => [min[1], max[1]].flatMap((y) => [min[2], max[2]].map((z): Vec3 => [x, y, z])));

/** The model turned about the vertical by `angle` radians and shifted. Boxes are boxed anew and grow, as boxes do. */
export function moved(model: Model, angle: number, shift: Vec3): Model {
  const [c, s] = [Math.cos(angle), Math.sin(angle)];
  const move = ([x, y, z]: Vec3): Vec3 => [c * x - s * y + shift[0], s * x + c * y + shift[1], z + shift[2]];
  const changed = withElements(model, (element) => ({
    ...element,
    origin: element.origin && move(element.origin),
    box: element.box && boxAround(corners(element.box).map(move)),
    centreLine: element.centreLine && { ...element.centreLine, points: element.centreLine.points.map(move) },
  }));
  return { ...changed, ports: model.ports.map((port) => ({ ...port, at: port.at && move(port.at) })) };
}
