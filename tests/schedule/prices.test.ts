import { describe, expect, test } from 'vitest';
import { readPrices } from '../../src/schedule/prices.ts';
import { codeOf } from '../support/run-sketch.ts';
import { faults } from '../support/schemas.ts';
import { sampleText, weighSketch } from '../support/weigh-sketch.ts';

const { series } = codeOf('npc-2020');
const file = {
  format: 'drainwright-prices',
  version: 1,
  currency: 'CAD',
  pipes: { '4 in': 30, '3 in': 20, '2 in': 12, '1 1/2 in': 8, '1 1/4 in': 7 },
  fittings: { bend: { '3 in': 9 }, junction: { '3 in': 14 } },
  cleanouts: { '3 in': 25 },
  floorHoles: { '1½ in': 5, '2 in': 6 },
};
const read = (value: unknown) => readPrices(JSON.stringify(value), 'prices.json', series);

test('quantities times the user’s own figures; what has no price is named', () => {
  const { of, result } = weighSketch(sampleText('hall-circuit-vented'), {}, read(file));
  expect(faults('weigh', result)).toEqual([]);
  expect(result.currency).toBe('CAD');
  const circuit = of('circuit-vent');
  const { costs } = circuit;
  const line = (what: string, size: string) => costs?.lines.find((one) => one.what === what && one.size === size);
  // Counted off the sketch: the row and what follows it before the closet joins, seven holes of 2 in, two of 1½ in.
  expect(line('hole through a floor', '2 in')).toMatchObject({ quantity: 7, price: 6, cost: 42 });
  expect(line('hole through a floor', '1½ in')).toMatchObject({ quantity: 2, price: 5, cost: 10 });
  expect(line('cleanout', '3 in')).toMatchObject({ quantity: 1, price: 25, cost: 25 });
  const metres = circuit.pipes
    .filter(({ size }) => size?.label === '3 in')
    .reduce((sum, { length }) => sum + length, 0);
  expect(line('pipe', '3 in')?.quantity).toBeCloseTo(metres, 3);
  expect(line('pipe', '3 in')?.cost).toBeCloseTo(20 * metres, 1);
  expect(costs?.total).toBeCloseTo(
    costs!.lines.reduce((sum, { cost }) => sum + cost, 0),
    2,
  );
  expect(costs?.unpriced).toContain('cleanout 1½ in');
});

test('no prices, no costs', () => {
  const { of, result } = weighSketch(sampleText('hall-circuit-vented'));
  expect(result.currency).toBeUndefined();
  expect(of('wet-vent').costs).toBeUndefined();
});

describe('a price file is refused with its place', () => {
  test.each([
    [{ ...file, format: 'prices' }, 'prices.json: format'],
    [{ ...file, version: 2 }, 'prices.json: version'],
    [{ ...file, currency: '' }, 'prices.json: currency'],
    [{ ...file, pipes: { '7 in': 1 } }, 'prices.json: pipes.7 in: is no size of the code'],
    [{ ...file, pipes: { '3 in': -1 } }, 'prices.json: pipes.3 in: is -1'],
    [{ ...file, pipes: { '3 in': '20' } }, 'prices.json: pipes.3 in'],
    [{ ...file, fittings: { elbow: {} } }, 'prices.json: fittings.elbow'],
    [{ ...file, surprise: 1 }, 'surprise'],
    [[], 'prices.json'],
  ])('%#', (value, says) => expect(() => read(value)).toThrow(says));
  test('no JSON at all', () =>
    expect(() => readPrices('{', 'prices.json', series)).toThrow('prices.json: is not JSON'));
});
