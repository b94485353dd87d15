import { describe, expect, test } from 'vitest';
import { explain } from '../../src/schedule/explain.ts';
import { findInResult } from '../../src/schedule/find-in-result.ts';
import { europeanTower } from '../support/european.ts';
import { times, ventedRow } from '../support/rows.ts';
import { runSketch, type SketchRun } from '../support/run-sketch.ts';
import { faults } from '../support/schemas.ts';
import { tower } from '../support/towers.ts';

// Physics beside a code's size. Values: check cases HY-C08, HY-C11, HY-C32 and HY-C33 (see tests/hydraulics).
const story = ({ result }: SketchRun, name: string): string =>
  explain(result, findInResult(result, name), []).story.join(' ');

describe('level drains', () => {
  test('HY-C08 3 in schedule 40 at 1:48, Manning n 0.012: 2.07 l/s at 0.87 m/s half full, which cleans itself', () => {
    // Three sinks and a closet want 3 in.
    const it = runSketch(
      ventedRow([...times(3, 'kitchen-sink, trap 1 1/2 in'), 'closet, tank']).replaceAll('fall 1:50', 'fall 1:48'),
    );
    const { hydraulics } = it.pipe('J4-K');
    expect(it.size('J4-K')).toBe('3 in');
    expect(hydraulics).toMatchObject({
      kind: 'level',
      law: 'Manning, n 0.012',
      halfFull: { speed: 0.87, cleansItself: true },
    });
    expect(hydraulics?.kind === 'level' && hydraulics.halfFull.flow).toBeCloseTo(2.08, 2);
    expect(hydraulics).not.toHaveProperty('atFlow');
    expect(story(it, 'J4-K')).toContain(
      'For information, not for its size: half full, a bore of 77.9 mm at 2.08 % (1:48) carries 2.08 l/s at 0.87 m/s (Manning, n 0.012); it cleans itself, which takes 0.6 m/s.',
    );
  });

  test('HY-C11 DN 100 at 1 % by Colebrook-White: 2.50 l/s at 0.69 m/s, and how full its own flow runs', () => {
    const it = runSketch(europeanTower([{ west: ['closet'] }, { west: ['closet'] }]), { code: 'en12056-2000' });
    const { hydraulics } = it.pipe('SF-OUT');
    expect(hydraulics).toMatchObject({
      bore: 0.096,
      law: 'Colebrook-White, roughness 1 mm',
      halfFull: { flow: 2.5, speed: 0.69 },
    });
    expect(hydraulics).toMatchObject({ atFlow: { flow: 2, cleansItself: true } });
    const fill = hydraulics?.kind === 'level' ? (hydraulics.atFlow?.fill ?? 0) : 0;
    expect([fill < 0.5, fill > 0.4]).toEqual([true, true]);
  });

  test('a flat drain does not clean itself, and that is said', () => {
    const it = runSketch(europeanTower([{ west: ['lavatory'] }, { west: ['lavatory'] }], { slope: '1:200' }), {
      code: 'en12056-2000',
      answers: { settings: { entries: 'square' } },
    });
    expect(story(it, 'SF-OUT')).toContain('less than the 0.6 m/s at which a drain cleans itself');
  });
});

describe('stacks', () => {
  test('HY-C32, C33 a 4 in stack 7/24 full: 9.07 l/s at 3.83 m/s, 2.505 m below the entry', () => {
    const storey = [...times(3, 'shower, heads 6, trap 3 in'), 'mop-sink, trap 2 in'];
    const it = runSketch(tower([storey, storey, storey]));
    expect(it.size('S1-SF')).toBe('4 in');
    expect(it.pipe('S1-SF').hydraulics).toMatchObject({ kind: 'stack', flow: 9.07, speed: 3.83, terminalLength: 2.5 });
    expect(story(it, 'S1-SF')).toContain(
      '7/24 full it carries 9.07 l/s, which falls at 3.83 m/s from 2.5 m below the entry on (Wyly and Eaton)',
    );
  });

  test('HY-C42 under EN 12056-2 4.0 l/s fill 20 % of a bore of 96 mm', () => {
    // Thirty-two closets: sum 64; 0.5 sqrt 64 is 4.0 l/s.
    const it = runSketch(europeanTower(times(8, '').map(() => ({ west: times(4, 'closet') }))), {
      code: 'en12056-2000',
      answers: { settings: { entries: 'square' } },
    });
    expect(it.pipe('S1-SF').load.most).toBe(64);
    expect([it.size('S1-SF'), it.pipe('S1-SF').hydraulics]).toMatchObject([
      'DN 100',
      { kind: 'stack', bore: 0.096, share: 0.2 },
    ]);
  });
});

test('vents have none, no size changes by it, and the schema holds', () => {
  const it = runSketch(europeanTower([{ west: ['closet'] }, { west: ['closet'] }]), { code: 'en12056-2000' });
  expect(it.pipe('S2-VT')).not.toHaveProperty('hydraulics');
  expect(it.result.pipes.flatMap(({ trail }) => trail).some(({ rule }) => /physics|hydraulics/i.test(rule))).toBe(
    false,
  );
  expect(faults('result', it.result)).toEqual([]);
});
