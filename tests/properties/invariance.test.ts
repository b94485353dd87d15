import { readFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { answerOf, differences, throughIfc } from '../support/answer-of.ts';
import { modelOf } from '../support/model-of.ts';
import { sketch } from '../support/sketch.ts';
import type { IfcOptions } from '../support/write-ifc.ts';

// A model says the same however it is written: turned, shifted, in other units, in another schema, with its lines
// shuffled and renumbered, without ports, without nominal sizes (then the outside diameter tells). By GlobalId.
const folder = resolve(import.meta.dirname, '../../sample-models');
const drawn = (name: string) => sketch(readFileSync(join(folder, `${name}.piping`), 'utf8'));

const schemas = ['IFC2X3', 'IFC4', 'IFC4X3_ADD2'] as const;
const units = ['m', 'mm', 'ft', 'in'] as const;
const placed = {
  turn: fc.integer({ min: 0, max: 359 }),
  shift: fc.tuple(
    fc.integer({ min: -1000, max: 1000 }),
    fc.integer({ min: -1000, max: 1000 }),
    fc.integer({ min: -50, max: 50 }),
  ),
  shuffle: fc.integer({ min: 1, max: 1_000_000 }),
};

describe.each(['hall-wet-vented', 'hall-circuit-vented'])('%s, every way to write it', (name) => {
  const plain = drawn(name);
  const said = answerOf(modelOf(plain));

  test('the answers are those of 40 things and more', () => {
    expect(said.size).toBeGreaterThan(40);
    expect([...said.values()].filter((text) => text.startsWith('row'))).toHaveLength(1);
  });

  const matrix = schemas.flatMap((schema) =>
    units.flatMap((unit) =>
      [true, false].flatMap((ports) => [true, false].map((sizes) => ({ schema, unit, ports, sizes }))),
    ),
  );
  const places = fc.sample(fc.record(placed), { numRuns: matrix.length, seed: 2026 });
  test.each(matrix.map((one, at) => ({ ...one, ...places[at]! })))(
    '$schema, $unit, ports $ports, sizes $sizes, turned $turn°, shifted $shift, shuffled $shuffle',
    (options) => {
      expect(differences(said, answerOf(throughIfc(plain, options as IfcOptions)))).toEqual([]);
    },
  );

  test('without storeys: one for each 3 m is assumed, which changes nothing here', () => {
    const model = modelOf(plain);
    const elements = model.elements.map((element) => ({ ...element, storey: null }));
    expect(differences(said, answerOf({ ...model, storeys: [], elements }))).toEqual([]);
  });
});

describe('a sample of the ways on the other models', () => {
  const any = fc.record({
    schema: fc.constantFrom(...schemas),
    unit: fc.constantFrom(...units),
    ports: fc.boolean(),
    sizes: fc.boolean(),
    ...placed,
  });
  test.each([
    { name: 'bathroom-group', numRuns: 6 },
    { name: 'dwelling', numRuns: 6 },
    { name: 'sports-hall', numRuns: 6 },
    { name: 'five-storey-core', numRuns: 3 },
    { name: 'school', numRuns: 2 },
  ])('$name, $numRuns ways', ({ name, numRuns }) => {
    const plain = drawn(name);
    const said = answerOf(modelOf(plain));
    fc.assert(
      fc.property(any, (options) => {
        expect(differences(said, answerOf(throughIfc(plain, options as IfcOptions)))).toEqual([]);
      }),
      { numRuns, seed: 7 },
    );
  });
});
