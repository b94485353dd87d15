import { distanceOfBoxes, distanceToBox } from '../geometry/box.ts';
import { footOn } from '../geometry/polyline.ts';
import { distance } from '../geometry/vector.ts';
import type { Identity } from '../model/identity.ts';
import type { ElementId, Model, Port, PortId } from '../model/model.ts';
import { bodyNode, endNode, endPoint, type Piping } from './piping.ts';
import { portPlaces } from './port-places.ts';
import { farApart } from './tolerance.ts';
import type { Link, Welds } from './welds.ts';

/** A connected pair that geometry or direction speaks against. The relation holds all the same. */
export interface Contradiction {
  readonly what: 'distance' | 'direction';
  readonly between: readonly [ElementId, ElementId];
  /** Metres; 0 for directions. */
  readonly gap: number;
}

export interface PortJoins {
  readonly contradictions: readonly Contradiction[];
  /** By pipe: which way water flows by the ports' word. */
  readonly flows: readonly ('forward' | 'backward' | null)[];
}

/**
 * Joins what the ports connect. `keeper` names the element that stands for each element: itself, or the one that it
 * doubles.
 */
export function joinPorts(
  model: Model,
  identities: readonly Identity[],
  piping: Piping,
  keeper: Int32Array,
  welds: Welds,
): PortJoins {
  const nodes = nodesOfPorts(model, piping, keeper, welds);
  const contradictions: Contradiction[] = [];
  for (const port of model.ports) {
    const a = nodes[port.id]!;
    if (a < 0 || suppliesOnly(port, model, identities)) continue;
    for (const [place, id] of port.connected.entries()) {
      const partner = model.ports[id];
      if (partner === undefined || suppliesOnly(partner, model, identities)) continue;
      const told = (id < port.id && partner.connected.includes(port.id)) || port.connected.indexOf(id) < place;
      if (told) continue;
      const b = nodes[id]!;
      if (b < 0) {
        if (partner.owner !== null) welds.hold(a);
        continue;
      }
      if (welds.elementOf(a) === welds.elementOf(b)) continue;
      const apart = port.at !== null && partner.at !== null ? distance(port.at, partner.at) : null;
      const drawn = gapOf(a, b, piping, welds);
      const gap = Math.min(apart ?? drawn ?? 0, drawn ?? apart ?? 0);
      const between: [ElementId, ElementId] = [welds.elementOf(a), welds.elementOf(b)];
      if (gap > farApart) contradictions.push({ what: 'distance', between, gap });
      if (port.direction === partner.direction && (port.direction === 'source' || port.direction === 'sink'))
        contradictions.push({ what: 'direction', between, gap: 0 });
      welds.join(a, b, 'ports', gap, flowBetween(port, partner));
    }
  }
  return { contradictions, flows: flowsOf(model, piping, nodes) };
}

const flowBetween = (from: Port, to: Port): Link['flow'] => {
  const word = saidDirection(from, to);
  return word === 'source' ? 'forward' : word === 'sink' ? 'backward' : null;
};

/** Direction of a port, by its own word or else by what its partner says; null where neither does or both clash. */
function saidDirection(port: Port, partner: Port | undefined): 'source' | 'sink' | null {
  const own = port.direction === 'source' || port.direction === 'sink' ? port.direction : null;
  const other = partner?.direction === 'source' ? 'sink' : partner?.direction === 'sink' ? 'source' : null;
  if (own !== null && other !== null && own !== other) return null;
  return own ?? other;
}

function nodesOfPorts(model: Model, piping: Piping, keeper: Int32Array, welds: Welds): Int32Array {
  const nodes = new Int32Array(model.ports.length).fill(-1);
  const ofPipe: Port[][] = piping.pipes.map(() => []);
  for (const port of model.ports) {
    if (port.owner === null) continue;
    const owner = keeper[port.owner]!;
    const pipe = piping.pipeOf[owner]!;
    const body = piping.bodyOf[owner]!;
    if (body >= 0) nodes[port.id] = bodyNode(piping, body);
    if (pipe >= 0) ofPipe[pipe]!.push(port);
  }
  for (const [pipe, ports] of ofPipe.entries()) {
    if (ports.length === 0) continue;
    const part = piping.pipes[pipe]!;
    portPlaces(part, ports, model).forEach((place, i) => {
      const port = ports[i]!;
      if (typeof place === 'number') nodes[port.id] = endNode(pipe, place);
      else if (port.connected.length > 0) nodes[port.id] = welds.wall(pipe, place.wall);
    });
  }
  return nodes;
}

/**
 * A fixture's port where water enters it, from piping of no stated medium, is its supply, if another port of the fixture
 * lets water out. Floor drains take water from pipes.
 */
function suppliesOnly(port: Port, model: Model, identities: readonly Identity[]): boolean {
  if (port.owner === null || port.direction !== 'sink') return false;
  const identity = identities[port.owner]!;
  if (identity.part !== 'fixture' || identity.kind === 'floor-drain') return false;
  const leaves = (id: PortId): boolean => {
    const other = model.ports[id];
    return other !== undefined && other.direction === 'source' && other.connected.length > 0;
  };
  return (
    model.elements[port.owner]!.ports.some(leaves) &&
    port.connected.some((id) => {
      const owner = model.ports[id]?.owner ?? null;
      return owner !== null && identities[owner]!.medium === null;
    })
  );
}

function flowsOf(model: Model, piping: Piping, nodes: Int32Array): ('forward' | 'backward' | null)[] {
  const enters: (boolean | null)[] = new Array<boolean | null>(2 * piping.pipes.length).fill(null);
  const clash = new Set<number>();
  for (const port of model.ports) {
    const node = nodes[port.id]!;
    if (node < 0 || node >= enters.length) continue;
    const word = saidDirection(port, model.ports[port.connected[0] ?? -1]);
    if (word === null) continue;
    const sink = word === 'sink';
    if (enters[node] !== null && enters[node] !== sink) clash.add(node >> 1);
    enters[node] = sink;
  }
  return piping.pipes.map((_, pipe) => {
    const [first, second] = [enters[2 * pipe]!, enters[2 * pipe + 1]!];
    if (clash.has(pipe) || (first === null && second === null) || first === second) return null;
    return (first ?? !second) ? 'forward' : 'backward';
  });
}

/** Metres between two nodes as drawn; null where one has no shape. */
function gapOf(a: number, b: number, piping: Piping, welds: Welds): number | null {
  const first = shapeOf(a, piping, welds);
  const second = shapeOf(b, piping, welds);
  if (first === null || second === null) return null;
  if ('box' in first)
    return 'box' in second ? distanceOfBoxes(first.box, second.box) : distanceToBox(second.at, first.box);
  if ('box' in second) return distanceToBox(first.at, second.box);
  if (second.axis !== null) return Math.max(0, footOn(second.axis, first.at).off - second.radius);
  if (first.axis !== null) return Math.max(0, footOn(first.axis, second.at).off - first.radius);
  return distance(first.at, second.at);
}

function shapeOf(node: number, { pipes, bodies }: Piping, welds: Welds) {
  const wall = welds.wallOf(node);
  const pipe = pipes[wall === null ? node >> 1 : wall.pipe];
  if (wall !== null || node < 2 * pipes.length) {
    if (pipe === undefined || pipe.axis === null) return null;
    const at = endPoint(pipe.axis, (node & 1) as 0 | 1);
    return { at, axis: wall === null ? null : pipe.axis, radius: pipe.diameter / 2 };
  }
  const { box } = bodies[node - 2 * pipes.length]!;
  return box === null ? null : { box };
}
