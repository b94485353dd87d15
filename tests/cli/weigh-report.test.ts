import { existsSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { beforeAll, describe, expect, test } from 'vitest';
import { builtProgram, drainwright, scratch } from '../support/program.ts';
import { faults } from '../support/schemas.ts';

const samples = resolve(import.meta.dirname, '../../sample-models');
const hall = join(samples, 'hall-wet-vented.ifc');
beforeAll(builtProgram, 120_000);

describe('weigh', () => {
  test('side by side, and 0: it has done its work whatever the findings', () => {
    const { code, stdout, stderr } = drainwright(['weigh', hall]);
    expect({ code, stderr }).toEqual({ code: 0, stderr: '' });
    expect(stdout).toMatch(/wet vented \*\s+circuit vented\s+individually vented/);
    expect(stdout).toContain('=> The wall governs: wet vented asks for studs of 38 × 140 (4 in)');
  });

  test('as JSON by its schema; from standard input the same batteries', () => {
    const { stdout } = drainwright(['weigh', hall, '--json']);
    const result = JSON.parse(stdout);
    expect(faults('weigh', result)).toEqual([]);
    expect(result).toMatchObject({ format: 'drainwright-weigh', version: 1, model: { file: 'hall-wet-vented.ifc' } });
    const piped = JSON.parse(drainwright(['weigh', '-', '--json'], { input: readFileSync(hall) }).stdout);
    expect(piped.batteries).toEqual(result.batteries);
  });

  test('one battery by its id, its number, or one of its fixtures', () => {
    const dwelling = join(samples, 'dwelling.ifc');
    for (const what of ['battery-2', '2', 'L2']) {
      const { batteries } = JSON.parse(drainwright(['weigh', dwelling, '--json', '--battery', what]).stdout);
      expect(
        batteries.map(({ id }: { id: string }) => id),
        what,
      ).toEqual(['battery-2']);
    }
    const { code, stdout, stderr } = drainwright(['weigh', dwelling, '--battery', 'battery-7']);
    expect({ code, stdout }).toEqual({ code: 2, stdout: '' });
    expect(stderr).toContain('battery-1, battery-2');
  });

  test('prices from a file; a bad one is 3 and says where', () => {
    const cwd = scratch();
    const prices = { format: 'drainwright-prices', version: 1, currency: 'EUR', pipes: { '4 in': 30, '3 in': 20 } };
    writeFileSync(join(cwd, 'prices.json'), JSON.stringify(prices));
    expect(drainwright(['weigh', hall, '--prices', 'prices.json'], { cwd }).stdout).toMatch(/cost\s+[\d.]+ EUR/);
    writeFileSync(join(cwd, 'bad.json'), JSON.stringify({ ...prices, pipes: { '4 in': 'much' } }));
    const { code, stderr } = drainwright(['weigh', hall, '--prices', 'bad.json'], { cwd });
    expect(code).toBe(3);
    expect(stderr).toContain('bad.json: pipes.4 in');
    expect(drainwright(['weigh', hall, '--prices', 'none.json'], { cwd }).code).toBe(3);
  });

  test('the cut through the wall as SVG, whole or not at all', () => {
    const cwd = scratch();
    expect(drainwright(['weigh', hall, '--picture', 'wall.svg'], { cwd }).code).toBe(0);
    expect(readFileSync(join(cwd, 'wall.svg'), 'utf8')).toMatch(/^<svg [\s\S]*<\/svg>\n$/);
    expect(readdirSync(cwd)).toEqual(['wall.svg']);
    expect(drainwright(['weigh', hall, '--picture', 'none/wall.svg'], { cwd }).code).toBe(3);
    expect(drainwright(['weigh', hall, '--battery', 'no', '--picture', 'other.svg'], { cwd }).code).toBe(2);
    expect(existsSync(join(cwd, 'other.svg'))).toBe(false);
  });

  test('every sample model, valid by the schema', () => {
    const names = readdirSync(samples).filter((name) => name.endsWith('.ifc'));
    expect(names.length).toBeGreaterThanOrEqual(7);
    for (const name of names)
      expect(faults('weigh', JSON.parse(drainwright(['weigh', join(samples, name), '--json']).stdout)), name).toEqual(
        [],
      );
  });
});

describe('report', () => {
  test('.csv is the take-off, .json the result', () => {
    const cwd = scratch();
    expect(drainwright(['report', hall, '-o', 'take-off.csv'], { cwd })).toMatchObject({ code: 0, stderr: '' });
    const csv = readFileSync(join(cwd, 'take-off.csv'), 'utf8');
    expect(csv.startsWith('\uFEFFitem,what,size required,')).toBe(true);
    expect(csv).toContain('\r\npipe,wet vent,4 in,3 in,Ground floor,PVC-DWV,9,');
    expect(drainwright(['report', hall, '-o', 'RESULT.JSON'], { cwd }).code).toBe(0);
    const result = JSON.parse(readFileSync(join(cwd, 'RESULT.JSON'), 'utf8'));
    expect(result).toEqual(JSON.parse(drainwright(['check', hall, '--json']).stdout));
  });

  test.each([
    ['an ending nobody writes', 'out.docx', 2, '.csv'],
    ['no ending', 'out', 2, 'has no ending'],
    ['a folder that is not there', 'none/out.csv', 3, 'there is no folder'],
    ['a dash', '-', 2, '.csv'],
  ])('%s', (_, out, exit, says) => {
    const cwd = scratch();
    const { code, stderr } = drainwright(['report', hall, '-o', out], { cwd });
    expect(code).toBe(exit);
    expect(stderr).toContain(says);
    expect(readdirSync(cwd)).toEqual([]);
  });

  test('the input itself is refused', () => {
    const cwd = scratch();
    writeFileSync(join(cwd, 'model.csv'), readFileSync(hall));
    expect(drainwright(['report', 'model.csv', '-o', 'model.csv'], { cwd }).code).toBe(2);
  });
});
