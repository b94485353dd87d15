import { jsonText } from '../schedule/json-text.ts';
import { leanResult } from '../schedule/lean-result.ts';
import type { Result } from '../schedule/result.ts';
import type { TextLine } from '../schedule/text-line.ts';
import type { ModelOptions } from './options.ts';
import { print, printLines } from './terminal.ts';

/** The result as JSON where that is asked for, else the lines for a person. */
export async function printResult(
  result: Result,
  { json, lean }: ModelOptions,
  lines: () => readonly TextLine[],
): Promise<void> {
  if (json === true) await printJson({ ...(lean === true ? leanResult(result) : result) });
  else await printLines(lines());
}

export const printJson = (value: Readonly<Record<string, unknown>>): Promise<void> => print(jsonText(value));
