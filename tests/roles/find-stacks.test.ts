import { describe, expect, test } from 'vitest';
import { runSketch } from '../support/run-sketch.ts';

// Two sinks under the roof of three storeys of 3 m; their branch drops on its way to a stack that takes two more below.
const building = (drop: number): string => `
storey "First" at 0
storey "Second" at 3
storey "Third" at 6
node B at 0 0 5.7
node A from B west 1 rise 1:50
node TA from A north 0.4 rise 1:50
node TB from B north 0.4 rise 1:50
on "Third"
sink S1 from TA to 6.6, trap 1 1/2 in
sink S2 from TB to 6.6, trap 1 1/2 in
trap TA
trap TB
drain 1 1/2 in: S1 > TA > A
drain 1 1/2 in: S2 > TB > B
drain 2 in: A > B > C (east 0.5 fall 1:50) > D (down ${drop}) > E (east 2 fall 1:50)
on "Second"
node M from E to 2.7
node TM from M north 0.4 rise 1:50
sink S3 from TM to 3.6, trap 1 1/2 in
sink S4 from TN to 3.6, trap 1 1/2 in
node N from M west 0.5 rise 1:50
node TN from N north 0.4 rise 1:50
trap TM
trap TN
drain 1 1/2 in: S3 > TM > M
drain 1 1/2 in: S4 > TN > N
drain 2 in: N > M
drain 2 in: E > M > F (to -0.5)
on "First"
drain 3 in: F > G (east 4 fall 1:50)
sewer G
vent 2 in: A > V (to 12)
terminal V
`;

describe('a level drain that drops before it comes to the top of a stack', () => {
  const rolesOf = (drop: number): string[] => {
    const run = runSketch(building(drop));
    return ['C-D', 'D-E', 'E-M', 'M-F'].map((name) => {
      const { role, also } = run.pipe(name);
      return [role, ...(also ?? [])].includes('stack') ? 'stack' : 'branch';
    });
  };

  // Half a storey of 3 m is 1.5 m: what drops less passes none, and the stack begins where it turns down for good.
  test.each([0.5, 1.2, 1.4])('%s m: a branch of the stack', (drop) =>
    expect(rolesOf(drop)).toEqual(['branch', 'branch', 'stack', 'stack']),
  );
  test('1.6 m: the stack passes its storey there, and goes on after an offset', () =>
    expect(rolesOf(1.6)).toEqual(['stack', 'stack', 'stack', 'stack']));
});
