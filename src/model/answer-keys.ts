import type { Element } from './model.ts';

const namePrefix = 'name:';

/**
 * A key of the answers file meets an element by GlobalId, or by name where it says `name:` with `*` as wildcard. Where
 * a model doubles or lacks the GlobalId, results write `GlobalId#file.STEP id`, and answers may.
 */
export function keyMatches(key: string, element: Element): boolean {
  if (!key.startsWith(namePrefix)) return key === element.globalId || (key.includes('#') && key === fullId(element));
  const pattern = key.slice(namePrefix.length);
  // `name:*` means every one, those without a name too.
  return element.name === null ? /^\*+$/.test(pattern) : wildcardMatches(pattern, element.name);
}

export const fullId = ({ globalId, file, stepId }: Element): string => `${globalId}#${file}.${stepId}`;

/** Linear in both lengths: no pattern of a user can hang the program. */
export function wildcardMatches(pattern: string, text: string): boolean {
  const parts = pattern.split('*');
  if (parts.length === 1) return pattern === text;
  const first = parts[0]!;
  const last = parts[parts.length - 1]!;
  if (!text.startsWith(first) || !text.endsWith(last) || text.length < first.length + last.length) return false;
  let at = first.length;
  for (const part of parts.slice(1, -1)) {
    const found = text.indexOf(part, at);
    if (found < 0) return false;
    at = found + part.length;
  }
  return at <= text.length - last.length;
}
