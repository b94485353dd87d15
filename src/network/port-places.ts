import { boxCentre } from '../geometry/box.ts';
import { footOn, type Polyline } from '../geometry/polyline.ts';
import { distance, type Vec3 } from '../geometry/vector.ts';
import type { Model, Port } from '../model/model.ts';
import { endPoint, type PipePart } from './piping.ts';

/** Where on its pipe a port sits: at an end, or on the wall so many metres along. */
export type PortPlace = 0 | 1 | { readonly wall: number };

/** Differences below this do not tell two ends apart. */
const tells = 1e-4;
/** A port this far from both ends, at least, is one on the wall. */
const leastFromEnds = 0.1;

/**
 * Places of a pipe's ports, in their order. Positions decide; where ports have none, the things they connect to; then
 * direction (water enters at the first end); then order.
 */
export function portPlaces(pipe: PipePart, ports: readonly Port[], model: Model): readonly PortPlace[] {
  const { axis } = pipe;
  if (axis === null) return byDirection(ports);
  const spots = placesOf(ports, axis, model);
  const walls = spots.map((at) => (at === null ? null : onWall(at, pipe, axis)));
  const atEnds = ports.filter((_, i) => walls[i] === null);
  const ends = atTheEnds(
    atEnds,
    spots.filter((_, i) => walls[i] === null),
    axis,
  );
  let next = 0;
  return walls.map((wall) => (wall === null ? ends[next++]! : { wall }));
}

function placesOf(ports: readonly Port[], axis: Polyline, model: Model): readonly (Vec3 | null)[] {
  const first = ports[0]?.at ?? null;
  const alike =
    ports.length > 1 && first !== null && ports.every(({ at }) => at !== null && distance(at, first) < tells);
  return ports.map((port) => (port.at !== null && !alike ? port.at : partnerPlace(port, axis, model)));
}

/** Where the thing that a port connects to stands; null when it has no place either. */
function partnerPlace(port: Port, axis: Polyline, model: Model): Vec3 | null {
  for (const id of port.connected) {
    const partner = model.ports[id];
    if (partner === undefined) continue;
    if (partner.at !== null) return partner.at;
    const owner = partner.owner === null ? undefined : model.elements[partner.owner];
    const line = owner?.centreLine?.points;
    if (line !== undefined && line.length > 1) {
      const reach = (p: Vec3): number => Math.min(distance(p, endPoint(axis, 0)), distance(p, endPoint(axis, 1)));
      const [a, b] = [line[0]!, line[line.length - 1]!];
      return reach(a) <= reach(b) ? a : b;
    }
    if (owner?.box) return boxCentre(owner.box);
    if (owner?.origin) return owner.origin;
  }
  return null;
}

function onWall(at: Vec3, { diameter }: PipePart, axis: Polyline): number | null {
  const foot = footOn(axis, at);
  const fromEnds = Math.min(foot.at, axis.length - foot.at);
  return foot.off <= diameter / 2 + 0.02 && fromEnds > Math.max(diameter, leastFromEnds) ? foot.at : null;
}

function atTheEnds(ports: readonly Port[], spots: readonly (Vec3 | null)[], axis: Polyline): readonly (0 | 1)[] {
  const fallback = byDirection(ports);
  const costs = spots.map((at) =>
    at === null ? null : [distance(at, endPoint(axis, 0)), distance(at, endPoint(axis, 1))],
  );
  /** Positive: the second end is nearer. */
  const leaning = costs.map((cost) => (cost === null ? 0 : cost[0]! - cost[1]!));
  if (ports.length === 2) {
    const balance = leaning[0]! - leaning[1]!;
    if (Math.abs(balance) > tells) return balance < 0 ? [0, 1] : [1, 0];
    return fallback;
  }
  return leaning.map((lean, i) => (Math.abs(lean) > tells ? (lean < 0 ? 0 : 1) : fallback[i]!));
}

function byDirection(ports: readonly Port[]): readonly (0 | 1)[] {
  const enters = ports.filter(({ direction }) => direction === 'sink').length;
  const leaves = ports.filter(({ direction }) => direction === 'source').length;
  if (ports.length === 2 && !(enters === 1 || leaves === 1)) return [0, 1];
  if (ports.length === 2) {
    const first = ports[0]!.direction;
    const second = ports[1]!.direction;
    return first === 'source' || second === 'sink' ? [1, 0] : [0, 1];
  }
  return ports.map(({ direction }, i) => (direction === 'sink' ? 0 : direction === 'source' ? 1 : i === 0 ? 0 : 1));
}
