import { expect, test } from 'vitest';
import { plainText } from '../../src/schedule/text-line.ts';
import { wallFitText } from '../../src/schedule/wall-fit-text.ts';
import { runSketch } from '../support/run-sketch.ts';
import { sampleText } from '../support/weigh-sketch.ts';

test('the sports hall: six level pipes of 3 in bore loadbearing studs of 89 mm, one drop stands between them', () => {
  expect(plainText(wallFitText(runSketch(sampleText('sports-hall')).result.findings))).toBe(`
Not in the wall as modelled: 7 pipes
  - Urinal wall: 6 pipes of 3 in: fittings 100.6 mm wide in 89 mm; no usual stud may be bored so
    wide.
  - Urinal wall: 1 pipe of 3 in: fittings 100.6 mm wide in 89 mm; studs of 38 × 140 take it.
`);
});

test('where everything fits nothing is said', () => {
  expect(wallFitText(runSketch(sampleText('hall-wet-vented')).result.findings)).toEqual([]);
});
