import { createHash } from 'node:crypto';
import { readdirSync, readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { describe, expect, test } from 'vitest';
import { readModel } from '../../src/ifc/open.ts';
import { modelOf } from '../support/model-of.ts';
import { runModel } from '../support/run-sketch.ts';
import { ifcOfWorked } from '../support/samples.ts';
import { faults } from '../support/schemas.ts';
import { sketch } from '../support/sketch.ts';
import { bothAnswers, givenAnswers } from '../support/worked-answer.ts';
import { workedCase, workedFolder, workedNames, workedText } from '../support/worked-case.ts';

// The open set of worked vent pipings: every case from its notation and from its IFC file, against the answer that is
// argued from the code in its answer file. Where the two differ one of them is wrong; neither is copied from the other.
const names = workedNames();
const sha256 = (bytes: Uint8Array): string => createHash('sha256').update(bytes).digest('hex');

test('what the set holds, counted by hand', () => {
  const files = readdirSync(workedFolder).filter((file) => /\.(piping|ifc|json)$/.test(file));
  expect(files.sort()).toEqual(
    names.flatMap((name) => ['ifc', 'json', 'piping'].map((end) => `${name}.${end}`)).sort(),
  );
  const kinds = names.map((name) => workedCase(name).kind);
  const count = (kind: string) => kinds.filter((one) => one === kind).length;
  expect([count('judgement'), count('battery'), count('published')]).toEqual([40, 13, 35]);
  const readme = readFileSync(resolve(import.meta.dirname, '../../README.md'), 'utf8');
  expect(readme).toContain(`an open set of ${names.length} worked vent pipings`);
  const index = readFileSync(resolve(workedFolder, 'README.md'), 'utf8');
  for (const name of names) expect(index).toContain(`- [${name}](${name}.json): ${workedCase(name).title} (`);
  expect(index.match(/^- \[/gm)).toHaveLength(names.length);
  expect(new Set(names.map((name) => workedCase(name).title)).size).toBe(names.length);
});

describe.each(names)('%s', (name) => {
  const worked = workedCase(name);
  const piping = workedText(name, 'piping');
  const ifc = workedText(name, 'ifc');

  test('its files hold to the schema and to each other', () => {
    expect(faults('worked', worked)).toEqual([]);
    expect(piping).toContain(`\nmodel "${worked.title}"\n`);
    expect(ifcOfWorked(name)).toBe(ifc);
  });

  test.each(worked.answers.map((answer, at) => [`${answer.code}: ${answer.answer}`, answer, at] as const))(
    '%s',
    (_, answer, at) => {
      const answers = givenAnswers(answer, `${name}.json: answers[${at}].given`);
      const file = { name: `${name}.ifc`, bytes: new TextEncoder().encode(ifc) };
      for (const model of [modelOf(sketch(piping), { ports: true, sizes: true }), readModel([file], sha256)]) {
        const { argued, found } = bothAnswers(answer, runModel(model, { code: answer.code, answers }));
        expect(found).toEqual(argued);
      }
    },
  );
});
