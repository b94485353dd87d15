import { expect, test } from 'vitest';
import { pageData } from '../../src/deliver/page-data.ts';
import { buildingOf } from '../../src/page/building.ts';
import { sampleOutcome } from '../support/sample-outcomes.ts';
import { samples } from '../support/samples.ts';

// The page's file leaves the lists of ids out; what the page finds again from its paths must be what the result said.
test.each(samples)('$name: whose water and whose air, found again from the paths', ({ name }) => {
  const { outcome, result } = sampleOutcome(name);
  const source = { ...outcome, paths: { ...outcome.paths, traps: outcome.shown.roles.air } };
  const building = buildingOf(pageData(result, source));
  const ids = (fixtures: readonly number[]): string[] => fixtures.map((row) => result.fixtures[row]!.globalId).sort();
  expect(building.result.pipes).toHaveLength(result.pipes.length);
  for (const [row, pipe] of result.pipes.entries()) {
    expect([pipe.name, 'water', ids(building.servesWater(row))]).toEqual([
      pipe.name,
      'water',
      [...(pipe.servesWater ?? [])].sort(),
    ]);
    expect([pipe.name, 'air', ids(building.servesAir(row))]).toEqual([
      pipe.name,
      'air',
      [...(pipe.servesAir ?? [])].sort(),
    ]);
  }
  for (const [row, fixture] of result.fixtures.entries()) {
    const walked = building.water(row).flatMap((section) => building.pipe(section)?.globalId ?? []);
    expect(walked.filter((id, at) => id !== walked[at - 1])).toEqual(fixture.waterPath);
  }
});
