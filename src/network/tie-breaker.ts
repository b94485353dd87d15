import type { Model } from '../model/model.ts';

/**
 * An order of elements that their GlobalIds alone fix, so that neither lines nor numbering decide between equals. By a
 * number made of the GlobalId first: buildings repeat themselves, and comparing texts for each of their equals is slow.
 */
export function tieBreaker({ elements }: Model): (a: number, b: number) => number {
  const keys = Float64Array.from(elements, ({ globalId }) => keyOf(globalId));
  return (a, b) => {
    const difference = keys[a]! - keys[b]!;
    if (difference !== 0) return difference;
    const [x, y] = [elements[a]!.globalId, elements[b]!.globalId];
    return x < y ? -1 : x > y ? 1 : 0;
  };
}

/** Two independent hashes of 32 and 21 bits side by side. */
function keyOf(text: string): number {
  let [low, high] = [0x811c9dc5, 0x9e3779b9];
  for (let i = 0; i < text.length; i++) {
    low = Math.imul(low ^ text.charCodeAt(i), 0x01000193);
    high = Math.imul(high ^ text.charCodeAt(i), 0x85ebca6b);
  }
  return (low >>> 0) * 2 ** 21 + (high >>> 11);
}
