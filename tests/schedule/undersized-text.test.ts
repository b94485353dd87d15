import { expect, test } from 'vitest';
import { undersizedText } from '../../src/schedule/undersized-text.ts';
import { circuitVentedRow, hall, times, ventedRow } from '../support/rows.ts';
import { type RunOptions, runSketch } from '../support/run-sketch.ts';
import { at48, circuitRowToStack } from '../support/stack-rows.ts';
import { tower } from '../support/towers.ts';

const closet = 'closet, tank';
const textOf = (sketch: string, code: string, settings: object = { use: 'public' }): string =>
  undersizedText(runSketch(sketch, { code, answers: { settings } as NonNullable<RunOptions['answers']> }).result)
    .map(({ text }) => text.trim())
    .join(' ');

test('a relief vent shows the load of the branch that sizes it, not the traps that breathe through it: IPC-W11, 20', () => {
  const text = textOf(
    circuitRowToStack(times(5, closet), { relief: true, above: [closet, closet] }).replace(
      'vent 3 in: RV',
      'vent 1 1/4 in: RV',
    ),
    'ipc-2021',
  );
  expect(text).toContain('Circuit vent size: 20 drainage fixture units');
  expect(text).not.toMatch(/\b0 drainage fixture units/);
});

test('closets that ask for a size are counted: UPC-W08, six private ones on 3 in', () => {
  const text = textOf(at48(ventedRow(times(6, closet))), 'upc-2021', { use: 'private' });
  expect(text).toContain('6 water closets, at most 5');
});

test('a slope that asks for the size says what a steeper pipe would need: IPC-W03 at 1/8 in per ft', () => {
  const row = circuitVentedRow([...times(6, 'urinal, stall, trap 2 in'), ...times(2, 'lavatory, trap 1 1/4 in')], {
    relief: '',
  });
  const text = textOf(row.replaceAll('1:50', '1:96').replaceAll('drain 3 in: J1', 'drain 2 in: J1'), 'ipc-2021');
  expect(text).toContain('laid at 2 % (1:50) or steeper 2 in is enough');
});

test('pipes that fall short alike are told once: six closet vents of 1¼ in that need 1½ in (906.2)', () => {
  const text = textOf(
    tower(times(3, '').map(() => [closet, closet])).replaceAll('vent 1 1/2 in: V', 'vent 1 1/4 in: V'),
    'ipc-2021',
  );
  expect(text.match(/Drawn 1¼ in, needs 1½ in/g)).toHaveLength(1);
  expect(text).toContain('6 individual vents');
});

test('rows too: two bathrooms, each wet vented by a vent of 1¼ in that needs 1½ in (912.3)', () => {
  const room = (name: string, north: number): string => `node ${name}J at 0 ${north} 0.5
trap ${name}T from ${name}J north 0.4 rise 1:48
lavatory ${name}L from ${name}T up 0.12, trap 1 1/4 in
drain 1 1/4 in: ${name}L > ${name}T > ${name}J
drain 2 in: ${name}J > ${name}F (to -0.4)
drain 3 in: ${name}F > ${name}C (east 0.7 fall 1:48)
node ${name}B from ${name}C south 0.3 rise 1:48
closet ${name}W from ${name}B to 0, tank
drain 3 in: ${name}W > ${name}B > ${name}C
drain 3 in: ${name}C > ${name}D (east 1 fall 1:48)
vent 1 1/4 in: ${name}J > ${name}V (to 4.2)
terminal ${name}V`;
  const text = textOf(
    hall(
      'Two bathrooms',
      `${room('A', 0)}\n${room('B', 6)}
drain 4 in: BD > K (south 3 fall 1:48) > AD
drain 4 in: AD > OUT (east 6 fall 1:48)
sewer OUT`,
    ),
    'ipc-2021',
    { use: 'private' },
  );
  expect(text).toContain('2 continuous vents, battery-1 and 1 alike');
});
