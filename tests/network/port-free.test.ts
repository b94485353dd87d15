import { describe, expect, test } from 'vitest';
import { buildNetwork } from '../../src/network/build-network.ts';
import { drawn, joinsOf } from '../support/drawn.ts';
import { type Fitted, tower } from '../support/fitted.ts';

const withoutPorts = ({ parts }: Fitted) => drawn(parts.map(({ ports: _, ...part }) => part));

describe('a building drawn with ports and its twin without', () => {
  const gaps: readonly (readonly [string, (end: number) => number])[] = [
    ['no gaps', () => 0],
    ['gaps of 2 mm', () => 0.002],
    ['gaps of 10 mm', () => 0.01],
    ['gaps of 25 mm, out of habit', () => 0.025],
    ['gaps of 0 to 10 mm', (end) => ((end * 7919) % 11) / 1000],
  ];
  for (const [name, gap] of gaps)
    test(`are joined alike: ${name}`, () => {
      const building = tower(3, 4, gap);
      const ported = drawn(building.parts, building.connected);
      const bare = withoutPorts(building);
      const truth = buildNetwork(ported.model, ported.identities);
      const found = buildNetwork(bare.model, bare.identities);
      expect(truth.value.joined.geometry).toBe(0);
      expect(found.value.joined.ports).toBe(0);
      expect(joinsOf(bare, found.value)).toEqual(joinsOf(ported, truth.value));
      expect(found.findings.map(({ code }) => code)).toEqual(['joint-inferred']);
    });
});
