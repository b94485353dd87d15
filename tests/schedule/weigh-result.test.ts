import { expect, test } from 'vitest';
import { plainText } from '../../src/schedule/text-line.ts';
import { weighText } from '../../src/schedule/weigh-text.ts';
import { hall } from '../support/rows.ts';
import { faults } from '../support/schemas.ts';
import { sampleText, weighSketch } from '../support/weigh-sketch.ts';

const samples = ['hall-wet-vented', 'hall-circuit-vented', 'bathroom-group', 'dwelling', 'sports-hall'];

test.each(samples)('%s is valid by the published schema, with and without ports and sizes', (name) => {
  expect(faults('weigh', weighSketch(sampleText(name)).result)).toEqual([]);
  expect(faults('weigh', weighSketch(sampleText(name), { ports: false, sizes: false }).result)).toEqual([]);
});

test.each(['ipc-2021', 'en12056-2000'])('%s: valid too; a reading that the code does not know says so', (code) => {
  const { result, of } = weighSketch(sampleText('hall-wet-vented'), { code });
  expect(faults('weigh', result)).toEqual([]);
  expect(of('individual-vent').holds).toBe(true);
  if (code === 'en12056-2000') expect(of('wet-vent').broken[0]?.sentence).toBe('the code does not know it');
});

test('ports or geometry, sizes or none: the same alternatives', () => {
  for (const name of samples) {
    const told = (options: { ports: boolean; sizes: boolean }) =>
      weighSketch(sampleText(name), options).result.batteries.map(({ alternatives }) =>
        alternatives.map(({ holds, pipes, adds, wall, cleanouts }) => [
          holds,
          pipes.map(({ role, size, length }) => [role, size?.label, Math.round(length * 100) / 100]).sort(),
          adds.map(({ role, length }) => [role, Math.round(length * 100) / 100]),
          wall?.stud,
          cleanouts.map(({ size }) => size.label),
        ]),
      );
    expect(told({ ports: false, sizes: true }), name).toEqual(told({ ports: true, sizes: true }));
  }
});

test('the same model gives the same bytes', () => {
  const once = JSON.stringify(weighSketch(sampleText('hall-wet-vented')).result);
  expect(JSON.stringify(weighSketch(sampleText('hall-wet-vented')).result)).toBe(once);
});

test('a model without batteries says so', () => {
  const lone = hall(
    'One lavatory',
    `node J at 0 0 0.5
lavatory L from J south 0.3 rise 1:50, trap 1 1/4 in
drain 1 1/4 in: L > J > F (to -0.4) > OUT (east 9 fall 1:50)
vent 3 in: J > VT (to 4.2)
terminal VT
sewer OUT`,
  );
  const { result } = weighSketch(lone);
  expect(result.batteries).toEqual([]);
  expect(faults('weigh', result)).toEqual([]);
  expect(plainText(weighText(result))).toContain('nothing to weigh');
});

test('a model without geometry at its joints: readings are told, nothing is built, nothing crashes', () => {
  // Without floors, walls and roof; the storey alone.
  const bare = sampleText('sports-hall')
    .split('\n')
    .filter((line) => !/^(wall|slab|roof|space)/.test(line))
    .join('\n');
  const { of, result } = weighSketch(bare);
  expect(faults('weigh', result)).toEqual([]);
  expect(of('wet-vent').wall?.modelled).toEqual([]);
  expect(of('wet-vent').wall?.fits).toBe(null);
  // The pipes above the floor are judged instead: 3 in, 100.6 mm.
  expect(of('wet-vent').wall).toMatchObject({ depth: 0.1006, stud: '38 × 140' });
});

test('the table stands within the width of a page, one screen a battery, hostile names harmless', () => {
  const text = sampleText('hall-wet-vented').replace('storey "Ground floor"', 'storey "Ground\u001B[31m \u202Efloor"');
  for (const line of plainText(weighText(weighSketch(text).result)).split('\n')) {
    expect([...line].length).toBeLessThanOrEqual(100);
    expect(line.includes('\u001B') || line.includes('\u202E')).toBe(false);
  }
  expect(weighText(weighSketch(sampleText('hall-wet-vented')).result).length).toBeLessThan(50);
});

test('storeys alike are told once: the school’s storeys 2 and 3', () => {
  const text = plainText(weighText(weighSketch(sampleText('school')).result));
  expect(text).toMatch(/So\s+is battery-3\./);
  expect(text).not.toMatch(/^battery-3:/m);
  expect(text).toMatch(/^battery-4: 8 urinals/m);
});
