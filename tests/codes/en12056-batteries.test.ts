import { describe, expect, test } from 'vitest';
import type { Settings } from '../../src/model/answers.ts';
import { circuitVentedRow, wetVentedRow } from '../support/rows.ts';
import { runSketch, type SketchRun } from '../support/run-sketch.ts';

// The battery of six wall urinals and two lavatories, drawn wet vented and circuit vented, under EN 12056-2. The standard
// knows neither reading: fixtures that share a vent stand on a ventilated branch (6.4.2). Urinal with cistern 0.8, basin
// 0.5 (Table 2, system I): six and two 5.8; K 0.7 for a school: 0.7 sqrt 5.8 = 1.686 l/s.
const urinals = Array.from({ length: 6 }, () => 'urinal, wall, tank, trap 2 in');
const run = (text: string, settings: Settings = {}): SketchRun =>
  runSketch(text, { code: 'en12056-2000', answers: { settings: { K: 0.7, ...settings } } });

describe('six wall urinals and two lavatories, drawn wet vented', () => {
  const it = run(wetVentedRow(urinals));

  test('one battery, read as a ventilated branch, and why', () => {
    expect(it.result.batteries).toHaveLength(1);
    expect(it.result.batteries[0]).toMatchObject({
      reading: 'ventilated-branch',
      why: 'the code knows no other: it has neither wet vents nor circuit vents',
      others: [],
      broken: [],
    });
    expect(it.fixture('F6').ventedBy.how).toBe('ventilated-branch');
  });

  test('1.686 l/s: branch DN 70 (Table 7: 2.25), vent DN 50, roles by their shared names', () => {
    const last = it.pipe('J6-K');
    const [step] = last.trail.filter(({ rule }) => rule === 'EN-R13');
    expect([last.load.most, Number(step?.facts.flowLps).toFixed(3), step?.asks?.label]).toEqual([
      5.8,
      '1.686',
      'DN 70',
    ]);
    expect([it.role('J5-J6'), it.role('LJ-VT'), it.size('LJ-VT')]).toEqual(['branch', 'branch-vent', 'DN 50']);
  });

  test('in system II the branch is DN 50 and the vent DN 30', () => {
    // Urinal 0.5, basin 0.3: 3.6; 0.7 sqrt 3.6 = 1.328: row 1.5, DN 50/30.
    const two = run(wetVentedRow(urinals), { system: 'II' });
    expect(two.pipe('J6-K').trail.find(({ rule }) => rule === 'EN-R13')?.asks?.label).toBe('DN 50');
    expect(two.size('LJ-VT')).toBe('DN 30');
  });

  test('no wet vent and no circuit vent is named anywhere', () => {
    const roles = it.result.pipes.flatMap(({ role, also }) => [role, ...also]);
    expect(roles.filter((role) => /wet-vent|circuit/.test(role))).toEqual([]);
    expect(it.findings('wet-vent-not-allowed')).toEqual([]);
  });
});

describe('the same, drawn circuit vented', () => {
  const it = run(circuitVentedRow(urinals, { lavatories: true }));

  test('a ventilated branch; the relief vent is one more vent of it, sized by what breathes through it', () => {
    expect(it.result.batteries[0]?.reading).toBe('ventilated-branch');
    const vents = it.result.pipes.filter(({ role, trail }) => /vent/.test(role) && trail.length > 0);
    expect(vents.length).toBeGreaterThan(0);
    expect(
      it.result.pipes.flatMap(({ role, also }) => [role, ...also]).filter((role) => /relief|circuit/.test(role)),
    ).toEqual([]);
  });

  test('its drain asks for the same as when drawn wet vented', () => {
    expect(it.pipe('RV-K').trail.find(({ rule }) => rule === 'EN-R13')?.asks?.label).toBe('DN 70');
  });
});
