import { spawnSync } from 'node:child_process';
import { accessSync, constants, existsSync, mkdtempSync, readdirSync, readFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import { beforeAll, expect, test } from 'vitest';
import { builtProgram, mainFile } from '../support/program.ts';

// What npm would publish, and what the built program loads.
const root = resolve(import.meta.dirname, '../..');
const {
  exports: exported,
  bin,
  files,
  license,
  dependencies,
} = JSON.parse(readFileSync(join(root, 'package.json'), 'utf8'));
beforeAll(builtProgram, 120_000);

test('everything that package.json points at is there, the program can be run', () => {
  const targets = Object.values<string | Record<string, string>>(exported).flatMap((target) =>
    typeof target === 'string' ? [target] : Object.values(target),
  );
  expect(targets.length).toBeGreaterThanOrEqual(8);
  for (const target of [...targets, ...Object.values<string>(bin)])
    expect(existsSync(join(root, target)), target).toBe(true);
  accessSync(join(root, bin.drainwright), constants.X_OK);
  expect(readFileSync(mainFile, 'utf8').startsWith('#!/usr/bin/env node\n')).toBe(true);
  expect(license).toBe('MIT');
});

test('the package holds the program, the tables and their papers, no tests and no samples', () => {
  const { stdout, status } = spawnSync('npm', ['pack', '--dry-run', '--json', '--ignore-scripts'], {
    cwd: root,
    encoding: 'utf8',
  });
  expect(status).toBe(0);
  const packed: string[] = JSON.parse(stdout)[0].files.map(({ path }: { path: string }) => path);
  for (const path of [
    'dist/cli/main.js',
    'dist/index.d.ts',
    'dist/page/bundle.js',
    'tables/npc/branch.json',
    'LICENSE',
  ])
    expect(packed).toContain(path);
  const strangers = packed.filter(
    (path) => !/^(?:dist\/|tables\/|package\.json|LICENSE|README\.md|CHANGELOG\.md)/.test(path),
  );
  expect(strangers).toEqual([]);
  expect(files).toEqual(['dist', 'tables', 'CHANGELOG.md']);
});

test('the library does the main job from the bytes alone', async () => {
  const library = await import(join(root, 'dist/index.js'));
  const tables = join(root, 'tables');
  const source = {
    list: () => readdirSync(tables, { recursive: true, encoding: 'utf8' }).filter((name) => name.endsWith('.json')),
    read: (path: string) => JSON.parse(readFileSync(join(tables, path), 'utf8')),
  };
  const code = library.plumbingCode(
    'npc-2020',
    { tables: source, dimensions: library.readPipeDimensions(source) },
    {},
    'settings',
  );
  const bytes = new Uint8Array(readFileSync(join(root, 'sample-models/hall-wet-vented.ifc')));
  const model = library.readModel([{ name: 'hall.ifc', bytes }], () => 'ab'.repeat(32));
  const outcome = library.run(model, code, library.noAnswers, library.readNamesTable(source));
  const result = library.resultOf(outcome, '0.0.0');
  expect(result.pipes.length).toBeGreaterThan(30);
  expect(library.plainText(library.checkText(result))).toContain('Undersized');
});

/** Names of the packages that a run of the program loads, by the coverage that the runtime writes of every script. */
function loadedBy(args: readonly string[]): string[] {
  const folder = mkdtempSync(join(tmpdir(), 'drainwright-loaded-'));
  const env = { PATH: process.env.PATH ?? '', NODE_V8_COVERAGE: folder };
  spawnSync(process.execPath, [mainFile, ...args], { cwd: root, env, encoding: 'utf8' });
  const urls = readdirSync(folder).flatMap((name): string[] =>
    JSON.parse(readFileSync(join(folder, name), 'utf8')).result.map(({ url }: { url: string }) => url),
  );
  expect(urls.some((url) => url.endsWith('/dist/cli/main.js'))).toBe(true);
  return [...new Set(urls.flatMap((url) => /node_modules\/((?:@[^/]+\/)?[^/]+)/.exec(url)?.[1] ?? []))].sort();
}

test('--help loads the command line and nothing else; check and size load neither web-ifc nor three', () => {
  expect(Object.keys(dependencies).sort()).toEqual(['commander', 'fflate', 'three', 'web-ifc']);
  expect(loadedBy(['--help'])).toEqual(['commander']);
  expect(loadedBy(['check', 'sample-models/hall-wet-vented.ifc'])).toEqual(['commander', 'fflate']);
  expect(
    loadedBy(['view', 'sample-models/hall-wet-vented.ifc', '-o', join(tmpdir(), `drainwright-${process.pid}.html`)]),
  ).toEqual(['commander', 'fflate']);
});
