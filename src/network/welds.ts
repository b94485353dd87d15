import type { ElementId } from '../model/model.ts';
import type { JointGround } from './network.ts';
import { bodyNode, type Piping } from './piping.ts';
import { samePlace } from './tolerance.ts';

/** One relation between two things that meet, with its ground and the gap it bridges. */
export interface Weld {
  readonly nodes: readonly [number, number];
  readonly how: 'ports' | JointGround;
  readonly gap: number;
  readonly between: readonly [ElementId, ElementId];
}

/** Two bodies that touch: each stays a joint of its own, a link joins them. */
export interface Link {
  readonly bodies: readonly [number, number];
  /** By the ports' word, from the first body to the second. */
  readonly flow: 'forward' | 'backward' | null;
}

/** A place on a pipe's wall where something ends. */
export interface WallPlace {
  readonly pipe: number;
  readonly at: number;
}

/**
 * Who is joined to whom. Nodes are pipe ends, bodies and places on walls; those that meet share a root, which is a joint
 * to be. A joint has one body at most: two bodies that meet are linked instead.
 */
export class Welds {
  readonly all: Weld[] = [];
  readonly links: Link[] = [];
  readonly walls: WallPlace[] = [];
  /** Connections that each body has, by body. */
  readonly degree: Int32Array;
  private readonly parent: number[];
  private readonly bodyAt: number[];
  private readonly linked = new Set<string>();
  private readonly held: boolean[];
  private readonly onPipe = new Map<number, readonly number[]>();
  private readonly piping: Piping;
  private readonly firstWall: number;

  constructor(piping: Piping) {
    this.piping = piping;
    const nodes = 2 * piping.pipes.length + piping.bodies.length;
    this.firstWall = nodes;
    this.parent = Array.from({ length: nodes }, (_, node) => node);
    this.bodyAt = Array.from({ length: nodes }, (_, node) => Math.max(-1, node - 2 * piping.pipes.length));
    this.held = new Array<boolean>(nodes).fill(false);
    this.degree = new Int32Array(piping.bodies.length);
  }

  get nodes(): number {
    return this.parent.length;
  }

  root(node: number): number {
    let at = node;
    while (this.parent[at] !== at) {
      this.parent[at] = this.parent[this.parent[at]!]!;
      at = this.parent[at]!;
    }
    return at;
  }

  /** Body of the joint that a node belongs to, or -1. */
  bodyOf(node: number): number {
    return this.bodyAt[this.root(node)]!;
  }

  /** True when something has been joined to this very node. */
  isHeld(node: number): boolean {
    return this.held[node] === true;
  }

  /** Marks an end as settled though nothing in the network is joined to it. */
  hold(node: number): void {
    this.held[node] = true;
  }

  /** The node at a place on a pipe's wall: one that is there already, give or take a centimetre, or a new one. */
  wall(pipe: number, at: number): number {
    const here = this.onPipe.get(pipe) ?? [];
    const shared = here.find((node) => Math.abs(this.wallOf(node)!.at - at) <= samePlace);
    if (shared !== undefined) return shared;
    this.walls.push({ pipe, at });
    this.bodyAt.push(-1);
    this.held.push(true);
    const node = this.parent.push(this.parent.length) - 1;
    this.onPipe.set(pipe, [...here, node]);
    return node;
  }

  /** Nodes on a pipe's wall, in the order they were made. */
  wallsOn(pipe: number): readonly number[] {
    return this.onPipe.get(pipe) ?? [];
  }

  wallOf(node: number): WallPlace | null {
    const place = node - this.firstWall;
    return place < 0 ? null : this.walls[place]!;
  }

  elementOf(node: number): ElementId {
    const { pipes, bodies } = this.piping;
    if (node < 2 * pipes.length) return pipes[node >> 1]!.element;
    const wall = this.wallOf(node);
    return wall === null ? bodies[node - 2 * pipes.length]!.element : pipes[wall.pipe]!.element;
  }

  join(a: number, b: number, how: Weld['how'], gap: number, flow: Link['flow'] = null): void {
    this.held[a] = true;
    this.held[b] = true;
    const between = [this.elementOf(a), this.elementOf(b)] as const;
    this.all.push({ nodes: [a, b], how, gap: gap < noGap ? 0 : gap, between });
    for (const node of [a, b]) this.count(node);
    const [x, y] = [this.root(a), this.root(b)];
    if (x === y) return;
    const [bodyX, bodyY] = [this.bodyAt[x]!, this.bodyAt[y]!];
    if (bodyX >= 0 && bodyY >= 0) this.link(bodyX, bodyY, flow);
    else {
      this.parent[y] = x;
      this.bodyAt[x] = Math.max(bodyX, bodyY);
    }
  }

  private count(node: number): void {
    const body = node - 2 * this.piping.pipes.length;
    if (body >= 0 && body < this.degree.length) this.degree[body]!++;
  }

  private link(a: number, b: number, flow: Link['flow']): void {
    const key = a < b ? `${a} ${b}` : `${b} ${a}`;
    if (this.linked.has(key)) return;
    this.linked.add(key);
    this.links.push(a < b ? { bodies: [a, b], flow } : { bodies: [b, a], flow: turned(flow) });
  }

  /** Node at which a body stands. */
  nodeOfBody(body: number): number {
    return bodyNode(this.piping, body);
  }
}

/** What arithmetic leaves where drawing left nothing, metres. */
const noGap = 1e-6;

export const turned = (flow: Link['flow']): Link['flow'] =>
  flow === null ? null : flow === 'forward' ? 'backward' : 'forward';
