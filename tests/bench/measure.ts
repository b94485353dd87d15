/** Median of a list; the middle pair's mean where it is even. */
export function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  const middle = sorted.length >> 1;
  return sorted.length % 2 === 1 ? sorted[middle]! : (sorted[middle - 1]! + sorted[middle]!) / 2;
}

/** Processor seconds of this process that a call takes: steadier than the clock on a busy machine. */
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

/** Two calls in turn, both warm, in alternating order; the ratio is taken pair by pair. Seconds. */
export function ratio(ours: () => void, theirs: () => void, rounds = 7, warm = 3): Ratio {
  for (let round = 0; round < warm; round++) {
    ours();
    theirs();
  }
  const pairs = Array.from({ length: rounds }, (_, round) => {
    if (round % 2 === 0) return [cpuSeconds(ours), cpuSeconds(theirs)] as const;
    const second = cpuSeconds(theirs);
    return [cpuSeconds(ours), second] as const;
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
