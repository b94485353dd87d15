const most = 3;
/** Further apart than this share of the longer one, two words have nothing to do with each other. */
const farthest = 0.5;
/** Of very many words only the first are compared: it is a hint, not a search. */
const mostCompared = 20_000;

/** Up to three of the words that are written most like this one, the nearest first; equally near ones in their order. */
export function nearest(word: string, words: readonly string[]): readonly string[] {
  const short = word.slice(0, longest).toLowerCase();
  const limit = Math.ceil(farthest * Math.max(short.length, 1));
  return [...new Set(words.slice(0, mostCompared))]
    .map((other) => ({ other, steps: editSteps(short, other.slice(0, longest).toLowerCase()) }))
    .filter(({ steps }) => steps <= limit)
    .toSorted((a, b) => a.steps - b.steps)
    .slice(0, most)
    .map(({ other }) => other);
}

const longest = 40;

/** Letters to insert, drop or change to make one word of the other. */
export function editSteps(a: string, b: string): number {
  let row = Array.from({ length: b.length + 1 }, (_, index) => index);
  for (let i = 1; i <= a.length; i += 1) {
    const next = [i];
    for (let j = 1; j <= b.length; j += 1) {
      const change = (row[j - 1] ?? 0) + (a[i - 1] === b[j - 1] ? 0 : 1);
      next.push(Math.min(change, (row[j] ?? 0) + 1, (next[j - 1] ?? 0) + 1));
    }
    row = next;
  }
  return row[b.length] ?? 0;
}
