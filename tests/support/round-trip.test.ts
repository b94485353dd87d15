import { createHash } from 'node:crypto';
import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { describe, expect, test } from 'vitest';
import { readModel } from '../../src/ifc/open.ts';
import type { Element, Model } from '../../src/model/model.ts';
import { modelOf } from './model-of.ts';
import { samples } from './samples.ts';
import { sketch } from './sketch.ts';
import { ifcOf } from './write-ifc.ts';

/** Alike, with numbers within a thousandth of a millimetre; what the expected side leaves out does not count. */
function differences(found: unknown, expected: unknown, path: string): string[] {
  if (typeof found === 'number' && typeof expected === 'number')
    return Math.abs(found - expected) < 1e-6 ? [] : [`${path}: ${found}, expected ${expected}`];
  if (found === null || expected === null || typeof found !== 'object' || typeof expected !== 'object')
    return Object.is(found, expected)
      ? []
      : [`${path}: ${JSON.stringify(found)}, expected ${JSON.stringify(expected)}`];
  if (Array.isArray(expected) && Array.isArray(found) && found.length !== expected.length)
    return [`${path}: ${found.length} entries, expected ${expected.length}`];
  const told = new Map(Object.entries(found));
  return Object.entries(expected).flatMap(([key, value]) => differences(told.get(key), value, `${path}.${key}`));
}

/** An element by names instead of dense ids, which depend on the order of lines. */
function told(model: Model, element: Element) {
  const partners = element.ports.flatMap((port) =>
    model.ports[port]!.connected.map((other) => model.elements[model.ports[other]!.owner!]!.globalId),
  );
  const { id: _, stepId: __, ports, systems, storey, space, properties, ...rest } = element;
  const named = properties.map((fact) => [`${fact.set}.${fact.name}`, fact] as const);
  return {
    ...rest,
    ports: ports
      .map((port) => `${model.ports[port]!.direction} ${model.ports[port]!.at!.map((x) => x.toFixed(4))}`)
      .sort(),
    partners: partners.sort(),
    properties: Object.fromEntries(named),
    systems: systems.map((system) => model.systems[system]!.globalId),
    storey: storey === null ? null : model.storeys[storey]!.globalId,
    space: space === null ? null : model.spaces[space]!.globalId,
  };
}

const folder = resolve(import.meta.dirname, '../../sample-models');
const sha256 = (bytes: Uint8Array): string => createHash('sha256').update(bytes).digest('hex');
const read = (text: string): Model => readModel([{ name: 'a.ifc', bytes: new TextEncoder().encode(text) }], sha256);

describe.each(samples)('$name', ({ name }) => {
  const drawn = sketch(readFileSync(resolve(folder, `${name}.piping`), 'utf8'));

  test.each([
    { ports: true, sizes: true, shuffle: null },
    { ports: true, sizes: false, shuffle: 5 },
    { ports: false, sizes: true, shuffle: 11 },
  ])('the reader makes of the IFC4 file what the sketch says: %o', (options) => {
    const expected = modelOf(drawn, options);
    const found = read(ifcOf(drawn, { ...options, unit: 'm' }));
    expect(found.findings).toEqual([]);
    const byId = new Map(found.elements.map((element) => [element.globalId, element]));
    expect(byId.size).toBe(expected.elements.length);
    for (const element of expected.elements) {
      const same = byId.get(element.globalId);
      expect(same, element.name ?? '').toBeDefined();
      expect(differences(told(found, same!), told(expected, element), element.name ?? '')).toEqual([]);
    }
    const { storeys, systems, spaces, walls, slabs, roofs } = expected;
    for (const [key, list] of Object.entries({ storeys, systems, spaces, walls, slabs, roofs })) {
      const there = found[key as keyof typeof found] as readonly { readonly globalId: string }[];
      expect(there.length, key).toBe(list.length);
      for (const each of list) {
        const same = there.find(({ globalId }) => globalId === each.globalId);
        const { id: _, stepId: __, storey: ___, outline: ____, ...rest } = { ...each } as Record<string, unknown>;
        expect(differences(same, rest, key)).toEqual([]);
      }
    }
  });
});
