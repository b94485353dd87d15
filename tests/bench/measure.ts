/** Median of a list; the middle pair's mean where it is even. */
export function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  const middle = sorted.length >> 1;
  return sorted.length % 2 === 1 ? sorted[middle]! : (sorted[middle - 1]! + sorted[middle]!) / 2;
}

/**
 * Processor seconds of this process that a call takes: steadier than the clock on a busy machine. Memory is not swept
 * before it: a full sweep forgets the shapes that the compiled code is made for, and the next call would be a cold one.
 */
export function cpuSeconds(call: () => void): number {
  const before = process.cpuUsage();
  call();
  const { user, system } = process.cpuUsage(before);
  return (user + system) / 1e6;
}

export interface Ratio {
  readonly ours: number;
  readonly theirs: number;
  readonly ratio: number;
  readonly least: number;
  readonly most: number;
}

/**
 * Two calls in turn, both warm, in alternating order; the ratio is taken pair by pair. Seconds. `ours` makes what the
 * measured call begins with, so that no round finds what another has remembered.
 */
export function freshRatio<T>(
  ours: { prepare(): T; run(from: T): void },
  theirs: () => void,
  rounds = 7,
  warm = 3,
): Ratio {
  const measured = (): number => {
    const from = ours.prepare();
    return cpuSeconds(() => ours.run(from));
  };
  for (let round = 0; round < warm; round++) {
    measured();
    theirs();
  }
  const pairs = Array.from({ length: rounds }, (_, round) => {
    if (round % 2 === 0) return [measured(), cpuSeconds(theirs)] as const;
    const second = cpuSeconds(theirs);
    return [measured(), second] as const;
  });
  const ratios = pairs.map(([a, b]) => a / b);
  return {
    ours: median(pairs.map(([a]) => a)),
    theirs: median(pairs.map(([, b]) => b)),
    ratio: median(ratios),
    least: Math.min(...ratios),
    most: Math.max(...ratios),
  };
}

/** The same, where our call begins with nothing. */
export const ratio = (ours: () => void, theirs: () => void, rounds = 7, warm = 3): Ratio =>
  freshRatio({ prepare: () => undefined, run: ours }, theirs, rounds, warm);
