import { expect, test } from 'vitest';
import { checkText } from '../../src/schedule/check-text.ts';
import { plainText } from '../../src/schedule/text-line.ts';
import { runSketch } from '../support/run-sketch.ts';

// The drain goes on past its last fixture to a cleanout in the floor; another stub ends in a cap.
const run = runSketch(`
storey "Ground floor" at 0
node A at 0 0 -0.3
node E from A west 1 rise 1:50
node T from A north 0.4 rise 1:50
closet W from T to 0, tank
drain 3 in: W > T > A > B (east 3 fall 1:50)
cleanout CO from E to 0, 3 in
drain 3 in: CO > E > A
cap C from B south 1 rise 1:50
drain 3 in: C > B > S (east 3 fall 1:50)
sewer S
vent 3 in: A > V (to 5)
terminal V
`);

test('pipes that lead to a cleanout are told as its extension, a capped stub is not', () => {
  const said = (name: string): string => `${run.role(name)}: ${run.pipe(name).reason}`;
  for (const name of ['CO-E', 'E-A'])
    expect(said(name)).toBe('idle: it extends to a cleanout: nothing drains or vents through it');
  expect(said('C-B')).toBe('idle: no water and no air of a trap passes');
  expect(plainText(checkText(run.result))).toContain('2 cleanout extensions');
});

test('the stub is a dead end, the extension none', () => {
  expect(run.findings('dead-end').map(({ about }) => about)).toEqual([[run.pipe('C-B').globalId]]);
});
