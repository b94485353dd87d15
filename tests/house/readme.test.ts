import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { drainwright } from '../support/program.ts';

const root = join(import.meta.dirname, '../..');
const readme = readFileSync(join(root, 'README.md'), 'utf8');

test('README shows what the program prints', () => {
  const shown = [...readme.matchAll(/```text\n\$ drainwright (.+)\n([\s\S]*?)\n```/g)];
  expect(shown.length).toBeGreaterThan(0);
  for (const [, command, text] of shown) {
    expect(drainwright(command!.split(' ')).stdout.trim()).toBe(text!.trim());
  }
});

test('README names every command, and no other', () => {
  const help = drainwright(['--help']).stdout;
  const commands = [...help.matchAll(/^ {2}([a-z]+) (?:\[options\]|<|\[)/gm)].map(([, name]) => name);
  const named = [...readme.matchAll(/^\| `drainwright ([a-z]+)/gm)].map(([, name]) => name);
  expect(commands.length).toBeGreaterThan(5);
  expect(named.toSorted()).toEqual(commands.toSorted());
});

test('the two commands of README are those of package.json and of CI', () => {
  const scripts = (JSON.parse(readFileSync(join(root, 'package.json'), 'utf8')) as { scripts: Record<string, string> })
    .scripts;
  expect(readme).toContain('npm ci && npm run demo');
  expect(readme).toContain('npm ci && npm test');
  expect(Object.keys(scripts)).toEqual(expect.arrayContaining(['demo', 'test']));
  expect(readFileSync(join(root, '.ci/run'), 'utf8')).toContain('npm ci && npm test');
});
