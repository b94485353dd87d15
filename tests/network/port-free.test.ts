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

test('a building drawn twice over is one building', () => {
  const once = tower(1, 3);
  const again = once.parts.map((part) => ({ ...part, name: `${part.name} again` }));
  const relations = once.connected.map(([a, b]) => [renamed(a), renamed(b)] as const);
  for (const withPorts of [true, false]) {
    const parts = [...once.parts, ...again].map((part) => (withPorts ? part : { ...part, ports: [] }));
    const single = drawn(parts.slice(0, once.parts.length), withPorts ? once.connected : []);
    const double = drawn(parts, withPorts ? [...once.connected, ...relations] : []);
    const truth = buildNetwork(single.model, single.identities).value;
    const { value, findings } = buildNetwork(double.model, double.identities);
    expect(joinsOf(double, value)).toEqual(joinsOf(single, truth));
    expect(findings.filter(({ code }) => code === 'doubled-element').length).toBe(once.parts.length);
    expect(value.fates.slice(once.parts.length).every(({ reason }) => reason === 'double')).toBe(true);
  }
});

const renamed = (port: string): string => port.replace(/\.(\d+)$/, ' again.$1');
