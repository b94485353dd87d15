import { createHash } from 'node:crypto';
import { expect, test } from 'vitest';
import { readModel } from '../../src/ifc/open.ts';
import { fullId } from '../../src/model/answer-keys.ts';
import { noAnswers } from '../../src/model/answers.ts';
import { matchAnswers } from '../../src/model/match-answers.ts';
import { codeOf, runModel } from '../support/run-sketch.ts';
import { sketch } from '../support/sketch.ts';
import { ifcOf } from '../support/write-ifc.ts';

// A wing that was copied into a second file, 6 m away: every GlobalId stands in both. Its drain has two open ends.
const wing = sketch(`
model "Wing"
storey "Ground floor" at 0
slab "Slab" from -1 -1 to 9 3 top 0 thick 0.2
node A at 0 0 -0.3
node B from A east 4 fall 1:50
node HIGH from B east 3 rise 1:50
node LOW from B south 2 fall 1:50
node T from A north 0.4 rise 1:50
closet W from T to 0, tank
drain 3 in: W > T > A > B > LOW
drain 3 in: HIGH > B
cap C from A west 0.5 rise 1:50
drain 3 in: C > A
vent 3 in: A > V (to 5)
terminal V
`);
const model = readModel(
  [
    { name: 'west.ifc', bytes: new TextEncoder().encode(ifcOf(wing)) },
    { name: 'east.ifc', bytes: new TextEncoder().encode(ifcOf(wing, { shift: [0, 6, 0] })) },
  ],
  (bytes) => createHash('sha256').update(bytes).digest('hex'),
);
const idOf = (name: string, file: number): string =>
  fullId(model.elements.find((element) => element.name === name && element.file === file)!);
const run = (answers: Parameters<typeof runModel>[1] & object = {}) =>
  runModel(model, {
    answers: matchAnswers({ ...noAnswers, ...answers.answers }, model, codeOf('npc-2020').series, 'answers.json'),
  }).result;
const endsOf = (result: ReturnType<typeof run>): string[] =>
  result.systems.map(({ sewerEnd }) => `${sewerEnd.pipe} ${sewerEnd.how}`).sort();

test('without answers each wing leaves by its lower end', () => {
  expect(model.elements.filter(({ file }) => file === 1).length).toBe(model.elements.length / 2);
  expect(endsOf(run())).toEqual([`${idOf('B-LOW', 0)} ports`, `${idOf('B-LOW', 1)} ports`].sort());
});

test('a sewer end that is answered for the second file is that of the second alone', () => {
  const result = run({ answers: { sewerEnds: [idOf('HIGH-B', 1)] } });
  expect(endsOf(result)).toEqual([`${idOf('B-LOW', 0)} ports`, `${idOf('HIGH-B', 1)} answer`].sort());
  expect(result.answers).toEqual([{ part: 'sewerEnds', key: idOf('HIGH-B', 1), field: null, value: true, meets: 1 }]);
});

test('a GlobalId or a name alone answers for both', () => {
  const both = [`${idOf('HIGH-B', 0)} answer`, `${idOf('HIGH-B', 1)} answer`].sort();
  const { globalId } = model.elements.find(({ name }) => name === 'HIGH-B')!;
  for (const key of [globalId, 'name:HIGH-B']) expect(endsOf(run({ answers: { sewerEnds: [key] } }))).toEqual(both);
});

test('so it is with cleanouts: the stub behind one leads nowhere by intent', () => {
  const deadEnds = (keys: readonly string[]): number =>
    run({ answers: { cleanouts: keys } }).findings.filter(({ code, about }) => {
      const stubs = [idOf('C-A', 0), idOf('C-A', 1)];
      return code === 'dead-end' && about.some((id) => stubs.includes(id));
    }).length;
  expect([deadEnds([]), deadEnds([idOf('C', 0)]), deadEnds(['name:C'])]).toEqual([2, 1, 0]);
});
