import { createHash } from 'node:crypto';
import { mkdirSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { gunzipSync, gzipSync } from 'fflate';
import { beforeAll, describe, expect, test } from 'vitest';
import { readModel } from '../../src/ifc/open.ts';
import type { Model } from '../../src/model/model.ts';
import type { Result } from '../../src/schedule/result.ts';
import { answerOf, differences } from '../support/answer-of.ts';
import { modelOf } from '../support/model-of.ts';
import { builtProgram, drainwright, scratch } from '../support/program.ts';
import { runModel } from '../support/run-sketch.ts';
import { faults } from '../support/schemas.ts';
import { type Sketch, sketch } from '../support/sketch.ts';
import { type IfcOptions, ifcOf } from '../support/write-ifc.ts';

// One building in several files, as it comes from several offices: the same roles, loads, sizes and findings as from one.

const drawnOf = (name: string): Sketch =>
  sketch(readFileSync(resolve(import.meta.dirname, `../../sample-models/${name}.piping`), 'utf8'));
const sha256 = (bytes: Uint8Array): string => createHash('sha256').update(bytes).digest('hex');

type Files = readonly Partial<IfcOptions>[];

const read = (drawn: Sketch, files: Files): Model =>
  readModel(
    files.map((options) => ({
      name: `${options.holds?.join(' and ')}.ifc`,
      bytes: new TextEncoder().encode(ifcOf(drawn, options)),
    })),
    sha256,
  );

/** Errors and warnings by code and elements; joints that geometry infers are no fault. */
const faultsOf = (model: Model): string[] =>
  runModel(model)
    .findings()
    .filter(({ severity }) => severity !== 'note')
    .map(({ code, about }) => `${code} ${[...about].sort().join(' ')}`);

const architecture = { holds: ['architecture'], schema: 'IFC2X3', unit: 'ft' } as const;
const fixtures = { holds: ['fixtures'], schema: 'IFC4', unit: 'mm', shuffle: 4 } as const;
const piping = { holds: ['piping'], schema: 'IFC4X3_ADD2', unit: 'm', shuffle: 9 } as const;

const ways: readonly { readonly title: string; readonly files: Files }[] = [
  {
    title: 'architecture, fixtures and piping, each in its own schema and unit',
    files: [architecture, fixtures, piping],
  },
  { title: 'the same, named in another order', files: [piping, fixtures, architecture] },
  {
    title: 'fixtures in the architecture file alone',
    files: [{ holds: ['architecture', 'fixtures'], schema: 'IFC2X3', unit: 'in' }, piping],
  },
  {
    title: 'piping without ports and without stated sizes',
    files: [architecture, fixtures, { ...piping, ports: false, sizes: false }],
  },
  {
    title: 'sites placed differently, the building at one place',
    files: [
      { ...architecture, site: [250, -40, 12], turn: 30 },
      { ...fixtures, site: [0, 0, 0], turn: 30 },
      { ...piping, site: [-1000, 3, -2], turn: 30 },
    ],
  },
];

describe.each(['hall-wet-vented', 'dwelling'])('%s', (name) => {
  const drawn = drawnOf(name);
  const whole = modelOf(drawn);
  const expected = answerOf(whole);
  test.each(ways)('$title', ({ files }) => {
    expect(expected.size).toBeGreaterThan(40);
    const model = read(drawn, files);
    expect(differences(expected, answerOf(model))).toEqual([]);
    expect(faultsOf(model)).toEqual(faultsOf(whole));
    // Walls, spaces and floors come from the architecture file, whichever place it has.
    expect([model.walls.length, model.spaces.length, model.storeys.length]).toEqual([
      whole.walls.length,
      whole.spaces.length,
      whole.storeys.length,
    ]);
  });

  test('fixtures drawn in two of the files are one fixture each', () => {
    const twice = read(drawn, [{ holds: ['architecture', 'fixtures'], schema: 'IFC4', unit: 'm' }, fixtures, piping]);
    const { result } = runModel(twice);
    expect(result.fixtures).toHaveLength(runModel(whole).result.fixtures.length);
    expect(result.counts.leftOut).toEqual({ double: result.fixtures.length });
    // Both carry one GlobalId: the result tells them apart by file and STEP id.
    for (const { globalId } of result.fixtures) expect(globalId).toMatch(/^[0-9A-Za-z_$]{22}#[012]\.\d+$/);
    expect(new Set(result.fixtures.map(({ globalId }) => globalId)).size).toBe(result.fixtures.length);
    const loads = ({ pipes }: Result): string[] => pipes.map((pipe) => `${pipe.globalId} ${pipe.load.most}`).sort();
    expect(loads(result)).toEqual(loads(runModel(whole).result));
  });
});

describe('files that do not lie at one place are not joined', () => {
  const drawn = drawnOf('hall-wet-vented');
  // A survey grid: 540 km east, 4 820 km north, 212 m up. sqrt(540² + 4820²) = 4850.2 km from the local origin.
  const survey = { ...architecture, shift: [540_000, 4_820_000, 212] } as const;
  const model = read(drawn, [survey, fixtures, piping]);

  test('the finding names both files and the distance', () => {
    const found = runModel(model).findings('files-apart');
    expect(found.map(({ sentence }) => sentence)).toEqual([
      'architecture.ifc lies 4850.1 km from piping.ifc: the two count from different origins, so nothing of architecture.ifc is joined. Export both with the same origin.',
    ]);
    expect(found[0]?.severity).toBe('error');
  });
  test('its walls, floors and roof judge nothing; fixtures and piping are still one network', () => {
    expect([model.walls.length, model.slabs.length, model.roofs.length]).toEqual([0, 0, 0]);
    expect(model.storeys.map(({ elevation }) => elevation)).toEqual([0]);
    const { result } = runModel(model);
    expect(result.fixtures).toHaveLength(10);
    expect(result.systems).toHaveLength(1);
  });
  test('elements of a file that lies apart are counted as left out', () => {
    const far = read(drawn, [{ ...fixtures, shift: [0, 0, 950] }, architecture, piping]);
    const { counts, fixtures: joined } = runModel(far).result;
    expect(counts.leftOut).toEqual({ 'file apart': 10 });
    expect(joined).toHaveLength(0);
  });
});

describe('the commands', () => {
  beforeAll(builtProgram, 120_000);
  const drawn = drawnOf('hall-wet-vented');
  const names = { 'arch.ifc': architecture, 'sub/fixtures.ifc': fixtures, 'piping.ifc.gz': piping } as const;
  const paths = Object.keys(names);

  function laidOut(): string {
    const cwd = scratch();
    mkdirSync(join(cwd, 'sub'));
    for (const [path, options] of Object.entries(names)) {
      const bytes = new TextEncoder().encode(ifcOf(drawn, options));
      writeFileSync(join(cwd, path), path.endsWith('.gz') ? gzipSync(bytes, { mtime: 0 }) : bytes);
    }
    return cwd;
  }
  const plain = (cwd: string, path: string): Buffer => {
    const bytes = readFileSync(join(cwd, path));
    return path.endsWith('.gz') ? Buffer.from(gunzipSync(bytes)) : bytes;
  };

  test('check names every file with its digest; the result agrees with the single file', () => {
    const cwd = laidOut();
    const text = drainwright(['check', ...paths], { cwd });
    expect(text.code).toBe(1);
    expect(text.stdout).toContain('3 files as one building');
    for (const path of paths) expect(text.stdout.replace(/\s+/g, ' ')).toContain(sha256(plain(cwd, path)));
    const result: Result = JSON.parse(drainwright(['check', ...paths, '--json'], { cwd }).stdout);
    expect(faults('result', result)).toEqual([]);
    expect(result.models?.map(({ file, schema }) => `${file} ${schema}`)).toEqual([
      'arch.ifc IFC2X3',
      'fixtures.ifc IFC4',
      'piping.ifc IFC4X3_ADD2',
    ]);
    expect(result.pipes.filter(({ verdict }) => verdict === 'undersized')).toHaveLength(9);
  });

  test('explain, survey and view take them; explain the last word as what is asked', () => {
    const cwd = laidOut();
    const explained = JSON.parse(drainwright(['explain', ...paths, 'LJ-CO1', '--json'], { cwd }).stdout);
    expect(faults('explain', explained)).toEqual([]);
    expect(explained.pipe.role).toBe('wet-vent');
    expect(explained.models).toHaveLength(3);
    const survey = JSON.parse(drainwright(['survey', ...paths, '--json'], { cwd }).stdout);
    expect(faults('survey', survey)).toEqual([]);
    expect(survey.models).toHaveLength(3);
    expect(drainwright(['view', ...paths, '-o', 'page.html'], { cwd }).code).toBe(0);
    const page = readFileSync(join(cwd, 'page.html'), 'latin1');
    expect(page.length).toBeGreaterThan(100_000);
  });

  test('size -o FOLDER writes each file that owns an element, under its own name; twice is once', () => {
    const cwd = laidOut();
    const { code, stdout } = drainwright(['size', ...paths, '-o', 'sized'], { cwd });
    expect(code).toBe(0);
    // The architecture owns no pipe and no fixture.
    expect(readdirSync(join(cwd, 'sized')).sort()).toEqual(['fixtures.ifc', 'piping.ifc.gz']);
    expect(stdout).toContain('sized/fixtures.ifc');
    for (const [original, copy, set, count] of [
      ['sub/fixtures.ifc', 'sized/fixtures.ifc', 'Drainwright_Fixture', 10],
      ['piping.ifc.gz', 'sized/piping.ifc.gz', 'Drainwright_Pipe', drawn.pipes.length],
    ] as const) {
      const text = plain(cwd, copy).toString('latin1');
      const block = /\/\* Drainwright 1 begin \*\/[\s\S]*\/\* Drainwright 1 end \*\/\r?\n/.exec(text)?.[0] ?? '';
      expect(text.replace(block, '')).toBe(plain(cwd, original).toString('latin1'));
      expect(block.split(`'${set}'`)).toHaveLength(count + 1);
      expect(block).not.toContain(set === 'Drainwright_Pipe' ? "'Drainwright_Fixture'" : "'Drainwright_Pipe'");
      // The set of the building names every file with its digest, and its own apart.
      expect(block).toContain(`IFCLABEL('${sha256(plain(cwd, original))}')`);
      for (const path of paths) expect(block).toContain(sha256(plain(cwd, path)));
    }
    expect(
      drainwright(['size', 'arch.ifc', 'sized/fixtures.ifc', 'sized/piping.ifc.gz', '-o', 'again'], { cwd }).code,
    ).toBe(0);
    for (const name of ['fixtures.ifc', 'piping.ifc.gz'])
      expect(readFileSync(join(cwd, 'again', name)).equals(readFileSync(join(cwd, 'sized', name)))).toBe(true);
  });

  test('two files of one name are told apart, in the result and in the folder', () => {
    const cwd = laidOut();
    writeFileSync(join(cwd, 'fixtures.ifc'), ifcOf(drawn, piping));
    const files = ['sub/fixtures.ifc', 'fixtures.ifc'];
    const { models } = JSON.parse(drainwright(['check', ...files, '--json'], { cwd }).stdout) as Result;
    expect(models?.map(({ file }) => file)).toEqual(['fixtures.ifc', 'fixtures (2).ifc']);
    drainwright(['size', ...files, '-o', 'sized'], { cwd });
    expect(readdirSync(join(cwd, 'sized')).sort()).toEqual(['fixtures (2).ifc', 'fixtures.ifc']);
  });

  test.each([
    { title: 'a file named twice', args: ['check', 'arch.ifc', 'sub/../arch.ifc'], code: 2, says: 'named twice' },
    { title: 'a copy of a file', args: ['check', 'arch.ifc', 'copy.ifc'], code: 2, says: 'the same model as arch.ifc' },
    { title: 'standard input twice', args: ['check', '-', '-'], code: 2, says: 'not several' },
    { title: 'one file for several', args: ['size', ...paths, '-o', 'arch.ifc'], code: 2, says: 'is no folder' },
    { title: 'a folder in no folder', args: ['size', ...paths, '-o', 'no/sized'], code: 3, says: 'no folder no' },
    { title: 'the folder of the inputs', args: ['size', ...paths, '-o', '.'], code: 2, says: 'is the input itself' },
    { title: 'one of them missing', args: ['check', 'arch.ifc', 'other.ifc'], code: 3, says: 'no such file' },
  ])('$title is refused', ({ args, code, says }) => {
    const cwd = laidOut();
    writeFileSync(join(cwd, 'copy.ifc'), readFileSync(join(cwd, 'arch.ifc')));
    const before = readdirSync(cwd, { recursive: true, encoding: 'utf8' }).sort();
    const ran = drainwright(args, { cwd });
    expect([ran.code, ran.stdout]).toEqual([code, '']);
    expect(ran.stderr).toContain(says);
    expect(readdirSync(cwd, { recursive: true, encoding: 'utf8' }).sort()).toEqual(before);
  });
});
