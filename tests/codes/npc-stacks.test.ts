import { describe, expect, test } from 'vitest';
import { armOf, times } from '../support/rows.ts';
import { runSketch, type SketchRun } from '../support/run-sketch.ts';
import { floorOf, type Tower, tower } from '../support/towers.ts';

// National Plumbing Code, stacks and their vents: rules R47, R67, R68, R70 to R72. Loads by Table 2.4.9.3.
const lavatory = 'lavatory, trap 1 1/4 in'; // 1
const closet = 'closet, tank'; // 4
const shower6 = 'shower, heads 6, trap 3 in'; // 6
const storeys = (count: number, each: readonly string[] = [lavatory]) => times(count, '').map(() => each);
const missing = (run: SketchRun) =>
  [
    'stack-vent-missing',
    'vent-stack-missing',
    'vent-stack-misplaced',
    'yoke-vent-missing',
    'offset-relief-vent-missing',
  ].flatMap((code) => run.findings(code).map(() => code));

describe('R67 every stack goes on upward as a stack vent', () => {
  test('the pipe goes on to the roof: stack vent', () => {
    const run = runSketch(tower(storeys(3, [closet])));
    expect([run.role('S3-VH'), run.role('VH-VT'), missing(run)]).toEqual(['stack-vent', 'stack-vent', []]);
  });

  test('it ends at its highest branch: missing', () => {
    expect(missing(runSketch(tower(storeys(3, [closet]), { stackVent: false })))).toEqual(['stack-vent-missing']);
  });
});

describe('R68 vent stack: where fixtures drain from more than four storeys', () => {
  test('four storeys: none; five: one', () => {
    expect(missing(runSketch(tower(storeys(4))))).toEqual([]);
    expect(missing(runSketch(tower(storeys(5))))).toEqual(['vent-stack-missing']);
  });

  test('five storeys with one, from just below the lowest branch', () => {
    const run = runSketch(tower(storeys(5), { ventStack: true }));
    expect(missing(run)).toEqual([]);
    expect(['VF-VB', 'VB-VU', 'VU-VH', 'S5-VH', 'VH-VT'].map((pipe) => run.role(pipe))).toEqual([
      ...times(3, 'vent-stack'),
      'stack-vent',
      'stack-vent',
    ]);
  });

  test('its foot on the level drain, not on a vertical part: misplaced', () => {
    const text = tower(storeys(5), { ventStack: true })
      .replace('VF (down 0.3) > SF (to -1.6) >', 'SF (to -1.6) > VF (east 1 fall 1:50) >')
      .replace('OUT (east 9', 'OUT (east 8');
    const run = runSketch(text);
    expect([run.role('VF-VB'), missing(run)]).toEqual(['vent-stack', ['vent-stack-misplaced']]);
  });

  test('its foot above the lowest branch: misplaced', () => {
    const text = tower(storeys(5), { ventStack: true }).replace(
      'S2 > S1 > VF (down 0.3) >',
      'S2 > VF (down 0.3) > S1 >',
    );
    const run = runSketch(text);
    expect([run.role('VF-VB'), missing(run)]).toEqual(['vent-stack', ['vent-stack-misplaced']]);
  });
});

/** A stack whose fixtures join without vents of their own: they breathe through it and its stack vent `S<top>-VT`. */
const wetStack = (each: readonly (readonly string[])[]): string => {
  const top = each.length;
  const down = each.map((_, at) => `S${top - at}`).join(' > ');
  const arms = each.flatMap((fixtures, at) =>
    fixtures.map((what, n) => {
      const joint = n === 0 ? `S${at + 1}` : `S${at + 1}`;
      const side = n === 0 ? 'south' : 'north';
      const [word = '', ...details] = what.split(', ');
      const name = `${at + 1}.${n + 1}`;
      return `on "Storey ${at + 1}"\ntrap T${name} from ${joint} ${side} 0.4 rise 1:50\n${word} F${name} from T${name} up 0.15, ${details.join(', ')}
drain ${/trap ([^,]*) in/.exec(what)?.[1]} in: F${name} > T${name} > ${joint}`;
    }),
  );
  return `model "A wet stack"
${each.map((_, at) => `storey "Storey ${at + 1}" at ${floorOf(at + 1)}`).join('\n')}
${each.map((_, at) => `node S${at + 1} at 0 0 ${floorOf(at + 1) + 0.5}`).join('\n')}
drain 3 in: ${down} > SF (to -0.6) > OUT (east 5 fall 1:50)
vent 3 in: S${top} > VT (to ${floorOf(top + 1) + 1})
${arms.join('\n')}
terminal VT
sewer OUT
roof "Roof" from -9 -9 to 9 9 top ${floorOf(top + 1)} thick 0.3`;
};

describe('R47 a wet vent over several storeys: at most 4 from each storey above the lowest', () => {
  const sink = 'kitchen-sink, trap 1 1/2 in'; // 1.5

  test('kitchen sinks on four storeys: 4 x 1.5, the lowest left out: 4.5, 3 in', () => {
    const run = runSketch(wetStack(storeys(4, [sink])));
    expect(run.result.batteries.map(({ reading, broken }) => [reading, broken])).toEqual([['wet-vent', []]]);
    for (const pipe of ['S4-S3', 'S3-S2', 'S2-S1'])
      expect([run.role(pipe), run.pipe(pipe).also, run.pipe(pipe).ventLoad?.most, run.size(pipe)]).toEqual([
        'wet-vent',
        ['stack'],
        4.5,
        '3 in',
      ]);
    // Below the lowest sink it is a plain stack; no vent stack is asked for a stack that is a wet vent.
    expect([run.role('S1-SF'), run.role('S4-VT'), missing(run)]).toEqual(['stack', 'stack-vent', []]);
  });

  test('two lavatories of 2 in all on each storey fit; 4.5 from an upper storey does not, and its traps are unvented', () => {
    expect(runSketch(wetStack(storeys(3, [lavatory, lavatory]))).findings('unvented-trap')).toEqual([]);
    const heavy = runSketch(wetStack([[sink], times(2, 'clinical-sink, trap 2 in'), [sink]]));
    // 3 + 3 = 6 from storey 2 (Table 2.4.10.2.): the stack is no wet vent; only the sink at its top has a vent.
    expect(heavy.findings('unvented-trap')).toHaveLength(3);
    expect([heavy.role('S2-S1'), heavy.fixture('F3.1').ventedBy.how]).toEqual(['stack', 'stack-vent']);
  });

  test('five storeys of wet vent: no vent stack; the stack vent keeps the wet vent’s size to open air (2.5.8.4.(4))', () => {
    const run = runSketch(wetStack(storeys(5, [sink])));
    // 6 counted: 3 in; the stack vent by Table 2.5.8.4., 3 in stack, row 10: 1½ in, but 3 in as the wet vent.
    expect([run.size('S5-S4'), run.size('S5-VT'), missing(run)]).toEqual(['3 in', '3 in', []]);
    const four = runSketch(wetStack(storeys(4, [sink])));
    expect(four.pipe('S4-VT').trail.map(({ asks }) => asks?.label)).not.toContain('3 in');
  });
});

describe('R70 fixtures on the foot of a vent stack: at most 8 units, in the lowest storey', () => {
  /** The vent stack's foot at `VB`; above it fixtures join at `VB`'s vertical part, the first at `VJ`, under the dry part. */
  const onFoot = (fixtures: readonly string[]): SketchRun => {
    const text = tower(storeys(5), { ventStack: true }).replace(
      'vent 3 in: VF > VB (north 0.5 rise 1:50) > VU',
      `node VB from VF north 0.5 rise 1:50
${fixtures.map((what, at) => armOf(`8${at}`, what).replaceAll('south', 'north')).join('')}
node J80 from VB up ${0.2 + 0.25 * fixtures.length}
${fixtures
  .slice(1)
  .map((_, at) => `node J8${at + 1} from J8${at} down 0.25`)
  .join('\n')}
drain 3 in: ${fixtures.map((_, at) => `J8${at}`).join(' > ')} > VB > VF
vent 3 in: J80 > VU`,
    );
    return runSketch(text.replace('VU (to', 'node-VU (to').replace('J80 > node-VU', 'J80 > VU'));
  };

  test('lavatory 1 and kitchen sink 1.5: fits; the foot is wet, and is a wet vent too', () => {
    const run = onFoot([lavatory, 'kitchen-sink, trap 1 1/2 in']);
    expect(missing(run)).toEqual([]);
    expect(run.pipe('J80-VU').role).toBe('vent-stack');
    expect(run.pipe('VB-VF')).toMatchObject({ role: 'vent-stack', portion: 'wet' });
    expect(run.findings('unvented-trap')).toEqual([]);
  });
});

describe('R71 yoke vents: more than eleven storeys, one for each five counted from the top', () => {
  const high = (count: number, more: Tower) => runSketch(tower(storeys(count), { ventStack: true, ...more }));

  test('eleven storeys: none', () => {
    expect(missing(high(11, {}))).toEqual([]);
  });

  test('fourteen storeys: sections 14-10, 9-5, 4-1: yokes at 10 and 5, the foot has the vent stack', () => {
    expect(missing(high(14, {}))).toEqual(['yoke-vent-missing', 'yoke-vent-missing']);
    const run = high(14, { yokes: [10, 5] });
    expect([missing(run), run.role('Y10-W10'), run.role('Y5-W5')]).toEqual([[], 'yoke-vent', 'yoke-vent']);
    expect(missing(high(14, { yokes: [10] }))).toEqual(['yoke-vent-missing']);
  });

  test('twelve storeys: sections 12-8, 7-3, 2-1: yokes at 8 and 3', () => {
    expect(missing(high(12, { yokes: [8, 3] }))).toEqual([]);
    expect(missing(high(12, { yokes: [8] }))).toEqual(['yoke-vent-missing']);
    // At the top of a section it is no vent for the section's foot.
    expect(missing(high(12, { yokes: [8, 6] }))).toEqual(['yoke-vent-missing']);
    // A storey further down it stands in the next section.
    expect(missing(high(12, { yokes: [7, 3] }))).toEqual(['yoke-vent-missing']);
  });

  test('sixteen: 16-12, 11-7, 6-2, 1: the third yoke at storey 2; fifteen: 15-11, 10-6, 5-1 ends at the foot', () => {
    expect(missing(high(16, { yokes: [12, 7, 2] }))).toEqual([]);
    expect(missing(high(16, { yokes: [12, 7] }))).toEqual(['yoke-vent-missing']);
    expect(missing(high(15, { yokes: [11, 6] }))).toEqual([]);
  });

  test('the foot is that of the lowest storey served: fifteen storeys above three without fixtures', () => {
    const above = (yokes: readonly number[]) =>
      missing(runSketch(tower([[], [], [], ...storeys(15)], { ventStack: true, yokes })));
    expect([above([14, 9]), above([14])]).toEqual([[], ['yoke-vent-missing']]);
  });

  test('drains that run over the floor: the yoke vent below such a drain stands in the storey itself', () => {
    const lower = tower(storeys(12), { ventStack: true, yokes: [8, 3] }).replace(
      /^(storey "Storey \d+" at) (\d+)$/gm,
      (_, head: string, floor: string) => `${head} ${(Number(floor) - 0.8).toFixed(1)}`,
    );
    expect(missing(runSketch(lower))).toEqual([]);
  });
});

describe('R71 storeys that are tied to the vent stack already need no yoke vents', () => {
  /** Twelve storeys; each fixture's vent runs into the vent stack at `W<storey>`. */
  const tied = (size: string, fixture: string, apart = 0) => {
    const all = Array.from({ length: 12 }, (_, at) => at + 1).filter((storey) => storey !== apart);
    const text = all.reduce(
      (drawn, n) =>
        drawn.replace(
          new RegExp(`vent 1 1/2 in: V${n}\\.1 > VT${n}\\.1 .*\\n.*terminal VT${n}\\.1`),
          `vent ${size}: V${n}.1 > U${n} (to ${floorOf(n) + 1}) > W${n}`,
        ),
      tower(storeys(12, [fixture]), { ventStack: true }),
    );
    const on = all.map((n) => `W${n} (to ${floorOf(n) + 1.1})`).join(' > ');
    return missing(runSketch(text.replace('VB (north 0.5 rise 1:50) > VU', `VB (north 0.5 rise 1:50) > ${on} > VU`)));
  };

  test('by vents of 2 in where the branch is larger; smaller ones do not', () => {
    expect(tied('2 in', closet)).toEqual([]); // 3 in branches
    expect(tied('1 1/2 in', closet)).toEqual(['yoke-vent-missing', 'yoke-vent-missing']);
    // Every storey is to be tied: one that has its own way to the sky is not.
    expect(tied('2 in', closet, 12)).toEqual(['yoke-vent-missing', 'yoke-vent-missing']);
  });
});

describe('R72 offset relief vents', () => {
  // Storeys 1 to 3 hold the offset and the lower part; the upper part passes those above.
  const stepped = (upper: readonly (readonly string[])[], offset: number, more = '') =>
    runSketch(tower([[], [], [], ...upper], { offset, more }));
  const twenty = [...times(3, shower6), 'mop-sink, trap 2 in']; // 20

  test('six storeys of 20, 120, 2 m aside: two are due', () => {
    expect(
      missing(
        stepped(
          times(6, '').map(() => twenty),
          2,
        ),
      ),
    ).toContain('offset-relief-vent-missing');
  });

  test('with both: none is missing, and they are named', () => {
    const vents = `node RA from OA up 0.3
node RB from OB down 0.5
vent 2 in: RA > RA1 (to 33)
terminal RA1
vent 2 in: RB > RB1 (north 1 rise 1:50) > RB2 (to 33)
terminal RB2`;
    const text = tower([[], [], [], ...times(6, '').map(() => twenty)], { offset: 2, more: vents })
      .replace('OA (down 1.2) > OB', 'RA > OA (down 1.2) > OB')
      .replace('SF (to -1.6)', 'RB > SF (to -1.6)')
      .replace('node RA from OA up 0.3', 'node RA from S4 down 0.9')
      .replace('OA (down 1.2)', 'OA (down 0.3)');
    const run = runSketch(text);
    expect([run.role('RA-RA1'), run.role('RB-RB1'), missing(run)]).toEqual([
      'offset-relief-vent',
      'offset-relief-vent',
      ['vent-stack-missing'],
    ]);
  });

  test.each([
    {
      upper: times(6, '').map(() => [...times(2, shower6), 'clinical-sink, trap 3 in']),
      offset: 2,
      why: '102 due, 96 not',
    },
  ])('limits: $why', ({ upper, offset }) => {
    expect(missing(stepped(upper, offset))).toContain('offset-relief-vent-missing'); // 6 x 17 = 102
    const sixteen = times(6, '').map(() => [...times(2, shower6), closet]); // 6 x 16 = 96
    expect(missing(stepped(sixteen, offset))).not.toContain('offset-relief-vent-missing');
    expect(missing(stepped(upper, 1.5))).not.toContain('offset-relief-vent-missing'); // not above 1.5 m
    const two = times(2, '').map(() => times(9, shower6)); // 108 from two storeys
    expect(missing(stepped(two, offset))).not.toContain('offset-relief-vent-missing');
    const three = times(3, '').map(() => times(6, shower6)); // 108 from three storeys
    expect(missing(stepped(three, offset))).toContain('offset-relief-vent-missing');
    expect(missing(stepped(upper, 1.6))).toContain('offset-relief-vent-missing');
    // 4 x 17 + 2 x 16 = 100, the limit itself; 5 x 17 + 16 = 101.
    const some = (more: number) => [...upper.slice(0, more), ...sixteen.slice(more)];
    expect(missing(stepped(some(4), offset))).not.toContain('offset-relief-vent-missing');
    expect(missing(stepped(some(5), offset))).toContain('offset-relief-vent-missing');
  });
});
