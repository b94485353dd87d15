import { expect, test } from 'vitest';
import { fittingsOf } from '../../src/study/row-fittings.ts';
import { hall } from '../support/rows.ts';
import { outcomeOf, sampleText } from '../support/weigh-sketch.ts';

const told = (text: string): Record<string, number> => {
  const outcome = outcomeOf(text);
  const counts: Record<string, number> = {};
  const all = outcome.network.pipes.map(({ id }) => id);
  for (const { kind, angle, size, branch } of fittingsOf(outcome, all, () => false)) {
    const name = [kind, angle, branch === null ? size : `${size} x ${branch}`]
      .filter((part) => part !== null)
      .join(' ');
    counts[name] = (counts[name] ?? 0) + 1;
  }
  return counts;
};

test('the hall, circuit vented, counted off its sketch joint by joint', () => {
  expect(told(sampleText('hall-circuit-vented'))).toEqual({
    'bend 90 2 in': 1, // K0
    'bend 45 3 in': 2, // K1, K2
    'bend 90 3 in': 3, // JD, BF, WB
    'bend 90 1½ in': 1, // RT
    'junction 3 in x 2 in': 6, // J2 to J7
    'junction 3 in x 1½ in': 3, // CV, RV, WV
    'junction 3 in x 3 in': 2, // JW, CB
    'junction 1½ in x 1½ in': 1, // VJ
    'double-junction 1½ in x 1¼ in': 1, // LJ
    'reducer 3 in x 2 in': 1, // at CV: the first urinal's drain
    'reducer 4 in x 3 in': 1, // at CB: the building sewer
  });
});

test('a plain line: a bend of 22.5 degrees is one, a joint that goes on straight is a coupling, a cut is nothing', () => {
  // 0.4142 north to 1 east is 22.5 degrees.
  const text = hall(
    'A line',
    `node J at 0 0 0.5
trap T from J south 0.3 rise 1:50
lavatory L from T up 0.12, trap 1 1/4 in
drain 1 1/4 in: L > T > J
vent 1 1/2 in: J > VT (to 4.2)
terminal VT
drain 3 in: J > F (to -0.4) > A (east 2 fall 1:50) > B (east 2 north 0.8284 fall 1:50) > C (east 2 north 0.8284 fall 1:50)
sewer C`,
  );
  // The lavatory needs 1¼ in all the way but the building drain 3 in; its vent 1¼ in.
  const counts = told(text);
  expect(Object.keys(counts).filter((name) => name.startsWith('bend 22.5'))).toHaveLength(1);
  expect(
    Object.entries(counts)
      .filter(([name]) => name.startsWith('coupling'))
      .map(([, count]) => count),
  ).toEqual([1]);
});
