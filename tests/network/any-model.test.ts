import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { Vec3 } from '../../src/geometry/vector.ts';
import type { Part } from '../../src/model/identity.ts';
import { elementId, type Model, type PortId } from '../../src/model/model.ts';
import { buildNetwork } from '../../src/network/build-network.ts';
import type { Network } from '../../src/network/network.ts';
import { type DrawnPart, drawn } from '../support/drawn.ts';

/** Numbers as files hold them: sensible ones close together, so that much meets, and now and then nonsense. */
const number = fc.oneof(
  { weight: 20, arbitrary: fc.integer({ min: -4, max: 4 }).map((n) => n / 2) },
  { weight: 4, arbitrary: fc.double({ min: -3, max: 3, noNaN: true }) },
  { weight: 1, arbitrary: fc.constantFrom(Number.NaN, Number.POSITIVE_INFINITY, 1e300, -1e9, 2.4e7) },
);
const point: fc.Arbitrary<Vec3> = fc.tuple(number, number, number);
const parts: readonly Part[] = [
  'pipe',
  'pipe',
  'pipe',
  'fitting',
  'fixture',
  'trap',
  'cleanout',
  'vent-terminal',
  'air-admittance-valve',
  'chamber',
  'sewer-connection',
  'valve',
  'tank',
  'not-drainage',
  'unknown-terminal',
];
const piece = fc.record({
  part: fc.constantFrom(...parts),
  line: fc.option(fc.array(point, { maxLength: 4 })),
  diameter: fc.constantFrom(0, 0.05, 0.11, 0.3),
  box: fc.option(fc.tuple(point, point)),
  ports: fc.array(
    fc.record({ at: fc.option(point), direction: fc.constantFrom('source', 'sink', 'both', 'unknown') }),
    {
      maxLength: 3,
    },
  ),
  medium: fc.constantFrom('sanitary', 'vent', 'storm', 'supply', 'other', null),
});
const links = fc.array(fc.tuple(fc.nat(40), fc.nat(40)), { maxLength: 20 });

function modelFrom(
  pieces: readonly (typeof piece extends fc.Arbitrary<infer T> ? T : never)[],
  pairs: [number, number][],
) {
  const drawing = drawn(
    pieces.map(({ part, line, box, ports, ...rest }, i): DrawnPart => {
      const drawnBox = box && { min: box[0], max: box[1] };
      return {
        name: `e${i}`,
        part,
        ...rest,
        ...(line ? { line } : {}),
        ...(drawnBox ? { box: drawnBox } : {}),
        ports: ports as NonNullable<DrawnPart['ports']>,
      } as DrawnPart;
    }),
  );
  const joined = drawing.model.ports.map(() => [] as PortId[]);
  // One sided, doubled, to itself, and to ports that do not exist: as relations in files are.
  for (const [a, b] of pairs) joined[a]?.push(b as PortId);
  const model: Model = {
    ...drawing.model,
    ports: drawing.model.ports.map((port, i) => ({ ...port, connected: joined[i]! })),
  };
  return { model, identities: drawing.identities };
}

function coherent(network: Network, model: Model): void {
  const { joints, pipes, pipesOf, jointsOf, fates } = network;
  expect(fates.length).toBe(model.elements.length);
  expect(joints.map(({ id }) => id)).toEqual(joints.map((_, i) => i));
  expect(pipes.map(({ id }) => id)).toEqual(pipes.map((_, i) => i));
  for (const pipe of pipes) {
    for (const end of pipe.ends) expect(joints[end]!.pipes).toContain(pipe.id);
    expect(pipe.length).toBeGreaterThanOrEqual(0);
    if (pipe.element !== null) {
      expect(fates[pipe.element]!.use).toBe('pipe');
      expect(pipesOf.get(pipe.element)).toContain(pipe.id);
    }
  }
  for (const joint of joints) {
    for (const id of joint.pipes) expect(pipes[id]!.ends).toContain(joint.id);
    for (const element of joint.elements) expect(jointsOf.get(element)).toContain(joint.id);
  }
  for (const [element, ids] of pipesOf) {
    const own = ids.map((id) => pipes[id]!);
    own.slice(1).forEach((section, i) => {
      expect(section.from).toBe(own[i]!.to);
      expect(section.ends[0]).toBe(own[i]!.ends[1]);
    });
    expect(fates[element]!.use).toBe('pipe');
  }
  for (const { use, reason } of fates) expect(reason === null).toBe(use !== 'left-out' && use !== 'unresolved');
  for (const { id } of model.elements) {
    if (fates[id]!.use === 'pipe') expect(pipesOf.get(elementId(id))!.length).toBeGreaterThan(0);
  }
}

describe('any model, however broken', () => {
  test('gives a coherent network, and the same one twice', () => {
    fc.assert(
      fc.property(fc.array(piece, { maxLength: 14 }), links, (pieces, pairs) => {
        const { model, identities } = modelFrom(pieces, pairs);
        const first = buildNetwork(model, identities);
        coherent(first.value, model);
        expect(buildNetwork(model, identities)).toEqual(first);
      }),
      { numRuns: 500, seed: 7 },
    );
  });

  test('an empty model gives an empty network', () => {
    const { model, identities } = drawn([]);
    expect(buildNetwork(model, identities)).toEqual({
      value: {
        joints: [],
        pipes: [],
        pipesOf: new Map(),
        jointsOf: new Map(),
        fates: [],
        joined: { ports: 0, geometry: 0 },
      },
      findings: [],
    });
  });
});
