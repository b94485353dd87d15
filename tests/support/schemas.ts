import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { Ajv2020, type ValidateFunction } from 'ajv/dist/2020.js';

const src = resolve(import.meta.dirname, '../../src');
const schemaFiles = {
  result: 'schedule/result.schema.json',
  survey: 'schedule/survey.schema.json',
  explain: 'schedule/explain.schema.json',
  codes: 'schedule/codes.schema.json',
  versus: 'schedule/versus.schema.json',
  weigh: 'schedule/weigh.schema.json',
  mend: 'schedule/mend.schema.json',
  answers: 'model/answers.schema.json',
  worked: '../tests/support/worked-case.schema.json',
} as const;

const read = (file: string): object => JSON.parse(readFileSync(resolve(src, file), 'utf8'));
const ajv = new Ajv2020({
  allErrors: true,
  strict: true,
  strictTypes: false,
  strictRequired: false,
  allowUnionTypes: true,
});
const validators = new Map<string, ValidateFunction>();

/** What the published schema says against a value: one line a fault, none for a good one. */
export function faults(schema: keyof typeof schemaFiles, value: unknown): string[] {
  if (validators.size === 0)
    for (const [name, file] of Object.entries(schemaFiles)) validators.set(name, ajv.compile(read(file)));
  const validate = validators.get(schema);
  if (validate === undefined) throw new Error(`no schema ${schema}`);
  // As it is read from a file: undefined is absent there.
  if (validate(JSON.parse(JSON.stringify(value)))) return [];
  return (validate.errors ?? []).map(({ instancePath, message }) => `${instancePath}: ${message}`);
}
