import { spawn } from 'node:child_process';
import { createHash } from 'node:crypto';
import {
  chmodSync,
  existsSync,
  linkSync,
  mkdirSync,
  readdirSync,
  readFileSync,
  statSync,
  symlinkSync,
  writeFileSync,
} from 'node:fs';
import { join, resolve } from 'node:path';
import { beforeAll, describe, expect, test } from 'vitest';
import { outputPlace } from '../../src/cli/output-place.ts';
import { type FileIdentity, readInput } from '../../src/cli/read-input.ts';
import { writeNew } from '../../src/cli/write-new.ts';
import { builtProgram, scratch } from '../support/program.ts';

const text = (words: string): Uint8Array => new TextEncoder().encode(words);
const identity = async (path: string): Promise<FileIdentity | null> => (await readInput(path)).identity;

test('writes all pieces, tells bytes and digest, leaves nothing else behind', async () => {
  const folder = scratch();
  const out = join(folder, 'out.ifc');
  const written = await writeNew(await outputPlace(out, [], false), [text('one '), text(''), text('two')], 'out.ifc');
  expect(readFileSync(out, 'utf8')).toBe('one two');
  expect(written).toEqual({ path: 'out.ifc', bytes: 7, sha256: createHash('sha256').update('one two').digest('hex') });
  expect(readdirSync(folder)).toEqual(['out.ifc']);
});

test('replaces an old file and keeps its permissions', async () => {
  const out = join(scratch(), 'out.ifc');
  writeFileSync(out, 'old');
  chmodSync(out, 0o640);
  await writeNew(await outputPlace(out, [], false), [text('new')], out);
  expect(readFileSync(out, 'utf8')).toBe('new');
  expect(statSync(out).mode & 0o777).toBe(0o640);
});

test('a failure in the middle leaves the old file and no temporary one', async () => {
  const folder = scratch();
  const out = join(folder, 'out.ifc');
  writeFileSync(out, 'old');
  const place = await outputPlace(out, [], false);
  function* broken(): Generator<Uint8Array> {
    yield text('half');
    throw Object.assign(new Error('ENOSPC: no space left on device'), { code: 'ENOSPC' });
  }
  await expect(writeNew(place, broken(), 'out.ifc')).rejects.toThrow('out.ifc: cannot be written: the disk is full');
  expect(readFileSync(out, 'utf8')).toBe('old');
  expect(readdirSync(folder)).toEqual(['out.ifc']);
});

test('what a killed run left is taken away by the next, what a living one has is not', async () => {
  const folder = scratch();
  const out = join(folder, 'out.ifc');
  const dead = join(folder, '.out.ifc.999999999.drainwright-tmp');
  const living = join(folder, `.out.ifc.${process.ppid}.drainwright-tmp`);
  for (const path of [dead, living]) writeFileSync(path, 'half');
  await writeNew(await outputPlace(out, [], false), [text('new')], out);
  expect(existsSync(dead)).toBe(false);
  expect(existsSync(living)).toBe(true);
});

describe('the input is refused as output, whatever it is called', () => {
  const names: readonly [string, (folder: string) => string][] = [
    ['the same name', (folder) => join(folder, 'hall.ifc')],
    ['through ./', (folder) => `${folder}/./hall.ifc`],
    ['through the folder above', (folder) => `${folder}/../${folder.split('/').at(-1)}/hall.ifc`],
    [
      'a symbolic link',
      (folder) => {
        symlinkSync(join(folder, 'hall.ifc'), join(folder, 'link.ifc'));
        return join(folder, 'link.ifc');
      },
    ],
    [
      'a hard link',
      (folder) => {
        linkSync(join(folder, 'hall.ifc'), join(folder, 'hard.ifc'));
        return join(folder, 'hard.ifc');
      },
    ],
    [
      'a link to its folder',
      (folder) => {
        symlinkSync(folder, join(folder, 'here'));
        return join(folder, 'here', 'hall.ifc');
      },
    ],
  ];
  for (const [what, other] of names) {
    test(what, async () => {
      const folder = scratch();
      const input = join(folder, 'hall.ifc');
      writeFileSync(input, 'model');
      const out = other(folder);
      await expect(outputPlace(out, [{ identity: await identity(input) }], false)).rejects.toMatchObject({ exit: 2 });
      await expect(outputPlace(out, [{ identity: await identity(input) }], true)).resolves.toMatchObject({
        mode: expect.any(Number),
      });
    });
  }
});

test('a place that cannot be written is said with the reason', async () => {
  const folder = scratch();
  mkdirSync(join(folder, 'sub'));
  symlinkSync(join(folder, 'nowhere'), join(folder, 'dangling'));
  const cases: readonly [string, string, 2 | 3][] = [
    [join(folder, 'sub'), 'it is a folder', 3],
    [join(folder, 'missing/out.ifc'), 'there is no folder', 3],
    [join(folder, 'dangling'), 'a symbolic link that leads nowhere', 3],
    ['/dev/null', 'a pipe, socket or device', 3],
    ['-', 'a file name is needed', 2],
  ];
  for (const [out, says, exit] of cases) {
    const refused = outputPlace(out, [], false);
    await expect(refused).rejects.toThrow(says);
    await expect(refused).rejects.toMatchObject({ exit });
  }
});

describe('killed at any moment', () => {
  beforeAll(builtProgram, 120_000);
  const dist = resolve(import.meta.dirname, '../../dist/cli');
  // 24 MB in small pieces, so that the kill falls into the writing.
  const script = (out: string): string => `
    const { writeNew } = await import(${JSON.stringify(join(dist, 'write-new.js'))});
    const { outputPlace } = await import(${JSON.stringify(join(dist, 'output-place.js'))});
    const piece = new Uint8Array(1 << 16).fill(78);
    function* pieces() { for (let i = 0; i < 384; i++) yield piece; }
    const place = await outputPlace(${JSON.stringify(out)}, [], false);
    process.send('writing');
    await writeNew(place, pieces(), 'out');
  `;
  const whole = 384 * (1 << 16);

  test('the path holds the old file or the whole new one, 40 times out of 40', { timeout: 120_000 }, async () => {
    const folder = scratch();
    const out = join(folder, 'out.ifc');
    let replaced = 0;
    let interrupted = 0;
    for (let round = 0; round < 40; round++) {
      writeFileSync(out, 'old');
      const child = spawn(process.execPath, ['--input-type=module', '-e', script(out)], {
        stdio: ['ignore', 'ignore', 'ignore', 'ipc'],
      });
      await new Promise((begun) => child.once('message', begun));
      const ended = new Promise((done) => child.once('exit', done));
      setTimeout(() => child.kill('SIGKILL'), round * 3);
      await ended;
      const size = statSync(out).size;
      expect([3, whole]).toContain(size);
      if (size === whole) replaced++;
      else interrupted++;
    }
    // Both must have been seen, or the loop proved nothing.
    expect(interrupted).toBeGreaterThan(0);
    expect(replaced + interrupted).toBe(40);
  });

  test('a polite end takes the temporary file away', { timeout: 30_000 }, async () => {
    const folder = scratch();
    const out = join(folder, 'out.ifc');
    const child = spawn(process.execPath, ['--input-type=module', '-e', script(out)], {
      stdio: ['ignore', 'ignore', 'ignore', 'ipc'],
    });
    await new Promise((begun) => child.once('message', begun));
    const ended = new Promise<NodeJS.Signals | null>((done) => child.once('exit', (_, signal) => done(signal)));
    setTimeout(() => child.kill('SIGTERM'), 8);
    const signal = await ended;
    const left = readdirSync(folder);
    if (signal === 'SIGTERM') expect(left).toEqual([]);
    else expect(left).toEqual(['out.ifc']);
  });
});
