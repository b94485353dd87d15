import type { Network } from '../../src/network/network.ts';

/**
 * Which elements touch which, as pairs of ids `3 17`: a pipe and the fitting it ends in, two fittings that are linked,
 * pipes that meet without a fitting.
 */
export function adjacency(network: Network): ReadonlySet<string> {
  const pairs = new Set<string>();
  const touch = (a: number, b: number): void => {
    if (a !== b) pairs.add(a < b ? `${a} ${b}` : `${b} ${a}`);
  };
  for (const { elements, pipes } of network.joints) {
    const met = pipes.map((id) => network.pipes[id]!.element).filter((element) => element !== null);
    for (const body of elements) for (const pipe of met) touch(body, pipe);
    if (elements.length === 0) for (const a of met) for (const b of met) touch(a, b);
  }
  for (const { element, ends } of network.pipes) {
    if (element !== null) continue;
    for (const a of network.joints[ends[0]]!.elements) for (const b of network.joints[ends[1]]!.elements) touch(a, b);
  }
  return pairs;
}

/** How much of the truth was found, and how much of what was found is true, from 0 to 1. */
export function agreement(
  found: ReadonlySet<string>,
  truth: ReadonlySet<string>,
): { recall: number; precision: number } {
  const shared = [...found].filter((pair) => truth.has(pair)).length;
  return { recall: truth.size === 0 ? 1 : shared / truth.size, precision: found.size === 0 ? 1 : shared / found.size };
}
