import { readdirSync, readFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { describe, expect, test } from 'vitest';
import { buildNetwork } from '../../src/network/build-network.ts';
import { adjacency, agreement } from '../support/adjacency.ts';
import { modelOf } from '../support/model-of.ts';
import { moved, withGaps, withoutPorts } from '../support/model-twins.ts';
import { plainIdentities } from '../support/plain-identities.ts';
import { sketch } from '../support/sketch.ts';

const folder = resolve(import.meta.dirname, '../../sample-models');
const samples = readdirSync(folder)
  // Models with planted faults have a test of their own.
  .filter((name) => name.endsWith('.piping') && !name.includes('fault'))
  .sort();

test('there are samples', () => expect(samples.length).toBeGreaterThanOrEqual(5));

/** Truth is the sample's own port relations. */
describe.each(samples)('%s without its ports', (name) => {
  const model = modelOf(sketch(readFileSync(join(folder, name), 'utf8')));
  const identities = plainIdentities(model);
  const { value: network, findings } = buildNetwork(model, identities);
  const truth = adjacency(network);

  test('is joined by ports alone, whole, each element with one fate', () => {
    expect(network.joined.geometry).toBe(0);
    expect(truth.size).toBeGreaterThan(10);
    expect(findings).toEqual([]);
    expect(network.fates.length).toBe(model.elements.length);
    expect(network.fates.filter(({ use }) => use === 'unresolved')).toEqual([]);
  });

  test.each([
    { gap: 0, angle: 0 },
    { gap: 0.002, angle: 0.5 },
    { gap: 0.01, angle: 0 },
    { gap: 0.01, angle: Math.PI / 4 },
  ])('is joined alike with gaps of $gap m, turned by $angle', ({ gap, angle }) => {
    const twin = moved(
      withGaps(withoutPorts(model), () => gap),
      angle,
      [1000, -500, 3],
    );
    const found = buildNetwork(twin, identities);
    expect(found.value.joined.ports).toBe(0);
    expect(agreement(adjacency(found.value), truth)).toEqual({ recall: 1, precision: 1 });
    expect(found.findings.map(({ code }) => code)).toEqual(['joint-inferred']);
  });
});
