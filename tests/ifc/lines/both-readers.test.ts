import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { IfcAPI, LogLevel } from 'web-ifc';
import { Cursor } from '../../../src/ifc/lines/cursor.ts';
import { indexLines } from '../../../src/ifc/lines/index-lines.ts';
import { hasOpenModels, modelFiles } from '../models.ts';
import { readValues, type Value } from './read-values.ts';

// Slow: every value of every model at hand, read by our tokenizer and by web-ifc.

const api = new IfcAPI();
beforeAll(async () => {
  await api.Init(undefined, true);
  api.SetLogLevel(LogLevel.LOG_LEVEL_OFF);
});

/**
 * web-ifc's raw argument in our form. Its known faults: a derived value (`*`) is dropped; the words T and F come as
 * booleans and U as nothing; numbers in typed values come as text; the class of a typed value that no schema of its
 * own knows (those of pre-release schemas) is lost.
 */
function foreign(argument: unknown): Value {
  if (argument === null || argument === undefined) return null;
  if (Array.isArray(argument)) return argument.map(foreign);
  const { type, value, typecode = 0 } = argument as { type: number; value: unknown; typecode?: number };
  switch (type) {
    case 1:
      return ['s', String(value)];
    case 2:
      return ['t', api.GetNameFromTypeCode(typecode).toUpperCase(), typed(value)];
    case 3:
      return ['e', value === true ? 'T' : value === false ? 'F' : value === undefined ? 'U' : String(value)];
    case 5:
      return ['#', Number(value)];
    case 11:
      return ['b', String(value)];
    default:
      return Number(value);
  }
}

function typed(value: unknown): Value {
  if (Array.isArray(value)) return value.map(foreign);
  if (value === undefined) return 'U';
  if (typeof value === 'boolean') return value ? 'T' : 'F';
  return typeof value === 'number' ? value : String(value);
}

const unknownType = '<WEB-IFC-TYPE-UNKNOWN>';

function isSame(ours: Value, theirs: Value): boolean {
  if (Array.isArray(ours) && Array.isArray(theirs)) {
    if (ours[0] === 't' && theirs[0] === 't') {
      const [, type, within] = ours as readonly Value[];
      // The kind of what a typed value holds is not told: texts and words come bare.
      const content = Array.isArray(within) && (within[0] === 's' || within[0] === 'e') ? (within[1] ?? '') : within;
      return (type === theirs[1] || theirs[1] === unknownType) && isSame(content ?? null, theirs[2] as Value);
    }
    return ours.length === theirs.length && ours.every((one, k) => isSame(one, theirs[k] as Value));
  }
  if (typeof ours === 'number' && typeof theirs === 'string') return ours === Number(theirs);
  return ours === theirs;
}

let compared = 0;

describe(`our tokenizer and web-ifc read the same (${modelFiles.length} models)`, () => {
  for (const { name, read } of modelFiles) {
    test(name, () => {
      const bytes = read();
      const index = indexLines(bytes);
      const model = api.OpenModel(bytes);
      expect(model).toBeGreaterThanOrEqual(0);
      try {
        const lines = api.GetAllLines(model);
        const theirs = new Set<number>();
        for (let k = 0; k < lines.size(); k++) theirs.add(lines.get(k));
        expect(theirs).toEqual(new Set(index.ids));
        const differing: string[] = [];
        const cursor = new Cursor(index.bytes);
        for (let record = 0; record < index.count && differing.length < 5; record++) {
          if (index.typeOf[record] === 0) continue;
          const id = index.ids[record]!;
          const line = api.GetRawLineData(model, id) as { type: number; arguments: unknown[] };
          const type = api.GetNameFromTypeCode(line.type).toUpperCase();
          const ours = readValues(cursor.at(index.args[record]!));
          const foreignValues = line.arguments.map(foreign);
          compared += ours.length;
          if (type !== index.types[index.typeOf[record]!]) differing.push(`#${id} ${type}`);
          else if (!isSame(ours, foreignValues)) {
            differing.push(`#${id}: ${JSON.stringify(ours)} against ${JSON.stringify(foreignValues)}`);
          }
        }
        expect(differing).toEqual([]);
      } finally {
        api.CloseModel(model);
      }
    });
  }

  afterAll(() => {
    // 337 337 instances of the open models alone.
    if (hasOpenModels) expect(compared).toBeGreaterThan(600_000);
  });
});
