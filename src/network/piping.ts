import { boxAround, boxCentre, isSound } from '../geometry/box.ts';
import { type Polyline, polyline } from '../geometry/polyline.ts';
import type { Box, Vec3 } from '../geometry/vector.ts';
import type { Identity, Part } from '../model/identity.ts';
import type { Element, ElementId, Model } from '../model/model.ts';
import { noLength } from './tolerance.ts';

/**
 * What takes part, before anything is joined: pipes with two ends each, and bodies (fittings, fixtures, terminals,
 * chambers) that other things end in. Both in the order of the model's elements. Pipe p has the nodes 2p and 2p + 1;
 * body b follows all ends as node 2 * pipes + b.
 */
export interface Piping {
  readonly pipes: readonly PipePart[];
  readonly bodies: readonly BodyPart[];
  /** By element id: index into `pipes` or `bodies`, -1 where the element is not one. */
  readonly pipeOf: Int32Array;
  readonly bodyOf: Int32Array;
}

export interface PipePart {
  readonly element: ElementId;
  /** null: no geometry, or no length. */
  readonly axis: Polyline | null;
  /** Outside diameter in metres, 0 where nothing says. */
  readonly diameter: number;
}

export interface BodyPart {
  readonly element: ElementId;
  readonly part: Part;
  readonly box: Box | null;
  /** Places where something is known to connect: ports, ends of a swept fitting's axis. */
  readonly spots: readonly Vec3[];
  /** Connections it can take; null where nothing says. */
  readonly capacity: number | null;
}

export const endNode = (pipe: number, side: 0 | 1): number => 2 * pipe + side;
export const isEnd = ({ pipes }: Piping, node: number): boolean => node < 2 * pipes.length;
export const bodyNode = ({ pipes }: Piping, body: number): number => 2 * pipes.length + body;

export const endPoint = (axis: Polyline, side: 0 | 1): Vec3 => axis.points[side === 0 ? 0 : axis.points.length - 1]!;

/** `part` says which elements take part; `null` leaves one out. */
export function pipingOf(model: Model, identities: readonly Identity[], takesPart: readonly boolean[]): Piping {
  const pipes: PipePart[] = [];
  const bodies: BodyPart[] = [];
  const pipeOf = new Int32Array(model.elements.length).fill(-1);
  const bodyOf = new Int32Array(model.elements.length).fill(-1);
  for (const element of model.elements) {
    if (!takesPart[element.id]) continue;
    const { part } = identities[element.id]!;
    if (part === 'pipe') {
      pipeOf[element.id] = pipes.length;
      pipes.push({ element: element.id, axis: axisOf(element), diameter: diameterOf(element) });
    } else {
      bodyOf[element.id] = bodies.length;
      bodies.push(bodyPart(element, part, model));
    }
  }
  return { pipes, bodies, pipeOf, bodyOf };
}

function axisOf({ centreLine }: Element): Polyline | null {
  if (centreLine === null || centreLine.points.length < 2) return null;
  const axis = polyline(centreLine.points);
  return Number.isFinite(axis.length) && axis.length > noLength ? axis : null;
}

/** Outside diameter, or the largest length that claims to be a size: only used to say how far an end may reach. */
function diameterOf({ centreLine, sizes }: Element): number {
  const drawn = centreLine?.outerDiameter ?? null;
  if (drawn !== null) return drawn;
  const stated = sizes.flatMap(({ mm, means }) => (mm !== null && means !== 'unknown' ? [mm / 1000] : []));
  return Math.min(Math.max(0, ...stated), 5);
}

function bodyPart(element: Element, part: Part, model: Model): BodyPart {
  const ports = element.ports.flatMap((port) => {
    const at = model.ports[port]?.at ?? null;
    return at?.every(Number.isFinite) ? [at] : [];
  });
  const line = element.centreLine?.points.filter((at) => at.every(Number.isFinite)) ?? [];
  const ends = line.length >= 2 ? [line[0]!, line[line.length - 1]!] : [];
  const spots = apart([...ports, ...ends]);
  return {
    element: element.id,
    part,
    box: element.box !== null && isSound(element.box) ? element.box : boxAround(spots),
    spots,
    capacity: capacityOf(element, part),
  };
}

/** Points that differ: ports without a place of their own all stand at their element's origin and say nothing. */
function apart(points: readonly Vec3[]): readonly Vec3[] {
  const alike = points.length > 1 && points.every((p) => p.every((x, i) => Math.abs(x - points[0]![i]!) < 1e-6));
  return alike ? [] : points;
}

function capacityOf({ predefinedType, ports }: Element, part: Part): number | null {
  const two = part === 'fitting' && (predefinedType === 'BEND' || predefinedType === 'TRANSITION');
  return two ? Math.max(2, ports.length) : null;
}

/** Middle of a body, or where its placement stands; null where the model says neither. */
export const placeOf = (body: BodyPart, model: Model): Vec3 | null =>
  body.box !== null ? boxCentre(body.box) : (model.elements[body.element]?.origin ?? null);
