import type { Result } from './result.ts';
import { shortened, shownText } from './shown-text.ts';

/** What people call the elements of a result: `Pipe 12 #4711`; a text that is no GlobalId of it stays as it is. */
export interface ElementNames {
  readonly of: (globalId: string) => string;
  /** Without the STEP id where there is a name. */
  readonly short: (globalId: string) => string;
}

export function elementNames({ elements, fixtures, pipes }: Result): ElementNames {
  const names = new Map<string, string | null>([...fixtures, ...pipes].map(({ globalId, name }) => [globalId, name]));
  const known = new Map(elements.map((element) => [element.globalId, element]));
  for (const { globalId, stepId } of [...fixtures, ...pipes]) {
    if (!known.has(globalId)) known.set(globalId, { globalId, stepId, file: '', class: '', use: 'unresolved' });
  }
  const nameOf = (globalId: string): string => shortened(shownText(names.get(globalId) ?? ''), longestName);
  return {
    of: (globalId) => {
      const element = known.get(globalId);
      if (element === undefined) return shownText(globalId);
      return `${nameOf(globalId) || element.class.replace(/^Ifc/, '')} #${element.stepId}`.trim();
    },
    short: (globalId) => nameOf(globalId) || `#${known.get(globalId)?.stepId ?? shownText(globalId)}`,
  };
}

const longestName = 36;
