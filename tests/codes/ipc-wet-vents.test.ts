import { describe, expect, test } from 'vitest';
import { armOf, hall } from '../support/rows.ts';
import { runSketch, type SketchRun } from '../support/run-sketch.ts';
import { at48 } from '../support/stack-rows.ts';

// International Plumbing Code 911 and 912: common and wet vents. Table 912.3: 1½ in 1, 2 in 4, 2½ in 6, 3 in 12.
// Table 911.3 (load of the upper fixture): 1½ in 1, 2 in 4, 2½ and 3 in 6. Rules IPC-R45, R46, R51 to R58.
const codes = ['ipc-2015', 'ipc-2018', 'ipc-2021', 'ipc-2024'];
const private_ = { use: 'private', omitSizes: ['2½ in'] };
const run = (text: string, settings: Record<string, string | readonly string[]> = private_, code = 'ipc-2021') =>
  runSketch(at48(text), { code, answers: { settings } });
const only = (done: SketchRun) => {
  expect(done.result.batteries).toHaveLength(1);
  return done.result.batteries[0]!;
};
const broken = (done: SketchRun) => only(done).broken.map(({ rule, facts }) => [rule, Object.keys(facts)[0]]);

/**
 * A lavatory with a dry vent at `LJ`, dropping to `LF`, then level past the fixtures at `J1` on, and out. `room` puts all
 * into one space.
 */
const bathroom = (fixtures: readonly string[], { room = false, head = 'lavatory, trap 1 1/4 in', more = '' } = {}) =>
  hall(
    'A bathroom',
    `${room ? 'space "Bathroom" from -2 -2 to 6 2 height 2.6' : ''}
node LJ at 0 0 0.5
trap TL from LJ south 0.4 rise 1:48
${head.split(', ')[0]} L from TL up 0.12, ${head.split(', ')[1]}
drain 1 1/2 in: L > TL > LJ
drain 3 in: LJ > LF (to -0.4)${fixtures.map((_, n) => ` > J${n + 1} (east 0.7 fall 1:48)`).join('')} > K (east 0.7 fall 1:48) > BF (to -1.2) > OUT (east 9 fall 1:48)
${fixtures.map((what, n) => armOf(n + 1, what)).join('')}
vent 2 in: LJ > VT (to 4.2)
terminal VT
sewer OUT
${more}`,
  );
const tub = 'bathtub, trap 1 1/2 in';
const closet = 'closet, tank';

describe('W06 one private bathroom, horizontal wet vent: lavatory 1, tub 2, closet 3', () => {
  const done = run(bathroom([tub, closet]));

  test('1½, 2, 3 in along the flow: 1; 3; past the closet 6, and a closet needs 3 in (912.3, 710.1(1))', () => {
    expect(only(done)).toMatchObject({ reading: 'wet-vent', broken: [] });
    expect(['LF-J1', 'J1-J2', 'J2-K'].map((pipe) => `${done.role(pipe)} ${done.size(pipe)}`)).toEqual([
      'wet-vent 1½ in',
      'wet-vent 2 in',
      'branch 3 in',
    ]);
    expect(done.pipe('J1-J2').ventLoad).toEqual({ least: 3, most: 3 });
    expect(done.findings().filter(({ severity }) => severity === 'error')).toEqual([]);
  });

  test('its dry vent is half of 3 in, the closet’s drain: 1½ in (912.3, 906.2)', () => {
    expect([done.role('LJ-VT'), done.size('LJ-VT')]).toEqual(['continuous-vent', '1½ in']);
    expect(done.pipe('LJ-VT').trail.find(({ rule }) => rule === 'IPC-R57')?.facts.wetVent).toBe('3 in');
  });

  test('without a closet the largest wet pipe is 2 in, and half of it 1¼ in', () => {
    expect(run(bathroom([tub, 'shower, trap 2 in'])).size('LJ-VT')).toBe('1¼ in');
  });

  test('in one room the group counts 5, not 6, on what carries all of it (709.1); in public rooms its parts add up', () => {
    const inRoom = run(bathroom([tub, closet], { room: true }));
    expect([inRoom.pipe('J1-J2').load.most, inRoom.pipe('J2-K').load.most]).toEqual([3, 5]);
    const inPublic = run(bathroom([tub, closet], { room: true }), { use: 'public' });
    expect(inPublic.pipe('J2-K').load.most).toBe(7);
    const unsaid = run(bathroom([tub, closet], { room: true }), {});
    expect(unsaid.pipe('J2-K').load).toEqual({ least: 5, most: 7 });
  });

  test('a bidet of the room belongs to the group and adds nothing', () => {
    const done = run(bathroom([tub, 'bidet, trap 1 1/4 in', closet], { room: true }));
    expect(done.pipe('J3-K').load.most).toBe(5);
  });
});

test('W07 two private groups on one wet vent: 10, past 2½ in (6): 3 in; dry vent 1½ in', () => {
  const two = bathroom([tub, 'lavatory, trap 1 1/4 in', tub, closet, closet]);
  const done = run(two);
  expect(only(done)).toMatchObject({ reading: 'wet-vent', broken: [] });
  // 1 + 2 + 1 + 2 + 3 = 9 before the second closet: past 4 and 6.
  expect([done.pipe('J4-J5').load.most, done.size('J4-J5')]).toEqual([9, '3 in']);
  expect(done.size('LJ-VT')).toBe('1½ in');
});

describe('Table 912.3 at its limits, loads through the section', () => {
  test.each([
    { before: [], load: 1, size: '1½ in' },
    { before: [tub], load: 3, size: '2 in' },
    { before: ['lavatory, trap 1 1/4 in'], load: 2, size: '2 in' },
    { before: [tub, 'lavatory, trap 1 1/4 in'], load: 4, size: '2 in' },
    { before: [tub, tub], load: 5, size: '2½ in' },
    { before: [tub, tub, 'lavatory, trap 1 1/4 in'], load: 6, size: '2½ in' },
    { before: [tub, tub, 'lavatory, trap 1 1/4 in', 'bidet, trap 1 1/4 in'], load: 7, size: '3 in' },
  ])('$load: $size', ({ before, load, size }) => {
    const done = run(bathroom([...before, closet]), { use: 'private' });
    const section = before.length === 0 ? 'LF-J1' : `J${before.length}-J${before.length + 1}`;
    expect([done.pipe(section).load.most, done.size(section)]).toEqual([load, size]);
  });

  test('the last row, 12, holds; one past it no size: overloaded', () => {
    const twelve = run(
      bathroom([tub, tub, 'lavatory, trap 1 1/4 in', closet, 'bidet, trap 1 1/4 in', 'bidet, trap 1 1/4 in', closet]),
      {
        use: 'public',
      },
    );
    // 1 + 2 + 2 + 1 + 4 + 1 + 1 = 12 before the last closet.
    expect([twelve.pipe('J6-J7').load.most, twelve.size('J6-J7')]).toEqual([12, '3 in']);
    // Closets above 1.6 gal count 6 in public use: 1 + 2 + 2 + 1 + 1 + 6 = 13 before the second.
    const text = bathroom([tub, tub, 'lavatory, trap 1 1/4 in', 'bidet, trap 1 1/4 in', closet, closet]);
    const over = runSketch(at48(text), {
      code: 'ipc-2021',
      answers: {
        settings: { use: 'public' },
        fixtures: new Map([5, 6].map((n) => [`name:F${n}`, { detail: { flushLitres: 13 } }])),
      },
    });
    expect([over.pipe('J5-J6').load.most, over.size('J5-J6')]).toEqual([13, 'none']);
    expect(over.findings('wet-vent-overloaded').map(({ clause }) => clause)).toEqual(['912.3, Table 912.3']);
  });
});

describe('who may be wet vented (912.1, R51)', () => {
  test.each(codes)('%s: a kitchen sink, a urinal, a washer, a fountain may not', (code) => {
    for (const what of [
      'kitchen-sink, trap 1 1/2 in',
      'urinal, washout, trap 2 in',
      'clothes-washer, trap 2 in',
      'drinking-fountain, trap 1 1/4 in',
    ])
      expect(broken(run(bathroom([tub, what, closet]), private_, code))).toEqual([['IPC-R51', 'outsideGroup']]);
  });

  test('closet and lavatory alone may: any combination of a group', () => {
    expect(broken(run(bathroom([closet])))).toEqual([]);
  });

  test('two groups may, three lavatories make a third', () => {
    const lav = 'lavatory, trap 1 1/4 in';
    expect(broken(run(bathroom([lav, tub, tub])))).toEqual([]);
    expect(broken(run(bathroom([lav, lav, tub])))).toEqual([['IPC-R51', 'bathroomGroups']]);
  });

  test('other fixtures join downstream of it, with vents of their own', () => {
    const mop = armOf('M', 'mop-sink, trap 2 in', { vented: true }).replaceAll('JM', 'K');
    expect(broken(run(bathroom([tub, closet], { more: mop })))).toEqual([]);
  });
});

describe('where its dry vent stands (912.2, R54)', () => {
  test('not on an emergency floor drain', () => {
    const done = run(bathroom([tub, closet], { head: 'shower, trap 2 in' }));
    expect(broken(done)).toEqual([]);
    const drained = run(
      bathroom([tub, closet]).replace(
        'lavatory L from TL up 0.12, trap 1 1/4 in',
        'floor-drain L from TL up 0.12, emergency, untrapped, trap 2 in',
      ),
    );
    expect(broken(drained)).toEqual([['IPC-R54', 'emergencyVent']]);
  });
});

describe('vertical wet vents: closets at one level, all else there or above (912.1.1, R53)', () => {
  /** Fixtures on one vertical pipe, 0.7 m apart from the top down. */
  const column = (fixtures: readonly string[]) =>
    hall(
      'A vertical wet vent',
      `drain 3 in: C1 > ${fixtures
        .slice(1)
        .map((_, n) => `C${n + 2}`)
        .join(' > ')} > BF (to -1.2) > OUT (east 9 fall 1:48)
${fixtures
  .map((what, n) => {
    const [word = '', detail = ''] = what.split(', ');
    const closetHere = word === 'closet';
    return `node C${n + 1} at 0 0 ${(fixtures.length - n) * 0.35 - 0.4}
${closetHere ? `node X${n} from C${n + 1} ${n % 2 === 0 ? 'south' : 'north'} 0.5 rise 1:48\ncloset F${n + 1} from X${n} up 0.2, tank\ndrain 3 in: F${n + 1} > X${n} > C${n + 1}` : `trap X${n} from C${n + 1} ${n % 2 === 0 ? 'south' : 'north'} 0.5 rise 1:48\n${word} F${n + 1} from X${n} up 0.2, ${detail}\ndrain 1 1/2 in: F${n + 1} > X${n} > C${n + 1}`}`;
  })
  .join('\n')}
vent 2 in: C1 > VT (to 4.2)
terminal VT
sewer OUT`,
    );
  const lav = 'lavatory, trap 1 1/4 in';

  test('lavatory, tub, closet from the top: holds', () => {
    const done = run(column([lav, tub, closet]));
    expect([only(done).reading, broken(done)]).toEqual(['wet-vent', []]);
    expect(['C1-C2', 'C2-C3'].map((pipe) => done.size(pipe))).toEqual(['1½ in', '2 in']);
  });

  test('a tub below the closet: not', () => {
    expect(broken(run(column([lav, closet, tub])))).toEqual([['IPC-R53', 'closetUpstream']]);
  });

  test('two closets at two levels: not', () => {
    expect(broken(run(column([lav, closet, closet])))).toContainEqual(['IPC-R53', 'closetsApart']);
  });

  describe('two fixtures on it share a common vent at two levels (911.3, Table 911.3, R46)', () => {
    test.each([
      { upper: lav, size: '1½ in', why: 'W14: upper 1' },
      { upper: 'sink, trap 1 1/2 in', size: '2 in', why: 'W14 swapped: upper 2' },
      { upper: 'urinal, washout, trap 2 in', size: '2 in', why: 'upper 2' },
      { upper: 'shower, heads 6, trap 3 in', size: '2½ in', why: 'upper 5: past 4' },
      { upper: 'shower, heads 12, trap 4 in', size: '2½ in', why: 'upper 6, the limit itself' },
    ])('$why: $size', ({ upper, size }) => {
      const done = run(column([upper, 'sink, trap 1 1/2 in']), {});
      expect([only(done).reading, broken(done)]).toEqual(['common-vent', []]);
      const step = done.pipe('C1-C2').trail.find(({ rule }) => rule === 'IPC-R46');
      expect(step?.asks?.label).toBe(size);
      expect([done.role('C1-C2'), done.role('C1-VT')]).toEqual(['common-vent', 'dual-vent']);
      expect(done.fixture('F2').ventedBy.how).toBe('common-vent');
    });

    test('not with a closet above', () => {
      const done = run(column([closet, lav]));
      expect(only(done).others.find(({ reading }) => reading === 'common-vent')?.broken[0]?.facts).toEqual({
        closetAbove: true,
      });
    });
  });
});

describe('common vent at one level: at the joint of two drains or past it (911.2, R45)', () => {
  const pair = (past: boolean, second = 'urinal, washout, trap 2 in') =>
    hall(
      'Two drains and a vent',
      `node J at 0 0 -0.4
drain 2 in: J${past ? ' > V (east 0.5 fall 1:48)' : ''} > K (east 0.8 fall 1:48) > BF (to -1.2) > OUT (east 9 fall 1:48)
trap T1 from J south 0.4 rise 1:48
urinal F1 from T1 to 0, washout, trap 2 in
drain 2 in: F1 > T1 > J
trap T2 from J north 0.4 rise 1:48
${second.split(', ')[0]} F2 from T2 to 0, ${second.split(', ').slice(1).join(', ')}
drain 2 in: F2 > T2 > J
vent 2 in: ${past ? 'V' : 'J'} > VT (to 4.2)
terminal VT
sewer OUT`,
    );

  test('at the joint: a vent of two, 1¼ in: 4 units drain, 2 in, and half of it is less', () => {
    const done = run(pair(false), { use: 'public' });
    expect([done.role('J-VT'), done.size('J-VT')]).toEqual(['dual-vent', '1¼ in']);
    expect(done.findings('unvented-trap')).toEqual([]);
  });

  test('past the joint: both arms are measured to it', () => {
    const done = run(pair(true), { use: 'public' });
    expect([only(done).reading, done.role('V-VT'), done.role('J-V')]).toEqual(['common-vent', 'dual-vent', 'branch']);
    expect([done.fixture('F1').ventedBy.how, done.fixture('F2').ventedBy.how]).toEqual(['common-vent', 'common-vent']);
    expect(done.fixture('F1').trapArm?.length).toBeCloseTo(0.9, 2);
    expect([done.size('V-VT'), done.findings('unvented-trap')]).toEqual(['1¼ in', []]);
  });

  test('the Canadian code has no such vent: its traps have none', () => {
    expect(runSketch(pair(true), { code: 'npc-2020' }).findings('unvented-trap')).toHaveLength(2);
  });

  test('three drains at one joint are one too many', () => {
    const three = pair(false).replace(
      'sewer OUT',
      `trap T3 from J west 0.4 rise 1:48
urinal F3 from T3 to 0, washout, trap 2 in
drain 2 in: F3 > T3 > J
sewer OUT`,
    );
    expect(
      run(three, { use: 'public' })
        .findings('common-vent-not-allowed')
        .map(({ clause }) => clause),
    ).toEqual(['911.1, 911.2']);
  });
});

describe('R54 one wet-vented fixture drain may join upstream of the dry vent (912.2.1; UPC 908.2.1, R46)', () => {
  /** Showers on the branch before the lavatory, whose vent it is, comes in at `LF`; a closet after it. */
  const upstream = (showers: number, code: string) => {
    const heads = Array.from({ length: showers }, (_, n) => `U${n + 1}`);
    return runSketch(
      hall(
        'Showers before the vent',
        `node LJ at 0 0 0.5
trap TL from LJ south 0.4 rise 1:48
lavatory L from TL up 0.12, trap 1 1/4 in
drain 1 1/2 in: L > TL > LJ
node LF from LJ to -0.4
${heads.map((head, n) => `node ${head} from LF west ${(showers - n) * 0.7} rise 1:48`).join('\n')}
drain 2 in: ${heads.join(' > ')} > LF
${heads.map((head, n) => armOf(`s${n}`, 'shower, trap 2 in').replaceAll(`Js${n}`, head)).join('')}
drain 3 in: LJ > LF > J1 (east 0.7 fall 1:48) > K (east 0.7 fall 1:48) > BF (to -1.2) > OUT (east 9 fall 1:48)
${armOf(1, closet)}
vent 3 in: LJ > VT (to 4.2)
terminal VT
sewer OUT`,
      ),
      { code, answers: { settings: { use: 'private' } } },
    );
  };
  test.each(['ipc-2021', 'upc-2021'])(
    '%s: one shower breathes through the lavatory’s drain, of two neither does',
    (code) => {
      const one = upstream(1, code);
      expect([one.fixture('Fs0').ventedBy.how, one.findings('unvented-trap')]).toEqual(['wet-vent', []]);
      expect(only(one).fixtures).toHaveLength(3);
      const two = upstream(2, code);
      expect(two.findings('unvented-trap')).toHaveLength(2);
    },
  );
});
