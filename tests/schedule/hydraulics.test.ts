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
    // By Darcy and Weisbach, iterated: 2.07 l/s at 0.87 m/s; Manning reaches 0.6 m/s at 0.243 of the bore, 19 mm.
    expect(hydraulics).toMatchObject({ otherLaw: { flow: 2.07, speed: 0.87 }, cleansFrom: 0.24 });
    expect(story(it, 'J4-K')).toContain(
      'For information, not for its size: half full, a bore of 77.9 mm at 2.08 % (1:48) carries 2.08 l/s at 0.87 m/s by Manning (n 0.012), 2.07 l/s at 0.87 m/s by Colebrook-White (roughness 1 mm). It cleans itself, which takes 0.6 m/s, from 24 % full, 19 mm deep.',
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
    // Manning, n 0.012: 2.51 l/s at 0.69 m/s. By iteration 0.6 m/s at 0.374 of the bore; 2 l/s at 0.44 and 0.65 m/s.
    expect(hydraulics).toMatchObject({
      otherLaw: { law: 'Manning, n 0.012', flow: 2.51, speed: 0.69 },
      cleansFrom: 0.37,
      atFlow: { flow: 2, fill: 0.44, speed: 0.65, cleansItself: true },
    });
    expect(story(it, 'SF-OUT')).toContain('At its 2 l/s it runs 44 % full, 42 mm deep, at 0.65 m/s: it cleans itself.');
  });

  test('a flat drain does not clean itself, and that is said', () => {
    const it = runSketch(europeanTower([{ west: ['lavatory'] }, { west: ['lavatory'] }], { slope: '1:200' }), {
      code: 'en12056-2000',
      answers: { settings: { entries: 'square' } },
    });
    // 0.555 m/s at 0.81 of the bore is the most that 1:200 gives it.
    expect(it.pipe('SF-OUT').hydraulics).toMatchObject({ cleansFrom: null, atFlow: { cleansItself: false } });
    expect(story(it, 'SF-OUT')).toContain('It is too slow at every depth to clean itself, which takes 0.6 m/s.');
    expect(story(it, 'SF-OUT')).toContain('too slow to clean itself.');
  });
});

describe('stacks', () => {
  test('HY-C32, C33 a 4 in stack 7/24 full: 9.07 l/s at 3.83 m/s, 2.505 m below the entry', () => {
    const storey = [...times(3, 'shower, heads 6, trap 3 in'), 'mop-sink, trap 2 in'];
    const it = runSketch(tower([storey, storey, storey]));
    expect(it.size('S1-SF')).toBe('4 in');
    expect(it.pipe('S1-SF').hydraulics).toMatchObject({ kind: 'stack', flow: 9.07, speed: 3.83, terminalLength: 2.5 });
    expect(story(it, 'S1-SF')).toContain(
      '7/24 full, a stack of 101.6 mm bore carries 9.07 l/s, which fall at 3.83 m/s from 2.5 m below the entry on (Wyly and Eaton).',
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
