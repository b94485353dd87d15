/** Two things that may be joined, settled in the order of cost; equal costs by GlobalId. */
export interface Pair {
  readonly cost: number;
  /** GlobalIds. */
  readonly names: readonly [string, string];
  /** Joins them, if nothing that came before stands against it. */
  readonly settle: () => void;
}

/** Costs that differ by less than a micrometre are equal: turning a model must not decide. */
export function settlePairs(pairs: readonly Pair[]): void {
  const inOrder = [...pairs].sort(
    (a, b) =>
      Math.round(a.cost * 1e6) - Math.round(b.cost * 1e6) ||
      byText(a.names[0], b.names[0]) ||
      byText(a.names[1], b.names[1]),
  );
  for (const pair of inOrder) pair.settle();
}

const byText = (a: string, b: string): number => (a < b ? -1 : a > b ? 1 : 0);
