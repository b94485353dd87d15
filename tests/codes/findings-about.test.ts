import { expect, test } from 'vitest';
import { armOf, hall } from '../support/rows.ts';
import { runSketch } from '../support/run-sketch.ts';
import { floorOf, tower } from '../support/towers.ts';

// A finding is about the pipes and the fixtures that a designer has to look at, the one to change first.
const lavatory = 'lavatory, trap 1 1/4 in';
const times = (count: number): string[][] => Array.from({ length: count }, () => [lavatory]);

/** By name, of the first finding of that code that fits. */
const about = (text: string, code: string, finding: string, fits: Readonly<Record<string, unknown>> = {}): string[] => {
  const run = runSketch(text, { code });
  const names = new Map([...run.result.pipes, ...run.result.fixtures].map(({ globalId, name }) => [globalId, name]));
  const found = run
    .findings(finding)
    .find(({ facts }) => Object.entries(fits).every(([fact, value]) => facts[fact] === value));
  return (found?.about ?? []).map((id) => names.get(id) ?? id);
};

const threeAtOneJoint = hall(
  'Drains at one joint',
  `node J at 0 0 -0.4
drain 3 in: J > K (east 0.8 fall 1:48) > BF (to -1.2) > OUT (east 9 fall 1:48)
${['south', 'north', 'west']
  .map(
    (side, n) =>
      `trap T${n} from J ${side} 0.4 rise 1:48\nbathtub F${n} from T${n} to 0, trap 1 1/2 in\ndrain 1 1/2 in: F${n} > T${n} > J`,
  )
  .join('\n')}
vent 2 in: J > VT (to 4.2)
terminal VT
sewer OUT`,
);
test.each(['ipc-2021', 'upc-2021'])('%s, three drains at one vent: the vent and the three', (code) => {
  expect(about(threeAtOneJoint, code, 'common-vent-not-allowed')).toEqual(['J-VT', 'F0', 'F1', 'F2']);
});

test('a shower with an island vent: all of the vent, and the shower', () => {
  const island = hall(
    'An island',
    `trap T at 0 0 0.4
shower F from T up 0.2, trap 1 1/2 in
drain 2 in: F > T > J (east 0.3 fall 1:48) > D (to -0.4) > K (east 2 fall 1:48) > OUT (east 6 fall 1:48)
vent 1 1/2 in: J > UP (up 0.5) > A (south 0.4) > DN (to -0.3) > W (south 3 rise 1:48) > VT (to 4.2)
terminal VT
sewer OUT`,
  );
  expect(about(island, 'upc-2021', 'island-vent-not-allowed')).toEqual(['J-UP', 'UP-A', 'A-DN', 'DN-W', 'W-VT', 'F']);
});

test('a drain near the foot of a stack: the drain, then the stack', () => {
  const joined = tower(times(2), {
    more: `node J90 from SF east 0.9 fall 1:50${armOf(90, lavatory, { vented: true, length: 0.5 })}`,
  }).replace('OUT (east 9 fall 1:50)', 'J90 > OUT (east 9 fall 1:50)');
  expect(about(joined, 'npc-2020', 'branch-near-foot')).toEqual(['V90-J90', 'S2-S1', 'S1-SF']);
});

test('vents that meet too low: the pipe that meets, the fixture that floods, the rest of the vent', () => {
  const meeting = hall(
    'Two vents',
    `sink S at 0 0 0.6, trap 1 1/2 in, rim 0.9
trap T from S down 0.15
floor-drain D at 4 0 0, untrapped, trap 2 in
trap DT from D down 0.5
drain 1 1/2 in: S > T > J (east 0.5 fall 1:50) > F (to -0.6) > DJ (over E fall 1:50) > OUT (east 5 fall 1:50)
drain 2 in: D > DT > E (north 0.5 fall 1:50) > DJ
vent 3 in: J > M (to 0.6) > A (to 0.8) > VT (to 4.2)
vent 2 in: E > B (to 0.7) > A
terminal VT
sewer OUT`,
  );
  expect(about(meeting, 'npc-2020', 'vent-joins-too-low')).toEqual(['J-M', 'S', 'M-A', 'A-VT']);
});

test('a yoke vent that an offset lacks: the top of the stack and the offset', () => {
  const stepped = tower([[], [], [], ...times(12)], {
    ventStack: true,
    offset: 1,
    yokes: [11, 6],
    more: `node J90 from OB down 3${armOf(90, lavatory, { vented: true, length: 0.5, floor: floorOf(2) + 1.5, sky: 50 })}`,
  })
    .replace('VF (down 0.3) > OA', 'OA')
    .replace('SF (to -1.6)', 'J90 > VF (down 0.3) > SF (to -1.6)');
  expect(about(stepped, 'npc-2020', 'yoke-vent-missing', { offset: true })).toEqual(['S15-S14', 'OA-OB']);
});

test('drains that no cleanout reaches: all of them, the farthest first', () => {
  const long = hall(
    'A long drain',
    `node J1 at 0 0 -0.4
node J2 from J1 east 0.5 fall 1:50
cleanout CO from J1 west 0.3 up 0.3, 3 in
trap T1 from J1 south 0.3 rise 1:50
trap T2 from J2 south 0.3 rise 1:50
lavatory L1 from T1 to 0.1, trap 1 1/4 in
lavatory L2 from T2 to 0.1, trap 1 1/4 in
drain 1 1/4 in: L1 > T1 > J1
drain 1 1/4 in: L2 > T2 > J2
drain 3 in: CO > J1
drain 3 in: J1 > J2 > K (east 13.5 fall 1:50) > M (east 2 fall 1:50) > N (east 2 fall 1:50) > OUT (down 1)
vent 3 in: J1 > VT (to 4.2)
terminal VT
sewer OUT`,
  );
  // 15 m one way at 3 in (Table 2.4.7.2.): the ends of M and N lie 16 and 18 m away.
  expect(about(long, 'npc-2020', 'cleanout-missing', { what: 'spacing' })).toEqual(['M-N', 'K-M']);
});

test('a vent that runs level too low: the pipe from the drain, the fixture that floods, the rest of the vent', () => {
  const low = hall(
    'A level vent',
    `sink S at 0 0 0.6, trap 1 1/2 in, rim 0.9
trap T from S down 0.15
drain 1 1/2 in: S > T > J (east 0.5 fall 1:48) > F (to -0.6) > OUT (east 5 fall 1:48)
vent 1 1/2 in: J > A (to 0.7) > B (south 2 rise 1:48) > VT (to 4.2)
terminal VT
sewer OUT`,
  );
  // 6 in above the flood level at 0.9 m before it runs level (905.4).
  expect(about(low, 'ipc-2021', 'dry-vent-too-flat')).toEqual(['J-A', 'S', 'A-B', 'B-VT']);
});

test('a branch near an inclined offset that has no vent: the offset, and the top of its stack', () => {
  const inclined = tower(times(6), { stack: '2 in' })
    .replace('node S1 at 0 0 -0.4', 'node S1 at 0.8 0 -0.4')
    .replace('S2 > S1', 'S2 > OA (to 0.7) > OB (east 0.8 down 0.8) > S1');
  expect(about(inclined, 'ipc-2021', 'offset-relief-vent-missing')).toEqual(['OA-OB', 'S6-S5']);
});
