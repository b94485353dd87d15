import { readdirSync, readFileSync } from 'node:fs';
import { join, relative } from 'node:path';
import { plumbingCode } from '../../src/codes/index.ts';
import type { PlumbingCode } from '../../src/codes/plumbing-code.ts';
import { type Answers, noAnswers } from '../../src/model/answers.ts';
import type { Model } from '../../src/model/model.ts';
import { readNamesTable } from '../../src/model/read-names-table.ts';
import { run } from '../../src/pipeline.ts';
import type { Result, ResultFinding, ResultFixture, ResultPipe } from '../../src/schedule/result.ts';
import { resultOf } from '../../src/schedule/result-of.ts';
import { readPipeDimensions } from '../../src/tables/read-pipe-dimensions.ts';
import type { TableSource } from '../../src/tables/table-source.ts';
import { modelOf } from './model-of.ts';
import { sketch } from './sketch.ts';

const root = join(import.meta.dirname, '../../tables');
const files = readdirSync(root, { recursive: true, encoding: 'utf8' })
  .filter((name) => name.endsWith('.json'))
  .map((name) => relative('.', name));

/** The project's own tables, from disk. */
export const tables: TableSource = {
  name: 'tables',
  list: () => files,
  read: (path) => JSON.parse(readFileSync(join(root, path), 'utf8')) as unknown,
};
const dimensions = readPipeDimensions(tables);
export const names = readNamesTable(tables);

export interface RunOptions {
  readonly code?: string;
  readonly answers?: Partial<Answers>;
  readonly ports?: boolean;
  readonly sizes?: boolean;
}

/** A sketch carried through every stage, and ways to ask its result by the names of the sketch. */
export interface SketchRun {
  readonly result: Result;
  pipe(name: string): ResultPipe;
  fixture(name: string): ResultFixture;
  /** Required size: `3 in`; `2 in to 3 in` for a range; `none` where no size holds or none is asked. */
  size(name: string): string;
  role(name: string): string;
  findings(code?: string): readonly ResultFinding[];
}

const codes = new Map<string, PlumbingCode>();

/** A code reads a score of files: one reading serves all sketches. */
export function codeOf(id: string, settings: Answers['settings'] = {}): PlumbingCode {
  const key = JSON.stringify([id, settings]);
  const known = codes.get(key) ?? plumbingCode(id, { tables, dimensions }, settings, 'answers');
  codes.set(key, known);
  return known;
}

export const runSketch = (text: string, options: RunOptions = {}): SketchRun =>
  runModel(modelOf(sketch(text), { ports: options.ports ?? true, sizes: options.sizes ?? true }), options);

export function runModel(model: Model, options: RunOptions = {}): SketchRun {
  const answers: Answers = { ...noAnswers, ...options.answers };
  const code = codeOf(options.code ?? 'npc-2020', answers.settings);
  const result = resultOf(run(model, code, answers, names), '0.0.0');
  const named = <T extends { readonly name: string | null }>(list: readonly T[], name: string): T => {
    const found = list.filter((one) => one.name === name);
    if (found.length !== 1) {
      throw new Error(`${found.length} things are called ${name}; there are ${list.map((one) => one.name).join(', ')}`);
    }
    return found[0] as T;
  };
  const pipe = (name: string): ResultPipe => named(result.pipes, name);
  return {
    result,
    pipe,
    fixture: (name) => named(result.fixtures, name),
    size: (name) => {
      const { required } = pipe(name);
      const [least, most] = [required?.least?.label, required?.most?.label];
      if (most === undefined) return 'none';
      return least === undefined || least === most ? most : `${least} to ${most}`;
    },
    role: (name) => pipe(name).role,
    findings: (code) => result.findings.filter((one) => code === undefined || one.code === code),
  };
}
