import type { State } from './state.ts';

/** States by their bound; of equal ones the one with more changes, then the one that came first. */
export class StateQueue {
  readonly #heap: { readonly state: State; readonly turn: number }[] = [];
  #turn = 0;

  push(state: State): void {
    this.#heap.push({ state, turn: this.#turn++ });
    let at = this.#heap.length - 1;
    while (at > 0) {
      const up = (at - 1) >> 1;
      if (!this.#before(at, up)) break;
      this.#swap(at, up);
      at = up;
    }
  }

  pop(): State | null {
    const top = this.#heap[0];
    const last = this.#heap.pop();
    if (top === undefined || last === undefined) return null;
    if (this.#heap.length > 0) {
      this.#heap[0] = last;
      this.#sink();
    }
    return top.state;
  }

  #sink(): void {
    let at = 0;
    for (;;) {
      let least = at;
      for (const child of [2 * at + 1, 2 * at + 2])
        if (child < this.#heap.length && this.#before(child, least)) least = child;
      if (least === at) return;
      this.#swap(at, least);
      at = least;
    }
  }

  #before(a: number, b: number): boolean {
    const [x, y] = [this.#heap[a]!, this.#heap[b]!];
    const bounds = x.state.bound - y.state.bound;
    if (Math.abs(bounds) > 1e-9) return bounds < 0;
    const depths = y.state.made.length - x.state.made.length;
    return depths === 0 ? x.turn < y.turn : depths < 0;
  }

  #swap(a: number, b: number): void {
    [this.#heap[a], this.#heap[b]] = [this.#heap[b]!, this.#heap[a]!];
  }
}
