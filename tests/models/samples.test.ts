import { readdirSync, readFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import * as W from 'web-ifc';
import { planDistance } from '../../src/geometry/vector.ts';
import { draftOf } from '../support/draft.ts';
import { ifcOfSample, samples } from '../support/samples.ts';
import { sketch } from '../support/sketch.ts';

const folder = resolve(import.meta.dirname, '../../sample-models');
const textOf = (file: string): string => readFileSync(join(folder, file), 'utf8');

/** Faults that a sample plants: what is laid the wrong way, has no body, or whose end meets nothing. */
const planted: Readonly<
  Record<string, { readonly uphill: string[]; readonly bare: string[]; readonly open: string[] }>
> = {
  'twelve-faults': {
    uphill: ['F6-P6'],
    bare: ['P8-Q8', 'P9-Q9'],
    open: ['J2-F2', 'F2-A2', 'F3-GA', 'GB-A3', 'V13-C13'],
  },
};

test('every notation in the folder is a sample, and has its file', () => {
  const files = readdirSync(folder);
  const names = samples.map(({ name }) => name);
  expect(files.filter((file) => file.endsWith('.piping')).sort()).toEqual(names.map((name) => `${name}.piping`));
  expect(files.filter((file) => file.endsWith('.ifc')).sort()).toEqual(names.map((name) => `${name}.ifc`));
});

test('the three schemas are among them', () => {
  expect(new Set(samples.map(({ options }) => options.schema))).toEqual(new Set(['IFC2X3', 'IFC4', 'IFC4X3_ADD2']));
});

const api = new W.IfcAPI();
beforeAll(async () => {
  await api.Init(undefined, true);
  api.SetLogLevel(W.LogLevel.LOG_LEVEL_OFF);
});

describe.each(samples)('$name', ({ name, options }) => {
  const piping = textOf(`${name}.piping`);
  const drawn = sketch(piping);
  const { uphill = [], bare = [], open = [] } = planted[name] ?? {};
  const draft = draftOf(drawn);
  let model = -1;
  afterAll(() => {
    if (model >= 0) api.CloseModel(model);
  });

  test('the writer still makes the committed bytes', () => {
    expect(ifcOfSample(piping, options)).toBe(textOf(`${name}.ifc`));
  });

  test('web-ifc opens the file and finds a shape for every element that has a body', () => {
    model = api.OpenModel(readFileSync(join(folder, `${name}.ifc`)));
    expect(model).toBeGreaterThanOrEqual(0);
    const shaped = new Set<number>();
    api.StreamAllMeshes(model, ({ expressID, geometries }) => {
      if (geometries.size() > 0) shaped.add(expressID);
    });
    const ids = api.GetLineIDsWithType(model, W.IFCDISTRIBUTIONELEMENT, true);
    expect(ids.size()).toBe(draft.elements.length);
    let without = 0;
    for (let at = 0; at < ids.size(); at += 1) if (!shaped.has(ids.get(at))) without += 1;
    expect(without).toBe(bare.length);
  });

  test('drawn as a good designer would: drains fall 1:50 or more, vents never fall toward the sky', () => {
    const wrong = drawn.pipes.flatMap(({ name: pipe, medium, nodes }) => {
      const from = drawn.nodes.get(nodes[0]!)!.at;
      const to = drawn.nodes.get(nodes.at(-1)!)!.at;
      const plan = planDistance(from, to);
      const fall = from[2] - to[2];
      if (medium === 'vent') return fall > 1e-9 ? [`${pipe} falls toward the sky`] : [];
      return plan > 0 && fall / plan < 1 / 50 - 1e-9 ? [pipe] : [];
    });
    expect(wrong).toEqual(uphill);
  });

  test('every pipe end meets something', () => {
    const joined = new Set(draft.connections.flat());
    const loose = draft.ports.flatMap(({ owner }, port) => (joined.has(port) ? [] : [draft.elements[owner]!.name]));
    expect(loose).toEqual(open);
  });

  test('fixtures stand in a room, with their storey', () => {
    const fixtures = drawn.parts.filter(({ is }) => is === 'fixture').map((part) => part.name);
    expect(fixtures.length).toBeGreaterThan(2);
    const homeless = draft.elements.filter((element) => fixtures.includes(element.name) && element.space === null);
    expect(homeless.map((element) => element.name)).toEqual([]);
    expect(draft.elements.filter(({ storey }) => storey === null)).toEqual([]);
  });
});

test('what the samples hold, counted by hand', () => {
  const kinds = samples.map(({ name }) => {
    const drawn = sketch(textOf(`${name}.piping`));
    const count = (kind: string) =>
      drawn.parts.filter((part) => part.is === 'fixture' && part.word.kind === kind).length;
    return `${name}: ${['urinal', 'lavatory', 'water-closet', 'bathtub', 'mop-sink'].map((kind) => count(kind)).join(' ')}`;
  });
  expect(kinds).toEqual([
    'bathroom-group: 0 1 1 1 0',
    'dwelling: 0 2 2 1 0',
    // Five storeys with two lavatories, two closets and a mop sink; four with two lavatories and two closets.
    'five-storey-core: 0 18 18 0 5',
    'hall-circuit-vented: 7 2 1 0 0',
    'hall-wet-vented: 7 2 1 0 0',
    // Four storeys with eight urinals, four lavatories, six closets; one mop sink.
    'school: 32 16 24 0 1',
    'sports-hall: 6 0 0 0 0',
    'twelve-faults: 0 11 1 0 0',
  ]);
});
