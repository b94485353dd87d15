import { writeFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { beforeAll, describe, expect, test } from 'vitest';
import { builtProgram, drainwright, scratch } from '../support/program.ts';
import { faults } from '../support/schemas.ts';

const bathroom = resolve(import.meta.dirname, '../../sample-models/bathroom-group.ifc');
beforeAll(builtProgram, 120_000);

const answers = (settings: object, more: object = {}): string => {
  const file = join(scratch(), 'answers.json');
  writeFileSync(file, JSON.stringify({ format: 'drainwright-answers', version: 1, settings, ...more }));
  return file;
};

describe('check --versus', () => {
  test('JSON by its schema, text for people', () => {
    const run = drainwright(['check', bathroom, '--versus', 'en12056-2000', '--json']);
    const result = JSON.parse(run.stdout);
    expect(faults('versus', result)).toEqual([]);
    expect([result.code.id, result.versus.id]).toEqual(['npc-2020', 'en12056-2000']);
    expect(drainwright(['check', bathroom, '--versus', 'en12056-2000']).stdout).toContain('against EN 12056-2');
  });

  test('a code that is not known is wrong usage, whichever it is', () => {
    expect(drainwright(['check', bathroom, '--versus', 'npc-1999']).code).toBe(2);
    expect(drainwright(['check', bathroom, '--code', 'npc-1999', '--versus', 'npc-2020']).code).toBe(2);
  });

  test('a setting of one code counts for that one, and is said to; one of neither is refused', () => {
    const file = answers({ K: 0.7, sewerFloor: '4 in' });
    const run = drainwright(['check', bathroom, '--answers', file, '--versus', 'en12056-2000', '--json']);
    expect(JSON.parse(run.stdout).onlyFor).toEqual({ code: ['sewerFloor'], versus: ['K'] });
    const strange = drainwright([
      'check',
      bathroom,
      '--answers',
      answers({ colour: 'red' }),
      '--versus',
      'en12056-2000',
    ]);
    expect([strange.code, strange.stderr]).toEqual([3, expect.stringContaining('/settings/colour')]);
  });

  test('a size that only the other code has was said for that one; one of neither is refused', () => {
    const pipes = (size: string) => answers({}, { pipes: { 'name:SF-CB': { size } } });
    const run = drainwright(['check', bathroom, '--answers', pipes('DN 90'), '--versus', 'en12056-2000', '--json']);
    const pipe = JSON.parse(run.stdout).pipes.find(({ name }: { name: string }) => name === 'SF-CB');
    expect([pipe.from.modelled.label, pipe.to.modelled.label]).toEqual(['3 in', 'DN 90']);
    expect(drainwright(['check', bathroom, '--answers', pipes('7 in'), '--versus', 'en12056-2000']).code).toBe(3);
  });
});
