import { CommanderError } from 'commander';
import { InputError } from '../findings/input-error.ts';
import { complain, outputIsClosed } from './terminal.ts';

export const done = 0;
/** `check`, `batch`, `compare`: done, with error findings. */
export const doneWithErrors = 1;
export const wrongUsage = 2;
export const unusable = 3;
/** A fault of our own (sysexits.h: EX_SOFTWARE). */
export const ownFault = 70;

/** Says what went wrong and returns the exit code; 0 where only the reader of our output has gone. */
export function exitCodeOf(error: unknown): number {
  if (outputIsClosed()) return done;
  // Commander has said it already: help and version end with 0, everything else is wrong usage.
  if (error instanceof CommanderError) return error.exitCode === 0 ? done : wrongUsage;
  if (error instanceof InputError) {
    complain(`drainwright: ${error.message}`);
    return error.exit;
  }
  complain('drainwright: this is a fault of the program, not of your file. Please report it with these lines:');
  complain(error instanceof Error ? (error.stack ?? error.message) : String(error));
  return ownFault;
}
