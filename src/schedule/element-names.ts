import { elementRows } from './element-rows.ts';
import type { Result } from './result.ts';
import { shortened, shownText } from './shown-text.ts';

/** What people call the elements of a result: `Pipe 12 #4711`; a text that is no GlobalId of it stays as it is. */
export interface ElementNames {
  readonly of: (globalId: string) => string;
  /** Without the STEP id where there is a name. */
  readonly short: (globalId: string) => string;
}

export function elementNames(result: Result): ElementNames {
  const rows = [...result.fixtures, ...result.pipes];
  const names = new Map<string, string | null>(rows.map(({ globalId, name }) => [globalId, name]));
  const known = elementRows(result);
  const nameOf = (globalId: string): string => shortened(shownText(names.get(globalId) ?? ''), longestName);
  return {
    of: (globalId) => {
      const element = known.get(globalId);
      if (element === undefined) return shownText(globalId);
      return `${nameOf(globalId) || element.class.replace(/^Ifc/, '')} #${element.stepId}`.trim();
    },
    short: (globalId) => {
      const element = known.get(globalId);
      return nameOf(globalId) || (element === undefined ? shownText(globalId) : `#${element.stepId}`);
    },
  };
}

const longestName = 36;
