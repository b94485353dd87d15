import { expect, test } from 'vitest';
import { circuitVentedRow, times } from '../support/rows.ts';
import { runSketch, type SketchRun } from '../support/run-sketch.ts';

// A row that is read as a wet vent, and would be circuit vented but for a relief vent: National Plumbing Code 2.5.3.1.(3).
const stalls = times(8, 'urinal, stall, trap 2 in');
const notes = (run: SketchRun) => run.findings('one-vent-short').map(({ facts, severity }) => [severity, facts]);

test('drawn 3 in where a wet vent of 14 units needs 4 in: the one cause is named', () => {
  const run = runSketch(circuitVentedRow(stalls, { relief: '' }));
  expect(run.findings('undersized').length).toBeGreaterThan(6);
  expect(notes(run)).toEqual([
    [
      'note',
      expect.objectContaining({
        reading: 'wet-vent',
        instead: 'circuit-vent',
        lacks: 'relief-vent-missing',
        fixtures: 8,
      }),
    ],
  ]);
  const [found] = run.findings('one-vent-short');
  expect(found).toMatchObject({ clause: '2.5.3.1.(3)' });
  expect(found?.sentence).toContain('a relief vent downstream of its last fixture');
});

test('nothing to name where the relief vent stands, or the pipes are large enough', () => {
  expect(notes(runSketch(circuitVentedRow(stalls)))).toEqual([]);
  const wide = circuitVentedRow(stalls, { relief: '' }).replaceAll('drain 3 in', 'drain 4 in');
  expect(notes(runSketch(wide))).toEqual([]);
});

test('nor where the row breaks a second condition: a lavatory of 1¼ in among stalls of 2 in (2.5.3.1.(2))', () => {
  const mixed = circuitVentedRow([...stalls.slice(0, 7), 'lavatory, trap 1 1/4 in'], { relief: '' });
  expect(notes(runSketch(mixed))).toEqual([]);
});
