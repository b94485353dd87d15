import { mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { beforeAll, expect, test } from 'vitest';
import { stepString } from '../../src/ifc/write/step-text.ts';
import { builtProgram, drainwright, scratch } from '../support/program.ts';

// One model in which every name, tag, type, storey and system is an attack on a terminal, run through every verb that
// prints. What may reach the terminal is text: no control character but the line feed, no direction mark.
const attack =
  '\u001B[2J\u001B]0;gone\u0007\u009B31m\u202Egnp\b\b\r\nUndersized: 0 of 0 pipes, by cause __proto__ <script>';
const sample = resolve(import.meta.dirname, '../../sample-models/hall-wet-vented.ifc');
// biome-ignore lint/suspicious/noControlCharactersInRegex: the test looks for control characters
const steering = /[\u0000-\u0009\u000B-\u001F\u007F-\u009F\u200B-\u200F\u202A-\u202E\u2066-\u2069]/;

let folder = '';
let pipe = '';
beforeAll(() => {
  builtProgram();
  folder = scratch();
  let count = 0;
  // The third attribute of a rooted record is its name; those of property names and units stay, to be understood.
  const text = readFileSync(sample, 'latin1').replace(
    /^(#\d+=IFC(?:PIPE|SANITARY|WASTE|STACK|BUILDING|DISTRIBUTIONSYSTEM|SPACE|WALL|SLAB|PROJECT)\w*\('[^']{22}',[^,]*,)'[^']*'/gm,
    (_, start: string) => `${start}${stepString(`${attack} ${count++}`)}`,
  );
  expect(count).toBeGreaterThan(60);
  writeFileSync(join(folder, 'hostile.ifc'), text, 'latin1');
  // The first pipe of the file, whatever its number.
  pipe = /^#\d+(?==IFCPIPESEGMENT\()/m.exec(text)?.[0] ?? '';
  expect(pipe).not.toBe('');
}, 120_000);

const calls: readonly { readonly args: readonly string[]; readonly ends: number }[] = [
  { args: ['check', 'hostile.ifc'], ends: 1 },
  { args: ['check', 'hostile.ifc', '--json'], ends: 1 },
  { args: ['survey', 'hostile.ifc'], ends: 0 },
  { args: ['survey', 'hostile.ifc', '--json'], ends: 0 },
  { args: ['size', 'hostile.ifc', '-o', 'out.ifc'], ends: 0 },
  { args: ['view', 'hostile.ifc', '-o', 'out.html'], ends: 0 },
  { args: ['explain', 'hostile.ifc', 'PIPE'], ends: 0 },
  { args: ['explain', 'hostile.ifc', 'PIPE', '--json'], ends: 0 },
  { args: ['explain', 'hostile.ifc', attack], ends: 2 },
];
for (const { args, ends } of calls) {
  test(`${args[0]} ${args.slice(2).join(' ').slice(0, 12)} ends with ${ends}`, () => {
    const { code, stdout, stderr } = drainwright(
      args.map((arg) => (arg === 'PIPE' ? pipe : arg)),
      { cwd: folder },
    );
    expect(code).toBe(ends);
    if (args[0] !== 'view') expect(stdout + stderr).toContain('gone');
    expect(stdout).not.toMatch(steering);
    expect(stderr).not.toMatch(steering);
    expect(stdout.match(/^Undersized: 0/m)).toBeNull();
  });
}

test('the names come through unharmed in the data', () => {
  const { pipes } = JSON.parse(drainwright(['check', 'hostile.ifc', '--json'], { cwd: folder }).stdout);
  expect(pipes[0].name).toContain(attack);
});

test('a hostile path is shown, not obeyed', () => {
  const name = 'a\u001B[31mb\u202E.ifc';
  mkdirSync(join(folder, 'sub'));
  for (const path of [name, `sub/${name}`]) {
    const { code, stderr } = drainwright(['check', path], { cwd: folder });
    expect(code).toBe(3);
    expect(stderr).toContain('a\\u{1B}[31mb\\u{202E}.ifc');
    expect(stderr).not.toMatch(steering);
  }
});
