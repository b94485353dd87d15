#!/usr/bin/env node
import { exitCodeOf } from './exit.ts';
import { program } from './program.ts';
import { outputIsClosed, watchStreams } from './terminal.ts';

watchStreams();
try {
  await program().parseAsync(process.argv);
  if (outputIsClosed()) process.exitCode = 0;
} catch (error) {
  process.exitCode = exitCodeOf(error);
}
