import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { readModel } from '../../src/ifc/open.ts';
import type { Model } from '../../src/model/model.ts';
import { modelOf } from '../support/model-of.ts';
import { runModel } from '../support/run-sketch.ts';
import { type Sketch, sketch } from '../support/sketch.ts';
import { type IfcOptions, ifcOf } from '../support/write-ifc.ts';

// One building is one building, whatever file tells of it: schema, unit, place, order of lines, ports, stated sizes.

const drawnOf = (name: string): Sketch =>
  sketch(readFileSync(resolve(import.meta.dirname, `../../sample-models/${name}.piping`), 'utf8'));

/** What people read of a result, by GlobalId, without what a file may change: STEP ids, names of the file, grounds. */
function judged(model: Model): readonly string[] {
  const { pipes, fixtures, batteries, findings } = runModel(model).result;
  const lines = [
    ...pipes.flatMap((pipe) =>
      (pipe.sections ?? [pipe]).map((part, section) =>
        [
          `${pipe.globalId} ${section}`,
          part.role,
          ...(part.also ?? []),
          part.portion ?? '',
          `load ${part.load?.least} ${part.load?.most} vents ${part.ventLoad?.least} ${part.ventLoad?.most}`,
          `modelled ${part.modelled?.label} needs ${part.required?.least?.label} ${part.required?.most?.label}`,
          part.verdict,
        ].join(' '),
      ),
    ),
    ...fixtures.map(({ globalId, kind, load, ventedBy, trapSize }) =>
      [globalId, kind, load?.most, ventedBy?.how, trapSize?.label].join(' '),
    ),
    ...batteries.map(({ fixtures: of, reading }) => `${[...of].sort().join(' ')} ${reading}`),
    ...findings
      .filter(({ severity }) => severity !== 'note')
      .map(({ code, about }) => `${code} ${[...about].sort().join(' ')}`),
  ];
  return lines.sort();
}

const read = (drawn: Sketch, options: Partial<IfcOptions>): Model =>
  readModel([{ name: 'a.ifc', bytes: new TextEncoder().encode(ifcOf(drawn, options)) }], () => 'digest');

const schemas = ['IFC2X3', 'IFC4', 'IFC4X3_ADD2'] as const;
const units = ['m', 'mm', 'ft', 'in'] as const;

describe.each(['hall-wet-vented', 'hall-circuit-vented'])('%s, every way of writing it', (name) => {
  const drawn = drawnOf(name);
  const expected = judged(modelOf(drawn));
  for (const schema of schemas)
    test.each(units)(`${schema} in %s, with and without ports and sizes`, (unit) => {
      expect(expected.length).toBeGreaterThan(50);
      for (const ports of [true, false])
        for (const sizes of [true, false])
          expect(judged(read(drawn, { schema, unit, ports, sizes }))).toEqual(expected);
    });

  test('turned, moved by kilometres, lines shuffled and renumbered', () => {
    const way = fc.record({
      schema: fc.constantFrom(...schemas),
      unit: fc.constantFrom(...units),
      ports: fc.boolean(),
      sizes: fc.boolean(),
      turn: fc.double({ min: 0, max: 360, noNaN: true }),
      shift: fc.tuple(
        fc.double({ min: -5000, max: 5000, noNaN: true }),
        fc.double({ min: -5000, max: 5000, noNaN: true }),
        fc.double({ min: -100, max: 3000, noNaN: true }),
      ),
      shuffle: fc.nat(),
    });
    fc.assert(
      fc.property(way, (options) => {
        expect(judged(read(drawn, options))).toEqual(expected);
      }),
      { numRuns: 25, seed: 1 },
    );
  });
});

describe.each(['bathroom-group', 'dwelling', 'five-storey-core', 'school', 'sports-hall'])('%s, a few ways', (name) => {
  const drawn = drawnOf(name);
  const expected = judged(modelOf(drawn));
  test.each([
    { schema: 'IFC2X3', unit: 'ft', ports: false, sizes: true, turn: 17, shift: [1000, 0, 0], shuffle: 3 },
    { schema: 'IFC4', unit: 'in', ports: true, sizes: false, turn: 90, shift: [0, -1000, 12], shuffle: 8 },
    { schema: 'IFC4X3_ADD2', unit: 'mm', ports: false, sizes: false, turn: 203.4, shift: [-700, 700, 0], shuffle: 21 },
  ] as const)('%o', (options) => {
    expect(judged(read(drawn, options))).toEqual(expected);
  });
});
