import { copyFileSync, existsSync, readdirSync, readFileSync, statSync, writeFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { gunzipSync, unzipSync } from 'fflate';
import { beforeAll, describe, expect, test } from 'vitest';
import { wantsColour } from '../../src/cli/terminal.ts';
import { builtProgram, drainwright, scratch } from '../support/program.ts';
import { faults } from '../support/schemas.ts';

// The verbs on a sample whose answer is worked by hand from the tables: seven stall urinals (2 fixture units each) and
// two lavatories (1 each) on one wet vent. The most downstream urinal is left out, 14 remain; 3 in holds 12, 4 in 36.
// Source: NPC 2020, Table 2.4.9.3., Sentences 2.5.8.1.(1) and (2), Table 2.5.8.1.
const samples = resolve(import.meta.dirname, '../../sample-models');
const wetVented = join(samples, 'hall-wet-vented.ifc');
const circuitVented = join(samples, 'hall-circuit-vented.ifc');
beforeAll(builtProgram, 120_000);

const json = (...args: readonly string[]) => JSON.parse(drainwright([...args, '--json']).stdout);

describe('check', () => {
  test('leads with what was understood, then the undersized wet vent with load, sizes and clause', () => {
    const text = drainwright(['check', wetVented]).stdout.replace(/\s+/g, ' ');
    const order = [
      '7 urinals, 2 lavatories, 1 water closet',
      'battery-1: 7 urinals, 2 lavatories; wet vent',
      'Drawn 3 in, needs 4 in',
      '14 fixture units; 3 in holds 12, 4 in 36; 2.5.8.1.',
    ].map((words) => text.indexOf(words));
    expect(order).not.toContain(-1);
    expect(order).toEqual(order.toSorted((a, b) => a - b));
  });
  test('--json is the result by its schema; --lean leaves out the lists of ids', () => {
    const whole = json('check', wetVented);
    const lean = json('check', wetVented, '--lean');
    expect([faults('result', whole), faults('result', lean)]).toEqual([[], []]);
    expect(whole.pipes[0]).toHaveProperty('servesWater');
    expect(JSON.stringify(lean)).not.toMatch(/"(?:waterPath|airPath|servesWater|servesAir)"/);
  });
  test('the same input gives the same bytes, in any locale, zone and place', () => {
    const first = drainwright(['check', wetVented, '--json']).stdout;
    const cwd = scratch();
    copyFileSync(wetVented, join(cwd, 'hall-wet-vented.ifc'));
    const env = { LANG: 'tr_TR.UTF-8', LC_ALL: 'tr_TR.UTF-8', TZ: 'Pacific/Kiritimati' };
    expect(drainwright(['check', 'hall-wet-vented.ifc', '--json'], { cwd, env }).stdout).toBe(first);
  });
  test('another edition says so, everywhere', () => {
    expect(json('check', wetVented, '--code', 'npc-2015').code).toMatchObject({ id: 'npc-2015', edition: '2015' });
    expect(drainwright(['check', wetVented, '--code', 'npc-2015']).stdout).toContain('(npc-2015)');
  });
});

describe('size', () => {
  test('the copy holds the original and the sets; the original is not touched', () => {
    const cwd = scratch();
    copyFileSync(wetVented, join(cwd, 'hall.ifc'));
    const before = statSync(join(cwd, 'hall.ifc'), { bigint: true });
    const original = readFileSync(wetVented, 'latin1');
    const { code, stdout } = drainwright(['size', 'hall.ifc', '-o', 'sized.ifc'], { cwd });
    expect(code).toBe(0);
    expect(stdout).toContain('Written: sized.ifc');
    const sized = readFileSync(join(cwd, 'sized.ifc'), 'latin1');
    const block = /\/\* Drainwright 1 begin \*\/[\s\S]*\/\* Drainwright 1 end \*\/\r?\n/.exec(sized)?.[0] ?? '';
    expect(sized.replace(block, '')).toBe(original);
    expect(block).toContain("IFCLABEL('4 in')");
    const after = statSync(join(cwd, 'hall.ifc'), { bigint: true });
    expect([after.mtimeNs, after.ino, after.size]).toEqual([before.mtimeNs, before.ino, before.size]);
  });
  test('--in-place twice gives what once gives, and a copy gives the same', () => {
    const cwd = scratch();
    copyFileSync(wetVented, join(cwd, 'hall.ifc'));
    const size = (...args: readonly string[]): void => expect(drainwright(['size', ...args], { cwd }).code).toBe(0);
    size('hall.ifc', '-o', 'copy.ifc');
    size('hall.ifc', '--in-place');
    const once = readFileSync(join(cwd, 'hall.ifc'));
    size('hall.ifc', '-o', 'hall.ifc', '--in-place');
    expect(readFileSync(join(cwd, 'hall.ifc')).equals(once)).toBe(true);
    expect(readFileSync(join(cwd, 'copy.ifc')).equals(once)).toBe(true);
    expect(readdirSync(cwd).sort()).toEqual(['copy.ifc', 'hall.ifc']);
  });
  test('.ifc.gz and .ifczip are packed, and hold the same bytes; zones do not matter', () => {
    const cwd = scratch();
    for (const out of ['plain.ifc', 'packed.ifc.gz', 'packed.ifczip'])
      drainwright(['size', wetVented, '-o', out], { cwd });
    const away = scratch();
    drainwright(['size', wetVented, '-o', 'packed.ifczip'], { cwd: away, env: { TZ: 'Pacific/Kiritimati' } });
    const plain = readFileSync(join(cwd, 'plain.ifc'));
    expect(Buffer.from(gunzipSync(readFileSync(join(cwd, 'packed.ifc.gz')))).equals(plain)).toBe(true);
    const zip = unzipSync(readFileSync(join(cwd, 'packed.ifczip')));
    expect(Object.keys(zip)).toEqual(['packed.ifc']);
    expect(Buffer.from(zip['packed.ifc'] ?? []).equals(plain)).toBe(true);
    expect(readFileSync(join(away, 'packed.ifczip')).equals(readFileSync(join(cwd, 'packed.ifczip')))).toBe(true);
  });
});

describe('survey', () => {
  test('asks what can change a size; the answers, filled in, change it', () => {
    const cwd = scratch();
    const { stdout } = drainwright(['survey', circuitVented, '--questions', 'questions.json', '--json'], { cwd });
    const survey = JSON.parse(stdout);
    expect(faults('survey', survey)).toEqual([]);
    expect(survey.questions[0].choices.toSorted()).toEqual(['circuit-vent', 'wet-vent']);
    const form = JSON.parse(readFileSync(join(cwd, 'questions.json'), 'utf8'));
    expect(faults('answers', form)).toEqual([]);

    const unanswered = JSON.parse(
      drainwright(['check', circuitVented, '--answers', 'questions.json', '--json'], { cwd }).stdout,
    );
    expect(unanswered.batteries[0].reading).toBe('circuit-vent');
    const [key = ''] = Object.keys(form.batteries);
    form.batteries[key].reading = 'wet-vent';
    writeFileSync(join(cwd, 'answers.json'), JSON.stringify(form));
    const answered = JSON.parse(
      drainwright(['check', circuitVented, '--answers', 'answers.json', '--json'], { cwd }).stdout,
    );
    expect(answered.batteries[0].reading).toBe('wet-vent');
    // As a wet vent the same line carries 14 and needs 4 in; drawn 3 in for the circuit vent.
    const wet = answered.pipes.filter(({ role }: { role: string }) => role === 'wet-vent');
    expect(wet.length).toBeGreaterThan(5);
    expect(new Set(wet.map(({ required }: { required: { most: { label: string } } }) => required.most.label))).toEqual(
      new Set(['4 in']),
    );
  });
});

describe('explain', () => {
  test('tells whose water, whose air, each demand and which governs, and why not one size smaller', () => {
    const { pipes } = json('check', wetVented);
    const wet = pipes.find(({ role, name }: { role: string; name: string }) => role === 'wet-vent' && name === 'J4-J5');
    const { stdout, code } = drainwright(['explain', wetVented, `#${wet.stepId}`]);
    expect(code).toBe(0);
    const story = stdout.replace(/\s+/g, ' ');
    for (const words of [
      'is a wet vent',
      'Water: 4 urinals, 2 lavatories',
      'Air: for 3 urinals',
      'This governs.',
      'Why not 3 in? 3 in holds 12.',
      'undersized',
    ])
      expect(story).toContain(words);
    for (const what of [wet.globalId, `#${wet.stepId}`, 'J4-J5', 'j4-j5']) {
      const explanation = json('explain', wetVented, what);
      expect(faults('explain', explanation)).toEqual([]);
      expect(explanation.pipe.globalId).toBe(wet.globalId);
      expect(explanation.nextSmaller.size.label).toBe('3 in');
    }
  });
});

describe('codes', () => {
  test('lists, one code and one table are valid by their schema; every cell has a source', () => {
    for (const args of [
      [],
      ['npc-2020'],
      ['npc-2020', 'wet-vent'],
      ['npc-2015', '2.4.10.6.-B'],
      ['--verify'],
      ['npc-2020', '--verify'],
    ])
      expect(faults('codes', json('codes', ...args)), args.join(' ')).toEqual([]);
    const { table } = json('codes', 'npc-2020', 'wet-vent');
    const cells = table.rows.flatMap(({ cells: row }: { cells: object }) => Object.values(row));
    expect(cells.length).toBeGreaterThan(10);
    for (const { source } of cells) expect(source).toContain('2.5.8.1.');
  });
});

describe('view', () => {
  test('one file, whole, that fetches nothing', () => {
    const cwd = scratch();
    expect(drainwright(['view', wetVented, '-o', 'page.html'], { cwd }).code).toBe(0);
    const page = readFileSync(join(cwd, 'page.html'), 'utf8');
    expect(page.startsWith('<!doctype html>')).toBe(true);
    expect(page.trimEnd().endsWith('</html>')).toBe(true);
    expect(page).toContain("default-src 'none'");
    expect(page).not.toMatch(/<(?:script|img|iframe)[^>]*\ssrc=|<link[^>]*href=/);
    expect(existsSync(join(cwd, 'page.html'))).toBe(true);
  });
});

describe('colour', () => {
  test('none reaches a file or a pipe', () => expect(drainwright(['check', wetVented]).stdout).not.toContain('\u001B'));
  // https://no-color.org, and the terminal database's name of one that knows no escapes.
  const cases = [
    { isTTY: true, env: {}, colour: true },
    { isTTY: false, env: {}, colour: false },
    { isTTY: true, env: { NO_COLOR: '1' }, colour: false },
    { isTTY: true, env: { NO_COLOR: '' }, colour: true },
    { isTTY: true, env: { TERM: 'dumb' }, colour: false },
  ];
  for (const { isTTY, env, colour } of cases) {
    test(`${isTTY ? 'terminal' : 'pipe'}, ${JSON.stringify(env)}: ${colour ? 'coloured' : 'plain'}`, () =>
      expect(wantsColour({ isTTY }, env)).toBe(colour));
  }
});
