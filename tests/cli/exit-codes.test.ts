import { spawnSync } from 'node:child_process';
import { copyFileSync, existsSync, mkdirSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { gzipSync, zipSync } from 'fflate';
import { beforeAll, describe, expect, test } from 'vitest';
import { builtProgram, drainwright, mainFile, scratch, started } from '../support/program.ts';

// The exit codes are the contract: 0 done; 1 done with error findings (check); 2 wrong usage; 3 a file that cannot be
// used; 70 our own fault. Whatever is handed in, a person gets a sentence and never a stack.
const samples = resolve(import.meta.dirname, '../../sample-models');
const wetVented = join(samples, 'hall-wet-vented.ifc');
const circuitVented = join(samples, 'hall-circuit-vented.ifc');
beforeAll(builtProgram, 120_000);

const noStack = (text: string): void => {
  expect(text).not.toMatch(/\n\s+at .*:\d+|node:internal|TypeError|undefined/);
};

describe('0 and 1: done', () => {
  test('check of a model with undersized pipes ends with 1', () => {
    const { code, stdout, stderr } = drainwright(['check', wetVented]);
    expect({ code, stderr }).toEqual({ code: 1, stderr: '' });
    expect(stdout).toContain('Undersized');
  });
  for (const args of [
    ['size', '-o', 'out.ifc'],
    ['mend'],
    ['mend', '-o', 'mended.ifc'],
    ['view', '-o', 'out.html'],
    ['survey'],
  ]) {
    test(`${args[0]} of the same ends with 0: it has done its work`, () => {
      const cwd = scratch();
      expect(drainwright([args[0] ?? '', wetVented, ...args.slice(1)], { cwd }).code).toBe(0);
      expect(readdirSync(cwd)).toEqual(args.length > 1 ? [args[2]] : []);
    });
  }
  test('explain of one of its pipes ends with 0', () => {
    const result = JSON.parse(drainwright(['check', wetVented, '--json']).stdout);
    const { code, stdout } = drainwright(['explain', wetVented, result.pipes[0].globalId]);
    expect(code).toBe(0);
    expect(stdout).toContain(result.pipes[0].globalId);
  });
  test('codes, --help and --version end with 0', () => {
    for (const args of [
      ['codes'],
      ['codes', 'npc-2020'],
      ['codes', 'npc-2020', 'branch'],
      ['--help'],
      ['check', '--help'],
      ['--version'],
    ])
      expect(drainwright(args), args.join(' ')).toMatchObject({ code: 0, stderr: '' });
  });
  test('standard input and a packed file give the same as the file', () => {
    const bytes = readFileSync(wetVented);
    const whole = JSON.parse(drainwright(['check', wetVented, '--json']).stdout);
    const piped = JSON.parse(drainwright(['check', '-', '--json'], { input: bytes }).stdout);
    const cwd = scratch();
    writeFileSync(join(cwd, 'hall-wet-vented.ifc.gz'), gzipSync(bytes));
    writeFileSync(join(cwd, 'hall.ifczip'), zipSync({ 'hall-wet-vented.ifc': bytes }));
    expect(piped.model.sha256).toBe(whole.model.sha256);
    expect(piped.pipes).toEqual(whole.pipes);
    for (const name of ['hall-wet-vented.ifc.gz', 'hall.ifczip'])
      expect(JSON.parse(drainwright(['check', name, '--json'], { cwd }).stdout)).toEqual(whole);
  });
});

describe('2: wrong usage', () => {
  const cases: readonly [string, readonly string[], string][] = [
    ['no verb', [], 'Usage:'],
    ['an unknown verb', ['paint', wetVented], 'unknown command'],
    ['no model', ['check'], 'missing required argument'],
    ['a model named twice', ['check', wetVented, wetVented], 'named twice'],
    ['an unknown option', ['check', wetVented, '--colour'], 'unknown option'],
    ['an unknown code', ['check', wetVented, '--code', 'moon-2020'], 'npc-2020'],
    ['an unknown edition', ['codes', 'npc-1995'], 'npc-2020'],
    ['an unknown table', ['codes', 'npc-2020', 'moon'], 'branch'],
    ['nothing of that name', ['explain', wetVented, 'no such thing'], 'no pipe or fixture'],
    ['no place for the copy', ['size', wetVented], '-o OUT.ifc'],
    ['no place for the page', ['view', wetVented], '--out'],
    ['standard input in place', ['size', '-', '--in-place'], 'standard input'],
    ['a dash as output', ['size', wetVented, '-o', '-'], 'a file name is needed'],
  ];
  for (const [what, args, says] of cases) {
    test(what, () => {
      const { code, stdout, stderr } = drainwright(args);
      expect({ code, stdout }).toEqual({ code: 2, stdout: '' });
      expect(stderr).toContain(says);
      noStack(stderr);
    });
  }
  test('a name that several things bear: all of them are listed', () => {
    const cwd = scratch();
    const text = readFileSync(wetVented, 'latin1').replace(/(IFCPIPESEGMENT\('[^']{22}',[^,]*,)'[^']*'/g, "$1'Pipe'");
    writeFileSync(join(cwd, 'twins.ifc'), text, 'latin1');
    const { code, stderr } = drainwright(['explain', 'twins.ifc', 'Pipe'], { cwd });
    expect(code).toBe(2);
    expect(stderr).toMatch(/is the name of \d+ things; say which:\n {2}\S{22} /);
  });
  test('the output is the input, by ./ too; nothing is written', () => {
    const cwd = scratch();
    copyFileSync(wetVented, join(cwd, 'hall.ifc'));
    const before = readFileSync(join(cwd, 'hall.ifc'));
    for (const verb of ['size', 'view']) {
      const { code, stderr } = drainwright([verb, 'hall.ifc', '-o', './hall.ifc'], { cwd });
      expect(code).toBe(2);
      expect(stderr).toContain('is the input itself');
    }
    expect(readFileSync(join(cwd, 'hall.ifc')).equals(before)).toBe(true);
    expect(readdirSync(cwd)).toEqual(['hall.ifc']);
  });
});

describe('3: a file that cannot be used', () => {
  const whole = (): Buffer => readFileSync(wetVented);
  const cut = (share: number) => (): Buffer => whole().subarray(0, Math.floor(whole().length * share));
  const files: readonly [string, string, () => string | Buffer, RegExp][] = [
    ['empty', 'empty.ifc', () => '', /empty/],
    ['blanks', 'blanks.ifc', () => ' \n\t\n', /nothing but blanks/],
    ['text', 'notes.txt', () => 'Dear all, the stack is too small.\n', /no IFC file/],
    ['a web page', 'page.ifc', () => '<!doctype html><p>Sign in</p>', /web page/],
    ['cut at 25 %', 'quarter.ifc', cut(0.25), /cut off/],
    ['cut at 50 %', 'half.ifc', cut(0.5), /cut off/],
    ['cut at 99 %', 'most.ifc', cut(0.99), /cut off/],
    [
      'without its last line',
      'unended.ifc',
      () =>
        whole()
          .toString('latin1')
          .replace(/END-ISO-10303-21;\s*$/, ''),
      /cut off/,
    ],
    [
      'another schema',
      'step.ifc',
      () =>
        whole()
          .toString('latin1')
          .replace(/FILE_SCHEMA\(\('[^']*'/, "FILE_SCHEMA(('AP214'"),
      /not IFC/,
    ],
    ['damaged gzip', 'bad.ifc.gz', () => Buffer.from(gzipSync(whole()).subarray(0, 5000)), /damaged/],
    [
      'UTF-16',
      'wide.ifc',
      () => Buffer.from(`\uFEFF${whole().toString('latin1').slice(0, 2000)}`, 'utf16le'),
      /UTF-16/,
    ],
  ];
  // All verbs read by the same door: each is tried with the likeliest of the faults, `check` with every one.
  const likely = new Set(['empty', 'text', 'cut at 50 %']);
  for (const verb of ['check', 'survey', 'size', 'view', 'explain']) {
    const tried = files.filter(([what]) => verb === 'check' || likely.has(what));
    test(`${verb}: ${tried.map(([what]) => what).join(', ')}`, { timeout: 120_000 }, () => {
      expect(tried.length).toBeGreaterThanOrEqual(3);
      const cwd = scratch();
      for (const [what, name, content, says] of tried) {
        writeFileSync(join(cwd, name), content());
        const more =
          verb === 'size' ? ['-o', 'o.ifc'] : verb === 'view' ? ['-o', 'o.html'] : verb === 'explain' ? ['x'] : [];
        const { code, stdout, stderr } = drainwright([verb, name, ...more], { cwd });
        expect({ what, code, stdout }).toEqual({ what, code: 3, stdout: '' });
        expect(stderr, what).toMatch(says);
        expect(stderr, what).toContain(`drainwright: ${name.replace(/\.gz$/, '')}`);
        noStack(stderr);
      }
      expect(readdirSync(cwd).filter((name) => name.startsWith('o.') || name.startsWith('.'))).toEqual([]);
    });
  }

  test('a missing path, a folder, a pipe that nobody writes to, no permission to see it', () => {
    const cwd = scratch();
    mkdirSync(join(cwd, 'folder.ifc'));
    spawnSync('mkfifo', [join(cwd, 'pipe.ifc')]);
    const cases: readonly [string, string][] = [
      ['missing.ifc', 'no such file'],
      ['missing/hall.ifc', 'no such file'],
      ['folder.ifc', 'is a folder'],
      ['pipe.ifc', 'no regular file'],
      ['/dev/null', 'no regular file'],
      [`${'x'.repeat(300)}.ifc`, 'the name is too long'],
    ];
    for (const [path, says] of cases) {
      const { code, stderr } = drainwright(['check', path], { cwd });
      expect({ path, code }).toEqual({ path, code: 3 });
      expect(stderr).toContain(says);
      noStack(stderr);
    }
  });

  test('nothing on standard input', () => {
    expect(drainwright(['check', '-'], { input: '' })).toMatchObject({
      code: 3,
      stderr: expect.stringContaining('is empty'),
    });
  });

  test('a wrong answers file', () => {
    const cwd = scratch();
    const answers = (over: object): string => JSON.stringify({ format: 'drainwright-answers', version: 1, ...over });
    const cases: readonly [string, string][] = [
      ['', 'empty'],
      ['{', 'is not JSON'],
      ['[]', 'expected an object'],
      [answers({ format: 'other' }), 'format'],
      [answers({ fixture: {} }), 'unknown key'],
      [answers({ settings: { colour: 'red' } }), 'colour'],
      [answers({ fixtures: { x: { kind: 'throne' } } }), 'throne'],
    ];
    for (const [text, says] of cases) {
      writeFileSync(join(cwd, 'answers.json'), text);
      const { code, stdout, stderr } = drainwright(['check', wetVented, '--answers', 'answers.json'], { cwd });
      expect({ says, code, stdout }).toEqual({ says, code: 3, stdout: '' });
      expect(stderr).toContain('answers.json');
      expect(stderr).toContain(says);
      noStack(stderr);
    }
    expect(drainwright(['check', wetVented, '--answers', 'gone.json'], { cwd })).toMatchObject({ code: 3 });
  });

  test('a wrong local table, a folder without tables', () => {
    const cwd = scratch();
    mkdirSync(join(cwd, 'tables/npc'), { recursive: true });
    mkdirSync(join(cwd, 'none'));
    writeFileSync(join(cwd, 'tables/npc/branch.json'), '{"rows": []}');
    const wrong = drainwright(['check', wetVented, '--tables', 'tables'], { cwd });
    expect(wrong.code).toBe(3);
    expect(wrong.stderr).toContain('tables/npc/branch.json');
    expect(drainwright(['check', wetVented, '--tables', 'none'], { cwd })).toMatchObject({ code: 3 });
    expect(drainwright(['check', wetVented, '--tables', 'gone'], { cwd })).toMatchObject({ code: 3 });
  });

  test('an output that cannot be written', () => {
    const cwd = scratch();
    mkdirSync(join(cwd, 'there'));
    const cases: readonly [string, string][] = [
      ['there', 'it is a folder'],
      ['gone/out.ifc', 'there is no folder'],
      ['/dev/full', 'a pipe, socket or device'],
    ];
    for (const [out, says] of cases) {
      const { code, stderr } = drainwright(['size', wetVented, '-o', out], { cwd });
      expect({ out, code }).toEqual({ out, code: 3 });
      expect(stderr).toContain(says);
      noStack(stderr);
    }
    expect(readdirSync(cwd)).toEqual(['there']);
  });

  test('a full disk behind standard output', () => {
    const { status, stderr } = spawnSync(
      'sh',
      ['-c', `"$0" "$1" check "$2" --json > /dev/full`, process.execPath, mainFile, wetVented],
      { encoding: 'utf8' },
    );
    expect(status).toBe(3);
    expect(stderr).toContain('the disk is full');
    noStack(stderr);
  });
});

describe('a closed standard output ends quietly with 0', () => {
  for (const args of [
    ['check', wetVented, '--json'],
    ['check', wetVented],
    ['codes', 'npc-2020', 'stack-vent'],
    ['survey', circuitVented],
  ]) {
    test(`${args[0]} ${args[2] ?? ''}`, async () => {
      const child = started(args, scratch());
      child.stdout?.destroy();
      let stderr = '';
      child.stderr?.on('data', (chunk) => {
        stderr += chunk;
      });
      const code = await new Promise((done) => child.once('close', done));
      expect({ code, stderr }).toEqual({ code: 0, stderr: '' });
    });
  }
  test('size writes its copy all the same', async () => {
    const cwd = scratch();
    const child = started(['size', wetVented, '-o', 'out.ifc', '--json'], cwd);
    child.stdout?.destroy();
    expect(await new Promise((done) => child.once('close', done))).toBe(0);
    expect(existsSync(join(cwd, 'out.ifc'))).toBe(true);
  });
});
