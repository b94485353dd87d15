import { InputError } from '../findings/input-error.ts';
import { visible } from '../schedule/shown-text.ts';
import type { TextLine, Tone } from '../schedule/text-line.ts';
import { reasonOf, systemCode } from './system-errors.ts';

let closed = false;

/** True once whoever read standard output has gone: nothing more is printed, and the program ends with 0. */
export const outputIsClosed = (): boolean => closed;

/** To be called once at the start: a reader that goes away must not bring up a stack. */
export function watchStreams(): void {
  for (const stream of [process.stdout, process.stderr]) stream.on('error', () => undefined);
}

/** Prints pieces of text to standard output, waiting for it to take each. Control characters come out as escapes. */
export async function print(pieces: Iterable<string>): Promise<void> {
  let gathered = '';
  for (const piece of pieces) {
    gathered += piece;
    if (gathered.length < enough) continue;
    await write(gathered);
    gathered = '';
  }
  await write(gathered);
}

/** Lines for a person, in colour where standard output is a terminal and nobody asked for none. */
export async function printLines(lines: readonly TextLine[]): Promise<void> {
  const paint = wantsColour(process.stdout, process.env) ? painted : ({ text }: TextLine): string => visible(text);
  await print(lines.map((line) => `${paint(line).trimEnd()}\n`));
}

/** A line for standard error: a warning, or what went wrong. Never more than text. */
export function complain(text: string): void {
  process.stderr.write(`${visible(text)}\n`);
}

const enough = 1 << 16;

async function write(text: string): Promise<void> {
  if (closed || text === '') return;
  const error = await new Promise<Error | null | undefined>((done) => process.stdout.write(text, done));
  if (error === null || error === undefined) return;
  if (systemCode(error) === 'EPIPE' || systemCode(error) === 'ERR_STREAM_DESTROYED') closed = true;
  else throw new InputError('standard output', `cannot be written: ${reasonOf(error)}`, { cause: error });
}

/** https://no-color.org: a NO_COLOR that is not empty means none, whatever else is set. */
export const wantsColour = ({ isTTY }: { readonly isTTY?: boolean }, env: NodeJS.ProcessEnv): boolean =>
  isTTY === true && !env.NO_COLOR && env.TERM !== 'dumb';

const painted = ({ text, tone }: TextLine): string =>
  tone === 'plain' ? visible(text) : `\u001B[${colours[tone]}m${visible(text)}\u001B[0m`;

const colours: Readonly<Record<Exclude<Tone, 'plain'>, string>> = {
  heading: '1',
  error: '31',
  warning: '33',
  good: '32',
  quiet: '2',
};
