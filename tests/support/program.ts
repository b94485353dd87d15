import { type ChildProcess, spawn, spawnSync } from 'node:child_process';
import { mkdirSync, mkdtempSync, readdirSync, rmSync, statSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';

const root = resolve(import.meta.dirname, '../..');
const dist = join(root, 'dist');

export const mainFile = join(dist, 'cli/main.js');

/** Builds the program where dist/ is missing or older than its sources; one test file builds, the others wait. */
export function builtProgram(): void {
  const lock = join(root, 'node_modules/.drainwright-build');
  for (;;) {
    if (isFresh()) return;
    try {
      mkdirSync(lock);
    } catch {
      Atomics.wait(new Int32Array(new SharedArrayBuffer(4)), 0, 0, 200);
      if (Date.now() - (statSync(lock, { throwIfNoEntry: false })?.mtimeMs ?? Date.now()) > 120_000)
        rmSync(lock, { recursive: true, force: true });
      continue;
    }
    try {
      if (isFresh()) return;
      spawnSync(process.execPath, [join(root, 'src/build/build.mjs')], { cwd: root, stdio: 'ignore' });
      if (statSync(mainFile, { throwIfNoEntry: false }) === undefined) throw new Error('the build made no program');
      return;
    } finally {
      rmSync(lock, { recursive: true, force: true });
    }
  }
}

function isFresh(): boolean {
  const built = statSync(mainFile, { throwIfNoEntry: false })?.mtimeMs ?? 0;
  const sources = readdirSync(join(root, 'src'), { recursive: true, encoding: 'utf8' });
  return (
    built > 0 &&
    sources.every((name) => (statSync(join(root, 'src', name), { throwIfNoEntry: false })?.mtimeMs ?? 0) <= built)
  );
}

export interface Ran {
  readonly code: number | null;
  readonly stdout: string;
  readonly stderr: string;
}

/** Runs the built program and waits for it. */
export function drainwright(
  args: readonly string[],
  options: { readonly input?: Uint8Array | string; readonly cwd?: string; readonly env?: Record<string, string> } = {},
): Ran {
  builtProgram();
  const { status, stdout, stderr } = spawnSync(process.execPath, [mainFile, ...args], {
    cwd: options.cwd ?? root,
    input: options.input ?? '',
    env: { PATH: process.env.PATH ?? '', ...options.env },
    encoding: 'utf8',
    maxBuffer: 1 << 28,
    timeout: 60_000,
  });
  return { code: status, stdout, stderr };
}

/** Starts the built program without waiting. */
export function started(args: readonly string[], cwd: string): ChildProcess {
  builtProgram();
  return spawn(process.execPath, [mainFile, ...args], { cwd, stdio: ['ignore', 'pipe', 'pipe'] });
}

/** An empty folder of its own for one test. */
export const scratch = (): string => mkdtempSync(join(tmpdir(), 'drainwright-test-'));
