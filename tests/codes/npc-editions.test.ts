import { describe, expect, test } from 'vitest';
import { circuitVentedRow, times, wetVentedRow } from '../support/rows.ts';
import { runSketch } from '../support/run-sketch.ts';
import { tower } from '../support/towers.ts';

// The editions of 2005 to 2020 print the same limits as far as is known (RULES §6): the same sizes, by other evidence.
const stall = 'urinal, stall, trap 2 in';
const closet = 'closet, tank';
const editions = ['npc-2005', 'npc-2010', 'npc-2015', 'npc-2020'];

describe.each(editions)('%s', (code) => {
  test('seven stall urinals and two lavatories: 4 in wet vented, 3 in circuit vented', () => {
    const wet = runSketch(wetVentedRow(times(7, stall)), { code });
    const circuit = runSketch(circuitVentedRow(times(7, stall), { lavatories: true }), { code });
    expect([wet.size('LJ-LF'), circuit.size('J6-J7'), circuit.size('LJ-CV')]).toEqual(['4 in', '3 in', '1½ in']);
    expect([wet.result.code.id, wet.result.code.edition]).toEqual([code, code.slice(4)]);
  });

  test('a stack with its vents has a size, a clause and a word on its trust for every pipe', () => {
    const run = runSketch(
      tower(
        times(5, '').map(() => [closet]),
        { ventStack: true },
      ),
      { code },
    );
    for (const { name, role, required, trail } of run.result.pipes) {
      if (role === 'idle') continue;
      expect([name, required?.most ?? null]).not.toEqual([name, null]);
      for (const { clause, trust } of trail) {
        expect(clause, name!).toMatch(/^(2\.|Division A|Table 2\.)/);
        expect(['published', 'cross-checked', 'memory'], name!).toContain(trust);
      }
    }
    expect(run.result.pipes.length).toBeGreaterThan(20);
  });
});

test('the stack vent table has no evidence for 2005: its trust there is no better than memory', () => {
  const trust = (code: string) =>
    runSketch(
      tower(
        times(5, '').map(() => [closet]),
        { ventStack: true },
      ),
      { code },
    )
      .pipe('S5-VH')
      .trail.find(({ rule }) => rule === 'NPC-R77')?.trust;
  expect([trust('npc-2020'), trust('npc-2005')]).toEqual(['cross-checked', 'memory']);
});
