/** `water-closet` as people write it: `water closet`. Roles, kinds, finding codes and causes alike. */
export const plainWords = (id: string): string => id.replaceAll('-', ' ');

/** `1 urinal`, `7 urinals`, `12 dishwashers`, `2 bathrooms`. */
export function counted(count: number, thing: string): string {
  return `${count} ${count === 1 ? thing : plural(thing)}`;
}

/** The largest count first, equal ones by word: `7 urinals, 2 lavatories`. */
export function countedKinds(kinds: readonly string[]): string {
  return tally(kinds)
    .map(([kind, count]) => counted(count, kind))
    .join(', ');
}

/** How often each text stands in the list: the most frequent first, equal ones in code-unit order. */
export function tally(texts: readonly string[]): [text: string, count: number][] {
  const counts = new Map<string, number>();
  for (const text of texts) counts.set(text, (counts.get(text) ?? 0) + 1);
  return [...counts].sort(([a, m], [b, n]) => n - m || (a < b ? -1 : 1));
}

/** A sentence with one full stop: clauses often end in one of their own. */
export const sentence = (text: string): string => (/[.?!]$/.test(text) ? text : `${text}.`);

/** `a`, `a and b`, `a, b and c`. */
export function listed(texts: readonly string[]): string {
  return texts.length < 2 ? texts.join('') : `${texts.slice(0, -1).join(', ')} and ${texts.at(-1)}`;
}

function plural(thing: string): string {
  if (/^(?:unidentified|idle|unknown)\b/.test(thing)) return thing;
  if (/[^aeiou]y$/.test(thing)) return `${thing.slice(0, -1)}ies`;
  return /(?:s|sh|ch|x)$/.test(thing) ? `${thing}es` : `${thing}s`;
}
