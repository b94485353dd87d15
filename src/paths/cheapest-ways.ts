import type { JointId, Network, PipeId } from '../network/network.ts';
import { otherEnd } from '../network/other-end.ts';

export interface Ways {
  /** Pipe to take from a joint toward the nearest goal; null at goals and where none is reached. By joint id. */
  readonly via: readonly (PipeId | null)[];
  /** Cost from a joint to the nearest goal; Infinity where none is reached. By joint id. */
  readonly cost: Float64Array;
}

/**
 * Cheapest way from every joint to the nearest of `goals`. `costOf(pipe, to, from)` is asked for the move from the far
 * joint `from` to the joint `to` nearer the goal; Infinity closes the pipe. Equal costs go by the pipe's rank.
 */
export function cheapestWays(
  network: Network,
  goals: readonly JointId[],
  costOf: (pipe: PipeId, to: JointId, from: JointId) => number,
  rank: Int32Array,
): Ways {
  const cost = new Float64Array(network.joints.length).fill(Number.POSITIVE_INFINITY);
  const via: (PipeId | null)[] = new Array(network.joints.length).fill(null);
  const heap = new JointHeap();
  for (const goal of goals) {
    cost[goal] = 0;
    heap.push(goal, 0);
  }
  for (let top = heap.pop(); top !== null; top = heap.pop()) {
    const { joint, key } = top;
    if (key > cost[joint]!) continue;
    for (const pipe of network.joints[joint]!.pipes) {
      const from = otherEnd(network, pipe, joint);
      if (from === joint) continue;
      const total = key + costOf(pipe, joint, from);
      const known = cost[from]!;
      if (total > known || total === Number.POSITIVE_INFINITY) continue;
      if (total === known) {
        const old = via[from];
        if (old === null || old === undefined || rank[old]! <= rank[pipe]!) continue;
      }
      cost[from] = total;
      via[from] = pipe;
      heap.push(from, total);
    }
  }
  return { via, cost };
}

/** Binary heap of joints by cost; equal costs leave in the order of their ids. */
class JointHeap {
  readonly #joints: JointId[] = [];
  readonly #keys: number[] = [];

  push(joint: JointId, key: number): void {
    let at = this.#joints.length;
    this.#joints.push(joint);
    this.#keys.push(key);
    while (at > 0) {
      const up = (at - 1) >> 1;
      if (!this.#before(at, up)) break;
      this.#swap(at, up);
      at = up;
    }
  }

  pop(): { joint: JointId; key: number } | null {
    const joint = this.#joints[0];
    const key = this.#keys[0];
    if (joint === undefined || key === undefined) return null;
    const lastJoint = this.#joints.pop()!;
    const lastKey = this.#keys.pop()!;
    if (this.#joints.length > 0) {
      this.#joints[0] = lastJoint;
      this.#keys[0] = lastKey;
      this.#sink(0);
    }
    return { joint, key };
  }

  #sink(start: number): void {
    let at = start;
    for (;;) {
      let least = at;
      for (const child of [2 * at + 1, 2 * at + 2]) {
        if (child < this.#joints.length && this.#before(child, least)) least = child;
      }
      if (least === at) return;
      this.#swap(at, least);
      at = least;
    }
  }

  #before(a: number, b: number): boolean {
    const ka = this.#keys[a]!;
    const kb = this.#keys[b]!;
    return ka < kb || (ka === kb && this.#joints[a]! < this.#joints[b]!);
  }

  #swap(a: number, b: number): void {
    [this.#joints[a], this.#joints[b]] = [this.#joints[b]!, this.#joints[a]!];
    [this.#keys[a], this.#keys[b]] = [this.#keys[b]!, this.#keys[a]!];
  }
}
